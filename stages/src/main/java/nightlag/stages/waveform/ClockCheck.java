package nightlag.stages.waveform;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;

/**
 * Whether the oscillation went on with the time stamps where these leave a gap. The record is cut at its longest gaps, the
 * longest stretch is fitted on its own, and each other stretch is asked at that frequency for the phases of both channels. A
 * step of both by the same angle belongs to the stamps: rows that are missing change no phase, and a specimen that changes
 * moves only the load's. A jump by whole cycles leaves no trace and does no harm to the moduli.
 */
final class ClockCheck {
    /** An interval of more than so many usual ones is a gap. */
    private static final double GAP = 1.5;
    /** So many gaps, the longest, are looked at. */
    private static final int MOST_GAPS = 4;
    /** Stretches of fewer cycles have no phase of their own. */
    private static final double FEWEST_CYCLES = 0.75;
    /** From here on a stretch is fitted with all orders. */
    private static final double CYCLES_FOR_ALL_ORDERS = 1.5;

    private static final int SPARE_SAMPLES = 4;
    /** A step of the phase stands so many uncertainties out of the noise, taken for white, which leaves room for noise that is not. */
    private static final double SIGNIFICANT = 12;
    /** Both channels' steps agree to this part of the smaller one. */
    private static final double AGREE = 0.5;

    private final Waveform waveform;
    private final ExtractionPlan plan;

    /**
     * The stretch to use instead of the whole record.
     *
     * @param from its first sample
     * @param to the sample after its last
     * @param jump the larger of the jumps at its ends
     * @param cyclesBefore cycles from the record's first sample to its own
     */
    record Stretch(int from, int to, ClockJump jump, double cyclesBefore) {
        Waveform of(Waveform whole) {
            double[] temperature = whole.temperatureK();
            return new Waveform(
                    Arrays.copyOfRange(whole.timeS(), from, to),
                    Arrays.copyOfRange(whole.deformation(), from, to),
                    Arrays.copyOfRange(whole.load(), from, to),
                    temperature.length == 0 ? temperature : Arrays.copyOfRange(temperature, from, to),
                    whole.nominalFrequencyHz(),
                    whole.rowsLeftOut(),
                    whole.window().map(window -> plan(window, whole)));
        }

        /** What lies beyond a jump was not missed: it is left out, and that is said. */
        private RecordWindow plan(RecordWindow window, Waveform whole) {
            return new RecordWindow(
                    window.recordFromS(),
                    from == 0 ? window.fromS() : whole.timeS()[from],
                    to == whole.size() ? window.toS() : whole.timeS()[to - 1]);
        }
    }

    /** Samples {@code from} … {@code to − 1}. */
    private record Piece(int from, int to) {
        int size() {
            return to - from;
        }
    }

    private ClockCheck(Waveform waveform, ExtractionPlan plan) {
        this.waveform = waveform;
        this.plan = plan;
    }

    /** The stretch to use where the clock jumped; empty where it did not. A record without gaps costs one pass. */
    static Optional<Stretch> stretch(Waveform waveform, ExtractionPlan plan) {
        double[] timeS = waveform.timeS();
        double longest = 0;
        for (int i = 1; i < timeS.length; i++) {
            longest = Math.max(longest, timeS[i] - timeS[i - 1]);
        }
        int last = timeS.length - 1;
        return last > 0 && longest > GAP * (timeS[last] - timeS[0]) / last
                ? new ClockCheck(waveform, plan).look()
                : Optional.empty();
    }

    private Optional<Stretch> look() {
        double usual = usualInterval();
        List<Piece> pieces = pieces(usual);
        int longest = IntStream.range(0, pieces.size())
                .boxed()
                .max(Comparator.comparingInt(i -> pieces.get(i).size()))
                .orElse(0);
        Piece reference = pieces.get(longest);
        Waveform alone = new Stretch(reference.from(), reference.to(), new ClockJump(0, 0, 0, 0), 0).of(waveform);
        SignalFit fit;
        try {
            fit = HarmonicAnalysis.wholeRecord(
                    alone, new ExtractionPlan(0, plan.harmonics(), plan.drift(), plan.frequencyFrom()));
        } catch (ReductionFault fault) {
            return Optional.empty();
        }
        Optional<Double> before = Optional.empty();
        Optional<Double> after = Optional.empty();
        int first = longest;
        while (first > 0 && before.isEmpty()) {
            before = step(pieces.get(first - 1), fit);
            first -= before.isEmpty() ? 1 : 0;
        }
        int end = longest;
        while (end < pieces.size() - 1 && after.isEmpty()) {
            after = step(pieces.get(end + 1), fit);
            end += after.isEmpty() ? 1 : 0;
        }
        if (before.isEmpty() && after.isEmpty()) {
            return Optional.empty();
        }
        int from = pieces.get(first).from();
        int to = pieces.get(end).to();
        int leftOut = waveform.size() - (to - from);
        // going back over a jump ahead, the phase steps the other way
        List<ClockJump> jumps = new ArrayList<>();
        before.ifPresent(cycles -> jumps.add(jump(from, -cycles, usual, fit, leftOut)));
        after.ifPresent(cycles -> jumps.add(jump(to, cycles, usual, fit, leftOut)));
        ClockJump largest = jumps.stream()
                .max(Comparator.comparingDouble(jump -> Math.abs(jump.seconds())))
                .orElseThrow();
        return Optional.of(new Stretch(from, to, largest, from * usual * fit.frequencyHz()));
    }

