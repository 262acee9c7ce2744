package nightlag.stages.waveform;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.function.BiFunction;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;

/**
 * The fit of drift, harmonics and the frequency shared by both channels to one set of samples: how many orders the samples
 * bear, where the frequency is when there are several places it could be, and, in a window, how the amplitudes change.
 */
final class HarmonicFit {
    /** Below so many cycles with all orders the fit has several minima, and a grid comes before the refinement. */
    private static final double FEW_CYCLES = 2.5;
    /** Below so many cycles no order above the first can be told from the drift. */
    private static final double CYCLES_FOR_HARMONICS = 1.1;
    /** A tag is right or wrong by more than this part of it. */
    private static final double NEAR_TAG = 0.1;
    /** Twice the difference in ln likelihood from which on a frequency that is not the tagged one is believed. */
    private static final double CLEARLY_LIKELIER = 16;
    /** An order this near half the samples a cycle (as part of them) counts as at it. */
    private static final double BELOW_HALF = 0.495;
    /** Degrees of freedom a channel must keep. */
    private static final int SPARE_SAMPLES = 2;

    private final RecordPart part;
    private final int degree;

    HarmonicFit(RecordPart part) {
        this.part = part;
        this.degree = part.plan().drift().degree();
    }

    /** Refuses what has too few samples for one order and the drift. */
    static void requireSamples(int found, ExtractionPlan plan) throws ReductionFault {
        int needed = plan.drift().degree() + 1 + 2 + SPARE_SAMPLES;
        if (found < needed) {
            throw new ReductionFault(WaveformReason.WAVEFORM_TOO_FEW_SAMPLES.with(found, needed));
        }
    }

    /** The best fit from several frequencies to start from, rad/s. */
    Fitted best(Samples samples, double[] starts) throws ReductionFault {
        Optional<Fitted> best = Optional.empty();
        Optional<ReductionFault> firstFault = Optional.empty();
        for (double start : starts) {
            try {
                Fitted fitted = startingAt(start, samples);
                double least = best.map(b -> b.result().misfit()).orElse(Double.POSITIVE_INFINITY);
                if (best.isEmpty() || fitted.result().misfit() < least) {
                    best = Optional.of(fitted);
                }
            } catch (ReductionFault fault) {
                firstFault = firstFault.isPresent() ? firstFault : Optional.of(fault);
            }
        }
        if (best.isEmpty() && firstFault.isPresent()) {
            throw firstFault.get();
        }
        return best.orElseThrow();
    }

    /** The fit from one frequency to start from, rad/s. */
    Fitted startingAt(double start, Samples samples) throws ReductionFault {
        double omega = part.exact()
                ? start
                : orAtFixed(new JointFit(samples, 1, degree), JointFit::roughlyRefined, start)
                        .orElseThrow(() -> new ReductionFault(notSeparable(start)))
                        .angularFrequency();
        if (atHalfTheSampling(omega)) {
            throw new ReductionFault(tooFewACycle(omega));
        }
        List<Reason> notes = new ArrayList<>();
        double cycles = omega * samples.durationS() / (2 * Math.PI);
        int orders = ordersBelowHalf(omega, notes);
        int separable = Math.min(orders, (samples.size() - SPARE_SAMPLES - degree - 1) / 2);
        if (cycles < CYCLES_FOR_HARMONICS) {
            separable = 1;
        }
        for (int harmonics = separable; harmonics >= 1; harmonics--) {
            JointFit fit = new JointFit(samples, harmonics, degree);
            Optional<JointFit.Result> result = part.exact()
                    ? atTag(fit, samples, omega)
                    : orAtFixed(fit, (joint, from) -> refined(joint, samples, from, cycles), omega);
            if (result.isPresent()) {
                if (harmonics < orders) {
                    notes.add(WaveformReason.WAVEFORM_ORDERS_NOT_SEPARABLE.with(
                            harmonics, part.plan().harmonics(), samples.size(), cycles));
                }
                Fitted constant = new Fitted(samples, fit.basis(), result.get());
                return (part.waveform().isWindow() ? withTrend(constant, cycles, notes) : constant).noting(notes);
            }
        }
        throw new ReductionFault(WaveformReason.WAVEFORM_NOT_SEPARABLE.with());
    }

