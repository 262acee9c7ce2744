package nightlag.stages.spectrum;

import java.util.List;
import java.util.Optional;
import java.util.OptionalInt;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.moduli.SharedErrors;
import nightlag.stages.sweep.FrequencySweeps;

/** Readings of the complex modulus to a discrete spectrum. */
public final class DiscreteFit {
    /** Fewer different frequencies than this say too little about how a material relaxes. */
    public static final int LEAST_FREQUENCIES = 3;

    private DiscreteFit() {}

    /**
     * Fits as few modes as the readings carry, or a given number, by {@link ModeSearch}. Where an equilibrium modulus is
     * fitted and comes out as zero, the spectrum is a liquid's. Readings without uncertainties are weighted by
     * {@link SelfWeighing}.
     *
     * @param readings finite moduli at positive frequencies, in any order, repeats allowed
     * @param plan what is wanted
     * @throws ReductionFault where there are too few frequencies, or too few readings for the modes wanted
     */
    public static DiscreteSpectrum fit(List<ModulusReading> readings, SpectrumPlan plan) throws ReductionFault {
        return fit(readings, SharedErrors.none(), plan);
    }

    /**
     * Fits readings several of which are off together: the modes are the same, the uncertainties hold the shared errors too.
     *
     * @throws ReductionFault likewise
     */
    public static DiscreteSpectrum fit(List<ModulusReading> readings, SharedErrors shared, SpectrumPlan plan)
            throws ReductionFault {
        int frequencies = FrequencySweeps.distinct(
                readings.stream().mapToDouble(ModulusReading::angularFrequency).toArray());
        if (frequencies < LEAST_FREQUENCIES) {
            throw new ReductionFault(SpectrumReason.SPECTRUM_TOO_FEW_FREQUENCIES.with(frequencies, LEAST_FREQUENCIES));
        }
        int mostModes = readings.size() - (plan.fitEquilibrium() ? 1 : 0);
        OptionalInt wanted = plan.modes();
        if (wanted.isPresent() && wanted.getAsInt() > mostModes) {
            throw new ReductionFault(
                    SpectrumReason.SPECTRUM_TOO_MANY_MODES.with(wanted.getAsInt(), readings.size(), mostModes));
        }
        if (readings.stream().noneMatch(reading -> reading.moduli().magnitudePa() > 0)) {
            throw new ReductionFault(SpectrumReason.SPECTRUM_NO_MODULUS.with());
        }
        if (WeightedReadings.haveCovariances(readings)) {
            WeightedReadings weighted = WeightedReadings.byCovariances(readings);
            return new DiscreteSpectrum(
                    weighted, shared, plan.fitEquilibrium(), search(weighted, plan), Optional.empty());
        }
        SelfWeighing.Weighed weighed = new SelfWeighing(readings, weighted -> search(weighted, plan)).fit();
        return new DiscreteSpectrum(
                weighed.readings(), shared, plan.fitEquilibrium(), weighed.modes(), Optional.of(weighed.model()));
    }

    private static FittedModes search(WeightedReadings weighted, SpectrumPlan plan) {
        ModeRefinement refinement = new ModeRefinement(weighted, plan.fitEquilibrium());
        return new ModeSearch(weighted, refinement, plan.fitEquilibrium()).find(plan.modes());
    }
}
