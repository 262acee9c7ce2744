package nightlag.stages.waveform;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.DoubleStream;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;
import nightlag.stages.waveform.ScreeningFigures.Figure;

/**
 * A record of several frequencies at once to the complex amplitudes of each: drift and all tones of both channels are
 * fitted jointly on the true time stamps ({@link ToneFit}). Frequencies that are given and exact are taken as they are;
 * given otherwise, one factor common to all is refined, the recorder's clock against the drive's; found ones are refined
 * each.
 *
 * <p>Overtones are not in the model: where all tones are multiples of one frequency they fall on other tones, and no record
 * can tell a tone from the overtone of another. Where that can be it is said.
 */
public final class MultisineAnalysis {
    /** The tones must explain this share of the deformation's power above its drift. */
    private static final double LEAST_EXPLAINED = 0.9;
    /** A record must hold this many cycles of its slowest tone. */
    private static final double FEWEST_CYCLES = 0.999;
    /** Tones nearer than this many bins are one tone to the record. */
    private static final double LEAST_SPACING_BINS = 0.999;
    /** Samples a cycle of the fastest tone. */
    private static final double LEAST_SAMPLES_A_CYCLE = 2.02;

    /** Overtones beyond this order are not looked for among the tones. */
    private static final int HIGHEST_OVERTONE = 7;

    private final Waveform waveform;
    private final ExtractionPlan plan;
    private final double[] givenHz;
    private final double[] given;
    private final LeftOut leftOut;
    private final CutOffs cutOffs;
    private final List<Reason> notes = new ArrayList<>();
    private int first;

    private MultisineAnalysis(Waveform waveform, List<Double> frequenciesHz, ExtractionPlan plan) {
        this.waveform = waveform;
        this.plan = plan;
        this.givenHz =
                frequenciesHz.stream().mapToDouble(Double::doubleValue).sorted().toArray();
        this.given = DoubleStream.of(givenHz).map(hz -> 2 * Math.PI * hz).toArray();
        this.leftOut = new LeftOut(waveform);
        this.cutOffs = CutOffs.leftAtASlope(waveform);
    }

    /**
     * Takes the tones out of a record.
     *
     * @param frequenciesHz the frequencies in Hz, or none to have them found
     * @param plan its start-up cycles are those of the slowest tone; its harmonics mean nothing here
     * @return a fit of one order for each tone, the slowest first
     * @throws ReductionFault if the record does not hold the tones, holds something else besides, or is too short or too
     *     coarse for them
     */
    public static List<SignalFit> analyse(Waveform waveform, List<Double> frequenciesHz, ExtractionPlan plan)
            throws ReductionFault {
        RecordChecks.check(waveform);
        return new MultisineAnalysis(waveform, frequenciesHz, plan).run();
    }

    private record Fitted(Samples samples, ToneBasis basis, ToneFit.Result result, ToneFit.Freedom freedom)
            implements FitResiduals {
        @Override
        public double[][] residuals() {
            return result.residuals();
        }

        @Override
        public int columns() {
            return basis.columns();
        }

        @Override
        public double largestAmplitude(int channel) {
            double largest = 0;
            for (int k = 0; k < basis.tones(); k++) {
                largest = Math.max(largest, amplitude(channel, k));
            }
            return largest;
        }

        double amplitude(int channel, int tone) {
            double[] x = result.coefficients()[channel];
            int column = basis.cosineColumn(tone);
            return Math.hypot(x[column], x[column + 1]);
        }
    }

    private List<SignalFit> run() throws ReductionFault {
        int cut = leftOut.leaveOut(cutOffs);
        if (cut > 0) {
            notes.add(cutOffs.note(cut));
        }
        Samples samples = leftOut.samples(0);
        requireSamples(samples, 2);
        double[] start = given.length > 0 ? given : new ToneSearch(samples).found();
        if (given.length == 0 && start.length < 2) {
            throw new ReductionFault(
                    start.length == 0
                            ? MultiFrequencyReason.MULTISINE_NO_TONES.with()
                            : MultisineRefusal.oneTone(
                                    samples, start[0], plan.drift().degree(), LEAST_EXPLAINED));
        }
        if (given.length == 0) {
            requireSeveral(samples, start);
        }
        if (plan.startUpCycles() > 0) {
            samples = withoutStartUp(start[0], samples);
        }
        requireRoom(samples, start);
        requireSamples(samples, start.length);
        Fitted fitted = leftOut.withoutSpikes(fit(samples, start), first, this::refit);
        requireExplained(fitted);
        return summaries(fitted);
    }

