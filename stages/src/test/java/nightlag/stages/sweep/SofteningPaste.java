package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import java.util.Random;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.numeric.Complex;

/**
 * An invented paste with G' = 1000/(1 + x²) Pa and G'' = 100 (1 + x)/(1 + x²) Pa, x = γ/0.1: tan δ = (1 + x)/10 is 1 at x = 9,
 * where |G*| = 1000 √2/82 Pa.
 */
final class SofteningPaste {
    static final double CROSSOVER_STRAIN = 0.9;
    static final double CROSSOVER_STRESS = 0.9 * 1000 * Math.sqrt(2) / 82;

    private SofteningPaste() {}

    static Complex modulus(double strain) {
        double x = strain / 0.1;
        return new Complex(1000 / (1 + x * x), 100 * (1 + x) / (1 + x * x));
    }

    /** Where |G*| is 5 % below its mean over the strains of the first decade. */
    static double linearLimit(double[] strains) {
        double sum = 0;
        int count = 0;
        for (double strain : strains) {
            if (strain <= 10 * strains[0] * (1 + 1e-9)) {
                sum += modulus(strain).abs();
                count++;
            }
        }
        double level = 0.95 * sum / count;
        return MarkerModel.root(strain -> level - modulus(strain).abs(), strains[0], strains[strains.length - 1]);
    }

    static Sweep sweep(double[] strains, double noise, Random random) {
        List<ModulusPoint> points = new ArrayList<>();
        for (int i = 0; i < strains.length; i++) {
            points.add(SeriesPoint.of(i, 298.15, 1)
                    .strained(strains[i])
                    .moduli(MarkerModel.measured(modulus(strains[i]), noise, random))
                    .build());
        }
        return new Sweep(
                new SweepName("1", "1"),
                SweepPlan.Kind.AMPLITUDE,
                OptionalDouble.of(298.15),
                OptionalDouble.of(1),
                points);
    }
}
