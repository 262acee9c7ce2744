package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.numeric.Complex;
import nightlag.stages.numeric.SmoothSlope;
import nightlag.stages.numeric.SmoothSlope.Slopes;

/**
 * Takes out of an amplitude sweep between parallel plates that the strain falls from the rim to the axis. The torque's
 * linear factor gives the stress at the rim of a material whose modulus does not depend on strain; that of any material is
 * (3M + dM/d ln γ_R)/(2πR³) (Weissenberg's and Rabinowitsch's step, for oscillations on the complex amplitude of each order;
 * Macosko 1994, Rheology, section 5.5). So with the apparent complex G and σₙ
 *
 * <pre>
 *   G_true = G + ¼ dG/d ln γ_R = G (1 + ¼ d ln G/d ln γ_R),     σₙ_true = σₙ (3 + d ln σₙ/d ln γ_R)/4
 * </pre>
 *
 * <p>The slopes are those of the complex logarithms, which are straight both where the material is linear and where it
 * follows a power law, by {@link SmoothSlope}. A harmonic within three of its standard uncertainties does not steer its
 * order's slope but is corrected by it; an order that stands out at fewer than three strains stays as it is.
 */
public final class PlateRim {
    /** Strains below which there is no slope to be had. */
    public static final int LEAST_STRAINS = 3;

    private static final double STANDS_OUT = 3;
    /** No relative uncertainty is taken to be smaller. */
    private static final double FLOOR = 1e-12;

    private final List<ModulusPoint> points;
    private final int[] strainOf;
    private final double[] logStrains;

    private PlateRim(List<List<ModulusPoint>> strains) {
        this.points = strains.stream().flatMap(List::stream).toList();
        this.strainOf = new int[points.size()];
        this.logStrains = new double[strains.size()];
        int i = 0;
        for (int k = 0; k < strains.size(); k++) {
            for (ModulusPoint point : strains.get(k)) {
                strainOf[i++] = k;
                logStrains[k] +=
                        Math.log(AmplitudeSweeps.strain(point)) / strains.get(k).size();
            }
        }
    }

    /** Whether the stress of a point is that at the rim of a linear material. */
    public static boolean concerns(ModulusPoint point) {
        return point.torqueGeometry()
                        .filter(kind -> kind == GeometryKind.PARALLEL_PLATE)
                        .isPresent()
                && point.moduli().flatMap(Moduli::covariance).isPresent();
    }

    /** How many different strains a sweep has. */
    public static int strains(List<ModulusPoint> sweep) {
        return AmplitudeSweeps.strains(sweep).size();
    }

    /**
     * The points of a sweep with the modulus, the stress and the harmonics of the rim.
     *
     * @param sweep points of one amplitude sweep, all of them from parallel plates, at three strains or more
     */
    public static List<ModulusPoint> corrected(List<ModulusPoint> sweep) {
        return new PlateRim(AmplitudeSweeps.strains(sweep)).corrected();
    }

    private List<ModulusPoint> corrected() {
        List<Moduli> moduli =
                points.stream().map(point -> point.moduli().orElseThrow()).toList();
        List<Optional<Reading>> readings = new ArrayList<>();
        moduli.forEach(value -> readings.add(Optional.of(fundamental(value))));
        Orders fundamental = slopes(readings).orElseThrow();
        int most = points.stream()
                .mapToInt(point -> point.harmonics().size())
                .max()
                .orElse(0);
        List<Optional<Orders>> orders = new ArrayList<>();
        for (int order = 2; order <= most; order++) {
            orders.add(slopes(harmonicReadings(order)));
        }
        List<ModulusPoint> corrected = new ArrayList<>();
        for (int i = 0; i < points.size(); i++) {
            ModulusPoint point = points.get(i);
            Change change = fundamental.at(i, 1);
            Moduli rim =
                    rim(moduli.get(i), change, readings.get(i).orElseThrow().variance());
            double strain = AmplitudeSweeps.strain(point);
            corrected.add(point.atRim(
                    rim,
                    rim.magnitudePa() * strain,
                    harmonics(i, rim, change, orders),
                    SweepReason.SWEEP_RIM_CORRECTED.with(
                            rim.magnitudePa() / moduli.get(i).magnitudePa())));
        }
        return corrected;
    }

    /**
     * A complex figure of one point.
     *
     * @param value the figure
     * @param variance u² of either part over its square
     */
    private record Reading(Complex value, double variance) {}

    /**
     * What the correction does to a figure.
     *
     * @param factor true over apparent
     * @param slopeVariance u² of the logarithmic slope
     * @param covariance of the slope's error with the figure's own relative error
     */
    private record Change(Complex factor, double slopeVariance, double covariance) {
        /** u² of the true figure over the square of the apparent one. */
        double variance(double apparent) {
            double size = factor.abs();
            double sum = size * size * apparent + factor.re() * covariance / 2 + slopeVariance / 16;
            return Math.max(sum, FLOOR * FLOOR);
        }
    }

    private static Reading fundamental(Moduli moduli) {
        ModuliCovariance covariance = moduli.covariance().orElseThrow();
        double size = moduli.magnitudePa();
        double variance = (covariance.storageVariance() + covariance.lossVariance()) / (2 * size * size);
        return new Reading(moduli.complex(), Math.max(variance, FLOOR * FLOOR));
    }

    private List<Optional<Reading>> harmonicReadings(int order) {
        return points.stream()
                .map(point -> point.harmonics().size() < order
                        ? Optional.<Reading>empty()
                        : standingOut(point.harmonics().get(order - 1)))
                .toList();
    }