    /** Lines found may be those of one wave that is no sine. */
    private void requireSeveral(Samples samples, double[] found) throws ReductionFault {
        Optional<OneWave> wave =
                OneWave.of(samples, new ToneSearch(samples), found, plan.drift().degree());
        if (wave.isPresent()) {
            throw new ReductionFault(MultiFrequencyReason.MULTISINE_ONE_WAVE.with(
                    wave.get().shape(), wave.get().frequencyHz()));
        }
    }

    private void requireSamples(Samples samples, int tones) throws ReductionFault {
        int needed = plan.drift().degree() + 1 + 3 * tones + 2;
        if (samples.size() < needed) {
            throw new ReductionFault(WaveformReason.WAVEFORM_TOO_FEW_SAMPLES.with(samples.size(), needed));
        }
    }

    private Samples withoutStartUp(double slowest, Samples all) throws ReductionFault {
        double[] timeS = waveform.timeS();
        double end = timeS[0] + plan.startUpCycles() * 2 * Math.PI / slowest - 1e-6 * all.intervalS();
        while (first < timeS.length && timeS[first] < end) {
            first++;
        }
        Samples rest = leftOut.samples(first);
        if (rest.size() < 2) {
            throw new ReductionFault(WaveformReason.WAVEFORM_ALL_START_UP.with(
                    plan.startUpCycles(), slowest * all.durationS() / (2 * Math.PI)));
        }
        return rest;
    }

    /** Whether the record is long and dense enough to tell these tones apart. */
    private static void requireRoom(Samples samples, double[] omega) throws ReductionFault {
        double cyclesPerRadian = samples.durationS() / (2 * Math.PI);
        if (omega[0] * cyclesPerRadian < FEWEST_CYCLES) {
            throw new ReductionFault(MultiFrequencyReason.MULTISINE_TOO_SHORT.with(
                    omega[0] * cyclesPerRadian, omega[0] / (2 * Math.PI)));
        }
        double fastest = omega[omega.length - 1];
        double perCycle = 2 * Math.PI / (fastest * samples.intervalS());
        if (perCycle < LEAST_SAMPLES_A_CYCLE) {
            throw new ReductionFault(MultiFrequencyReason.MULTISINE_TOO_COARSE.with(perCycle, fastest / (2 * Math.PI)));
        }
        for (int k = 1; k < omega.length; k++) {
            if ((omega[k] - omega[k - 1]) * cyclesPerRadian < LEAST_SPACING_BINS) {
                throw new ReductionFault(MultiFrequencyReason.MULTISINE_TOO_NEAR.with(
                        omega[k - 1] / (2 * Math.PI), omega[k] / (2 * Math.PI), 1 / samples.durationS()));
            }
        }
    }

    private Fitted fit(Samples samples, double[] start) throws ReductionFault {
        ToneFit.Freedom freedom = given.length == 0
                ? ToneFit.Freedom.EACH
                : plan.frequencyFrom() == FrequencySource.TAG ? ToneFit.Freedom.NONE : ToneFit.Freedom.CLOCK;
        ToneFit fit = new ToneFit(samples, start.length, plan.drift().degree(), freedom);
        List<double[]> starts = new ArrayList<>(List.of(start));
        if (freedom == ToneFit.Freedom.CLOCK) {
            double factor = new ToneSearch(samples).clockFactor(start);
            double shift = Math.abs(factor - 1) * start[start.length - 1] * samples.durationS() / (2 * Math.PI);
            if (shift > 0.25) {
                starts.add(DoubleStream.of(start).map(omega -> omega * factor).toArray());
            }
        }
        ToneFit.Result best = starts.stream()
                .map(fit::fit)
                .flatMap(Optional::stream)
                .min(Comparator.comparingDouble(result -> DoubleStream.of(result.residualSquares())
                        .map(squares -> Math.log(Math.max(squares, Double.MIN_NORMAL)))
                        .sum()))
                .orElseThrow(() -> new ReductionFault(MultisineRefusal.noFit(
                        samples, start, given.length > 0, plan.drift().degree(), LEAST_EXPLAINED)));
        return new Fitted(samples, fit.basis(), best, freedom);
    }

