package nightlag.stages.sweep;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.moduli.Figure;
import nightlag.stages.numeric.SmoothCurve;
import nightlag.stages.sweep.FigureCurve.Place;
import nightlag.stages.sweep.Zeros.Zero;

/**
 * A figure about a value it reaches, as a smooth curve over ln f or T, and the figure reported there as another one. What the
 * curve may do between the places is in the u of all that is read off it.
 */
final class LocalFigure {
    /** Places taken beside those between which the value is reached, on either side. */
    private static final int BESIDE = 20;
    /** Where there are more than these, neighbours are averaged. */
    private static final int MOST = 100;
    /** Two are a straight line. */
    private static final int FEWEST = 3;
    /** Of fifth degree from so many on. */
    private static final int FEWEST_FOR_PARABOLA = 5;

    private static final double STANDS_OUT = 3;
    private static final double MOST_DOUBT = 3;
    private static final int STEPS = 4;
    private static final int HALVINGS = 50;

    private final DrawnFigure drawn;
    private final FigureNoise.Source source;
    private final boolean logReport;
    private final FigureSeries series;
    private final SmoothCurve figure;
    private final double doubt;

    private LocalFigure(DrawnFigure drawn, FigureNoise.Source source, boolean logReport, FigureSeries series) {
        this.drawn = drawn;
        this.source = source;
        this.logReport = logReport;
        this.series = series;
        this.doubt = hasLeast() ? 1 : doubt(series.count());
        // a curve over frequency may wave as single modes make it, even where noise or sparse frequencies hide it
        this.figure = series.figure(least(drawn.log() ? 1 : series.size()));
    }

    /**
     * The curve about places.
     *
     * @param places of one curve, rising
     * @param first the first of those between which the value is reached
     * @param last the last of them
     * @param step the value is passed between this one and the next
     * @return empty where places are too few
     */
    static Optional<LocalFigure> of(List<Place> places, FigureMarkerPlan plan, int first, int last, int step) {
        DrawnFigure drawn = new DrawnFigure(plan);
        boolean logReport = drawn.hasLogReport(places.get(step)) && drawn.hasLogReport(places.get(step + 1));
        List<Place> about = IntStream.rangeClosed(
                        Math.max(0, first - BESIDE), Math.min(places.size() - 1, last + BESIDE))
                .filter(i -> hasReport(places.get(i), drawn, logReport)
                        && (!drawn.log() || hasLogarithm(places.get(i), first <= i && i <= last)))
                .mapToObj(places::get)
                .toList();
        if (about.size() < FEWEST) {
            return Optional.empty();
        }
        FigureNoise noise = FigureNoise.of(drawn, logReport, places, about);
        FigureSeries series = FigureSeries.of(about, drawn, logReport, noise);
        return Optional.of(new LocalFigure(drawn, noise.source(), logReport, series.atMost(MOST)));
    }

    private static boolean hasReport(Place place, DrawnFigure drawn, boolean log) {
        Optional<Figure> report = drawn.plan().report();
        return report.isEmpty()
                || (log ? drawn.hasLogReport(place) : place.mean(report.get()).isPresent());
    }

    /** Noise about zero has no logarithm; a value so near to it that is looked for is to be found all the same. */
    private static boolean hasLogarithm(Place place, boolean needed) {
        double u = Math.sqrt(place.variance(1, Optional.empty(), 0).orElse(0));
        return place.mean() > (needed ? 0 : STANDS_OUT * u);
    }

    /** What is known beforehand: over frequency a curve may wave as single modes make it. */
    private double least(double size) {
        return hasLeast() ? LogModuli.leastStrength(series.x()) * size * size : 0;
    }

    private boolean hasLeast() {
        return drawn.overFrequency() && series.count() >= FEWEST_FOR_PARABOLA;
    }

    /**
     * By how much larger the variance is of what the curve may do, where only the places tell how much it does: that of Student's t with
     * as many degrees of freedom as there are places beyond those that fix the polynomial, ν/(ν − 2), and no more than 3.
     */
    private static double doubt(int places) {
        double freedom = places - (places < FEWEST_FOR_PARABOLA ? 2.0 : 3.0);
        return freedom > MOST_DOUBT ? freedom / (freedom - 2) : MOST_DOUBT;
    }