    /**
     * A refined fit; in a window of a longer record, where none is found because the amplitudes change so much, the fit at the
     * frequency to start from: the frequency is then found with the change ({@link WindowFit}).
     */
    private Optional<JointFit.Result> orAtFixed(
            JointFit fit, BiFunction<JointFit, Double, Optional<JointFit.Result>> refinement, double start) {
        Optional<JointFit.Result> refined = refinement.apply(fit, start);
        return refined.isPresent() || !part.waveform().isWindow() ? refined : fit.atFixed(start);
    }

    private Fitted withTrend(Fitted constant, double cycles, List<Reason> notes) {
        int harmonics = constant.basis().harmonics();
        Optional<Fitted> window = new WindowFit(constant.samples(), harmonics, degree, part.exact())
                .fit(constant.result().angularFrequency());
        if (window.isEmpty()) {
            notes.add(WaveformReason.WAVEFORM_WINDOW_TOO_SHORT.with(cycles));
        }
        return window.orElse(constant);
    }

    private double samplesPerCycle(double omega) {
        return 2 * Math.PI / (omega * part.clock().intervalS());
    }

    /** Whether the fundamental itself is no order below half the samples a cycle. */
    private boolean atHalfTheSampling(double omega) {
        return BELOW_HALF * samplesPerCycle(omega) < 1;
    }

    private Reason tooFewACycle(double omega) {
        return WaveformReason.WAVEFORM_TOO_FEW_A_CYCLE.with(samplesPerCycle(omega), 1 / BELOW_HALF);
    }

    private Reason notSeparable(double start) {
        return atHalfTheSampling(start) ? tooFewACycle(start) : WaveformReason.WAVEFORM_NOT_SEPARABLE.with();
    }

    private int ordersBelowHalf(double omega, List<Reason> notes) {
        int wanted = part.plan().harmonics();
        double perCycle = samplesPerCycle(omega);
        int highest = (int) Math.floor(BELOW_HALF * perCycle);
        if (highest < wanted) {
            notes.add(WaveformReason.WAVEFORM_ORDERS_ABOVE_SAMPLING.with(highest, wanted, perCycle));
        }
        return Math.min(wanted, highest);
    }

    private Optional<JointFit.Result> atTag(JointFit fit, Samples samples, double omega) {
        boolean complete = samples.size() == part.size() && !part.waveform().isWindow();
        if (part.plan().drift() == Drift.NONE && complete && WholeCycleBins.applies(samples, part.clock(), omega)) {
            return fit.given(omega, WholeCycleBins.coefficients(samples, fit.basis(), omega));
        }
        return fit.atFixed(omega);
    }

    private Optional<JointFit.Result> refined(JointFit fit, Samples samples, double omega, double cycles) {
        if (cycles >= FEW_CYCLES) {
            return fit.refined(omega);
        }
        int harmonics = fit.basis().harmonics();
        List<JointFit.Result> found = Arrays.stream(FrequencySearch.minimaNearby(samples, omega, harmonics, degree))
                .mapToObj(start -> fit.refined(start))
                .flatMap(Optional::stream)
                .filter(result -> FrequencySearch.near(result.angularFrequency(), omega))
                .sorted(Comparator.comparingDouble(JointFit.Result::misfit))
                .toList();
        // noise makes several maxima of the likelihood in so short a record; the tag decides between those that are
        // alike
        return found.stream()
                .filter(result -> nearTag(result.angularFrequency()))
                .filter(result ->
                        samples.size() * (result.misfit() - found.get(0).misfit()) < CLEARLY_LIKELIER)
                .findFirst()
                .or(() -> found.stream().findFirst());
    }

    private boolean nearTag(double omega) {
        return part.tagHz().isPresent()
                && Math.abs(omega / (2 * Math.PI * part.tagHz().getAsDouble()) - 1) < NEAR_TAG;
    }
}