    private Fitted refit(Samples rest, Fitted before) throws ReductionFault {
        requireSamples(rest, before.basis().tones());
        return fit(rest, given.length > 0 ? given : before.result().angularFrequencies());
    }

    /** A record that holds more than its tones and a drift is something else. */
    private void requireExplained(Fitted fitted) throws ReductionFault {
        double share = MultisineRefusal.explained(fitted.basis(), fitted.result());
        if (!(share >= LEAST_EXPLAINED)) {
            throw new ReductionFault(MultisineRefusal.unexplained(
                    fitted.samples(), fitted.result(), given.length > 0, share, LEAST_EXPLAINED));
        }
    }

    private List<SignalFit> summaries(Fitted fitted) {
        ToneNoise noise = new ToneNoise(
                fitted.samples(), fitted.basis(), fitted.result(), fitted.freedom() != ToneFit.Freedom.NONE);
        if (leftOut.spikes() > 0) {
            notes.add(WaveformReason.WAVEFORM_SPIKES_LEFT_OUT.with(leftOut.spikes()));
        }
        if (waveform.rowsLeftOut() > 0) {
            notes.add(WaveformReason.WAVEFORM_ROWS_MISSING.with(waveform.rowsLeftOut()));
        }
        ToneCovariance covariance =
                new ToneCovariance(fitted.basis(), fitted.result(), noise, fitted.freedom() == ToneFit.Freedom.NONE);
        Clock clock = Clock.of(waveform.timeS(), first);
        List<SignalFit> fits = new ArrayList<>();
        for (int k = 0; k < fitted.basis().tones(); k++) {
            fits.add(summary(fitted, noise, covariance, clock, k));
        }
        return List.copyOf(fits);
    }

    private SignalFit summary(Fitted fitted, ToneNoise noise, ToneCovariance covariance, Clock clock, int tone) {
        Samples samples = fitted.samples();
        double omega = fitted.result().angularFrequencies()[tone];
        double cycles = omega * samples.durationS() / (2 * Math.PI);
        cycles = Math.abs(cycles - Math.rint(cycles)) < 1e-3 ? Math.rint(cycles) : cycles;
        double frequencyU = covariance.phaseU(tone) / samples.halfSpanS() / (2 * Math.PI);
        double frequency = fitted.freedom() == ToneFit.Freedom.NONE ? givenHz[tone] : omega / (2 * Math.PI);
        List<Reason> toneNotes = new ArrayList<>(notes);
        for (int c = 0; c < Samples.CHANNELS; c++) {
            if (noise.beside(c, tone).pooled()) {
                toneNotes.add(WaveformReason.WAVEFORM_POOLED_NOISE.with(RecordChecks.channelName(c)));
            }
        }
        overtone(fitted, tone).ifPresent(toneNotes::add);
        double[][] covarianceOfTone = covariance.of(tone);
        if (fitted.amplitude(Samples.DEFORMATION, tone) < 3 * Math.sqrt(covarianceOfTone[0][0])) {
            toneNotes.add(MultiFrequencyReason.MULTISINE_TONE_ABSENT.with(frequency));
        }
        ScreeningFigures figures = new ScreeningFigures(
                (double) cutOffs.atLimit() / waveform.size(),
                (double) leftOut.spikes() / waveform.size(),
                clock.gapShare(),
                clock.jitter(),
                snrDb(fitted, noise, Samples.DEFORMATION, tone),
                snrDb(fitted, noise, Samples.LOAD, tone),
                baseline(fitted, noise, tone),
                Optional.empty(),
                Steadiness.temperatureWander(
                        waveform.temperatureK(),
                        samples.indices(),
                        2 * Math.PI / (fitted.result().angularFrequencies()[0] * samples.intervalS())),
                mismatch(fitted, covariance, tone));
        return new SignalFit(
                frequency,
                fitted.freedom() == ToneFit.Freedom.NONE ? 0 : frequencyU,
                samples.originS(),
                new Complex[] {amplitude(fitted, Samples.DEFORMATION, tone)},
                new Complex[] {amplitude(fitted, Samples.LOAD, tone)},
                covarianceOfTone,
                covariance.degreesOfFreedom(tone),
                Math.sqrt(noise.whole(Samples.DEFORMATION).variance()),
                Math.sqrt(noise.whole(Samples.LOAD).variance()),
                cycles,
                first,
                samples.size(),
                waveform.size() - samples.size(),
                Steadiness.meanTemperature(waveform.temperatureK(), samples.indices()),
                figures,
                List.copyOf(toneNotes));
    }

