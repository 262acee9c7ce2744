package nightlag.stages;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.Random;
import java.util.stream.DoubleStream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.geometry.SignalCorrection;
import nightlag.stages.moduli.CreepAnalysis;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoints.Origin;
import nightlag.stages.moduli.ModulusPoints.Ranges;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.ScreeningPlan;
import nightlag.stages.numeric.Complex;
import nightlag.stages.spectrum.CreepData;
import nightlag.stages.spectrum.CreepFit;
import nightlag.stages.spectrum.RelaxationModes;
import nightlag.stages.spectrum.RetardationModes;
import nightlag.stages.spectrum.ShiftedCreep;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.waveform.Waveform;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * How often 95 % intervals of the figures out of raw creep and recovery records hold the truth. The load comes on at once,
 * somewhere between two samples, and goes off likewise; both channels have noise of a part of what they read.
 */
@Tag("study")
class CreepUncertaintyStudyTest {
    private static final int DRAWS = Study.draws(6, 200);
    private static final double STRESS_PA = 100;
    /** The clock was started for something else: its zero says nothing of the load. */
    private static final double STARTED_S = 100;

    /** An invented melt; its figures follow exactly. */
    private static final RelaxationModes MELT = RelaxationModes.of(
            0, new double[] {1e-3, 1e-2, 0.08, 0.5, 2.5}, new double[] {9e4, 6e4, 3.5e4, 1.2e4, 2e3});
    /** An invented solid: J0 = 1/(3 MPa) and three modes. */
    private static final RetardationModes SOLID =
            RetardationModes.of(1 / 3e6, 0, new double[] {0.05, 0.5, 4}, new double[] {1e-7, 3e-7, 5e-7});

    /** What the draws of one figure came to. */
    private static final class Tally {
        private int draws;
        private int held;
        private double errors;
        private double squares;
        private double squaredU;
        private double squaredZ;
        private double largestZ;

        void take(double truth, Marker marker) {
            double error = marker.value() / truth - 1;
            double u = marker.u().getAsDouble() / truth;
            draws++;
            held += Math.abs(error) <= 1.96 * u ? 1 : 0;
            errors += error;
            squares += error * error;
            squaredU += u * u;
            squaredZ += error * error / (u * u);
            largestZ = Math.max(largestZ, Math.abs(error) / u);
        }

        double held() {
            return 100.0 * held / draws;
        }

        double rmsZ() {
            return Math.sqrt(squaredZ / draws);
        }
    }

    static Map<String, Double> truths(RetardationModes material) {
        Map<String, Double> truths = new LinkedHashMap<>();
        truths.put("instantaneous_compliance", material.instantaneousPerPa());
        truths.put("instantaneous_modulus", 1 / material.instantaneousPerPa());
        if (material.isLiquid()) {
            truths.put("zero_shear_viscosity", 1 / material.fluidityPerPaS());
            truths.put("steady_state_compliance", material.recoverablePerPa());
            truths.put("mean_relaxation_time", material.recoverablePerPa() / material.fluidityPerPaS());
        } else {
            truths.put("equilibrium_modulus", 1 / material.recoverablePerPa());
        }
        return truths;
    }

    private static Map<String, Tally> study(
            RetardationModes material, double intervalS, double loadedS, double noise, boolean withModuli, int draws)
            throws ReductionFault {
        Map<String, Tally> tallies = new LinkedHashMap<>();
        Map<String, Double> truths = truths(material);
        for (int draw = 0; draw < draws; draw++) {
            Random random = new Random(1000 + draw);
            CreepData data =
                    CreepData.of(ShiftedCreep.unmoved(List.of(record(material, intervalS, loadedS, noise, random))));
            if (withModuli) {
                data = data.with(moduli(material, noise, random), Optional.empty());
            }
            SpectrumPlan plan = new SpectrumPlan(!material.isLiquid(), OptionalInt.empty(), false);
            for (Marker marker : CreepFit.fit(data, plan).markers(298.15)) {
                if (truths.containsKey(marker.property())) {
                    tallies.computeIfAbsent(marker.property(), p -> new Tally())
                            .take(truths.get(marker.property()), marker);
                }
            }
        }
        tallies.forEach((property, tally) -> Study.row(
                "| %s | %.0f ms | %.0f s | %.2f %% | %s | %s | %d | %.1e | %.1e | %.1e | %.2f | %.1f |",
                material.isLiquid() ? "melt" : "solid",
                1000 * intervalS,
                loadedS,
                100 * noise,
                withModuli ? "with moduli" : "alone",
                property,
                tally.draws,
                tally.errors / tally.draws,
                Math.sqrt(tally.squares / tally.draws),
                Math.sqrt(tally.squaredU / tally.draws),
                tally.rmsZ(),
                tally.held()));
        return tallies;
    }

