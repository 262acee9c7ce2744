package nightlag.stages.response;

import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;
import nightlag.stages.response.Programme.Instant;
import nightlag.stages.response.Programme.Segment;
import nightlag.stages.response.ResponseRow.StrainParts;
import nightlag.stages.spectrum.RelaxationModes;
import nightlag.stages.spectrum.RetardationModes;

/**
 * Boltzmann superposition (1874) of a stepwise programme in reduced time ξ = ∫ dt/a_T (Morland &amp; Lee 1960), mode by mode in
 * closed form: while stress σ is held, the strain q of a retardation mode goes as q e^{−Δξ/λ} + j σ (1 − e^{−Δξ/λ}) and the flow
 * grows by φ σ Δξ; while strain is held, the stress of a relaxation mode falls as e^{−Δξ/τ}, and a step Δγ adds g Δγ. Nothing
 * grows from step to step but what the programme puts in, so the sums are as exact over a year as over a second.
 */
final class BoltzmannSum {
    private final Programme programme;
    private final double[] rates;

    /**
     * A programme in reduced time.
     *
     * @param rates 1/a_T of each segment
     */
    BoltzmannSum(Programme programme, double[] rates) {
        this.programme = programme;
        this.rates = rates.clone();
    }

    /** Strain at each instant under a programme of stress in Pa. */
    List<StrainParts> strains(RetardationModes modes) {
        double[] times = modes.timesS();
        double[] strengths = modes.strengthsPerPa();
        double[] delayed = new double[times.length];
        double flowed = 0;
        StrainParts[] strains = new StrainParts[programme.instants().size()];
        int next = 0;
        strains[next++] = new StrainParts(0, 0, 0);
        for (int s = 0; s < programme.segments().size(); s++) {
            Segment segment = programme.segments().get(s);
            double stress = segment.value();
            for (; next < strains.length && programme.instants().get(next).segment() == s; next++) {
                double reduced = programme.instants().get(next).sinceS() * rates[s];
                double later = 0;
                for (int k = 0; k < times.length; k++) {
                    later += held(delayed[k], strengths[k] * stress, reduced / times[k]);
                }
                strains[next] = new StrainParts(
                        modes.instantaneousPerPa() * stress, later, flowed + modes.fluidityPerPaS() * stress * reduced);
            }
            double reduced = segment.durationS() * rates[s];
            for (int k = 0; k < times.length; k++) {
                delayed[k] = held(delayed[k], strengths[k] * stress, reduced / times[k]);
            }
            flowed += modes.fluidityPerPaS() * stress * reduced;
        }
        return List.of(strains);
    }

    /** Where a first-order change from a value towards an end has come to. */
    private static double held(double from, double towards, double elapsed) {
        return from * Math.exp(-elapsed) - towards * Math.expm1(-elapsed);
    }

    /** Stress in Pa at each instant under a programme of strain. */
    double[] stresses(RelaxationModes modes) {
        double[] times = modes.timesS();
        double[] strengths = modes.strengthsPa();
        double[] left = new double[times.length];
        double[] stresses = new double[programme.instants().size()];
        int next = 1;
        for (int s = 0; s < programme.segments().size(); s++) {
            Segment segment = programme.segments().get(s);
            double step = programme.stepAt(s);
            for (int i = 0; i < times.length; i++) {
                left[i] += strengths[i] * step;
            }
            for (; next < stresses.length && programme.instants().get(next).segment() == s; next++) {
                double reduced = programme.instants().get(next).sinceS() * rates[s];
                double sum = modes.equilibriumPa() * segment.value();
                for (int i = 0; i < times.length; i++) {
                    sum += left[i] * Math.exp(-reduced / times[i]);
                }
                stresses[next] = sum;
            }
            for (int i = 0; i < times.length; i++) {
                left[i] *= Math.exp(-segment.durationS() * rates[s] / times[i]);
            }
        }
        return stresses;
    }

    /**
     * Reduced time at an instant since each step of the prescribed value up to it, s; a step of a constant that only the
     * temperature cuts is none.
     */
    double[] sinceSteps(Instant instant) {
        double[] since = new double[instant.segment() + 1];
        Arrays.fill(since, Double.NaN);
        double sum = 0;
        for (int s = instant.segment(); s >= 0; s--) {
            double held = s == instant.segment()
                    ? instant.sinceS()
                    : programme.segments().get(s).durationS();
            sum += held * rates[s];
            since[s] = sum;
        }
        return IntStream.range(0, since.length)
                .filter(s -> programme.stepAt(s) != 0)
                .mapToDouble(s -> since[s])
                .toArray();
    }
}