    private static Complex amplitude(Fitted fitted, int channel, int tone) {
        double[] x = fitted.result().coefficients()[channel];
        int column = fitted.basis().cosineColumn(tone);
        return new Complex(x[column], -x[column + 1]);
    }

    private static double snrDb(Fitted fitted, ToneNoise noise, int channel, int tone) {
        double deviation = Math.sqrt(noise.whole(channel).variance());
        return SignalToNoise.decibels(fitted.amplitude(channel, tone), deviation);
    }

    /** The movement of the mean over that of the whole oscillation: a drift is not the fault of a small tone. */
    private static Figure baseline(Fitted fitted, ToneNoise noise, int tone) {
        Figure worst = new Figure(0, 0);
        int terms = fitted.basis().driftTerms();
        for (int c = 0; c < Samples.CHANNELS && terms > 1; c++) {
            double squares = 0;
            for (int k = 0; k < fitted.basis().tones(); k++) {
                squares += fitted.amplitude(c, k) * fitted.amplitude(c, k);
            }
            double[] x = fitted.result().coefficients()[c];
            double slope = x[1];
            double curve = terms > 2 ? x[2] : 0;
            double turn = Math.abs(slope) < 2 * Math.abs(curve) ? -slope / (2 * curve) : 1;
            double[] heights = DoubleStream.of(-1, 1, turn)
                    .map(u -> u * (slope + u * curve))
                    .sorted()
                    .toArray();
            double size = Math.sqrt(squares);
            double deviation = Math.sqrt(
                    12 * noise.beside(c, tone).variance() / fitted.samples().size());
            Figure figure = new Figure((heights[2] - heights[0]) / size, deviation / size);
            worst = figure.value() > worst.value() ? figure : worst;
        }
        return worst;
    }

    private Optional<Figure> mismatch(Fitted fitted, ToneCovariance covariance, int tone) {
        if (given.length == 0) {
            return Optional.empty();
        }
        double halfSpan = fitted.samples().halfSpanS();
        double u = covariance.phaseU(tone) / halfSpan / given[tone];
        if (fitted.freedom() == ToneFit.Freedom.NONE) {
            // the common factor was held; where the signal would have taken it is still worth knowing
            double[] phases = fitted.result().phases();
            double fastest = given[given.length - 1];
            return phases.length == 0
                    ? Optional.empty()
                    : Optional.of(new Figure(Math.abs(phases[0]) / halfSpan / fastest, u));
        }
        return Optional.of(new Figure(Math.abs(fitted.result().angularFrequencies()[tone] / given[tone] - 1), u));
    }

    /** Which slower tone's overtone falls on a tone. */
    private static Optional<Reason> overtone(Fitted fitted, int tone) {
        double[] omega = fitted.result().angularFrequencies();
        double bin = 2 * Math.PI / fitted.samples().durationS();
        for (int order = 2; order <= HIGHEST_OVERTONE; order++) {
            double base = omega[tone] / order;
            int place = Arrays.binarySearch(omega, base - bin / order);
            int next = place < 0 ? -place - 1 : place;
            if (next < tone && Math.abs(omega[next] * order - omega[tone]) < bin) {
                return Optional.of(MultiFrequencyReason.MULTISINE_OVERTONE.with(order, omega[next] / (2 * Math.PI)));
            }
        }
        return Optional.empty();
    }
}
