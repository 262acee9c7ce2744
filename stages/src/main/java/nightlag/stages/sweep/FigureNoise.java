package nightlag.stages.sweep;

import java.util.List;
import java.util.OptionalDouble;
import nightlag.stages.sweep.FigureCurve.Place;

/**
 * How uncertain a figure and the one reported with it are, as they are drawn: by the points' own u, or where some of them have none
 * by the scatter about neighbouring ones.
 */
final class FigureNoise {
    private final DrawnFigure drawn;
    private final boolean logReport;
    private final List<Place> whole;
    private final Source source;

    private FigureNoise(DrawnFigure drawn, boolean logReport, List<Place> whole, Source source) {
        this.drawn = drawn;
        this.logReport = logReport;
        this.whole = whole;
        this.source = source;
    }

    /** Where an uncertainty comes from, and what a method says of it. */
    enum Source {
        POINTS(""),
        SCATTER("; u from the scatter about neighbouring points"),
        NONE("; no u, for the points bring none and are too few to tell their scatter");

        private final String words;

        Source(String words) {
            this.words = words;
        }

        String words() {
            return words;
        }
    }

    /**
     * Of some places of a curve.
     *
     * @param whole all places of the curve
     * @param some those looked at
     */
    static FigureNoise of(DrawnFigure drawn, boolean logReport, List<Place> whole, List<Place> some) {
        FigureNoise own = new FigureNoise(drawn, logReport, whole, Source.POINTS);
        if (some.stream().allMatch(own::isKnown)) {
            return own;
        }
        FigureNoise scatter = new FigureNoise(drawn, logReport, whole, Source.SCATTER);
        return some.stream().allMatch(scatter::isKnown)
                ? scatter
                : new FigureNoise(drawn, logReport, whole, Source.NONE);
    }

    private boolean isKnown(Place place) {
        return variance(place, 1, 0).isPresent()
                && (drawn.plan().report().isEmpty() || variance(place, 0, 1).isPresent());
    }

    Source source() {
        return source;
    }

    /** u² of a sum of the figure and the other one at a place, both as they are drawn; empty where there is none. */
    OptionalDouble variance(Place place, double byFigure, double byReport) {
        return switch (source) {
            case POINTS ->
                place.variance(
                        byFigure == 0 ? 0 : byFigure * drawn.perValue(place.mean()),
                        drawn.plan().report(),
                        byReport == 0 ? 0 : byReport * (logReport ? 1 / report(place) : 1));
            case SCATTER -> {
                double[][] known = whole.stream()
                        .map(at -> new double[] {drawn.place(at.at()), sum(at, byFigure, byReport)})
                        .filter(one -> Double.isFinite(one[1]))
                        .toArray(double[][]::new);
                OptionalDouble u = NeighbourScatter.at(column(known, 0), column(known, 1), drawn.place(place.at()));
                yield u.isPresent()
                        ? OptionalDouble.of(NeighbourScatter.doubt(known.length) * u.getAsDouble() * u.getAsDouble())
                        : u;
            }
            case NONE -> OptionalDouble.empty();
        };
    }

    private double sum(Place place, double byFigure, double byReport) {
        return (byFigure == 0 ? 0 : byFigure * drawn.value(place.mean()))
                + (byReport == 0 ? 0 : byReport * DrawnFigure.scaled(report(place), logReport));
    }

    private double report(Place place) {
        return drawn.plan()
                .report()
                .map(place::mean)
                .orElse(OptionalDouble.empty())
                .orElse(Double.NaN);
    }

    private static double[] column(double[][] rows, int column) {
        double[] values = new double[rows.length];
        for (int i = 0; i < values.length; i++) {
            values[i] = rows[i][column];
        }
        return values;
    }
}
