package nightlag.stages;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.Quality;
import nightlag.stages.response.TemperatureShift;
import nightlag.stages.spectrum.CreepContinuousFit;
import nightlag.stages.spectrum.CreepData;
import nightlag.stages.spectrum.CreepFit;
import nightlag.stages.spectrum.CreepSpectrum;
import nightlag.stages.spectrum.DiscreteSpectrum;
import nightlag.stages.spectrum.ShiftedCreep;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.spectrum.SpectrumRow;
import nightlag.stages.sweep.NaturalOrder;

/** The creep curves of a lot, and the spectra fitted to them. */
final class LotCreep {
    private static final Comparator<CreepCurve> ORDER = Comparator.comparing(
                    (CreepCurve curve) -> curve.key().specimen(), NaturalOrder::compare)
            .thenComparing(curve -> curve.key().sweep(), NaturalOrder::compare)
            .thenComparing(curve -> curve.key().point(), NaturalOrder::compare)
            .thenComparing(curve -> curve.key().sourceFile(), NaturalOrder::compare);

    private static final double SAME_TEMPERATURE_K = 0.5;
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;
    private static final double LN_10 = Math.log(10);

    private final Optional<LotCurve> moduli;
    private final Optional<TemperatureShift> shift;
    private final SpectrumPlan plan;
    private final List<PublishedSpectrum> spectra = new ArrayList<>();
    private final List<SpectrumRow> continuous = new ArrayList<>();
    private final List<Reason> notes = new ArrayList<>();
    private boolean replacesModuli;

    private LotCreep(Optional<LotCurve> moduli, SpectrumPlan plan) {
        this.moduli = moduli;
        this.shift = moduli.map(curve -> TemperatureShift.of(curve.temperatureK(), curve.master()));
        this.plan = plan;
    }

    /** All of them in an order of their own, whatever that of the reductions. */
    static List<CreepCurve> inOrder(List<Reduction> reductions) {
        return reductions.stream()
                .map(Reduction::creep)
                .flatMap(Optional::stream)
                .sorted(ORDER)
                .toList();
    }

    /**
     * Fits the usable curves that begin at rest. Those at the temperature of the lot's curve of moduli, and those among its
     * isotherms, which are shifted there, make one spectrum with the moduli; any other temperature has a spectrum of its own.
     *
     * @param ofModuli what was fitted to the moduli, as many modes as they carry
     */
    static LotCreep of(
            List<CreepCurve> curves,
            Optional<LotCurve> moduli,
            Optional<DiscreteSpectrum> ofModuli,
            SpectrumPlan plan) {
        LotCreep creep = new LotCreep(moduli, plan);
        List<Group> groups = creep.groups(curves);
        List<Group> together = groups.stream().filter(creep::goesWithModuli).toList();
        if (!together.isEmpty()) {
            creep.fitTogether(together, ofModuli);
        }
        groups.stream().filter(group -> !together.contains(group)).forEach(creep::fitAlone);
        return creep;
    }

    /** One for each temperature that has one; first that at the temperature of the moduli. */
    List<PublishedSpectrum> spectra() {
        return List.copyOf(spectra);
    }

    /** Whether the first of them takes the place of the discrete spectrum of the moduli. */
    boolean replacesModuli() {
        return replacesModuli;
    }

    /** Nodes of the continuous spectra that go with them, where these were asked for. */
    List<SpectrumRow> continuous() {
        return List.copyOf(continuous);
    }

    /** What could not be had, or is unusual. */
    List<Reason> notes() {
        return List.copyOf(notes);
    }

    /** Curves of one temperature, their mean in K. */
    private record Group(List<CreepCurve> curves, double temperatureK) {}

    private List<Group> groups(List<CreepCurve> curves) {
        List<CreepCurve> fit = curves.stream()
                .filter(curve -> curve.quality() != Quality.UNUSABLE && curve.fromRest())
                .toList();
        List<CreepCurve> placed =
                fit.stream().filter(curve -> curve.temperatureK().isPresent()).toList();
        if (placed.size() < fit.size()) {
            notes.add(ConclusionReason.CREEP_WITHOUT_TEMPERATURE.with(fit.size() - placed.size()));
        }
        if (placed.isEmpty() || !isOneDeformation(placed)) {
            return List.of();
        }
        List<CreepCurve> left = new ArrayList<>(placed.stream()
                .sorted(Comparator.comparingDouble(curve -> curve.temperatureK().getAsDouble()))
                .toList());
        List<Group> groups = new ArrayList<>();
        while (!left.isEmpty()) {
            double lowestK = left.get(0).temperatureK().getAsDouble();
            List<CreepCurve> group = left.stream()
                    .filter(curve -> curve.temperatureK().getAsDouble() - lowestK <= SAME_TEMPERATURE_K)
                    .toList();
            left.removeAll(group);
            groups.add(new Group(
                    group,
                    group.stream()
                            .mapToDouble(curve -> curve.temperatureK().getAsDouble())
                            .average()
                            .orElseThrow()));
        }
        return groups;
    }

