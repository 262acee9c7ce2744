package nightlag.stages.sweep;

import java.util.List;
import java.util.Locale;
import java.util.OptionalDouble;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;

/**
 * The apparent activation energy from transition temperatures at several frequencies: ln f = A − E/(RT). The temperatures carry
 * the uncertainty and the frequencies none, so 1/T is fitted against ln f, weighted by u(1/T) = u(T)/T²; E = −R/slope. Where the
 * line misses the temperatures by more than their u (a WLF shift is no straight line), u is widened by the misfit.
 */
final class ApparentActivation {
    /** Through two temperatures every line fits, and nothing tells whether the shift is a straight one. */
    static final int FEWEST_FREQUENCIES = 3;

    /** Molar gas constant, J/(mol K), exact (SI 2019). */
    private static final double GAS_CONSTANT = 8.31446261815324;
    /** No transition temperature is taken to be known better than this, K: a slip of rounding has no weight of its own. */
    private static final double LEAST_U_K = 1e-6;
    /** Standard uncertainties by which the temperatures must rise with the frequency. */
    private static final double STANDS_OUT = 3;

    private ApparentActivation() {}

    /** A transition temperature at a frequency. */
    record Transition(double frequencyHz, double temperatureK, double u) {}

    /**
     * The energy from transitions of one kind.
     *
     * @param transitions one a frequency
     * @param kind the kind in words, plural
     */
    static Findings from(SweepName name, List<Transition> transitions, String kind) {
        if (transitions.size() < FEWEST_FREQUENCIES) {
            return Findings.absent(TransitionReason.TRANSITION_TOO_FEW_FREQUENCIES.with(
                    name.specimen(), name.sweep(), kind, transitions.size(), FEWEST_FREQUENCIES));
        }
        double sum = 0;
        double meanX = 0;
        double meanY = 0;
        for (Transition transition : transitions) {
            sum += weight(transition);
            meanX += weight(transition) * Math.log(transition.frequencyHz());
            meanY += weight(transition) / transition.temperatureK();
        }
        meanX /= sum;
        meanY /= sum;
        double spread = 0;
        double slope = 0;
        for (Transition transition : transitions) {
            double x = Math.log(transition.frequencyHz()) - meanX;
            spread += weight(transition) * x * x;
            slope += weight(transition) * x * (1 / transition.temperatureK() - meanY);
        }
        slope /= spread;
        double misfit = 0;
        for (Transition transition : transitions) {
            double rest = 1 / transition.temperatureK() - meanY - slope * (Math.log(transition.frequencyHz()) - meanX);
            misfit += weight(transition) * rest * rest;
        }
        double widening = Math.max(1, misfit / (transitions.size() - 2));
        double slopeU = Math.sqrt(widening / spread);
        if (!(-slope > STANDS_OUT * slopeU)) {
            return Findings.absent(TransitionReason.TRANSITION_NOT_RISING.with(name.specimen(), name.sweep(), kind));
        }
        double energy = -GAS_CONSTANT / slope;
        double lowest =
                transitions.stream().mapToDouble(Transition::frequencyHz).min().orElseThrow();
        double highest =
                transitions.stream().mapToDouble(Transition::frequencyHz).max().orElseThrow();
        return new Findings(
                List.of(new Marker(
                        name.specimen(),
                        name.sweep(),
                        "activation_energy",
                        OptionalDouble.of(1 / meanY),
                        OptionalDouble.empty(),
                        energy,
                        OptionalDouble.of(energy * slopeU / -slope),
                        "J/mol",
                        String.format(
                                Locale.ROOT,
                                "apparent, ln f against 1/T of the %s at %d frequencies from %s to %s Hz%s",
                                kind,
                                transitions.size(),
                                figure(lowest),
                                figure(highest),
                                widening > 1 ? "; u from the misfit of the line" : ""))),
                List.of());
    }

    private static double weight(Transition transition) {
        double temperature = transition.temperatureK();
        double u = Math.max(transition.u(), LEAST_U_K) / (temperature * temperature);
        return 1 / (u * u);
    }

    private static String figure(double value) {
        return String.format(Locale.ROOT, "%.4g", value)
                .replaceAll("(\\.\\d*?)0+$", "$1")
                .replaceAll("\\.$", "");
    }
}
