package nightlag.stages.sweep;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import nightlag.stages.Study;
import nightlag.stages.SweepPoint;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.numeric.Complex;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * The material σ = G γ/(1 + γ²) between parallel plates, for which everything is known in closed form (exact): with
 * s = √(1 + γ₀²) and ρ = ((s − 1)/γ₀)² the moduli of the odd orders n = 2k + 1 at the rim are G'ₙ = G ρᵏ(1 − ρ)/s, and the
 * plates show 4/γ₀⁴ ∫ G'ₙ γ³ dγ. A constant loss modulus stands beside it.
 * {@code mvn test -pl stages -Dtest=PlateRimValidationTest -Dnightlag.study=long} prints what the correction costs and leaves.
 */
class PlateRimValidationTest {
    private static final double G = 1000;
    private static final double LOSS = 150;

    private static double rim(int order, double strain) {
        double root = Math.hypot(1, strain);
        double ratio = Math.pow((root - 1) / strain, 2);
        return G * Math.pow(ratio, (order - 1) / 2.0) * (1 - ratio) / root;
    }

    private static double apparent(int order, double strain) {
        if (order == 1) {
            return 8 * G / Math.pow(strain, 4) * (strain * strain / 2 - Math.hypot(1, strain) + 1);
        }
        int steps = 4000;
        double sum = 0;
        for (int i = 0; i < steps; i++) {
            double at = (i + 0.5) / steps;
            sum += rim(order, at * strain) * at * at * at / steps;
        }
        return 4 * sum;
    }

    /** The published figures of the material, G = 1. */
    @ParameterizedTest
    @CsvSource({"0.3, 0.9371936618, 0.9573818360", "1, 0.5857864376, 0.6862915010", "3, 0.1519493853, 0.2308861570"})
    void theMaterialIsTheOneOfTheClosedForm(double strain, double atRim, double between) {
        assertThat(rim(1, strain) / G).isCloseTo(atRim, within(1e-10));
        assertThat(apparent(1, strain) / G).isCloseTo(between, within(1e-10));
    }

    private static List<Double> strains(double low, double high, int perDecade) {
        List<Double> strains = new ArrayList<>();
        int last = (int) Math.round(perDecade * Math.log10(high / low));
        for (int i = 0; i <= last; i++) {
            strains.add(low * Math.pow(10, (double) i / perDecade));
        }
        return strains;
    }

    /** A sweep of points as the plates show them, moduli and third harmonic known to a relative u each. */
    private static List<ModulusPoint> sweep(List<Double> strains, double u, long seed, DoubleUnaryOperator storage) {
        Random random = new Random(seed);
        List<ModulusPoint> points = new ArrayList<>();
        for (double strain : strains) {
            Complex clean = new Complex(storage.applyAsDouble(strain), LOSS);
            double deviation = u * clean.abs();
            Complex modulus =
                    clean.plus(new Complex(deviation * random.nextGaussian(), deviation * random.nextGaussian()));
            Complex third = new Complex(
                    apparent(3, strain) * strain + deviation * strain * random.nextGaussian(),
                    deviation * strain * random.nextGaussian());
            points.add(SweepPoint.of(strain, modulus, u)
                    .harmonics(List.of(
                            new Harmonic(1, modulus.re() * strain, modulus.im() * strain, 1, OptionalDouble.of(0)),
                            new Harmonic(2, 0, 0, 0, OptionalDouble.of(Math.max(u, 1e-12))),
                            new Harmonic(
                                    3,
                                    third.re(),
                                    third.im(),
                                    third.abs() / (modulus.abs() * strain),
                                    OptionalDouble.of(Math.max(u, 1e-12)))))
                    .build());
        }
        return points;
    }

