package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.List;
import java.util.function.IntFunction;
import java.util.stream.IntStream;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;
import nightlag.stages.numeric.NonNegativeLeastSquares;
import nightlag.stages.numeric.Projection;

/**
 * The generalised Maxwell model that comes nearest to readings, and what it leaves of them.
 *
 * @param readings as weighted
 * @param used what each mode with a strength, the equilibrium modulus and the viscosity add to each row at unit strength
 * @param left weighted residuals
 * @param residuals the fitted moduli, and the readings less these
 */
record BestMaxwell(WeightedReadings readings, List<double[]> used, double[] left, List<ErrorModel.Residual> residuals) {
    private static final int MODES_PER_DECADE = 40;
    private static final double BEYOND_DECADES = 2;
    private static final double TERMS_PER_DECADE = 1.5;
    private static final int TERMS_BESIDE = 2;
    private static final int FREQUENCIES_PER_TERM = 3;
    private static final int MOST_WEIGHINGS = 3;

    /**
     * Fitted to readings whose weights are known, or found from their scatter about curves of their own. The search begins
     * with errors that are a share of |G*|: readings near zero then carry no weight that they have not earned.
     */
    static BestMaxwell of(List<ModulusReading> readings) {
        if (WeightedReadings.haveCovariances(readings)) {
            return of(readings, WeightedReadings.byCovariances(readings));
        }
        ErrorModel model = ErrorModel.OF_MAGNITUDE;
        List<Complex> moduli =
                readings.stream().map(reading -> reading.moduli().complex()).toList();
        BestMaxwell fit = of(readings, WeightedReadings.byModel(readings, model, moduli));
        for (int round = 1; round < MOST_WEIGHINGS; round++) {
            List<ErrorModel.Residual> scatter =
                    fit.residuals(readings, fit.aboutOwnCurves().residual());
            ErrorModel likeliest = ErrorModel.likeliest(scatter);
            if (likeliest.isLike(model)) {
                break;
            }
            model = likeliest;
            moduli = scatter.stream().map(ErrorModel.Residual::fitted).toList();
            fit = of(readings, WeightedReadings.byModel(readings, model, moduli));
        }
        return fit;
    }

    private static BestMaxwell of(List<ModulusReading> measured, WeightedReadings readings) {
        List<double[]> columns = columns(readings);
        double[] strengths = NonNegativeLeastSquares.solve(columns.toArray(double[][]::new), readings.target());
        double[] left = readings.target();
        List<double[]> used = new ArrayList<>();
        for (int j = 0; j < strengths.length; j++) {
            if (strengths[j] > 0) {
                double[] column = columns.get(j);
                used.add(column);
                for (int row = 0; row < left.length; row++) {
                    left[row] -= strengths[j] * column[row];
                }
            }
        }
        return new BestMaxwell(readings, used, left, residuals(measured, readings, left));
    }

    /** Modes so close that one between two of them is not missed, out to where they no longer change in kind, and both limits. */
    private static List<double[]> columns(WeightedReadings readings) {
        double decades = readings.decades() + 2 * BEYOND_DECADES;
        int steps = (int) Math.ceil(MODES_PER_DECADE * decades);
        double shortest = Math.pow(10, -BEYOND_DECADES) / readings.highestFrequency();
        List<double[]> columns = new ArrayList<>();
        columns.add(readings.viscosity());
        for (int j = 0; j <= steps; j++) {
            columns.add(readings.mode(shortest * Math.pow(10, j * decades / steps)));
        }
        columns.add(readings.equilibrium());
        return columns;
    }

    /**
     * What is left once G' and G'' may each leave the fit by a smooth factor of its own, a polynomial in ln ω, while the modes
     * in use move as well: how far the readings scatter, whether or not the two moduli belong together.
     */
    Projection aboutOwnCurves() {
        double[] frequencies = readings.angularFrequencies();
        double middle = Math.sqrt(readings.lowestFrequency() * readings.highestFrequency());
        double half = Math.log(readings.highestFrequency() / middle);
        int terms = Math.max(
                1,
                Math.min(
                        (int) Math.round(TERMS_PER_DECADE * readings.decades()) + TERMS_BESIDE,
                        frequencies.length / FREQUENCIES_PER_TERM));
        List<double[]> columns = new ArrayList<>(used);
        for (int degree = 0; degree < terms; degree++) {
            int n = degree;
            IntFunction<Complex> departing =
                    i -> residuals.get(i).fitted().times(chebyshev(n, Math.log(frequencies[i] / middle) / half));
            columns.add(readings.weighted(IntStream.range(0, frequencies.length)
                    .mapToObj(i -> new Complex(departing.apply(i).re(), 0))
                    .toList()));
            columns.add(readings.weighted(IntStream.range(0, frequencies.length)
                    .mapToObj(i -> new Complex(0, departing.apply(i).im()))
                    .toList()));
        }
        return Projection.of(columns, left);
    }

    private static double chebyshev(int degree, double x) {
        return Math.cos(degree * Math.acos(Math.max(-1, Math.min(1, x))));
    }

    private List<ErrorModel.Residual> residuals(List<ModulusReading> measured, double[] rows) {
        return residuals(measured, readings, rows);
    }

    private static List<ErrorModel.Residual> residuals(
            List<ModulusReading> measured, WeightedReadings readings, double[] rows) {
        return IntStream.range(0, measured.size())
                .mapToObj(i -> {
                    Complex difference = readings.unweighted(rows, i);
                    return new ErrorModel.Residual(
                            measured.get(i).moduli().complex().minus(difference), difference);
                })
                .toList();
    }
}