    private double usualInterval() {
        double[] timeS = waveform.timeS();
        double[] sorted = new double[timeS.length - 1];
        for (int i = 0; i < sorted.length; i++) {
            sorted[i] = timeS[i + 1] - timeS[i];
        }
        Arrays.sort(sorted);
        return sorted[sorted.length / 2];
    }

    private List<Piece> pieces(double usual) {
        double[] timeS = waveform.timeS();
        int[] cuts = IntStream.range(1, timeS.length)
                .filter(i -> timeS[i] - timeS[i - 1] > GAP * usual)
                .boxed()
                .sorted(Comparator.comparingDouble(i -> timeS[i - 1] - timeS[i]))
                .limit(MOST_GAPS)
                .mapToInt(Integer::intValue)
                .sorted()
                .toArray();
        List<Piece> pieces = new ArrayList<>();
        int from = 0;
        for (int cut : cuts) {
            pieces.add(new Piece(from, cut));
            from = cut;
        }
        pieces.add(new Piece(from, timeS.length));
        return pieces;
    }

    /** The step of both phases in cycles from where the longest stretch says they are; empty where there is none. */
    private Optional<Double> step(Piece piece, SignalFit reference) {
        double cycles = reference.frequencyHz() * (waveform.timeS()[piece.to() - 1] - waveform.timeS()[piece.from()]);
        int harmonics = cycles < CYCLES_FOR_ALL_ORDERS ? 1 : reference.harmonics();
        int columns = plan.drift().degree() + 1 + 2 * harmonics;
        if (cycles < FEWEST_CYCLES || piece.size() < columns + SPARE_SAMPLES) {
            return Optional.empty();
        }
        boolean[] others = new boolean[waveform.size()];
        Arrays.fill(others, 0, piece.from(), true);
        Arrays.fill(others, piece.to(), waveform.size(), true);
        Samples samples = Samples.of(waveform, piece.from(), others);
        JointFit fit = new JointFit(samples, harmonics, plan.drift().degree());
        Optional<JointFit.Result> result = fit.atFixed(reference.angularFrequency());
        return result.flatMap(found -> commonStep(new Fitted(samples, fit.basis(), found), reference));
    }

    private Optional<Double> commonStep(Fitted fitted, SignalFit reference) {
        double away = fitted.samples().originS() - reference.originS();
        double frequencyU = 2 * Math.PI * reference.frequencyUHz() * away;
        double[] steps = new double[Samples.CHANNELS];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            Complex before = c == Samples.DEFORMATION
                    ? reference.deformation()[0]
                    : reference.load()[0];
            double noise = c == Samples.DEFORMATION ? reference.deformationNoise() : reference.loadNoise();
            int column = fitted.basis().cosineColumn(1);
            double[] coefficients = fitted.result().coefficients()[c];
            Complex here = new Complex(coefficients[column], -coefficients[column + 1]);
            Complex expected = before.times(Complex.polar(1, reference.angularFrequency() * away));
            steps[c] = here.over(expected).argument();
            double own = Math.sqrt(Math.max(
                            fitted.result().normal().inverseForm(unit(fitted, column)),
                            fitted.result().normal().inverseForm(unit(fitted, column + 1))))
                    * fitted.deviation(c)
                    / here.abs();
            double others = noise * Math.sqrt(2.0 / reference.samplesUsed()) / before.abs();
            double u = Math.sqrt(own * own + others * others + frequencyU * frequencyU);
            if (!(Math.abs(steps[c]) > Math.max(2 * Math.PI * ClockJump.SMALLEST_CYCLES, SIGNIFICANT * u))) {
                return Optional.empty();
            }
        }
        double apart = Math.abs(Math.IEEEremainder(steps[1] - steps[0], 2 * Math.PI));
        boolean alike = apart <= AGREE * Math.min(Math.abs(steps[0]), Math.abs(steps[1]));
        return alike ? Optional.of(steps[0] / (2 * Math.PI)) : Optional.empty();
    }

    private static double[] unit(Fitted fitted, int column) {
        double[] unit = new double[fitted.basis().columns()];
        unit[column] = 1;
        return unit;
    }

    /**
     * The jump before a sample. A phase behind by some cycles says that the stamps are ahead by that and any whole number;
     * taken is the one nearest to the gap itself, as if no row were missing.
     */
    private ClockJump jump(int after, double stepCycles, double usual, SignalFit fit, int leftOut) {
        double[] timeS = waveform.timeS();
        double gap = timeS[after] - timeS[after - 1] - usual;
        double ahead = -stepCycles / fit.frequencyHz();
        double seconds = gap - Math.IEEEremainder(gap - ahead, 1 / fit.frequencyHz());
        return new ClockJump(seconds, timeS[after - 1], stepCycles, leftOut);
    }
}