    @Test
    void anExactSweepOfTenPointsADecadeIsCorrectedToTheRim() {
        List<Double> strains = strains(0.01, 10, 10);
        List<ModulusPoint> apparent = sweep(strains, 0, 1, strain -> apparent(1, strain));
        List<ModulusPoint> corrected = PlateRim.corrected(apparent);
        for (int i = 0; i < strains.size(); i++) {
            double strain = strains.get(i);
            ModulusPoint point = corrected.get(i);
            Complex truth = new Complex(rim(1, strain), LOSS);
            double error = point.moduli().orElseThrow().complex().minus(truth).abs() / truth.abs();
            // worst inside; at the last strains the slope is known from one side only
            assertThat(error).as("modulus at %g", strain).isLessThan(strain < 4 ? 2e-4 : 3e-3);
            assertThat(point.stressAmplitudePa().orElseThrow() / (truth.abs() * strain) - 1)
                    .isCloseTo(0, within(3e-3));
            double third = rim(3, strain) / truth.abs();
            assertThat(point.harmonics().get(2).relativeIntensity() / third - 1)
                    .as("third harmonic at %g", strain)
                    .isCloseTo(0, within(strain < 4 ? 3e-4 : 5e-3));
            assertThat(point.harmonics().get(2).stressInPhasePa()).isPositive();
        }
    }

    @Test
    void theUncertaintyOfTheRimCoversTheTruth() {
        List<Double> strains = strains(0.01, 10, 10);
        int draws = 40;
        int covered = 0;
        double third = 0;
        for (int seed = 0; seed < draws; seed++) {
            List<ModulusPoint> corrected =
                    PlateRim.corrected(sweep(strains, 0.01, seed, strain -> apparent(1, strain)));
            for (int i = 0; i < strains.size(); i++) {
                Moduli moduli = corrected.get(i).moduli().orElseThrow();
                double u = moduli.covariance().orElseThrow().storageU();
                covered += Math.abs(moduli.storagePa() - rim(1, strains.get(i))) <= 1.96 * u ? 1 : 0;
            }
            // at a strain of 1 the third harmonic stands 15 times above its noise
            Harmonic harmonic = corrected.get(20).harmonics().get(2);
            double truth = rim(3, 1) / Math.hypot(rim(1, 1), LOSS);
            third += Math.pow(
                            (harmonic.relativeIntensity() - truth)
                                    / harmonic.relativeIntensityU().orElseThrow(),
                            2)
                    / draws;
        }
        assertThat((double) covered / (draws * strains.size())).isBetween(0.93, 0.99);
        assertThat(Math.sqrt(third)).isBetween(0.7, 1.4);
    }

    /**
     * What the correction leaves and what it costs, over draws: rms of |ΔG*|/|G*| and the published u over the point's own,
     * inside and at the last strain, where the slope is known from one side only.
     */
    @Tag("study")
    @ParameterizedTest(name = "noise {0}, linear throughout: {1}")
    @CsvSource({
        "0,     false, 2e-4,   3e-3,   NaN, NaN",
        "0.001, false, 2.5e-3, 8e-3,   2.2, 6",
        "0.01,  false, 2e-2,   4.5e-2, 1.5, 3.5",
        "0.001, true,  1.6e-3, 1.8e-3, 1.1, 1.2"
    })
    void theCorrectionCostsAndLeavesLittle(
            double u, boolean linear, double inside, double atLast, double priceInside, double priceAtLast) {
        DoubleUnaryOperator shown = linear ? strain -> 900 : strain -> apparent(1, strain);
        DoubleUnaryOperator truth = linear ? strain -> 900 : strain -> rim(1, strain);
        List<Double> strains = strains(0.01, 10, 10);
        int last = strains.size() - 1;
        int draws = u == 0 ? 1 : Study.draws(40, 400);
        double[] squares = new double[2];
        double[] price = new double[2];
        for (int seed = 0; seed < draws; seed++) {
            List<ModulusPoint> apparent = sweep(strains, u, 100 + seed, shown);
            List<ModulusPoint> corrected = PlateRim.corrected(apparent);
            for (int i = 0; i <= last; i++) {
                Moduli before = apparent.get(i).moduli().orElseThrow();
                Moduli after = corrected.get(i).moduli().orElseThrow();
                Complex exact = new Complex(truth.applyAsDouble(strains.get(i)), LOSS);
                int place = i < last ? 0 : 1;
                int count = draws * (i < last ? last : 1);
                squares[place] += Math.pow(after.complex().minus(exact).abs() / exact.abs(), 2) / count;
                price[place] += after.covariance().orElseThrow().storageU()
                        / before.covariance().orElseThrow().storageU()
                        / count;
            }
        }
        Study.row(
                "| %.1f %%%s | %.1e / %.1e | %.2f / %.2f |",
                100 * u,
                linear ? ", linear throughout" : "",
                Math.sqrt(squares[0]),
                Math.sqrt(squares[1]),
                price[0],
                price[1]);
        assertThat(Math.sqrt(squares[0])).isLessThan(inside);
        assertThat(Math.sqrt(squares[1])).isLessThan(atLast);
        if (u > 0) {
            assertThat(price[0]).isBetween(0.95, priceInside);
            assertThat(price[1]).isBetween(0.95, priceAtLast);
        }
    }