    /** Shear and extension are two different compliances. */
    private boolean isOneDeformation(List<CreepCurve> curves) {
        List<DeformationMode> all =
                curves.stream().map(CreepCurve::deformation).distinct().toList();
        if (all.size() > 1) {
            notes.add(ConclusionReason.CREEP_MIXED_DEFORMATION.with());
            return false;
        }
        Optional<DeformationMode> ofModuli = moduli.map(LotCurve::deformation).filter(mode -> mode != all.get(0));
        ofModuli.ifPresent(mode -> notes.add(
                ConclusionReason.CREEP_OTHER_DEFORMATION.with(all.get(0).word(), mode.word())));
        return ofModuli.isEmpty();
    }

    private boolean goesWithModuli(Group group) {
        return shift.filter(to -> isAtReference(group, to) || (to.hasIsotherms() && to.isWithin(group.temperatureK())))
                .isPresent();
    }

    private static boolean isAtReference(Group group, TemperatureShift to) {
        return Math.abs(group.temperatureK() - to.referenceK()) <= SAME_TEMPERATURE_K;
    }

    private void fitTogether(List<Group> groups, Optional<DiscreteSpectrum> ofModuli) {
        TemperatureShift to = shift.orElseThrow();
        CreepData creep =
                CreepData.of(groups.stream().map(group -> shifted(group, to)).toList(), covariance(groups, to));
        CreepData all = creep;
        try {
            all = creep.with(moduli.orElseThrow().readings(), ofModuli);
        } catch (ReductionFault fault) {
            notes.add(fault.reason());
        }
        boolean inDoubt = moduli.filter(LotCurve::isInDoubt).isPresent();
        fit(all, to, inDoubt).ifPresent(spectrum -> replacesModuli = true);
    }

    private void fitAlone(Group group) {
        shift.ifPresent(to -> notes.add(
                to.hasIsotherms()
                        ? ConclusionReason.CREEP_OUTSIDE_ISOTHERMS.with(
                                celsius(group.temperatureK()), celsius(to.lowestK()), celsius(to.highestK()))
                        : ConclusionReason.CREEP_WITHOUT_SHIFT.with(
                                celsius(group.temperatureK()), celsius(to.referenceK()))));
        fit(
                CreepData.of(ShiftedCreep.unmoved(group.curves())),
                TemperatureShift.of(group.temperatureK(), Optional.empty()),
                false);
    }

    private Optional<CreepSpectrum> fit(CreepData data, TemperatureShift at, boolean inDoubt) {
        try {
            CreepSpectrum spectrum = CreepFit.fit(data, plan);
            spectra.add(new PublishedSpectrum(spectrum, at, inDoubt));
            notes.addAll(spectrum.notes());
            if (plan.continuous()) {
                addContinuous(spectrum, at);
            }
            return Optional.of(spectrum);
        } catch (ReductionFault fault) {
            notes.add(fault.reason());
            return Optional.empty();
        }
    }

    private void addContinuous(CreepSpectrum discrete, TemperatureShift at) {
        try {
            continuous.addAll(CreepContinuousFit.of(discrete).rows(at.referenceK()));
        } catch (ReductionFault fault) {
            notes.add(fault.reason());
        }
    }

    private static ShiftedCreep shifted(Group group, TemperatureShift to) {
        return new ShiftedCreep(
                group.curves(), LN_10 * to.log10A(group.temperatureK()), LN_10 * to.log10B(group.temperatureK()));
    }

    /** Of ln a of each temperature, then of ln b. */
    private static double[][] covariance(List<Group> groups, TemperatureShift to) {
        int n = groups.size();
        double[][] covariance = new double[2 * n][2 * n];
        for (int i = 0; i < n; i++) {
            for (int k = 0; k < n; k++) {
                double first = groups.get(i).temperatureK();
                double second = groups.get(k).temperatureK();
                covariance[i][k] = LN_10 * LN_10 * to.covariance(first, second);
                covariance[n + i][n + k] = LN_10 * LN_10 * to.verticalCovariance(first, second);
            }
        }
        return covariance;
    }

    private static double celsius(double kelvin) {
        return kelvin - KELVIN_AT_ZERO_CELSIUS;
    }
}
