package nightlag.pipeline.tables;

import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;
import java.util.function.ToDoubleFunction;
import java.util.stream.Collectors;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;
import nightlag.stages.sweep.PointOrder;

/** The declaration of {@code points}. */
final class PointsTable {
    private static final int THIRD = 3;
    private static final double ABSOLUTE_ZERO_CELSIUS = -273.15;

    static final Table<ModulusPoint> TABLE = Table.of(
            "points",
            "One point: what one record, window or row gave",
            LotColumns.before(
                    point -> point.key().grade(),
                    point -> point.key().lot(),
                    point -> point.key().specimen(),
                    List.of(
                            Column.<ModulusPoint>text(
                                            "sweep",
                                            "sweep of the specimen",
                                            point -> point.key().sweep())
                                    .asKey(),
                            Column.<ModulusPoint>text(
                                            "point",
                                            "point of the sweep: the tag's value, else the file's name, or the number of the"
                                                    + " window or row",
                                            point -> point.key().point())
                                    .asKey(),
                            Column.word(
                                    "deformation",
                                    "which modulus it is: G in shear, E in extension",
                                    Arrays.stream(DeformationMode.values())
                                            .map(DeformationMode::word)
                                            .toList(),
                                    point -> point.deformation().word()),
                            Column.<ModulusPoint>optional(
                                            "temperature_C",
                                            "°C",
                                            "mean of the temperature channel, else the tag",
                                            point -> Columns.celsius(point.temperatureK()))
                                    .atLeast(ABSOLUTE_ZERO_CELSIUS),
                            Column.<ModulusPoint>optional(
                                            "frequency_Hz", "Hz", "frequency f", ModulusPoint::frequencyHz)
                                    .atLeast(0),
                            Column.<ModulusPoint>optional(
                                            "angular_frequency_rad_s",
                                            "rad/s",
                                            "angular frequency ω = 2πf",
                                            PointsTable::angularFrequency)
                                    .atLeast(0),
                            Column.optional(
                                    "elapsed_s", "s", "time since the start of the run", ModulusPoint::elapsedS),
                            Column.<ModulusPoint>optional(
                                            "strain_amplitude",
                                            "1",
                                            "strain amplitude after corrections",
                                            ModulusPoint::strainAmplitude)
                                    .atLeast(0),
                            Column.<ModulusPoint>optional(
                                            "stress_amplitude_Pa",
                                            "Pa",
                                            "stress amplitude after corrections",
                                            ModulusPoint::stressAmplitudePa)
                                    .atLeast(0),
                            modulus("storage_modulus_Pa", "Pa", "storage modulus G' or E'", Moduli::storagePa),
                            uncertainty("storage_modulus_u_Pa", "storage modulus", ModuliCovariance::storageU),
                            modulus("loss_modulus_Pa", "Pa", "loss modulus G'' or E''", Moduli::lossPa),
                            uncertainty("loss_modulus_u_Pa", "loss modulus", ModuliCovariance::lossU),
                            modulus("complex_modulus_Pa", "Pa", "magnitude of the complex modulus", Moduli::magnitudePa)
                                    .atLeast(0),
                            modulus(
                                            "phase_angle_deg",
                                            "°",
                                            "phase angle δ of stress before strain, from −180° to 180°",
                                            moduli -> Math.toDegrees(moduli.phaseRad()))
                                    .atLeast(-180)
                                    .atMost(180),
                            modulus("tan_delta", "1", "loss factor tan δ, loss over storage modulus", Moduli::tanDelta),
                            Column.<ModulusPoint>optional(
                                            "tan_delta_u",
                                            "1",
                                            "standard uncertainty of tan δ from the record's own noise",
                                            point -> point.moduli()
                                                    .map(Moduli::tanDeltaU)
                                                    .orElse(OptionalDouble.empty()))
                                    .atLeast(0),
                            Column.<ModulusPoint>optional(
                                            "complex_viscosity_Pa_s",
                                            "Pa·s",
                                            "magnitude of the complex viscosity, the complex modulus over ω",
                                            PointsTable::complexViscosity)
                                    .atLeast(0),
                            Column.<ModulusPoint>optional(
                                            "relative_third_harmonic",
                                            "1",
                                            "third harmonic of the stress over its fundamental",
                                            PointsTable::relativeThirdHarmonic)
                                    .atLeast(0),
                            Column.word(
                                    "quality",
                                    "how far the point can be trusted; an unusable one is kept out of what follows",
                                    Arrays.stream(Quality.values())
                                            .map(Quality::word)
                                            .toList(),
                                    point -> point.quality().word()),
                            Column.<ModulusPoint>text(
                                            "flags",
                                            "why it is not sound, words between semicolons: " + flagWords(", "),
                                            PointsTable::flags)
                                    .matching(flagPattern()),
                            Column.<ModulusPoint>optional(
                                            "cycles_used",
                                            "1",
                                            "cycles that entered, start-up ones not counted",
                                            ModulusPoint::cyclesUsed)
                                    .atLeast(0),
                            Column.count(
                                    "samples_used",
                                    "samples that entered; 0 for moduli reduced elsewhere",
                                    ModulusPoint::samplesUsed),
                            Column.optional(
                                    "strain_snr_dB",
                                    "dB",
                                    "signal to noise of the deformation, 20 log10 of the fundamental's rms over the noise",
                                    ModulusPoint::strainSnrDb),
                            Column.optional(
                                    "stress_snr_dB",
                                    "dB",
                                    "signal to noise of the load, likewise",
                                    ModulusPoint::stressSnrDb),
                            Column.<ModulusPoint>text(
                                            "source_file",
                                            "raw file it came from: the intake folder's name, then the path below it",
                                            point -> point.key().sourceFile())
                                    .required()
                                    .asKey(),
                            Column.<ModulusPoint>optional(
                                            "degrees_of_freedom",
                                            "1",
                                            "effective degrees of freedom behind the standard uncertainties",
                                            ModulusPoint::degreesOfFreedom)
                                    .atLeast(0))),
            PointOrder.BY_KEY);

