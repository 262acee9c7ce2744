package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import java.util.function.DoubleFunction;
import java.util.function.DoubleUnaryOperator;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;

/** Materials with known markers, measured with known noise. */
final class MarkerModel {
    private MarkerModel() {}

    /** Maxwell elements: G* = Σ g iωτ/(1 + iωτ); pairs of g in Pa and τ in s. */
    static DoubleFunction<Complex> maxwell(double... pairs) {
        return angularFrequency -> {
            Complex sum = Complex.ZERO;
            for (int i = 0; i < pairs.length; i += 2) {
                Complex turn = new Complex(0, angularFrequency * pairs[i + 1]);
                sum = sum.plus(turn.over(Complex.ONE.plus(turn)).times(pairs[i]));
            }
            return sum;
        };
    }

    /**
     * Two springpots in series, 1/G* = 1/(iω)^α + 1/(iω)^β with α &gt; β. Its phase απ/2 − arg(1 + r e^{iθ}) with
     * r = ω^(α−β), θ = (α−β)π/2 is π/4 where r = sin φ/sin(θ − φ), φ = απ/2 − π/4.
     */
    static DoubleFunction<Complex> springpots(double alpha, double beta) {
        return angularFrequency -> {
            Complex first = Complex.polar(Math.pow(angularFrequency, alpha), alpha * Math.PI / 2);
            Complex second = Complex.polar(Math.pow(angularFrequency, beta), beta * Math.PI / 2);
            return first.times(second).over(first.plus(second));
        };
    }

    static double springpotCrossover(double alpha, double beta) {
        double phi = alpha * Math.PI / 2 - Math.PI / 4;
        double theta = (alpha - beta) * Math.PI / 2;
        return Math.pow(Math.sin(phi) / Math.sin(theta - phi), 1 / (alpha - beta));
    }

    /** Frequencies or strains, evenly spaced in their logarithm, both ends among them. */
    static double[] decades(double from, double to, int perDecade) {
        int count = (int) Math.round(Math.log10(to / from) * perDecade) + 1;
        double[] places = new double[count];
        for (int i = 0; i < count; i++) {
            places[i] = from * Math.pow(10, (double) i / perDecade);
        }
        return places;
    }

    /** The modulus with noise: both parts err by a share of |G*|, independently, and say so. */
    static Moduli measured(Complex modulus, double noise, Random random) {
        double deviation = noise * modulus.abs();
        return new Moduli(
                modulus.re() + deviation * random.nextGaussian(),
                modulus.im() + deviation * random.nextGaussian(),
                Optional.of(new ModuliCovariance(
                        Math.max(deviation * deviation, square(1e-12 * modulus.re())),
                        Math.max(deviation * deviation, square(1e-12 * modulus.im())),
                        0)));
    }

    private static double square(double value) {
        return value * value;
    }

    static List<ModulusReading> readings(
            DoubleFunction<Complex> model, double[] angularFrequencies, double noise, Random random) {
        List<ModulusReading> readings = new ArrayList<>();
        for (double angularFrequency : angularFrequencies) {
            readings.add(new ModulusReading(angularFrequency, measured(model.apply(angularFrequency), noise, random)));
        }
        return readings;
    }

    /** Where a function that rises from below zero passes it, by halving the interval of the logarithm. */
    static double root(DoubleUnaryOperator function, double low, double high) {
        double below = Math.log(low);
        double above = Math.log(high);
        for (int i = 0; i < 200; i++) {
            double half = (below + above) / 2;
            if (function.applyAsDouble(Math.exp(half)) < 0) {
                below = half;
            } else {
                above = half;
            }
        }
        return Math.exp((below + above) / 2);
    }

    /** Markers of a property, in their order. */
    static List<Marker> named(List<Marker> markers, String property) {
        return markers.stream()
                .filter(marker -> marker.property().equals(property))
                .toList();
    }
}