    /**
     * Where the curve reaches the value.
     *
     * @param line the straight line between the two places, for want of a place on the curve
     * @param from the place, as drawn, from which on it is looked for
     * @param to the place up to which
     */
    Reached reached(StraightLine line, double from, double to) {
        Zero zero = zero(line, series.between(from, to));
        double slope = figure.derivative(zero.place(), 1);
        double place = drawn.fromPlace(zero.place());
        if (drawn.plan().report().isEmpty()) {
            return new Reached(
                    place, place, u(zero.u() * (drawn.overFrequency() ? place : 1)), "by a smooth curve", source);
        }
        SmoothCurve report = series.report(least(logReport ? 1 : series.reportSize()));
        double value = DrawnFigure.unscaled(report.derivative(zero.place(), 0), logReport);
        double u = Crossing.u(
                estimate(report, zero.place()).u(),
                report.derivative(zero.place(), 1),
                zero.u(),
                slope,
                shared(report, zero.place()));
        return new Reached(place, value + drawn.offset(), u(u * (logReport ? value : 1)), "by a smooth curve", source);
    }

    /** Whether the curve is away from the value by more than noise at one of the places, Hz or K; also where there is no u. */
    boolean standsOut(double place) {
        double[] x = series.x();
        double at = Math.min(Math.max(drawn.place(place), x[0]), x[x.length - 1]);
        SmoothCurve.Estimate there = estimate(figure, at);
        return !series.known() || Math.abs(there.value()) > STANDS_OUT * there.u();
    }

    /** Whether the curve does not reach the value from one place, as drawn, to another; never where noise is not known. */
    boolean staysAway(double from, double to) {
        return series.known() && zeros(series.between(from, to)).length == 0;
    }

    private OptionalDouble u(double u) {
        return series.known() ? OptionalDouble.of(u) : OptionalDouble.empty();
    }

    /** The value of a curve with its u, as {@link SmoothCurve#estimate} has it, but for few places. */
    private SmoothCurve.Estimate estimate(SmoothCurve curve, double place) {
        SmoothCurve.Local there = curve.at(place, 0);
        double noise = there.noise()[0][0];
        double besides = doubt * Math.max(there.full()[0][0] - noise, 0);
        return new SmoothCurve.Estimate(there.derivatives()[0], Math.sqrt(Math.max(noise + besides / 4, besides)));
    }

    private Zero zero(StraightLine line, double[] looked) {
        Zeros clear = Zeros.of(at -> estimate(figure, at), looked);
        if (clear.zeros().size() == 1) {
            return clear.zeros().get(0);
        }
        double[] zeros = zeros(looked);
        double place = zeros.length == 0 ? line.place() : zeros[zeros.length / 2];
        double slope = zeros.length == 1 ? figure.derivative(place, 1) : line.slope();
        SmoothCurve.Estimate there = estimate(figure, place);
        double spread = zeros.length > 1 ? (zeros[zeros.length - 1] - zeros[0]) / 2 : 0;
        double u = Math.hypot(Math.hypot(there.u(), there.value()) / slope, spread);
        return new Zero(place, Math.min(u, looked[looked.length - 1] - looked[0]), slope > 0);
    }

    private double[] zeros(double[] looked) {
        return IntStream.range(0, (looked.length - 1) * STEPS)
                .mapToObj(i -> new double[] {grid(looked, i), grid(looked, i + 1)})
                .filter(ends -> figure.derivative(ends[0], 0) < 0 != figure.derivative(ends[1], 0) < 0)
                .mapToDouble(ends -> halved(ends[0], ends[1]))
                .toArray();
    }

    private static double grid(double[] places, int i) {
        int k = i / STEPS;
        double part = (double) (i % STEPS) / STEPS;
        return part == 0 ? places[k] : places[k] + part * (places[k + 1] - places[k]);
    }

    private double halved(double low, double high) {
        boolean negative = figure.derivative(low, 0) < 0;
        double below = low;
        double above = high;
        for (int i = 0; i < HALVINGS; i++) {
            double half = (below + above) / 2;
            if (figure.derivative(half, 0) < 0 == negative) {
                below = half;
            } else {
                above = half;
            }
        }
        return (below + above) / 2;
    }

    /** The covariance of what noise does to both curves at a place. */
    private double shared(SmoothCurve report, double place) {
        double[] first = figure.weights(place, 0);
        double[] second = report.weights(place, 0);
        double sum = 0;
        for (int i = 0; i < first.length; i++) {
            sum += first[i] * second[i] * series.shared()[i];
        }
        return sum * Math.sqrt(figure.widening() * report.widening());
    }
}
