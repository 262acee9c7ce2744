package nightlag.stages.sweep;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import nightlag.stages.moduli.SharedErrors;
import nightlag.stages.numeric.Cholesky;
import nightlag.stages.numeric.LevenbergMarquardt;
import nightlag.stages.numeric.VarianceRatio;

/** Fits laws of flow to viscosities by least squares of ln η, each residual over its relative uncertainty. */
final class FlowFit {
    /** A further viscosity at infinite rate must be this share of the lowest measured, or the data do not show it. */
    private static final double SEEN_OF_LOWEST = 0.2;

    private static final double LARGEST_CORRELATION = 0.95;
    private static final double CLEAR = 3;
    private static final double CHANCE = 0.01;
    private static final double LARGEST_U_OF_INFINITE = 1.0 / 3;
    private static final double TIMES_BEYOND = 1e3;
    private static final int START_TIMES = 9;
    private static final double[] START_WIDTHS = {0.4, 0.8, 2};
    private static final double[] START_POWERS = {-0.3, -0.6, -0.9};
    private static final double AT_LAST = 1e-14;
    private static final int MAX_STEPS = 300;

    private final double[] logRates;
    private final double[] logViscosities;
    private final double[] relativeU;
    private final boolean weighted;
    private final SharedErrors sharedErrors;

    /**
     * What is fitted.
     *
     * @param logRates ln γ̇, rising
     * @param logViscosities ln η
     * @param relativeU relative uncertainties of η, or all alike and {@code weighted} false
     * @param weighted whether they are known
     * @param sharedErrors what several points are off by together
     */
    FlowFit(
            double[] logRates,
            double[] logViscosities,
            double[] relativeU,
            boolean weighted,
            SharedErrors sharedErrors) {
        this.sharedErrors = sharedErrors;
        this.logRates = logRates;
        this.logViscosities = logViscosities;
        this.relativeU = relativeU;
        this.weighted = weighted;
    }

    /**
     * A law as fitted.
     *
     * @param law which
     * @param parameters ln η0, ln λ, the numbers that shape it, ln η∞ where the data carry it
     * @param u their standard uncertainties; empty where the data do not fix them all, or one ended at its bound
     * @param chiSquared the weighted sum of squares
     * @param rms root mean square of the unweighted residuals of ln η
     * @param misses whether the law misses the points by more than chance
     */
    record Fitted(
            FlowLaw law, double[] parameters, Optional<double[]> u, double chiSquared, double rms, boolean misses) {
        boolean hasInfinite() {
            return parameters.length > FlowLaw.FIRST_SHAPE + law.shapes();
        }
    }

    /**
     * The best fits of both laws. Whether the data show a viscosity at infinite rate is asked of the law that bends most
     * freely, for a law that misses the data would take it to make up for its own shape; where they do, both laws have one.
     */
    List<Fitted> fitAll() {
        Fitted cross = finished(FlowLaw.CROSS, search(FlowLaw.CROSS));
        if (logRates.length <= FlowLaw.FIRST_SHAPE + FlowLaw.CARREAU_YASUDA.shapes()) {
            return List.of(cross);
        }
        Fitted carreau = finished(FlowLaw.CARREAU_YASUDA, search(FlowLaw.CARREAU_YASUDA));
        if (logRates.length < carreau.parameters().length + 2) {
            return List.of(cross, carreau);
        }
        Fitted more = withInfinite(carreau);
        return carries(more, carreau) ? List.of(withInfinite(cross), more) : List.of(cross, carreau);
    }

    private Fitted withInfinite(Fitted plain) {
        int count = plain.parameters().length;
        double[] start = Arrays.copyOf(plain.parameters(), count + 1);
        start[count] = lowest() + Math.log(0.5);
        return finished(plain.law(), minimise(plain.law(), start));
    }

    private boolean carries(Fitted more, Fitted plain) {
        int count = plain.parameters().length;
        int free = logRates.length - count - 1;
        double perFreedom = more.chiSquared() / free;
        double gain = plain.chiSquared() - more.chiSquared();
        return gain > 0
                && VarianceRatio.chanceOfMore(gain / (weighted ? Math.max(1, perFreedom) : perFreedom), 1, free)
                        < CHANCE
                && more.parameters()[count] > lowest() + Math.log(SEEN_OF_LOWEST)
                && more.u().map(u -> u[count] < LARGEST_U_OF_INFINITE).orElse(false);
    }

