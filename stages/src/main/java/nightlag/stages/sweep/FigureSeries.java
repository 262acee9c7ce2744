package nightlag.stages.sweep;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import nightlag.stages.moduli.Figure;
import nightlag.stages.numeric.SmoothCurve;
import nightlag.stages.sweep.FigureCurve.Place;

/**
 * A figure at some places, less the value it is to reach, and the figure reported there, both as they are drawn.
 *
 * @param known whether uncertainties are in the variances
 * @param x the places, strictly rising
 * @param figure the figure less the value
 * @param report the other one; zero where none is
 * @param figureVariance u² of the one
 * @param reportVariance u² of the other
 * @param shared their covariance
 * @param size mean size of the figure itself
 * @param reportSize mean size of the other itself
 */
record FigureSeries(
        boolean known,
        double[] x,
        double[] figure,
        double[] report,
        double[] figureVariance,
        double[] reportVariance,
        double[] shared,
        double size,
        double reportSize) {
    /** No figure is taken to be known better, as a part of its size. */
    private static final double LEAST_VARIANCE = 1e-10;

    /** The figures at places that have both, with uncertainties where there are any. */
    static FigureSeries of(List<Place> places, DrawnFigure drawn, boolean logReport, FigureNoise noise) {
        int count = places.size();
        Optional<Figure> other = drawn.plan().report();
        double[] x = new double[count];
        double[] figure = new double[count];
        double[] report = new double[count];
        double[] raw = new double[count];
        double[] figureVariance = new double[count];
        double[] reportVariance = new double[count];
        double[] shared = new double[count];
        double size = places.stream()
                .mapToDouble(place -> Math.abs(place.mean()))
                .average()
                .orElseThrow();
        for (int i = 0; i < count; i++) {
            Place place = places.get(i);
            x[i] = drawn.place(place.at());
            figure[i] = drawn.value(place.mean()) - drawn.level();
            figureVariance[i] = noise.variance(place, 1, 0).orElse(0) + least(drawn.log() ? 1 : size);
            if (other.isPresent()) {
                raw[i] = place.mean(other.get()).orElseThrow();
                report[i] = DrawnFigure.scaled(raw[i], logReport);
                reportVariance[i] = noise.variance(place, 0, 1).orElse(0) + least(logReport ? 1 : Math.abs(raw[i]));
                shared[i] = (noise.variance(place, 1, 1).orElse(0)
                                - noise.variance(place, 1, -1).orElse(0))
                        / 4;
            }
        }
        double reportSize = Arrays.stream(raw).map(Math::abs).average().orElseThrow();
        boolean known = noise.source() != FigureNoise.Source.NONE;
        return new FigureSeries(known, x, figure, report, figureVariance, reportVariance, shared, size, reportSize);
    }

    private static double least(double size) {
        return Math.max(LEAST_VARIANCE * size * size, Double.MIN_NORMAL);
    }

    int count() {
        return x.length;
    }

    SmoothCurve figure(double leastStrength) {
        return curve(figure, figureVariance, leastStrength);
    }

    SmoothCurve report(double leastStrength) {
        return curve(report, reportVariance, leastStrength);
    }

    private SmoothCurve curve(double[] values, double[] variances, double leastStrength) {
        return known
                ? SmoothCurve.throughTrusted(x, values, variances, leastStrength)
                : SmoothCurve.throughBelieved(x, values, variances, leastStrength);
    }

    /** The places from one to another, and where these are averaged ones, the nearest on either side. */
    double[] between(double low, double high) {
        int from = 0;
        while (from < x.length - 2 && x[from + 1] <= low) {
            from++;
        }
        int to = x.length - 1;
        while (to > from + 1 && x[to - 1] >= high) {
            to--;
        }
        return Arrays.copyOfRange(x, from, to + 1);
    }

    /** The same, neighbours averaged until there are no more places than this. */
    FigureSeries atMost(int places) {
        int each = (x.length + places - 1) / places;
        if (each == 1) {
            return this;
        }
        int count = (x.length + each - 1) / each;
        double[][] sums = new double[6][count];
        for (int k = 0; k < count; k++) {
            int from = k * each;
            int to = Math.min(from + each, x.length);
            double weights = 0;
            for (int i = from; i < to; i++) {
                weights += 1 / figureVariance[i];
            }
            for (int i = from; i < to; i++) {
                double part = 1 / figureVariance[i] / weights;
                sums[0][k] += part * x[i];
                sums[1][k] += part * figure[i];
                sums[2][k] += part * report[i];
                sums[3][k] += part * part * figureVariance[i];
                sums[4][k] += part * part * reportVariance[i];
                sums[5][k] += part * part * shared[i];
            }
        }
        return new FigureSeries(known, sums[0], sums[1], sums[2], sums[3], sums[4], sums[5], size, reportSize);
    }
}
