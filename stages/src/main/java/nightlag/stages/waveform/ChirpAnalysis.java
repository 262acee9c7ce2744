package nightlag.stages.waveform;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;
import nightlag.stages.waveform.ScreeningFigures.Figure;

/**
 * An exponential sweep of frequency to the response at many frequencies (Geri, Keshavarz, Divoux, Clasen, Curtis &amp;
 * McKinley, Phys. Rev. X 8 (2018) 041042): the quotient of the Fourier transforms of load and deformation. The taper that
 * keeps such a signal free of ripples (Tukey 1967) is the signal's own and acts on both channels alike; none is laid over
 * it here, since a window does not commute with a material's memory. What the record's two ends add is fitted together
 * with the quotient, frequency by frequency ({@link LocalResponse}).
 */
public final class ChirpAnalysis {
    /** The band ends where the spectrum's power (times frequency, which makes that of a sweep flat) falls below this. */
    private static final double LEAST_LEVEL = 0.25;
    /** The record holds at least this many cycles of the slowest frequency given out. */
    private static final double FEWEST_CYCLES = 6;
    /** Lines are taken this far above the sweep, for the fit around its fastest frequency. */
    private static final double ABOVE_SWEEP = 1.35;

    private static final int FEWEST_LINES = 10;
    /** Points below this times the slowest are the ones a start in motion puts in doubt. */
    private static final double SLOW_POINTS = 2;

    private final Waveform waveform;
    private final double pointsPerDecade;
    private final int cutTerms;
    private final LeftOut leftOut;
    private final CutOffs cutOffs;
    private final List<Reason> notes = new ArrayList<>();

    private ChirpAnalysis(Waveform waveform, double pointsPerDecade, Drift drift) {
        this.waveform = waveform;
        this.pointsPerDecade = pointsPerDecade;
        this.cutTerms = Math.max(1, drift.degree());
        this.leftOut = new LeftOut(waveform);
        this.cutOffs = CutOffs.leftAtASlope(waveform);
    }

    /**
     * Takes the responses out of a record, which should begin at rest and go on a little after the sweep.
     *
     * @param pointsPerDecade how many frequencies to give out, evenly spaced in their logarithm
     * @param drift what is taken for the drift; a constant and a straight line are the same here
     * @return a fit of one order for each frequency, the slowest first. The deformation's amplitude is that of the sweep
     *     where it passes the frequency; the covariance is all in the load
     * @throws ReductionFault if the deformation is no exponential sweep, or too short for its range
     */
    public static List<SignalFit> analyse(Waveform waveform, double pointsPerDecade, Drift drift)
            throws ReductionFault {
        RecordChecks.check(waveform);
        return new ChirpAnalysis(waveform, pointsPerDecade, drift).run();
    }

    private List<SignalFit> run() throws ReductionFault {
        leftOut.leaveOutTowering();
        int cut = leftOut.leaveOut(cutOffs);
        if (cut > 0) {
            notes.add(cutOffs.note(cut));
        }
        Samples samples = leftOut.samples(0);
        int needed = 4 * FEWEST_LINES;
        if (samples.size() < needed) {
            throw new ReductionFault(WaveformReason.WAVEFORM_TOO_FEW_SAMPLES.with(samples.size(), needed));
        }
        SweepLaw law = SweepLaw.of(samples);
        Clock clock = Clock.of(waveform.timeS(), 0);
        FourierLines lines =
                FourierLines.of(samples, clock, samples.size() == waveform.size(), ABOVE_SWEEP * law.fastestHz());
        int[] band = band(lines, law);
        if (band[1] - band[0] + 1 < FEWEST_LINES) {
            throw new ReductionFault(
                    MultiFrequencyReason.CHIRP_TOO_SHORT.with(Math.max(0, band[1] - band[0] + 1), FEWEST_LINES));
        }
        double low = band[0] / lines.durationS();
        double high = band[1] / lines.durationS();
        notes.add(MultiFrequencyReason.CHIRP_BAND.with(low, high));
        if (leftOut.spikes() > 0) {
            notes.add(WaveformReason.WAVEFORM_SPIKES_LEFT_OUT.with(leftOut.spikes()));
        }
        if (waveform.rowsLeftOut() > 0) {
            notes.add(WaveformReason.WAVEFORM_ROWS_MISSING.with(waveform.rowsLeftOut()));
        }
        Figure start = SweepStart.of(samples, law, lines.noise()[Samples.DEFORMATION]);
        boolean inMotion = start.value() > SweepStart.AT_REST && start.significant();
        List<SignalFit> fits = new ArrayList<>();
        int steps = (int) Math.floor(Math.log10(high / low) * pointsPerDecade + 1e-9);
        int lost = 0;
        for (int step = 0; step <= steps; step++) {
            double frequency = low * Math.pow(10, step / pointsPerDecade);
            Optional<LocalResponse> response = response(frequency, lines, inMotion);
            if (response.isPresent()) {
                Optional<Figure> doubt = Optional.of(start).filter(any -> inMotion && frequency < SLOW_POINTS * low);
                fits.add(summary(frequency, response.get(), samples, lines, law, clock, doubt));
            } else {
                lost++;
            }
        }
        if (lost > 0) {
            throw new ReductionFault(MultiFrequencyReason.CHIRP_TOO_COARSE.with(lost, low, high));
        }
        return List.copyOf(fits);
    }