    private double lowest() {
        return Arrays.stream(logViscosities).min().orElseThrow();
    }

    private double[] search(FlowLaw law) {
        double fastest = -logRates[logRates.length - 1];
        double slowest = -logRates[0];
        double[] best = {};
        double least = Double.POSITIVE_INFINITY;
        for (double width : START_WIDTHS) {
            for (double power : START_POWERS) {
                for (int k = 0; k < START_TIMES; k++) {
                    double[] start = new double[FlowLaw.FIRST_SHAPE + law.shapes()];
                    start[FlowLaw.TIME] = fastest + (slowest - fastest) * k / (START_TIMES - 1);
                    start[FlowLaw.FIRST_SHAPE] = law.shapes() == 1 ? -power : width;
                    if (law.shapes() > 1) {
                        start[FlowLaw.FIRST_SHAPE + 1] = power + 1;
                    }
                    start[FlowLaw.VISCOSITY] = level(law, start);
                    double chiSquared = square(residuals(law, start));
                    if (chiSquared < least) {
                        least = chiSquared;
                        best = start;
                    }
                }
            }
        }
        return minimise(law, best);
    }

    /** The best ln η0 for the rest of a start. */
    private double level(FlowLaw law, double[] start) {
        double sum = 0;
        double weights = 0;
        for (int i = 0; i < logRates.length; i++) {
            double weight = 1 / (relativeU[i] * relativeU[i]);
            sum += weight * (logViscosities[i] - law.logShape(start, logRates[i]));
            weights += weight;
        }
        return sum / weights;
    }

    private double[] minimise(FlowLaw law, double[] start) {
        return LevenbergMarquardt.minimise(
                        new LevenbergMarquardt.Problem() {
                            @Override
                            public double[] residuals(double[] p) {
                                return FlowFit.this.residuals(law, p);
                            }

                            @Override
                            public double[][] jacobian(double[] p) {
                                return FlowFit.this.jacobian(law, p);
                            }
                        },
                        start,
                        bounds(law, start.length, false),
                        bounds(law, start.length, true),
                        AT_LAST,
                        MAX_STEPS)
                .parameters();
    }

    private double[] bounds(FlowLaw law, int count, boolean upper) {
        double beyond = Math.log(TIMES_BEYOND);
        double[] bounds = new double[count];
        Arrays.fill(bounds, upper ? Double.POSITIVE_INFINITY : Double.NEGATIVE_INFINITY);
        bounds[FlowLaw.TIME] = upper ? beyond - logRates[0] : -beyond - logRates[logRates.length - 1];
        for (int i = 0; i < law.shapes(); i++) {
            FlowLaw.Shape shape = law.shape().get(i);
            bounds[FlowLaw.FIRST_SHAPE + i] = upper ? shape.most() : shape.least();
        }
        if (count > FlowLaw.FIRST_SHAPE + law.shapes()) {
            bounds[count - 1] = upper ? lowest() + Math.log(2) : lowest() - beyond;
        }
        return bounds;
    }

    private double[] residuals(FlowLaw law, double[] p) {
        return IntStream.range(0, logRates.length)
                .mapToDouble(i -> (logViscosity(law, p, logRates[i]) - logViscosities[i]) / relativeU[i])
                .toArray();
    }

    private static double logViscosity(FlowLaw law, double[] p, double logRate) {
        double falling = p[FlowLaw.VISCOSITY] + law.logShape(p, logRate);
        if (p.length == FlowLaw.FIRST_SHAPE + law.shapes()) {
            return falling;
        }
        // η0 s + η∞ (1 − s)
        double infinite = p[p.length - 1];
        double rest = -Math.expm1(law.logShape(p, logRate));
        return falling + Math.log1p(rest * Math.exp(infinite - falling));
    }

