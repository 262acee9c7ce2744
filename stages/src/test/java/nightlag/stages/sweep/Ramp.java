package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.function.DoubleFunction;
import nightlag.stages.TestPoints;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.numeric.Complex;

/**
 * Temperature sweeps of model materials, for tests.
 *
 * @param material complex modulus, Pa, at a temperature, K
 * @param frequencyHz frequency
 * @param noise relative standard deviation of storage and loss modulus, each on its own
 * @param relativeU what the points say of it; 0 for nothing
 */
record Ramp(DoubleFunction<Complex> material, double frequencyHz, double noise, double relativeU) {
    static final double GAS_CONSTANT = 8.31446261815324;
    static final double GLASSY = 2e9;
    static final double RUBBERY = 2e7;
    static final double ENERGY = 400_000;
    static final double REFERENCE_K = 373.15;

    static Ramp exact(DoubleFunction<Complex> material, double frequencyHz) {
        return new Ramp(material, frequencyHz, 0, 0);
    }

    Ramp noisy(double relative) {
        return new Ramp(material, frequencyHz, relative, relative);
    }

    Ramp withoutU() {
        return new Ramp(material, frequencyHz, noise, 0);
    }

    /**
     * One relaxation time with an Arrhenius shift: E* = Er + (Eu − Er) ix/(1 + ix), x = f exp[(Ea/R)(1/T − 1/T0)]. All its markers
     * have closed forms.
     */
    static DoubleFunction<Complex> oneRelaxation(double frequencyHz) {
        return temperature -> {
            double x = frequencyHz * Math.exp(ENERGY / GAS_CONSTANT * (1 / temperature - 1 / REFERENCE_K));
            double storage = RUBBERY + (GLASSY - RUBBERY) * x * x / (1 + x * x);
            return new Complex(storage, (GLASSY - RUBBERY) * x / (1 + x * x));
        };
    }

    /**
     * A broad and lopsided relaxation after Havriliak and Negami (Polymer 8 (1967) 161), E* = Er + (Eu − Er)(1 − (1 + z^0.35)^−0.6),
     * z = iωτ, with a WLF shift (c1 = 13.5, c2 = 55 K) and a modulus that falls by 0.15 % of the glassy one a kelvin.
     */
    static DoubleFunction<Complex> broad(double frequencyHz) {
        return temperature -> {
            double distance = temperature - REFERENCE_K;
            double x = frequencyHz * Math.pow(10, -13.5 * distance / (55 + distance));
            Complex power = polar(Math.pow(x, 0.35), 0.35 * Math.PI / 2);
            Complex sum = Complex.ONE.plus(power);
            Complex inverse = polar(Math.pow(sum.abs(), -0.6), -0.6 * sum.argument());
            Complex fall = new Complex(1 - inverse.re(), -inverse.im());
            return new Complex(RUBBERY, 0).plus(fall.times((GLASSY - RUBBERY) * (1 - 0.0015 * distance)));
        };
    }

    private static Complex polar(double size, double angle) {
        return new Complex(size * Math.cos(angle), size * Math.sin(angle));
    }

    /** The sweep from one temperature to another, K, every so many kelvin. */
    Sweep sweep(double from, double to, double every, Random random) {
        List<Double> temperatures = new ArrayList<>();
        for (int k = 0; from + k * every <= to; k++) {
            temperatures.add(from + k * every);
        }
        return sweep(temperatures, random);
    }

    Sweep sweep(List<Double> temperatures, Random random) {
        List<ModulusPoint> points = new ArrayList<>();
        for (double temperature : temperatures) {
            Complex modulus = material.apply(temperature);
            Complex read = new Complex(
                    modulus.re() * (1 + noise * random.nextGaussian()),
                    modulus.im() * (1 + noise * random.nextGaussian()));
            points.add(TestPoints.point()
                    .at(temperature)
                    .hz(frequencyHz)
                    .modulus(read)
                    .relativeU(relativeU)
                    .build());
        }
        return new Sweep(
                new SweepName("1", "1"),
                SweepPlan.Kind.TEMPERATURE,
                OptionalDouble.empty(),
                OptionalDouble.of(frequencyHz),
                points);
    }
}
