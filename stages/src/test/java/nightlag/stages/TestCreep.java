package nightlag.stages;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.CreepPart;
import nightlag.stages.moduli.CreepReading;
import nightlag.stages.moduli.CreepStep;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;

/**
 * Creep under 1 kPa for tests, twenty readings a decade, and recovery where the record goes on.
 *
 * @param compliancePerPa J(t)
 * @param temperatureK temperature; not a number: none
 * @param firstS first reading after a step
 * @param loadedS how long the stress is on
 * @param untilS end of the record
 * @param noise error of each strain, of itself; u of one is said to be so much, 1e-6 at least
 */
public record TestCreep(
        DoubleUnaryOperator compliancePerPa,
        double temperatureK,
        double firstS,
        double loadedS,
        double untilS,
        double noise,
        long seed,
        DeformationMode deformation,
        String point) {
    private static final double STRESS_PA = 1000;

    public static TestCreep creep(DoubleUnaryOperator compliancePerPa, double firstS, double loadedS, double untilS) {
        return new TestCreep(compliancePerPa, 298.15, firstS, loadedS, untilS, 0, 1, DeformationMode.SHEAR, "run");
    }

    public TestCreep noisy(double ofItself, long withSeed) {
        return new TestCreep(
                compliancePerPa, temperatureK, firstS, loadedS, untilS, ofItself, withSeed, deformation, point);
    }

    /** At another temperature, where all goes a times as slowly and a reduced modulus is b times the modulus. */
    public TestCreep shifted(double toK, double a, double b) {
        return new TestCreep(
                t -> b * compliancePerPa.applyAsDouble(t / a),
                toK,
                firstS,
                loadedS,
                untilS,
                noise,
                seed,
                deformation,
                point + toK);
    }

    public TestCreep in(DeformationMode mode) {
        return new TestCreep(compliancePerPa, temperatureK, firstS, loadedS, untilS, noise, seed, mode, point + mode);
    }

    public CreepCurve build() {
        Random random = new Random(seed);
        List<CreepStep> steps = new ArrayList<>();
        List<CreepReading> readings = new ArrayList<>();
        steps.add(new CreepStep(CreepPart.LOAD, 0, 0, 0, STRESS_PA, 0, 0, 0, OptionalDouble.empty()));
        for (double t = firstS; t <= loadedS; t *= Math.pow(10, 0.05)) {
            readings.add(reading(1, t, t, STRESS_PA, STRESS_PA * compliancePerPa.applyAsDouble(t), 0, random));
        }
        if (untilS > loadedS) {
            double before = STRESS_PA * compliancePerPa.applyAsDouble(loadedS);
            steps.add(
                    new CreepStep(CreepPart.RECOVERY, loadedS, 0, 0, -STRESS_PA, 0, before, 0, OptionalDouble.empty()));
            for (double t = firstS; t <= untilS - loadedS; t *= Math.pow(10, 0.05)) {
                double strain =
                        STRESS_PA * (compliancePerPa.applyAsDouble(loadedS + t) - compliancePerPa.applyAsDouble(t));
                readings.add(reading(2, loadedS + t, t, -STRESS_PA, strain, before, random));
            }
        }
        return new CreepCurve(
                new PointKey("plover", "L1", "1", "1", point, "bench/" + point + ".csv"),
                Optional.empty(),
                deformation,
                Double.isNaN(temperatureK) ? OptionalDouble.empty() : OptionalDouble.of(temperatureK),
                OptionalDouble.empty(),
                true,
                steps,
                readings,
                Quality.SOUND,
                List.of(),
                1000,
                List.of());
    }

    private CreepReading reading(
            int step, double t, double since, double change, double strain, double before, Random random) {
        double u = Math.max(noise, 1e-6) * Math.abs(strain);
        double read = strain + noise * strain * random.nextGaussian();
        return new CreepReading(
                step, t, since, Math.max(0, change), read, u, (read - before) / change, u / Math.abs(change));
    }
}