    private double[][] jacobian(FlowLaw law, double[] p) {
        int shaped = FlowLaw.FIRST_SHAPE + law.shapes();
        double[][] columns = new double[p.length][logRates.length];
        for (int i = 0; i < logRates.length; i++) {
            double logShape = law.logShape(p, logRates[i]);
            double logViscosity = logViscosity(law, p, logRates[i]);
            double byZero = Math.exp(p[FlowLaw.VISCOSITY] + logShape - logViscosity);
            double byShape = byZero;
            if (p.length > shaped) {
                byShape -= Math.exp(p[shaped] + logShape - logViscosity);
                columns[shaped][i] = -Math.expm1(logShape) * Math.exp(p[shaped] - logViscosity) / relativeU[i];
            }
            columns[FlowLaw.VISCOSITY][i] = byZero / relativeU[i];
            double[] gradient = law.gradient(p, logRates[i]);
            for (int j = 0; j < gradient.length; j++) {
                columns[FlowLaw.TIME + j][i] = byShape * gradient[j] / relativeU[i];
            }
        }
        return columns;
    }

    private Fitted finished(FlowLaw law, double[] p) {
        double[] residuals = residuals(law, p);
        double chiSquared = square(residuals);
        double rms = 0;
        for (int i = 0; i < residuals.length; i++) {
            rms += Math.pow(residuals[i] * relativeU[i], 2) / residuals.length;
        }
        int free = residuals.length - p.length;
        double alike = alike(residuals);
        double perFreedom = chiSquared / free * alike;
        boolean misses = weighted ? chiSquared > free + CLEAR * Math.sqrt(2.0 * free) : alike > 1;
        double scale = weighted ? Math.max(1, perFreedom) : perFreedom;
        double[][] columns = jacobian(law, p);
        double[][] information = new double[p.length][p.length];
        for (int i = 0; i < p.length; i++) {
            for (int j = 0; j <= i; j++) {
                for (int k = 0; k < residuals.length; k++) {
                    information[i][j] += columns[i][k] * columns[j][k];
                }
            }
        }
        Optional<double[]> u = atABound(law, p)
                ? Optional.empty()
                : Cholesky.of(information).map(factored -> {
                    double[][] inverse = factored.inverse();
                    return IntStream.range(0, p.length)
                            .mapToDouble(i -> Math.sqrt(scale * inverse[i][i] + shared(columns, inverse[i])))
                            .toArray();
                });
        return new Fitted(law, p, u, chiSquared, Math.sqrt(rms), misses);
    }

    /**
     * What the shared errors add to the variance of a parameter: a point off by δ in ln ω and by β in ln |G*| is off by β − δ in
     * ln η, and the law is asked for at another rate; the parameters follow by the linearised fit.
     *
     * @param columns derivatives of the residuals by the parameters
     * @param row of the inverse of their products
     */
    private double shared(double[][] columns, double[] row) {
        double[] byLnFrequency = new double[logRates.length];
        double[] byLnModulus = new double[logRates.length];
        for (int i = 0; i < logRates.length; i++) {
            double byResidual = 0;
            for (int j = 0; j < row.length; j++) {
                byResidual -= row[j] * columns[j][i];
            }
            // rate and time stand in the law as their product
            byLnFrequency[i] = byResidual * (columns[FlowLaw.TIME][i] + 1 / relativeU[i]);
            byLnModulus[i] = -byResidual / relativeU[i];
        }
        return sharedErrors.variance(byLnFrequency, byLnModulus);
    }

    /**
     * How many neighbouring residuals count as one: (1 + ρ)/(1 − ρ) with ρ their correlation with the next (Bartlett, J. R.
     * Stat. Soc. 98 (1935) 536). A law that misses the points does so over whole stretches of the curve, and they no longer
     * average out; 1 where ρ is within twice what chance makes.
     */
    private static double alike(double[] residuals) {
        double products = 0;
        for (int i = 1; i < residuals.length; i++) {
            products += residuals[i - 1] * residuals[i];
        }
        double correlation = products / square(residuals);
        return correlation > 2 / Math.sqrt(residuals.length)
                ? (1 + correlation) / (1 - Math.min(correlation, LARGEST_CORRELATION))
                : 1;
    }

    private boolean atABound(FlowLaw law, double[] p) {
        double[] lower = bounds(law, p.length, false);
        double[] upper = bounds(law, p.length, true);
        return IntStream.range(0, p.length).anyMatch(i -> p[i] <= lower[i] || p[i] >= upper[i]);
    }

    private static double square(double[] vector) {
        return Arrays.stream(vector).map(v -> v * v).sum();
    }
}