    private PointsTable() {}

    private static Column<ModulusPoint> modulus(
            String name, String unit, String meaning, ToDoubleFunction<Moduli> getter) {
        return Column.optional(name, unit, meaning, point -> Columns.from(point.moduli(), getter));
    }

    private static Column<ModulusPoint> uncertainty(
            String name, String what, ToDoubleFunction<ModuliCovariance> getter) {
        Column<ModulusPoint> column = Column.optional(
                name,
                "Pa",
                "standard uncertainty of the " + what + " from the record's own noise",
                point -> Columns.from(point.moduli().flatMap(Moduli::covariance), getter));
        return column.atLeast(0);
    }

    private static OptionalDouble angularFrequency(ModulusPoint point) {
        return Columns.map(point.frequencyHz(), hertz -> 2 * Math.PI * hertz);
    }

    private static OptionalDouble complexViscosity(ModulusPoint point) {
        return point.moduli().isEmpty()
                ? OptionalDouble.empty()
                : Columns.map(
                        angularFrequency(point), omega -> point.moduli().get().magnitudePa() / omega);
    }

    private static OptionalDouble relativeThirdHarmonic(ModulusPoint point) {
        return point.harmonics().stream()
                .filter(harmonic -> harmonic.order() == THIRD)
                .mapToDouble(Harmonic::relativeIntensity)
                .findFirst();
    }

    private static String flags(ModulusPoint point) {
        return point.flags().stream().map(Flag::word).collect(Collectors.joining(";"));
    }

    private static String flagPattern() {
        String any = "(" + flagWords("|") + ")";
        return "^" + any + "(;" + any + ")*$";
    }

    private static String flagWords(String between) {
        return Arrays.stream(Flag.values()).map(Flag::word).collect(Collectors.joining(between));
    }
}