    private static Optional<Reading> standingOut(Harmonic harmonic) {
        double intensity = harmonic.relativeIntensity();
        double u = harmonic.relativeIntensityU().orElse(Double.POSITIVE_INFINITY);
        if (!(intensity > STANDS_OUT * u)) {
            return Optional.empty();
        }
        double relative = Math.max(u / intensity, FLOOR);
        return Optional.of(new Reading(
                new Complex(harmonic.stressInPhasePa(), harmonic.stressOutOfPhasePa()), relative * relative));
    }

    /** The logarithmic slopes of one figure of all points; empty where it is known at fewer than three strains. */
    private Optional<Orders> slopes(List<Optional<Reading>> readings) {
        int n = logStrains.length;
        double[][] logarithms = new double[2][n];
        double[] weights = new double[n];
        Complex before = Complex.ONE;
        double phase = 0;
        for (int i = 0; i < points.size(); i++) {
            if (readings.get(i).isPresent()) {
                Reading reading = readings.get(i).get();
                // the phase is followed from point to point, so that it does not jump by a turn
                phase += reading.value().over(before).argument();
                before = reading.value();
                double weight = 1 / reading.variance();
                logarithms[0][strainOf[i]] += weight * Math.log(reading.value().abs());
                logarithms[1][strainOf[i]] += weight * phase;
                weights[strainOf[i]] += weight;
            }
        }
        int[] known = IntStream.range(0, n).filter(k -> weights[k] > 0).toArray();
        if (known.length < LEAST_STRAINS) {
            return Optional.empty();
        }
        double[] at = new double[known.length];
        double[][] values = new double[2][known.length];
        double[] variance = new double[known.length];
        for (int j = 0; j < known.length; j++) {
            int k = known[j];
            at[j] = logStrains[k];
            values[0][j] = logarithms[0][k] / weights[k];
            values[1][j] = logarithms[1][k] / weights[k];
            variance[j] = 1 / weights[k];
        }
        Slopes slopes = SmoothSlope.of(at, values, variance, logStrains);
        double[] covariance = new double[n];
        for (int j = 0; j < known.length; j++) {
            covariance[known[j]] = slopes.weights()[known[j]][j] * variance[j];
        }
        return Optional.of(new Orders(slopes, covariance, readings));
    }

    /** The slopes of one figure over the sweep. */
    private final class Orders {
        private final Slopes slopes;
        /** Of each slope's error with that of a value read at the same strain. */
        private final double[] covariance;

        private final List<Optional<Reading>> readings;

        Orders(Slopes slopes, double[] covariance, List<Optional<Reading>> readings) {
            this.slopes = slopes;
            this.covariance = covariance;
            this.readings = readings;
        }

        /**
         * The change of one point's figure.
         *
         * @param level 1 for a modulus, ¾ for a stress, whose slope is larger by one
         */
        Change at(int i, double level) {
            int k = strainOf[i];
            Complex slope = new Complex(slopes.slope()[0][k], slopes.slope()[1][k]);
            return new Change(
                    new Complex(level, 0).plus(slope.times(0.25)),
                    slopes.variance()[k],
                    readings.get(i).isPresent() ? covariance[k] : 0);
        }
    }

    private static Moduli rim(Moduli apparent, Change change, double variance) {
        Complex modulus = apparent.complex().times(change.factor());
        double ratio = change.variance(variance) / variance;
        return new Moduli(
                modulus.re(),
                modulus.im(),
                apparent.covariance()
                        .map(own -> new ModuliCovariance(
                                own.storageVariance() * ratio, own.lossVariance() * ratio, own.covariance() * ratio)));
    }

    private List<Harmonic> harmonics(int i, Moduli rim, Change fundamental, List<Optional<Orders>> orders) {
        ModulusPoint point = points.get(i);
        double strain = AmplitudeSweeps.strain(point);
        double smaller = 1 / fundamental.factor().abs();
        List<Harmonic> corrected = new ArrayList<>();
        for (Harmonic harmonic : point.harmonics()) {
            if (harmonic.order() == 1) {
                corrected.add(new Harmonic(
                        1,
                        rim.storagePa() * strain,
                        rim.lossPa() * strain,
                        harmonic.relativeIntensity(),
                        harmonic.relativeIntensityU()));
            } else {
                Change change = orders.get(harmonic.order() - 2)
                        .map(order -> order.at(i, 0.75))
                        .orElse(new Change(Complex.ONE, 0, 0));
                corrected.add(corrected(harmonic, change, smaller));
            }
        }
        return corrected;
    }

    private static Harmonic corrected(Harmonic harmonic, Change change, double perFundamental) {
        Complex stress = new Complex(harmonic.stressInPhasePa(), harmonic.stressOutOfPhasePa()).times(change.factor());
        double intensity = harmonic.relativeIntensity();
        OptionalDouble u = harmonic.relativeIntensityU();
        double size = change.factor().abs();
        return new Harmonic(
                harmonic.order(),
                stress.re(),
                stress.im(),
                intensity * size * perFundamental,
                u.isEmpty()
                        ? u
                        : OptionalDouble.of(perFundamental
                                * Math.sqrt(Math.max(
                                        size * size * u.getAsDouble() * u.getAsDouble()
                                                + intensity
                                                        * intensity
                                                        * (change.factor().re() * change.covariance() / 2
                                                                + change.slopeVariance() / 16),
                                        FLOOR * FLOOR))));
    }
}
