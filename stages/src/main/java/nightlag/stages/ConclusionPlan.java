package nightlag.stages;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import nightlag.stages.acceptance.LimitPlan;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.response.ResponsePlan;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.superposition.SuperpositionPlan;
import nightlag.stages.sweep.OwnFigures;
import nightlag.stages.sweep.SweepPlan;

/**
 * All that decides what a lot's points become. Its contents are the fingerprint that says whether it must be done again.
 *
 * @param sweeps how points become sweeps
 * @param superposition empty: no master curve
 * @param spectrum empty: no spectra
 * @param responses predictions asked for, in the order of the configuration
 * @param limits limits, in the order of the configuration
 * @param dimensionUncertainty standard uncertainties of dimensions common to many records, SI
 * @param ownFigures figures the grade defines for itself
 */
public record ConclusionPlan(
        SweepPlan sweeps,
        Optional<SuperpositionPlan> superposition,
        Optional<SpectrumPlan> spectrum,
        List<ResponsePlan> responses,
        List<LimitPlan> limits,
        Map<Dimension, Double> dimensionUncertainty,
        OwnFigures ownFigures) {
    /** Copies the collections. */
    public ConclusionPlan {
        responses = List.copyOf(responses);
        limits = List.copyOf(limits);
        dimensionUncertainty = Map.copyOf(dimensionUncertainty);
    }

    /** A plan without figures of the grade's own. */
    public ConclusionPlan(
            SweepPlan sweeps,
            Optional<SuperpositionPlan> superposition,
            Optional<SpectrumPlan> spectrum,
            List<ResponsePlan> responses,
            List<LimitPlan> limits,
            Map<Dimension, Double> dimensionUncertainty) {
        this(sweeps, superposition, spectrum, responses, limits, dimensionUncertainty, OwnFigures.NONE);
    }

    /** A plan that gives the same markers and nothing else that takes time. */
    ConclusionPlan forMarkersAlone() {
        return new ConclusionPlan(
                sweeps,
                superposition,
                spectrum.map(wanted -> new SpectrumPlan(wanted.fitEquilibrium(), wanted.modes(), false)),
                List.of(),
                List.of(),
                dimensionUncertainty,
                new OwnFigures(List.of(), ownFigures.markers()));
    }
}
