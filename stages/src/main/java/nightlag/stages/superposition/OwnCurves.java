package nightlag.stages.superposition;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import nightlag.stages.numeric.EvenSplines;
import nightlag.stages.superposition.LogIsotherm.LogReading;

/**
 * Each isotherm about its own smooth curves, all equally smooth.
 *
 * @param curves one an isotherm
 * @param smoothness what they share
 */
record OwnCurves(List<OwnCurve> curves, Smoothness smoothness) {
    /** An interval of the splines in ln ω, a fifth of a decade: no sum of relaxation modes changes its course within less. */
    static final double SPLINE_STEP = Math.log(10) / 5;

    /**
     * The curves of one isotherm.
     *
     * @param pair the fit
     * @param coefficients its coefficients
     * @param residualSquares Σ rᵀ W r of its points
     * @param deviance minus twice the logarithm of the restricted likelihood, up to a constant
     */
    record OwnCurve(SmoothPair pair, double[] coefficients, double residualSquares, double deviance) {
        /** Degrees of freedom of the squares. */
        double freedom() {
            return pair.freedom(new double[0][], new double[0][]);
        }
    }

    OwnCurves {
        curves = List.copyOf(curves);
    }

    /**
     * Points and the splines at their places, made once and fitted often.
     *
     * @param readings the points
     * @param design the splines
     */
    record Prepared(List<LogReading> readings, PairDesign design) {
        static Prepared of(LogIsotherm isotherm) {
            double[] places =
                    isotherm.readings().stream().mapToDouble(LogReading::x).toArray();
            EvenSplines splines = EvenSplines.covering(isotherm.first(), isotherm.last(), SPLINE_STEP);
            return new Prepared(isotherm.readings(), new PairDesign(splines, places));
        }

        private double[] whitened(Weights weights) {
            double[] observed = new double[2 * readings.size()];
            for (int p = 0; p < readings.size(); p++) {
                LogReading reading = readings.get(p);
                weights.whiten(p, reading.has(0) ? reading.y()[0] : 0, reading.has(1) ? reading.y()[1] : 0, observed);
            }
            return observed;
        }

        /** The curve less the points, whitened by the weights it was fitted with. */
        double[] differences(OwnCurve curve, Weights weights) {
            double[] differences = curve.pair().fitted(curve.coefficients());
            double[] observed = whitened(weights);
            Arrays.setAll(differences, i -> differences[i] - observed[i]);
            return differences;
        }

        Optional<OwnCurve> fit(boolean useGiven, Smoothness smoothness) {
            Weights weights = Weights.of(readings, useGiven, smoothness);
            return SmoothPair.of(design, weights, smoothness).map(pair -> {
                double[] observed = whitened(weights);
                double[] coefficients = pair.coefficients(observed);
                double[] fitted = pair.fitted(coefficients);
                double squares = 0;
                for (int i = 0; i < fitted.length; i++) {
                    squares += (fitted[i] - observed[i]) * (fitted[i] - observed[i]);
                }
                double rough = 0;
                for (double penalty : pair.penalties(coefficients)) {
                    rough += penalty * penalty;
                }
                return new OwnCurve(pair, coefficients, squares, pair.deviance(squares + rough));
            });
        }
    }

    /** All curves for one smoothness; empty where the arithmetic gives out. */
    static Optional<OwnCurves> of(List<Prepared> isotherms, boolean useGiven, Smoothness smoothness) {
        List<OwnCurve> curves = new ArrayList<>();
        for (Prepared isotherm : isotherms) {
            Optional<OwnCurve> curve = isotherm.fit(useGiven, smoothness);
            if (curve.isEmpty()) {
                return Optional.empty();
            }
            curves.add(curve.get());
        }
        return Optional.of(new OwnCurves(curves, smoothness));
    }

    double deviance() {
        return curves.stream().mapToDouble(OwnCurve::deviance).sum();
    }
}
