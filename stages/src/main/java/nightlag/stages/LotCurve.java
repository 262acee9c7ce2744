package nightlag.stages;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.moduli.SharedErrors;
import nightlag.stages.spectrum.DiscreteFit;
import nightlag.stages.superposition.IsothermReadings;
import nightlag.stages.superposition.MasterCurve;
import nightlag.stages.superposition.Superposition;
import nightlag.stages.superposition.SuperpositionPlan;
import nightlag.stages.sweep.FrequencySweeps;
import nightlag.stages.sweep.Isotherm;
import nightlag.stages.sweep.LotIsotherms;
import nightlag.stages.sweep.SweepName;

/**
 * The modulus of a lot over frequency at one temperature: its master curve, or its only isotherm.
 *
 * @param temperatureK the temperature it is said to hold at, K
 * @param deformation the deformation they were measured in
 * @param readings the readings
 * @param sharedErrors what several of them are off by together
 * @param master the master curve they come from; empty where none was asked for
 * @param notes what is unusual about it
 */
record LotCurve(
        double temperatureK,
        DeformationMode deformation,
        List<ModulusReading> readings,
        SharedErrors sharedErrors,
        Optional<MasterCurve> master,
        List<Reason> notes) {
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;
    private static final double UNNOTED_KELVIN = 0.1;

    /** Copies the lists. */
    LotCurve {
        readings = List.copyOf(readings);
        notes = List.copyOf(notes);
    }

    /** Whether it is a master curve that does not superpose. */
    boolean isInDoubt() {
        return master.filter(MasterCurve::isInDoubt).isPresent();
    }

    /**
     * The curve of a lot.
     *
     * @throws ReductionFault if there is none, or more than one and no reference temperature
     */
    static LotCurve of(LotIsotherms lot, Optional<SuperpositionPlan> superposition) throws ReductionFault {
        if (lot.isotherms().isEmpty()) {
            throw new ReductionFault(ConclusionReason.CURVE_NO_POINTS.with());
        }
        if (superposition.isPresent()) {
            return superposed(lot.isotherms(), superposition.get());
        }
        Isotherm only = only(lot.isotherms());
        return new LotCurve(
                only.temperatureK(),
                deformation(List.of(only)),
                only.readings(),
                SharedErrors.none(),
                Optional.empty(),
                List.of());
    }

    /** Shear and extension are two different moduli. */
    private static DeformationMode deformation(List<Isotherm> isotherms) throws ReductionFault {
        List<DeformationMode> modes = isotherms.stream()
                .flatMap(isotherm -> isotherm.points().stream())
                .map(ModulusPoint::deformation)
                .distinct()
                .toList();
        if (modes.size() > 1) {
            throw new ReductionFault(ConclusionReason.CURVE_MIXED_DEFORMATION.with());
        }
        return modes.get(0);
    }

    private static LotCurve superposed(List<Isotherm> isotherms, SuperpositionPlan plan) throws ReductionFault {
        DeformationMode deformation = deformation(isotherms);
        Function<SweepName, String> specimen = specimens(isotherms);
        MasterCurve master = Superposition.of(
                isotherms.stream()
                        .map(isotherm -> new IsothermReadings(
                                isotherm.temperatureK(),
                                isotherm.readings(),
                                isotherm.names().stream().map(specimen).toList()))
                        .toList(),
                plan);
        List<Reason> notes = new ArrayList<>(master.notes());
        List<Double> used = master.shifts().stream()
                .filter(shift -> shift.used())
                .map(shift -> shift.temperatureK())
                .toList();
        double reference = plan.referenceTemperatureK();
        if (used.size() == 1 && Math.abs(used.get(0) - reference) > UNNOTED_KELVIN) {
            notes.add(ConclusionReason.CURVE_MEASURED_BESIDE_REFERENCE.with(
                    used.get(0) - KELVIN_AT_ZERO_CELSIUS, reference - KELVIN_AT_ZERO_CELSIUS));
        }
        return new LotCurve(
                reference,
                deformation,
                master.points().stream().map(point -> point.reduced()).toList(),
                master.sharedErrors(),
                Optional.of(master),
                notes);
    }

    /** What readings of one specimen have in common; where each isotherm is of one specimen, repeats are told by their sweep. */
    private static Function<SweepName, String> specimens(List<Isotherm> isotherms) {
        boolean several = isotherms.stream()
                .anyMatch(isotherm -> isotherm.names().stream()
                                .map(SweepName::specimen)
                                .distinct()
                                .count()
                        > 1);
        return several ? SweepName::specimen : SweepName::sweep;
    }

    /** The only isotherm with enough frequencies for a spectrum; where none has enough, the lowest. */
    private static Isotherm only(List<Isotherm> isotherms) throws ReductionFault {
        List<Isotherm> swept = isotherms.stream()
                .filter(isotherm ->
                        FrequencySweeps.distinctFrequencies(isotherm.points()) >= DiscreteFit.LEAST_FREQUENCIES)
                .toList();
        if (swept.size() > 1) {
            throw new ReductionFault(ConclusionReason.CURVE_SEVERAL_TEMPERATURES.with(swept.size()));
        }
        return swept.isEmpty() ? isotherms.get(0) : swept.get(0);
    }
}