    /** What a record that begins in motion remembers of the time before bends more than one that begins at rest. */
    private Optional<LocalResponse> response(double frequency, FourierLines lines, boolean inMotion) {
        Optional<LocalResponse> response = LocalResponse.at(frequency, lines, cutTerms);
        Optional<LocalResponse> other =
                inMotion && response.isPresent() ? LocalResponse.at(frequency, lines, cutTerms + 1) : Optional.empty();
        return other.isPresent()
                ? response.map(found -> found.allowingFor(other.get().response()))
                : response;
    }

    /** First and last line of the band in which the deformation's spectrum is strong. */
    private static int[] band(FourierLines lines, SweepLaw law) {
        int from = (int) Math.max(FEWEST_CYCLES, Math.ceil(law.slowestHz() * lines.durationS()));
        int to = (int) Math.min(lines.size() - 1.0, Math.floor(law.fastestHz() * lines.durationS()));
        if (to <= from) {
            return new int[] {from, from - 1};
        }
        double[] levels = new double[lines.size()];
        for (int k = 1; k < levels.length; k++) {
            levels[k] = k * lines.power(Samples.DEFORMATION, k);
        }
        double[] sorted = java.util.Arrays.copyOfRange(levels, from, to + 1);
        java.util.Arrays.sort(sorted);
        double least = LEAST_LEVEL * sorted[sorted.length / 2];
        int middle = (int) Math.sqrt((double) from * to);
        int low = middle;
        while (low > FEWEST_CYCLES && levels[low - 1] >= least) {
            low--;
        }
        int high = middle;
        while (high < levels.length - 1 && levels[high + 1] >= least) {
            high++;
        }
        return new int[] {Math.max(low, from), Math.min(high, to)};
    }

    private SignalFit summary(
            double frequency,
            LocalResponse response,
            Samples samples,
            FourierLines lines,
            SweepLaw law,
            Clock clock,
            Optional<Figure> startInMotion) {
        double amplitude = amplitude(samples, law, frequency);
        Complex load = response.response().times(amplitude);
        double variance = amplitude * amplitude * response.variance();
        double[][] covariance = new double[4][4];
        covariance[2][2] = variance;
        covariance[3][3] = variance;
        double deformationNoise = lines.noise()[Samples.DEFORMATION];
        // where the sweep reaches up to the last lines there is only the misfit to go by
        double loadNoise = lines.noise()[Samples.LOAD] > 0
                ? lines.noise()[Samples.LOAD]
                : Math.sqrt(response.lineVariance() / lines.samples());
        double cycles = frequency * lines.durationS();
        double loadSnr = SignalToNoise.decibels(load.abs(), loadNoise);
        ScreeningFigures figures = new ScreeningFigures(
                (double) cutOffs.atLimit() / waveform.size(),
                (double) leftOut.spikes() / waveform.size(),
                clock.gapShare(),
                clock.jitter(),
                deformationNoise > 0 ? SignalToNoise.decibels(amplitude, deformationNoise) : loadSnr,
                loadSnr,
                new Figure(0, 0),
                Optional.empty(),
                Steadiness.temperatureWander(
                        waveform.temperatureK(), samples.indices(), 1 / (law.slowestHz() * samples.intervalS())),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                startInMotion,
                OptionalDouble.empty());
        return new SignalFit(
                frequency,
                0,
                samples.originS(),
                new Complex[] {new Complex(amplitude, 0)},
                new Complex[] {load},
                covariance,
                response.freedom(),
                deformationNoise,
                loadNoise,
                cycles,
                0,
                samples.size(),
                waveform.size() - samples.size(),
                Steadiness.meanTemperature(waveform.temperatureK(), samples.indices()),
                figures,
                List.copyOf(notes));
    }

    /** The deformation's amplitude where the sweep passes a frequency: a fit of the sweep's own phase over two cycles. */
    private static double amplitude(Samples samples, SweepLaw law, double frequency) {
        double centre = law.passes(frequency);
        double[] seconds = samples.seconds();
        double[][] gram = new double[3][3];
        double[] moments = new double[3];
        double largest = 0;
        for (int i = 0; i < seconds.length; i++) {
            double t = seconds[i] - centre;
            if (Math.abs(t) <= 1 / frequency) {
                double phase = 2 * Math.PI * frequency * Math.expm1(law.rate() * t) / law.rate();
                double[] row = {1, Math.cos(phase), Math.sin(phase)};
                double value = samples.channels()[Samples.DEFORMATION][i];
                largest = Math.max(largest, Math.abs(value));
                for (int p = 0; p < 3; p++) {
                    moments[p] += row[p] * value;
                    for (int q = 0; q <= p; q++) {
                        gram[p][q] += row[p] * row[q];
                    }
                }
            }
        }
        double most = largest;
        return nightlag.stages.numeric.Cholesky.of(gram)
                .map(normal -> normal.solve(moments))
                .map(x -> Math.hypot(x[1], x[2]))
                .orElse(most);
    }
}
