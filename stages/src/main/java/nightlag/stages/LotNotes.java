package nightlag.stages;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReasonCode;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.ModuliReason;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.spectrum.SpectrumReason;
import nightlag.stages.superposition.SuperpositionReason;
import nightlag.stages.sweep.SweepReason;

/**
 * What is said of a lot, told apart by what a reader has to do about it.
 *
 * @param doubts what puts published figures in doubt
 * @param unattained what was asked for and could not be had
 * @param remarks what was had, and how
 */
record LotNotes(List<Reason> doubts, List<Reason> unattained, List<Reason> remarks) {
    private static final Set<String> DOUBTS = codes(
            SuperpositionReason.DOES_NOT_SUPERPOSE,
            SpectrumReason.KRAMERS_KRONIG_INCONSISTENT,
            SpectrumReason.KRAMERS_KRONIG_LEFT_MOST,
            SpectrumReason.CREEP_SHIFT_OFF,
            ConclusionReason.TAGGED_TEMPERATURES_OFF);

    private static final Set<String> REMARKS = codes(
            SweepReason.SWEEP_AMBIGUOUS,
            SweepReason.SWEEP_REPEATS_WITHOUT_TIME,
            SweepReason.SWEEP_RAMP_TURNS,
            SweepReason.SWEEP_MIXED_DEFORMATION,
            SweepReason.SWEEP_REPEATS_TOGETHER,
            SweepReason.SWEEP_UNUSABLE_LEFT_OUT,
            SuperpositionReason.ISOTHERM_TOO_FEW_FREQUENCIES,
            SuperpositionReason.ISOTHERM_WITHOUT_OVERLAP,
            SuperpositionReason.MODULI_WITHOUT_LOGARITHM,
            SuperpositionReason.VERTICAL_SHIFT_LIMITED,
            SuperpositionReason.REFERENCE_INTERPOLATED,
            SpectrumReason.CREEP_OTHER_NUMBER_OF_MODES,
            SpectrumReason.CREEP_MODULI_WITHOUT_U,
            SpectrumReason.EQUILIBRIUM_MODULUS_ZERO,
            ConclusionReason.CURVE_MEASURED_BESIDE_REFERENCE,
            ConclusionReason.CREEP_OUTSIDE_ISOTHERMS,
            ConclusionReason.CREEP_WITHOUT_SHIFT,
            ConclusionReason.RIM_TOO_FEW_STRAINS);

    /** Copies the lists. */
    LotNotes {
        doubts = List.copyOf(doubts);
        unattained = List.copyOf(unattained);
        remarks = List.copyOf(remarks);
    }

    /** Sorts notes, each kind in its order. */
    static LotNotes of(List<Reason> notes) {
        List<Reason> doubts = new ArrayList<>();
        List<Reason> unattained = new ArrayList<>();
        List<Reason> remarks = new ArrayList<>();
        for (Reason note : notes) {
            (isDoubt(note) ? doubts : REMARKS.contains(note.code()) ? remarks : unattained).add(note);
        }
        return new LotNotes(doubts, unattained, remarks);
    }

    /** Whether it puts published figures in doubt. */
    static boolean isDoubt(Reason note) {
        return DOUBTS.contains(note.code());
    }

    /** Whether it is why a figure is absent that the data do not reach, which is usual. */
    static boolean isUnsupported(Reason note) {
        return note.code().equals(SpectrumReason.MARKER_BEYOND_DATA.name());
    }

    /** One sentence about the files whose tagged temperatures are far from the measured ones. */
    static List<Reason> taggedTemperatures(List<ModulusPoint> points, List<CreepCurve> creep) {
        Map<String, List<Reason>> byFile = new LinkedHashMap<>();
        points.forEach(point -> addTagged(point.key(), point.reasons(), byFile));
        creep.forEach(curve -> addTagged(curve.key(), curve.reasons(), byFile));
        if (byFile.isEmpty()) {
            return List.of();
        }
        Map.Entry<String, List<Reason>> first = byFile.entrySet().iterator().next();
        return List.of(ConclusionReason.TAGGED_TEMPERATURES_OFF.with(
                byFile.values().stream().mapToInt(List::size).sum(),
                byFile.size(),
                first.getKey(),
                first.getValue().get(0).sentence()));
    }

    private static void addTagged(PointKey key, List<Reason> reasons, Map<String, List<Reason>> byFile) {
        reasons.stream()
                .filter(reason -> reason.code().equals(ModuliReason.MODULI_TAGGED_TEMPERATURE_OFF.name()))
                .forEach(reason -> byFile.computeIfAbsent(key.sourceFile(), any -> new ArrayList<>())
                        .add(reason));
    }

    private static Set<String> codes(ReasonCode... codes) {
        return Stream.of(codes).map(ReasonCode::name).collect(Collectors.toUnmodifiableSet());
    }
}
