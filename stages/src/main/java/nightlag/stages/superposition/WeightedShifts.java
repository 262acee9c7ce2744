package nightlag.stages.superposition;

import java.util.Arrays;
import java.util.Optional;
import nightlag.stages.fault.Reason;
import nightlag.stages.numeric.Cholesky;
import nightlag.stages.numeric.LevenbergMarquardt;

/** The shifts of all isotherms but the anchor, made independent and of unit variance by their covariance. */
final class WeightedShifts {
    /** The pole of a WLF law keeps this far below the lowest temperature, K. */
    private static final double CLEAR_OF_THE_POLE_K = 1;

    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;
    private static final double AT_LAST = 1e-14;
    private static final int MAX_STEPS = 200;

    private final double anchorK;
    private final double[] temperaturesK;
    private final double[] log10A;
    private final Cholesky covariance;
    private final double[] target;

    WeightedShifts(double anchorK, double[] temperaturesK, double[] log10A, Cholesky covariance) {
        this.anchorK = anchorK;
        this.temperaturesK = temperaturesK;
        this.log10A = log10A;
        this.covariance = covariance;
        this.target = covariance.whiten(log10A);
    }

    double anchorK() {
        return anchorK;
    }

    /** The Arrhenius law about the anchor: one constant, linear. */
    ArrheniusLaw arrhenius() {
        double[] column = covariance.whiten(Arrays.stream(temperaturesK)
                .map(temperature -> ArrheniusLaw.decadesPerEnergy(temperature, anchorK))
                .toArray());
        double information = dot(column, column);
        double energy = dot(column, target) / information;
        double chiSquared = 0;
        for (int i = 0; i < target.length; i++) {
            double residual = target[i] - energy * column[i];
            chiSquared += residual * residual;
        }
        LawQuality quality = quality(chiSquared, 1);
        return new ArrheniusLaw(anchorK, energy, quality.scale() / Math.sqrt(information), quality);
    }

    private LawQuality quality(double chiSquared, int constants) {
        return new LawQuality(target.length + 1, chiSquared, target.length - constants, "");
    }

    /**
     * The WLF law about the anchor as −s x/(1 + κx), with its pole below the lowest temperature.
     *
     * @param lowestK lowest temperature the law is asked for, the anchor's or one below, K
     */
    Bend bend(double lowestK) {
        double most = 1 / (CLEAR_OF_THE_POLE_K + anchorK - lowestK);
        Model model = new Model();
        LevenbergMarquardt.Fit fit = LevenbergMarquardt.minimise(
                model,
                start(most),
                new double[] {Double.NEGATIVE_INFINITY, 0},
                new double[] {Double.POSITIVE_INFINITY, most},
                AT_LAST,
                MAX_STEPS);
        double[][] jacobian = model.jacobian(fit.parameters());
        double[][] information = {
            {dot(jacobian[0], jacobian[0]), 0}, {dot(jacobian[0], jacobian[1]), dot(jacobian[1], jacobian[1])}
        };
        return new Bend(
                fit.parameters()[0],
                fit.parameters()[1],
                most,
                Cholesky.of(information).map(Cholesky::inverse),
                quality(fit.chiSquared(), 2));
    }

    /** From y (1 + κx) = −s x, which is linear in s and κ and exact without noise. */
    private double[] start(double most) {
        int n = temperaturesK.length;
        double[] slope = new double[n];
        double[] product = new double[n];
        for (int i = 0; i < n; i++) {
            double above = temperaturesK[i] - anchorK;
            slope[i] = -above;
            product[i] = -above * log10A[i];
        }
        double[] first = covariance.whiten(slope);
        double[] second = covariance.whiten(product);
        double a = dot(first, first);
        double b = dot(first, second);
        double c = dot(second, second);
        double determinant = a * c - b * b;
        double bend = determinant > 0 ? (a * dot(second, target) - b * dot(first, target)) / determinant : 0;
        bend = bend > 0 ? Math.min(bend, most) : 0;
        return new double[] {(dot(first, target) - bend * b) / a, bend};
    }

    private static double dot(double[] left, double[] right) {
        double sum = 0;
        for (int i = 0; i < left.length; i++) {
            sum += left[i] * right[i];
        }
        return sum;
    }

    /** Residuals of −s x/(1 + κx). */
    private final class Model implements LevenbergMarquardt.Problem {
        @Override
        public double[] residuals(double[] p) {
            double[] law = covariance.whiten(Arrays.stream(temperaturesK)
                    .map(temperature -> -p[0] * bent(temperature, p[1]))
                    .toArray());
            for (int i = 0; i < law.length; i++) {
                law[i] -= target[i];
            }
            return law;
        }

        @Override
        public double[][] jacobian(double[] p) {
            double[] bySlope = Arrays.stream(temperaturesK)
                    .map(temperature -> -bent(temperature, p[1]))
                    .toArray();
            double[] byBend = Arrays.stream(bySlope).map(b -> p[0] * b * b).toArray();
            return new double[][] {covariance.whiten(bySlope), covariance.whiten(byBend)};
        }

        private double bent(double temperatureK, double bend) {
            double above = temperatureK - anchorK;
            return above / (1 + bend * above);
        }
    }

    /**
     * A WLF law about the anchor as it was fitted.
     *
     * @param slopePerK s = C1/C2, decades per K
     * @param bendPerK κ = 1/C2, 1/K
     * @param mostPerK the largest κ allowed
     * @param variances covariance of s and κ from the shifts' own; empty where it cannot be had
     * @param quality how well it meets the shifts
     */
    record Bend(
            double slopePerK, double bendPerK, double mostPerK, Optional<double[][]> variances, LawQuality quality) {
        /** Why these constants are no WLF law; empty where they are one. */
        Optional<Reason> refusal(double lowestK, double referenceK, double anchorK) {
            if (!(slopePerK > 0)) {
                return Optional.of(ShiftLawReason.WLF_NOT_FALLING.with());
            }
            if (!(bendPerK > 0)) {
                return Optional.of(ShiftLawReason.WLF_STRAIGHT.with());
            }
            if (!(bendPerK < mostPerK)) {
                return Optional.of(ShiftLawReason.WLF_POLE_IN_DATA.with(lowestK - KELVIN_AT_ZERO_CELSIUS));
            }
            double c2 = 1 / bendPerK + referenceK - anchorK;
            double u = variances
                    .map(known -> quality.scale() * Math.sqrt(known[1][1]) / (bendPerK * bendPerK))
                    .orElse(Double.POSITIVE_INFINITY);
            return u < c2 ? Optional.empty() : Optional.of(ShiftLawReason.WLF_NOT_FIXED.with(c2, u));
        }

        /** The law; C1 = s/κ, C2 = 1/κ. */
        WlfLaw law(double anchorK) {
            double[][] known = variances.orElseThrow();
            double square = quality.scale() * quality.scale();
            double c1BySlope = 1 / bendPerK;
            double c1ByBend = -slopePerK / (bendPerK * bendPerK);
            double c2ByBend = -1 / (bendPerK * bendPerK);
            return new WlfLaw(
                    anchorK,
                    slopePerK / bendPerK,
                    1 / bendPerK,
                    new WlfLaw.WlfCovariance(
                            square
                                    * (c1BySlope * c1BySlope * known[0][0]
                                            + 2 * c1BySlope * c1ByBend * known[0][1]
                                            + c1ByBend * c1ByBend * known[1][1]),
                            square * c2ByBend * c2ByBend * known[1][1],
                            square * c2ByBend * (c1BySlope * known[0][1] + c1ByBend * known[1][1])),
                    quality);
        }
    }
}