    /** Nothing to correct: what noise makes of the correction stays within the noise, and so does its price. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8})
    void aLinearSweepStaysAsItIs(long seed) {
        double u = 1e-3;
        List<ModulusPoint> apparent = sweep(strains(0.01, 10, 10), u, seed, strain -> 900);
        List<ModulusPoint> corrected = PlateRim.corrected(apparent);
        double largest = 0;
        double price = 0;
        for (int i = 0; i < apparent.size(); i++) {
            Moduli before = apparent.get(i).moduli().orElseThrow();
            Moduli after = corrected.get(i).moduli().orElseThrow();
            largest = Math.max(largest, after.complex().minus(before.complex()).abs() / before.magnitudePa());
            price += after.covariance().orElseThrow().storageU()
                    / before.covariance().orElseThrow().storageU()
                    / apparent.size();
        }
        assertThat(largest).isLessThan(2 * u);
        assertThat(price).isBetween(0.95, 1.05);
    }

    /** Plates read the third harmonic of a cubic material two thirds as large (exact): its stress goes with γ³. */
    @Test
    void aThirdHarmonicThatGoesWithTheCubeOfStrainIsHalfAsMuchAgain() {
        List<ModulusPoint> points = new ArrayList<>();
        for (double strain : strains(0.01, 0.1, 5)) {
            points.add(SweepPoint.of(strain, new Complex(G, 0.1 * G), 1e-6)
                    .harmonics(List.of(
                            new Harmonic(1, G * strain, 0.1 * G * strain, 1, OptionalDouble.of(0)),
                            new Harmonic(2, 0, 0, 0, OptionalDouble.of(1e-6)),
                            new Harmonic(3, -G * Math.pow(strain, 3), 0, strain * strain, OptionalDouble.of(1e-8))))
                    .build());
        }
        List<ModulusPoint> corrected = PlateRim.corrected(points);
        for (int i = 0; i < points.size(); i++) {
            assertThat(corrected.get(i).harmonics().get(2).stressInPhasePa()
                            / points.get(i).harmonics().get(2).stressInPhasePa())
                    .isCloseTo(1.5, within(1e-4));
        }
    }

    @Test
    void repeatsOfAStrainAreCorrectedAlike() {
        List<Double> twice = new ArrayList<>(strains(0.01, 10, 10));
        twice.addAll(strains(0.01, 10, 10));
        List<ModulusPoint> corrected = PlateRim.corrected(sweep(twice, 0, 1, strain -> apparent(1, strain)));
        assertThat(corrected).hasSize(62);
        for (int i = 0; i < corrected.size(); i += 2) {
            assertThat(corrected.get(i).moduli().orElseThrow().storagePa())
                    .isCloseTo(corrected.get(i + 1).moduli().orElseThrow().storagePa(), within(1e-9));
        }
    }
}