    /** Samples every {@code intervalS}, further apart as time goes on, and as close again before and after the unload. */
    private static CreepCurve record(
            RetardationModes material, double intervalS, double loadedS, double noise, Random random)
            throws ReductionFault {
        List<Double> times = new ArrayList<>();
        for (int i = 60; i > 0; i--) {
            times.add(-i * intervalS);
        }
        double unload = loadedS + intervalS * random.nextDouble();
        double load = intervalS * random.nextDouble() - intervalS;
        for (double t = 0; t < loadedS - 20 * intervalS; t += Math.max(intervalS, t / 50)) {
            times.add(t);
        }
        for (int i = 20; i > 0; i--) {
            times.add(loadedS - i * intervalS);
        }
        for (double t = loadedS; t < 3 * loadedS; t += Math.max(intervalS, (t - loadedS) / 50)) {
            times.add(t);
        }
        double[] timeS = times.stream().mapToDouble(Double::doubleValue).toArray();
        double[] strain = new double[timeS.length];
        double[] stress = new double[timeS.length];
        for (int i = 0; i < timeS.length; i++) {
            double t = timeS[i];
            double exact = STRESS_PA
                    * ((t >= load ? material.creepPerPa(t - load) : 0)
                            - (t >= unload ? material.creepPerPa(t - unload) : 0));
            double held = t >= load && t < unload ? STRESS_PA : 0;
            strain[i] =
                    exact + noise * (exact + 0.1 * STRESS_PA * material.instantaneousPerPa()) * random.nextGaussian();
            stress[i] = held + noise * (held + 0.1 * STRESS_PA) * random.nextGaussian();
        }
        return CreepAnalysis.of(
                new Origin(
                        new PointKey("Melt", "1", "1", "1", "run", "run.csv"),
                        Optional.empty(),
                        OptionalDouble.of(298.15),
                        OptionalDouble.empty()),
                new Waveform(
                        DoubleStream.of(timeS).map(t -> t + STARTED_S).toArray(),
                        strain,
                        stress,
                        new double[0],
                        OptionalDouble.empty(),
                        0),
                SignalCorrection.of(
                        GeometrySpec.none(), Corrections.none(), DeformationSignal.STRAIN, LoadSignal.STRESS),
                new Ranges(Optional.empty(), Optional.empty()),
                ScreeningPlan.withDefaults());
    }

    /** Twelve frequencies from 0.02 to 20 Hz. */
    private static List<ModulusReading> moduli(RetardationModes material, double noise, Random random) {
        return DoubleStream.iterate(0, i -> i + 1)
                .limit(12)
                .map(i -> 2 * Math.PI * 0.02 * Math.pow(1000, i / 11))
                .mapToObj(omega -> {
                    Complex exact = new Complex(1, 0).over(material.compliancePerPa(omega));
                    double u = Math.max(1e-5, noise / 5) * exact.abs();
                    return new ModulusReading(
                            omega,
                            new Moduli(
                                    exact.re() + (noise > 0 ? u : 0) * random.nextGaussian(),
                                    exact.im() + (noise > 0 ? u : 0) * random.nextGaussian(),
                                    Optional.of(new ModuliCovariance(u * u, u * u, 0))));
                })
                .toList();
    }

    private static RetardationModes material(String name) {
        return name.equals("melt") ? MELT.retardation() : SOLID;
    }

    /**
     * Bounds of the long form: 95 % intervals hold the truth of η0, Je0, the mean time and Ge in at least 88 % of the draws
     * (200 draws are good to 3 %), and errors are at most 1.25 times u, rms; u may be on the safe side. In the short form no error is beyond 4 u.
     */
    @ParameterizedTest(name = "{0}, samples every {1} s about the steps, {2} s of load, {3} of noise, with moduli: {4}")
    @CsvSource({
        "melt, 0.001, 20, 0.003, false",
        "melt, 0.001, 20, 0.01, false",
        "melt, 0.01, 20, 0.003, false",
        "melt, 0.01, 20, 0.01, false",
        "melt, 0.01, 3, 0.003, false",
        "melt, 0.05, 20, 0.0003, false",
        "melt, 0.05, 20, 0.003, false",
        "melt, 0.05, 20, 0.01, false",
        "solid, 0.001, 20, 0.003, false",
        "solid, 0.01, 20, 0.01, false",
        "solid, 0.05, 20, 0.003, false",
        "melt, 0.001, 20, 0.003, true",
        "melt, 0.01, 20, 0.003, true",
        "melt, 0.05, 20, 0.003, true",
        "melt, 0.05, 20, 0.01, true",
        "solid, 0.01, 20, 0.01, true"
    })
    void intervalsHoldTheTruth(String name, double intervalS, double loadedS, double noise, boolean withModuli)
            throws ReductionFault {
        Map<String, Tally> tallies = study(material(name), intervalS, loadedS, noise, withModuli, DRAWS);

        assertThat(tallies).containsKey(name.equals("melt") ? "zero_shear_viscosity" : "equilibrium_modulus");
        tallies.forEach((property, tally) -> {
            assertThat(tally.draws).as(property).isGreaterThan(DRAWS * 9 / 10 - 1);
            assertThat(tally.largestZ).as(property).isLessThan(Study.isLong() ? 6 : 4);
            if (Study.isLong()) {
                assertThat(tally.held()).as(property).isGreaterThan(88);
                assertThat(tally.rmsZ()).as(property).isLessThan(1.25);
            }
        });
    }

    /** What the instant of a step leaves, both ways alike, has no mean: exact records, the step anywhere between two samples. */
    @ParameterizedTest(name = "{0}, samples every {1} s about the steps")
    @CsvSource({"melt, 0.001", "melt, 0.01", "solid, 0.001", "solid, 0.01"})
    void exactRecordsGiveTheTruth(String name, double intervalS) throws ReductionFault {
        Map<String, Tally> tallies = study(material(name), intervalS, 20, 0, false, Study.draws(10, 100));

        tallies.forEach((property, tally) -> {
            if (!property.startsWith("instantaneous")) {
                assertThat(Math.abs(tally.errors / tally.draws)).as(property).isLessThan(1e-3);
            }
        });
    }
}
