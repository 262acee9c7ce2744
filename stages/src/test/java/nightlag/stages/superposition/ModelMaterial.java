package nightlag.stages.superposition;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;

/**
 * Isotherms of invented materials whose shifts are known.
 *
 * @param modulus G*(ω a₁, ω a₂), with a₂ the shift of a second mechanism if there is one
 */
public record ModelMaterial(String name, Curve modulus) {
    /** G* as it depends on frequency. */
    public interface Curve {
        Complex at(double reduced, double reducedOfSecond);
    }

    public static final double REFERENCE_K = 443.15;

    /** Laun's eight modes (Rheol. Acta 17 (1978) 1; from memory). */
    public static final ModelMaterial LAUN = new ModelMaterial(
            "eight modes of a melt",
            (w, second) -> maxwell(w, new double[] {1e-4, 1e-3, 1e-2, 1e-1, 1, 10, 100, 1000}, new double[] {
                1.29e5, 9.48e4, 5.86e4, 2.67e4, 9.80e3, 1.89e3, 1.80e2, 1.00
            }));

    static final ModelMaterial NARROW =
            new ModelMaterial("two modes", (w, second) -> maxwell(w, new double[] {0.1, 1}, new double[] {3e4, 1e5}));

    /** Ge + (Gg − Ge)(iωτ)^α/(1 + (iωτ)^α), with a plateau at either end (Cole &amp; Cole 1941). */
    static final ModelMaterial SOLID =
            new ModelMaterial("solid with a rubbery plateau", (w, second) -> fractional(w, 2e6, 2e9, 1e-3, 0.5));

    static final ModelMaterial TWO_MECHANISMS = new ModelMaterial(
            "two mechanisms",
            (w, second) -> maxwell(w, new double[] {1e-3, 1e-2, 1e-1, 1}, new double[] {1e5, 5e4, 3e4, 1e4})
                    .plus(maxwell(second, new double[] {0.1, 1, 10, 100}, new double[] {2e4, 1e4, 5e3, 2e3})));

    public static Complex maxwell(double frequency, double[] times, double[] strengths) {
        double storage = 0;
        double loss = 0;
        for (int i = 0; i < times.length; i++) {
            double x = frequency * times[i];
            storage += strengths[i] * x * x / (1 + x * x);
            loss += strengths[i] * x / (1 + x * x);
        }
        return new Complex(storage, loss);
    }

    private static Complex fractional(double frequency, double low, double high, double time, double power) {
        Complex z = Complex.polar(Math.pow(frequency * time, power), power * Math.PI / 2);
        return z.over(z.plus(Complex.ONE)).times(high - low).plus(new Complex(low, 0));
    }

    /** log10 a_T of every material here: WLF with C1 = 8.86, C2 = 101.6 K about the reference (Williams, Landel &amp; Ferry 1955). */
    public static double log10A(double temperatureK) {
        return -8.86 * (temperatureK - REFERENCE_K) / (101.6 + temperatureK - REFERENCE_K);
    }

    /** Temperatures about the reference. */
    public static double[] temperatures(int count, double stepK) {
        double[] temperatures = new double[count];
        for (int i = 0; i < count; i++) {
            temperatures[i] = REFERENCE_K + stepK * (i - count / 2);
        }
        return temperatures;
    }

    /**
     * Sweeps from 0.1 to 100 rad/s.
     *
     * @param noise relative standard deviation of either modulus
     * @param givenU relative uncertainty the points come with; zero: none
     * @param secondShare log shift of a second mechanism over that of the first
     * @param lnB what ln G is lowered by, over temperature in K
     */
    public List<IsothermReadings> isotherms(
            double[] temperatures,
            int perDecade,
            double noise,
            double givenU,
            double secondShare,
            DoubleUnaryOperator lnB,
            Random random) {
        List<IsothermReadings> isotherms = new ArrayList<>();
        for (double temperature : temperatures) {
            double first = Math.pow(10, log10A(temperature));
            double second = Math.pow(first, secondShare);
            double height = Math.exp(-lnB.applyAsDouble(temperature));
            List<ModulusReading> readings = new ArrayList<>();
            for (int k = 0; k <= 3 * perDecade; k++) {
                double frequency = 0.1 * Math.pow(10, (double) k / perDecade);
                Complex exact =
                        modulus.at(frequency * first, frequency * second).times(height);
                double storage = exact.re() * (1 + noise * random.nextGaussian());
                double loss = exact.im() * (1 + noise * random.nextGaussian());
                Optional<ModuliCovariance> covariance = givenU > 0
                        ? Optional.of(new ModuliCovariance(
                                Math.pow(givenU * exact.re(), 2), Math.pow(givenU * exact.im(), 2), 0))
                        : Optional.empty();
                readings.add(new ModulusReading(frequency, new Moduli(storage, loss, covariance)));
            }
            isotherms.add(new IsothermReadings(temperature, readings));
        }
        return isotherms;
    }

    /**
     * Sweeps of several specimens, whose moduli are wrong by factors.
     *
     * @param perSpecimen standard deviation of what a specimen adds to ln |G*| at all temperatures
     * @param perLoading standard deviation of what each of its sweeps adds besides
     * @param repeatedFrom the isotherm from which on there are three specimens, those below are of the first alone
     */
    record Pooling(double perSpecimen, double perLoading, int repeatedFrom) {}

    /** Sweeps of three specimens pooled, 10 points a decade and 1 % noise. */
    List<IsothermReadings> pooled(
            double[] temperatures, double givenU, double secondShare, Pooling pooling, Random random) {
        List<List<IsothermReadings>> specimens = new ArrayList<>();
        for (int specimen = 0; specimen < 3; specimen++) {
            double everywhere = pooling.perSpecimen() * random.nextGaussian();
            List<IsothermReadings> own = new ArrayList<>();
            for (IsothermReadings isotherm : isotherms(temperatures, 10, 0.01, givenU, secondShare, t -> 0, random)) {
                double factor = Math.exp(everywhere + pooling.perLoading() * random.nextGaussian());
                own.add(new IsothermReadings(
                        isotherm.temperatureK(),
                        isotherm.readings().stream()
                                .map(reading ->
                                        new ModulusReading(reading.angularFrequency(), times(reading.moduli(), factor)))
                                .toList()));
            }
            specimens.add(own);
        }
        List<IsothermReadings> pooled = new ArrayList<>();
        for (int i = 0; i < temperatures.length; i++) {
            List<ModulusReading> readings = new ArrayList<>();
            List<String> names = new ArrayList<>();
            for (int specimen = 0; specimen < (i < pooling.repeatedFrom() ? 1 : 3); specimen++) {
                List<ModulusReading> own = specimens.get(specimen).get(i).readings();
                readings.addAll(own);
                names.addAll(Collections.nCopies(own.size(), Integer.toString(specimen)));
            }
            pooled.add(new IsothermReadings(temperatures[i], readings, names));
        }
        return pooled;
    }

    static Moduli times(Moduli moduli, double factor) {
        return new Moduli(
                factor * moduli.storagePa(),
                factor * moduli.lossPa(),
                moduli.covariance()
                        .map(known -> new ModuliCovariance(
                                factor * factor * known.storageVariance(),
                                factor * factor * known.lossVariance(),
                                factor * factor * known.covariance())));
    }

    /** Nine sweeps of 31 points each, 10 K apart. */
    List<IsothermReadings> nine(double noise, double givenU, long seed) {
        return isotherms(temperatures(9, 10), 10, noise, givenU, 1, t -> 0, new Random(seed));
    }

    @Override
    public String toString() {
        return name;
    }
}
