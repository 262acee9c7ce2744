package nightlag.stages.sweep;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.moduli.Figure;
import nightlag.stages.sweep.FigureCurve.Place;

/**
 * Where a figure reaches a value on the straight line between two places, for want of a curve: two places are all there are,
 * or noise hides how the figure runs between them.
 *
 * <p>A line errs by p (1 − p) y'' h²/2 at the part p of an interval h. How much a figure bends two places do not tell; u takes
 * its slopes at both ends to differ by no more than their mean, with all differences up to that alike likely.
 */
final class StraightLine {
    private final DrawnFigure drawn;
    private final Place from;
    private final Place to;
    private final boolean logReport;
    private final FigureNoise noise;

    /**
     * The line.
     *
     * @param whole all places of the curve
     * @param step the line is between this one and the next; both have the figure reported
     */
    StraightLine(FigureMarkerPlan plan, List<Place> whole, int step) {
        this.drawn = new DrawnFigure(plan);
        this.from = whole.get(step);
        this.to = whole.get(step + 1);
        this.logReport = drawn.hasLogReport(from) && drawn.hasLogReport(to);
        this.noise = FigureNoise.of(drawn, logReport, whole, List.of(from, to));
    }

    /** How far along the interval it is, 0 to 1. */
    private double part() {
        double rise = rise();
        return rise == 0 ? 0 : (drawn.level() - drawn.value(from.mean())) / rise;
    }

    private double rise() {
        return drawn.value(to.mean()) - drawn.value(from.mean());
    }

    private double run() {
        return drawn.place(to.at()) - drawn.place(from.at());
    }

    /** The place as it is drawn, ln f or T. */
    double place() {
        return drawn.place(from.at()) + part() * run();
    }

    /** How steeply the figure rises over the place, both as they are drawn. */
    double slope() {
        return rise() / run();
    }

    /** The marker. */
    Reached reached() {
        double part = part();
        double bend = part * (1 - part) / 2 / Math.sqrt(3);
        double place = drawn.fromPlace(place());
        Optional<Figure> report = drawn.plan().report();
        if (report.isEmpty()) {
            return reached(place, place, u(-run() / rise(), 0, 0, bend * run()), drawn.overFrequency() ? place : 1);
        }
        double first = DrawnFigure.scaled(from.mean(report.get()).orElseThrow(), logReport);
        double second = DrawnFigure.scaled(to.mean(report.get()).orElseThrow(), logReport);
        double gain = second - first;
        double value = DrawnFigure.unscaled(first + part * gain, logReport);
        // both figures may bend
        OptionalDouble u = u(-gain / rise(), 1 - part, part, Math.sqrt(2) * bend * gain);
        return reached(place, value + drawn.offset(), u, logReport ? value : 1);
    }

    private Reached reached(double place, double value, OptionalDouble u, double factor) {
        return new Reached(
                place,
                value,
                u.isPresent() ? OptionalDouble.of(u.getAsDouble() * Math.abs(factor)) : u,
                "by a straight line",
                noise.source());
    }

    private OptionalDouble u(double byFigure, double byFirst, double bySecond, double bend) {
        OptionalDouble first = noise.variance(from, (1 - part()) * byFigure, byFirst);
        OptionalDouble second = noise.variance(to, part() * byFigure, bySecond);
        if (first.isEmpty() || second.isEmpty()) {
            return OptionalDouble.empty();
        }
        double u = Math.sqrt(first.getAsDouble() + second.getAsDouble() + bend * bend);
        return u > 0 ? OptionalDouble.of(u) : OptionalDouble.empty();
    }
}
