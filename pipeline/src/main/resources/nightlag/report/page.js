'use strict';

// Draws the charts of the page from the data that stands beside each lot, when they come near the window.
(() => {
  const WIDTH = 520;
  const HEIGHT = 380;
  const MARGIN = { top: 10, right: 14, bottom: 46, left: 66 };
  const LOOKS = 7;
  const SHAPES = [
    d3.symbolCircle, d3.symbolSquare, d3.symbolTriangle, d3.symbolDiamond, d3.symbolStar, d3.symbolWye, d3.symbolCross,
  ];
  const NEAR_PX = 40;
  // beyond what any instrument measures, and where differences and ratios are still numbers
  const LARGEST = 1e150;

  const colour = (look) => `var(--look-${look % LOOKS})`;
  // after all colours have been used, the next round pairs them with other shapes
  const shape = (look) => d3.symbol(SHAPES[(look + Math.floor(look / LOOKS)) % SHAPES.length], 36);
  const figures = d3.format('.4~g');
  const withUnit = (axis) => (axis.unit ? `${axis.label} (${axis.unit})` : axis.label);

  function drawable(axis, value) {
    return Math.abs(value) < LARGEST && (axis.scale !== 'LOG' || value > 1 / LARGEST);
  }

  function domain(chart, along) {
    const axis = chart[along];
    const values = chart.series.flatMap((series) => [...series[along], ...(along === 'y' ? series.high : [])])
      .filter((value) => drawable(axis, value));
    let [low, high] = d3.extent(values);
    if (axis.scale === 'LOG') {
      if (low === high) { low /= 2; high *= 2; }
      const room = (high / low) ** 0.03;
      return [low / room, high * room];
    }
    if (low === high) { low -= 1; high += 1; }
    const room = (high - low) * 0.04;
    return [low - room, high + room];
  }

  function scaleOf(axis, range, extent) {
    return (axis.scale === 'LOG' ? d3.scaleLog() : d3.scaleLinear()).domain(extent).range(range);
  }

  /** Decades where there are some, with all their minor lines; else round numbers. */
  function ticks(axis, scale) {
    if (axis.scale !== 'LOG') {
      const major = scale.ticks(6);
      return { major, minor: scale.ticks(24), label: scale.tickFormat(6, 'f') };
    }
    const [low, high] = scale.domain();
    const from = Math.ceil(Math.log10(low) - 1e-9);
    const to = Math.floor(Math.log10(high) + 1e-9);
    const decades = d3.range(from, to + 1);
    const minor = d3.range(from - 1, to + 1)
      .flatMap((decade) => d3.range(2, 10).map((digit) => digit * 10 ** decade))
      .filter((value) => value >= low && value <= high);
    if (decades.length >= 2) {
      const step = Math.ceil(decades.length / 9);
      return {
        major: decades.map((decade) => 10 ** decade),
        minor: decades.length > 14 ? [] : minor,
        label: (value) => { const decade = Math.round(Math.log10(value)); return decade % step === 0 ? power(decade) : ''; },
      };
    }
    const major = [1, 2, 3, 5].flatMap((digit) => d3.range(from - 1, to + 1).map((decade) => digit * 10 ** decade))
      .filter((value) => value >= low && value <= high);
    if (major.length > 1) {
      return { major, minor, label: short(3) };
    }
    // less than a decade: as many digits as tell the lines apart
    const fine = scale.ticks(4);
    const digits = d3.range(3, 9).find((some) => new Set(fine.map(short(some))).size === fine.length);
    return { major: fine, minor, label: short(digits ?? 9) };
  }

  const RAISED = { '-': '⁻', 0: '⁰', 1: '¹', 2: '²', 3: '³', 4: '⁴', 5: '⁵', 6: '⁶', 7: '⁷', 8: '⁸', 9: '⁹' };
  const power = (decade) => (decade >= -1 && decade <= 2
    ? String(10 ** decade)
    : `10${[...String(decade)].map((sign) => RAISED[sign]).join('')}`);

  /** Like 2·10⁷ beyond what is easily read. */
  const short = (digits) => (value) => {
    const decade = Math.floor(Math.log10(value) + 1e-9);
    const written = d3.format(`.${digits}~g`);
    return decade >= -2 && decade <= 3 ? written(value) : `${written(value / 10 ** decade)}·${power(decade)}`;
  };

  class Plot {
    constructor(chart, figure, number) {
      this.chart = chart;
      this.spots = chart.series.flatMap((series, s) => series.x.map((x, i) => ({
        x, y: series.y[i], low: series.low[i], high: series.high[i], s,
      })))
        .filter((spot) => drawable(chart.x, spot.x) && drawable(chart.y, spot.y));
      this.picked = -1;
      const id = `chart-${number}`;
      d3.select(figure).append('h3').text(chart.title);
      this.svg = d3.select(figure).append('svg')
        .attr('viewBox', `0 0 ${WIDTH} ${HEIGHT}`)
        .attr('role', 'img')
        .attr('tabindex', 0)
        .attr('aria-labelledby', `${id}-title ${id}-desc`);
      this.svg.append('title').attr('id', `${id}-title`).text(chart.title);
      this.svg.append('desc').attr('id', `${id}-desc`).text(
        `${chart.caption} ${withUnit(chart.y)} over ${withUnit(chart.x)}. Arrow keys go from point to point.`);
      const inner = this.svg.append('clipPath').attr('id', `${id}-clip`).append('rect');
      this.place(inner);
      this.grid = this.svg.append('g');
      this.marks = this.svg.append('g').attr('clip-path', `url(#${id}-clip)`);
      this.place(this.svg.append('rect').attr('class', 'frame'));
      this.brush = d3.brush()
        .extent([[MARGIN.left, MARGIN.top], [WIDTH - MARGIN.right, HEIGHT - MARGIN.bottom]])
        .on('end', (event) => this.zoomTo(event));
      this.brushing = this.svg.append('g').call(this.brush);
      this.pick = this.svg.append('circle').attr('class', 'pick').attr('r', 7).attr('visibility', 'hidden');
      this.svg
        .on('pointermove', (event) => this.hover(d3.pointer(event, this.svg.node())))
        .on('pointerleave', () => this.show(-1))
        .on('keydown', (event) => this.key(event));
      this.readOff = d3.select(figure).append('div').attr('class', 'read-off').attr('aria-live', 'polite');
      this.legend(figure);
      d3.select(figure).append('figcaption').text(chart.caption);
      const tools = d3.select(figure).append('div').attr('class', 'tools');
      this.back = tools.append('button').attr('type', 'button').attr('hidden', '').text('Whole chart')
        .on('click', () => this.whole());
      this.values(figure);
      this.whole();
    }

    place(rect) {
      rect.attr('x', MARGIN.left).attr('y', MARGIN.top)
        .attr('width', WIDTH - MARGIN.left - MARGIN.right).attr('height', HEIGHT - MARGIN.top - MARGIN.bottom);
    }

    whole() {
      this.draw(domain(this.chart, 'x'), domain(this.chart, 'y'));
      this.back.attr('hidden', '');
    }

    zoomTo(event) {
      if (!event.selection) {
        return;
      }
      const [[left, top], [right, bottom]] = event.selection;
      this.brushing.call(this.brush.clear);
      if (right - left < 8 || bottom - top < 8) {
        return;
      }
      this.draw([this.x.invert(left), this.x.invert(right)], [this.y.invert(bottom), this.y.invert(top)]);
      this.back.attr('hidden', null);
    }

    draw(across, up) {
      this.x = scaleOf(this.chart.x, [MARGIN.left, WIDTH - MARGIN.right], across);
      this.y = scaleOf(this.chart.y, [HEIGHT - MARGIN.bottom, MARGIN.top], up);
      this.drawGrid();
      this.marks.selectAll('*').remove();
      this.chart.series.forEach((series, s) => this.drawSeries(series, s));
      this.show(-1);
    }

    drawGrid() {
      const bottom = HEIGHT - MARGIN.bottom;
      const right = WIDTH - MARGIN.right;
      this.grid.selectAll('*').remove();
      const across = ticks(this.chart.x, this.x);
      const up = ticks(this.chart.y, this.y);
      const lines = (kind, xs, ys) => {
        const group = this.grid.append('g').attr('class', kind);
        xs.forEach((value) => group.append('line')
          .attr('x1', this.x(value)).attr('x2', this.x(value)).attr('y1', MARGIN.top).attr('y2', bottom));
        ys.forEach((value) => group.append('line')
          .attr('y1', this.y(value)).attr('y2', this.y(value)).attr('x1', MARGIN.left).attr('x2', right));
      };
      lines('minor', across.minor, up.minor);
      lines('major', across.major, up.major);
      across.major.forEach((value) => this.grid.append('text')
        .attr('x', this.x(value)).attr('y', bottom + 16).attr('text-anchor', 'middle').text(across.label(value)));
      up.major.forEach((value) => this.grid.append('text')
        .attr('x', MARGIN.left - 6).attr('y', this.y(value) + 4).attr('text-anchor', 'end').text(up.label(value)));
      this.grid.append('text').attr('x', (MARGIN.left + right) / 2).attr('y', HEIGHT - 8)
        .attr('text-anchor', 'middle').text(withUnit(this.chart.x));
      this.grid.append('text').attr('transform', `translate(14 ${(MARGIN.top + bottom) / 2}) rotate(-90)`)
        .attr('text-anchor', 'middle').text(withUnit(this.chart.y));
    }

    drawSeries(series, s) {
      const group = this.marks.append('g').attr('stroke', colour(series.look)).attr('fill', series.filled ? colour(series.look) : 'var(--paper)');
      const spots = this.spots.filter((spot) => spot.s === s);
      if (series.low.length > 0) {
        // an end that a logarithmic axis does not have lies on its edge
        const level = (value) => this.y(drawable(this.chart.y, value) ? value : this.y.domain()[0]);
        group.append('path').attr('class', 'band').attr('fill', colour(series.look)).attr('stroke', 'none')
          .attr('d', d3.area((spot) => this.x(spot.x), (spot) => level(spot.low), (spot) => level(spot.high))(spots));
      }
      if (series.joined) {
        group.append('path').attr('fill', 'none').attr('stroke-width', 1.5)
          .attr('d', d3.line((spot) => this.x(spot.x), (spot) => this.y(spot.y))(spots));
        return;
      }
      const outline = shape(series.look)();
      spots.forEach((spot) => group.append('path').attr('d', outline)
        .attr('transform', `translate(${this.x(spot.x).toFixed(1)} ${this.y(spot.y).toFixed(1)})`));
    }

    legend(figure) {
      const first = (series, s) => this.chart.series.findIndex((other) => other.name === series.name) === s;
      const items = d3.select(figure).append('ul').attr('class', 'legend').selectAll('li')
        .data(this.chart.series.filter(first)).join('li');
      const key = items.append('svg').attr('viewBox', '-7 -7 14 14').attr('aria-hidden', 'true').append('path')
        .attr('stroke', (series) => colour(series.look))
        .attr('fill', (series) => (series.filled ? colour(series.look) : 'none'));
      key.attr('d', (series) => (series.joined ? 'M-7 0H7' : shape(series.look)()));
      items.append('span').text((series) => series.name);
    }

    /** All values as a table, made when it is opened. */
    values(figure) {
      const details = d3.select(figure).append('details').attr('class', 'values');
      details.append('summary').text('Values');
      details.on('toggle', () => {
        if (!details.select('table').empty()) {
          return;
        }
        const table = details.append('div').attr('class', 'wide').append('table');
        const banded = this.chart.series.some((series) => series.low.length > 0);
        table.append('thead').append('tr').selectAll('th')
          .data(['series', withUnit(this.chart.x), withUnit(this.chart.y), ...(banded ? ['low', 'high'] : [])])
          .join('th').attr('scope', 'col').text(String);
        const rows = table.append('tbody').selectAll('tr').data(this.spots).join('tr');
        rows.append('td').text((spot) => this.chart.series[spot.s].name);
        rows.append('td').attr('class', 'number').text((spot) => figures(spot.x));
        rows.append('td').attr('class', 'number').text((spot) => figures(spot.y));
        if (banded) {
          const end = (value) => (value === undefined ? '' : figures(value));
          rows.append('td').attr('class', 'number').text((spot) => end(spot.low));
          rows.append('td').attr('class', 'number').text((spot) => end(spot.high));
        }
      });
    }

    hover([left, top]) {
      const near = d3.least(d3.range(this.spots.length),
        (i) => Math.hypot(this.x(this.spots[i].x) - left, this.y(this.spots[i].y) - top));
      const spot = this.spots[near];
      const close = spot && Math.hypot(this.x(spot.x) - left, this.y(spot.y) - top) < NEAR_PX;
      this.show(close ? near : -1);
    }

    key(event) {
      const step = { ArrowRight: 1, ArrowDown: 1, ArrowLeft: -1, ArrowUp: -1 }[event.key];
      if (step) {
        event.preventDefault();
        const count = this.spots.length;
        this.show(this.picked < 0 ? (step > 0 ? 0 : count - 1) : (this.picked + step + count) % count);
      } else if (event.key === 'Escape') {
        this.whole();
      }
    }

    show(index) {
      this.picked = index;
      const spot = this.spots[index];
      this.pick.attr('visibility', spot ? 'visible' : 'hidden');
      if (!spot) {
        this.readOff.text('');
        return;
      }
      this.pick.attr('cx', this.x(spot.x)).attr('cy', this.y(spot.y));
      const unit = (axis) => (axis.unit ? ` ${axis.unit}` : '');
      const band = spot.low === undefined ? '' : ` (${figures(spot.low)} to ${figures(spot.high)})`;
      this.readOff.text(`${this.chart.series[spot.s].name}: ${figures(spot.y)}${unit(this.chart.y)}${band} at ${figures(spot.x)}${unit(this.chart.x)}`);
    }
  }

  let drawn = 0;
  function drawLot(lot) {
    const charts = JSON.parse(lot.querySelector('.charts-data').textContent);
    const place = lot.querySelector('.charts');
    charts.forEach((chart) => {
      const figure = document.createElement('figure');
      place.append(figure);
      drawn += 1;
      new Plot(chart, figure, drawn);
    });
  }

  const lots = [...document.querySelectorAll('.lot')];
  const waiting = new Set(lots);
  const drawOnce = (lot) => { if (waiting.delete(lot)) { drawLot(lot); } };
  const seen = new IntersectionObserver((entries) => entries.filter((entry) => entry.isIntersecting).forEach((entry) => {
    seen.unobserve(entry.target);
    drawOnce(entry.target);
  }), { rootMargin: '100% 0%' });
  lots.forEach((lot) => seen.observe(lot));
  window.addEventListener('beforeprint', () => lots.forEach(drawOnce));

  const seek = document.getElementById('seek');
  if (seek) {
    seek.addEventListener('input', () => {
      const wanted = seek.value.trim().toLowerCase();
      document.querySelectorAll('[data-name]').forEach((item) => {
        item.hidden = !item.dataset.name.toLowerCase().includes(wanted);
      });
    });
  }
})();
