package nightlag.stages.moduli;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;
import java.util.stream.Collectors;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReasonCode;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.geometry.CorrectionMap;
import nightlag.stages.geometry.SignalCorrection;
import nightlag.stages.moduli.ModulusPoints.Origin;
import nightlag.stages.moduli.ModulusPoints.Ranges;
import nightlag.stages.waveform.Waveform;

/**
 * A record of steps of stress to its creep curve. The steps are found from the stress alone; after each one the strain
 * since just before it, over the step's stress, is J(t) after a load and the recovered compliance after an unload
 * (Ferry 1980, ch. 1; Plazek and O'Rourke 1971 for the recovery).
 *
 * <p>Of the corrections only the frame's compliance and the geometry act: the rest state of inertia and friction takes no
 * load, and a delay of microseconds is nothing against a creep time. While the stress settles, and as long again, nothing
 * is read: after twice the rise t₁, with the time counted from its centre, what it leaves in a power law tⁿ is below
 * n(1 − n)/96 of the reading.
 */
public final class CreepAnalysis {
    private static final int LEAST_SAMPLES = 8;
    /** Times of the rise, from its centre, before which nothing is read. */
    private static final double RISES_LEFT_OUT = 2;

    /** Samples before a later step that tell where the strain was going. */
    private static final int BEFORE_A_STEP = 50;

    /** Samples whose own scatter is better known than it may differ from the whole record's. */
    private static final int ENOUGH_FOR_NOISE = 20;

    private static final double SIGNIFICANT = 3;
    private static final int LEAST_FOR_DRIFT = 10;

    private final Waveform record;
    private final SignalCorrection correction;
    private final double[] timeS;
    private final double[] strain;
    private final double[] stress;
    private final List<Reason> reasons = new ArrayList<>();

    private CreepAnalysis(Waveform record, SignalCorrection correction) {
        this.record = record;
        this.correction = correction;
        this.timeS = record.timeS();
        this.strain = new double[timeS.length];
        this.stress = new double[timeS.length];
        CorrectionMap still = correction.at(0);
        for (int i = 0; i < timeS.length; i++) {
            strain[i] = still.strainFromDeformation().re() * record.deformation()[i]
                    + still.strainFromLoad().re() * record.load()[i];
            stress[i] = still.stressFromLoad().re() * record.load()[i];
        }
    }

    /**
     * The creep curve of a record.
     *
     * @throws ReductionFault if no step of the stress is found, or nothing can be read after it
     */
    public static CreepCurve of(
            Origin origin, Waveform record, SignalCorrection correction, Ranges ranges, ScreeningPlan plan)
            throws ReductionFault {
        check(record);
        return new CreepAnalysis(record, correction).curve(origin, ranges, plan);
    }

    private static void check(Waveform record) throws ReductionFault {
        if (record.size() < LEAST_SAMPLES) {
            throw new ReductionFault(CreepReason.CREEP_TOO_FEW_SAMPLES.with(record.size(), LEAST_SAMPLES));
        }
        for (int i = 0; i < record.size(); i++) {
            if (!Double.isFinite(record.deformation()[i])) {
                throw new ReductionFault(CreepReason.CREEP_NOT_FINITE.with("deformation", i + 1));
            }
            if (!Double.isFinite(record.load()[i])) {
                throw new ReductionFault(CreepReason.CREEP_NOT_FINITE.with("load", i + 1));
            }
            if (!(i == 0 || record.timeS()[i] > record.timeS()[i - 1])) {
                throw new ReductionFault(CreepReason.CREEP_TIME_NOT_RISING.with(i + 1));
            }
        }
    }

    private CreepCurve curve(Origin origin, Ranges ranges, ScreeningPlan plan) throws ReductionFault {
        List<LoadSteps.Step> found = LoadSteps.of(timeS, stress);
        List<CreepStep> steps = new ArrayList<>();
        List<CreepReading> readings = new ArrayList<>();
        double firstAt = found.get(0).atS();
        boolean fromRest = fromRest(found);
        double rest = fromRest ? restPa(found) : 0;
        int samples = 0;
        int spikes = 0;
        double correlation = 0;
        double stressChange = 0;
        for (int k = 0; k < found.size(); k++) {
            LoadSteps.Step here = found.get(k);
            int begin = Math.max(here.settled(), firstAfter(here.atS() + RISES_LEFT_OUT * rise(here)));
            int end = k + 1 < found.size() ? found.get(k + 1).foot() : timeS.length - 1;
            CreepBins bins = CreepBins.of(timeS, strain, stress, begin, end, here.atS());
            List<CreepBins.Mean> means = bins.means();
            CreepStep step = step(k, found, begin, end, rest, firstAt);
            steps.add(step);
            readings.addAll(readings(k + 1, step, means, here.atS(), firstAt));
            samples += means.stream().mapToInt(CreepBins.Mean::samples).sum();
            spikes += bins.spikes();
            correlation = Math.max(correlation, bins.correlation());
            stressChange = Math.max(stressChange, change(means) / Math.abs(step.changePa()));
        }
        if (readings.isEmpty()) {
            throw new ReductionFault(CreepReason.CREEP_NO_READINGS.with());
        }
        CreepFigures figures = figures(found, readings, stressChange);
        Screening screening = Screening.ofCreep(figures, ranges.deformation(), ranges.load(), plan);
        reasons.addAll(screening.reasons());
        notes(found, steps, fromRest, spikes, correlation);
        OptionalDouble temperature = temperatureK();
        ModulusPoints.taggedTemperatureOff(origin, temperature).ifPresent(reasons::add);
        return new CreepCurve(
                origin.key(),
                origin.made(),
                correction.deformationMode(),
                temperature.isPresent() ? temperature : origin.taggedTemperatureK(),
                origin.taggedTemperatureK(),
                fromRest,
                steps,
                readings,
                screening.quality(),
                screening.flags().stream().sorted().toList(),
                samples,
                reasons);
    }

    private double rise(LoadSteps.Step step) {
        return timeS[step.settled()] - timeS[step.foot()];
    }

    private int firstAfter(double time) {
        int place = Arrays.binarySearch(timeS, time);
        return place >= 0 ? place : -place - 1;
    }

    /** Whether the record begins before the first load: it does not come down from what it begins at. */
    private boolean fromRest(List<LoadSteps.Step> found) {
        double most = 0;
        for (LoadSteps.Step step : found) {
            most = Math.max(most, Math.abs(stress[step.settled()]));
        }
        return Math.abs(restPa(found)) <= most / 2;
    }

    private double restPa(List<LoadSteps.Step> found) {
        return mean(stress, 0, found.get(0).foot());
    }

    private CreepStep step(int k, List<LoadSteps.Step> found, int begin, int end, double rest, double firstAt) {
        LoadSteps.Step here = found.get(k);
        int from = k == 0 ? 0 : Math.min(here.foot(), found.get(k - 1).settled());
        double before = mean(stress, from, here.foot());
        double after = mean(stress, Math.min(begin, end), end);
        double beforeU = meanU(stress, from, here.foot());
        double afterU = meanU(stress, Math.min(begin, end), end);
        double[] strainBefore = k == 0 ? meanBefore(here) : lineBefore(here, from);
        return new CreepStep(
                Math.abs(after - rest) > Math.abs(before - rest) ? CreepPart.LOAD : CreepPart.RECOVERY,
                here.atS() - firstAt,
                here.atUS(),
                rise(here),
                after - before,
                Math.hypot(beforeU, afterU),
                strainBefore[0],
                strainBefore[1],
                OptionalDouble.of(beforeU));
    }

    /** Before the first step: the mean, and its u. */
    private double[] meanBefore(LoadSteps.Step step) {
        return new double[] {mean(strain, 0, step.foot()), meanU(strain, 0, step.foot())};
    }

    /** Of a channel's mean over some samples: by their own noise, which may grow with the load, where they are enough to tell. */
    private double meanU(double[] values, int first, int last) {
        int count = last - first + 1;
        double noise = count < ENOUGH_FOR_NOISE
                ? LoadSteps.noise(timeS, values)
                : LoadSteps.noise(
                        Arrays.copyOfRange(timeS, first, last + 1), Arrays.copyOfRange(values, first, last + 1));
        return noise / Math.sqrt(count);
    }

    /** Before a later step: where a line through the last samples comes to at its instant, and its u. */
    private double[] lineBefore(LoadSteps.Step step, int from) {
        int first = Math.max(from, step.foot() - BEFORE_A_STEP + 1);
        // of no more than the last twentieth of the hold: the strain is no straight line over all of it
        double soonest = timeS[step.foot()] - (timeS[step.foot()] - timeS[from]) / 20;
        first = Math.min(Math.max(first, firstAfter(soonest)), Math.max(from, step.foot() - 2));
        int count = step.foot() - first + 1;
        double meanTime = mean(timeS, first, step.foot());
        double meanStrain = mean(strain, first, step.foot());
        double squares = 0;
        double products = 0;
        for (int i = first; i <= step.foot(); i++) {
            squares += (timeS[i] - meanTime) * (timeS[i] - meanTime);
            products += (timeS[i] - meanTime) * (strain[i] - meanStrain);
        }
        double slope = squares > 0 ? products / squares : 0;
        double ahead = step.atS() - meanTime;
        double share = 1.0 / count + (squares > 0 ? ahead * ahead / squares : 0);
        return new double[] {
            meanStrain + slope * ahead,
            Math.hypot(LoadSteps.noise(timeS, strain) * Math.sqrt(share), slope * step.atUS())
        };
    }

    private static double mean(double[] values, int first, int last) {
        double sum = 0;
        for (int i = first; i <= last; i++) {
            sum += values[i] - values[first];
        }
        return values[first] + sum / (last - first + 1);
    }

    private static List<CreepReading> readings(
            int number, CreepStep step, List<CreepBins.Mean> means, double atS, double firstAt) {
        List<CreepReading> readings = new ArrayList<>();
        for (int i = 0; i < means.size(); i++) {
            CreepBins.Mean mean = means.get(i);
            double since = mean.timeS() - atS;
            double compliance = (mean.strain() - step.strainBefore()) / step.changePa();
            CreepBins.Mean earlier = means.get(Math.max(0, i - 1));
            CreepBins.Mean later = means.get(Math.min(means.size() - 1, i + 1));
            double slope = later.timeS() > earlier.timeS()
                    ? (later.strain() - earlier.strain()) / (later.timeS() - earlier.timeS()) / step.changePa()
                    : 0;
            double own = Math.hypot(mean.strainU(), step.strainBeforeU()) / step.changePa();
            double shared = compliance * step.changeUPa() / step.changePa();
            readings.add(new CreepReading(
                    number,
                    mean.timeS() - firstAt,
                    since,
                    mean.stressPa(),
                    mean.strain(),
                    mean.strainU(),
                    compliance,
                    Math.hypot(Math.hypot(own, shared), slope * step.atUS())));
        }
        return readings;
    }

    private static double change(List<CreepBins.Mean> means) {
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        int most = means.stream().mapToInt(CreepBins.Mean::samples).max().orElse(0);
        for (CreepBins.Mean mean : means) {
            // means of few samples hold their noise
            if (mean.samples() * 10 >= most) {
                low = Math.min(low, mean.stressPa());
                high = Math.max(high, mean.stressPa());
            }
        }
        return Math.max(0, high - low);
    }

    private CreepFigures figures(List<LoadSteps.Step> found, List<CreepReading> readings, double stressChange) {
        int foot = found.get(0).foot();
        double deformation = largestFrom(record.deformation(), mean(record.deformation(), 0, foot));
        double load = largestFrom(record.load(), mean(record.load(), 0, foot));
        double snr = Math.min(
                decibel(deformation, LoadSteps.noise(timeS, record.deformation())),
                decibel(load, LoadSteps.noise(timeS, record.load())));
        CorrectionMap still = correction.at(0);
        double frame = Math.abs(still.strainFromLoad().re()) * load;
        double own = Math.abs(still.strainFromDeformation().re()) * deformation;
        double least = Double.POSITIVE_INFINITY;
        double zero = mean(strain, 0, foot);
        for (CreepReading reading : readings) {
            if (reading.step() == 1) {
                least = Math.min(least, Math.abs(reading.strain() - zero));
            }
        }
        return new CreepFigures(
                snr,
                CreepRecordChecks.clippedShare(
                        record.deformation(), found.get(0).settled()),
                CreepRecordChecks.missingShare(timeS, found),
                drift(foot, own - frame),
                stressChange,
                frame == 0 ? 0 : frame / (frame + least),
                CreepRecordChecks.wander(record.temperatureK()),
                deformation,
                load);
    }

    private static double largestFrom(double[] values, double zero) {
        return Arrays.stream(values).map(value -> Math.abs(value - zero)).max().orElse(0);
    }

    private static double decibel(double signal, double noise) {
        return noise == 0 ? Double.POSITIVE_INFINITY : 20 * Math.log10(signal / noise);
    }

    /** What the drift before the load, where it stands out of the noise, would come to over the largest strain. */
    private double drift(int foot, double largest) {
        if (foot + 1 < LEAST_FOR_DRIFT) {
            return 0;
        }
        double meanTime = mean(timeS, 0, foot);
        double squares = 0;
        double products = 0;
        for (int i = 0; i <= foot; i++) {
            squares += (timeS[i] - meanTime) * (timeS[i] - meanTime);
            products += (timeS[i] - meanTime) * strain[i];
        }
        double slope = products / squares;
        double u = LoadSteps.noise(timeS, strain) / Math.sqrt(squares);
        double comes = Math.abs(slope) * (timeS[timeS.length - 1] - timeS[foot]);
        return Math.abs(slope) > SIGNIFICANT * u ? comes / Math.abs(largest) : 0;
    }

    private OptionalDouble temperatureK() {
        return Arrays.stream(record.temperatureK()).filter(Double::isFinite).average();
    }

    private void notes(
            List<LoadSteps.Step> found, List<CreepStep> steps, boolean fromRest, int spikes, double correlation) {
        reasons.add(CreepReason.CREEP_RAMP_LEFT_OUT.with(found.stream()
                .map(step -> ReasonCode.rounded(RISES_LEFT_OUT * rise(step)) + " s")
                .collect(Collectors.joining(", "))));
        if (!fromRest) {
            reasons.add(CreepReason.CREEP_BEGINS_UNDER_LOAD.with());
        }
        long loads =
                steps.stream().filter(step -> step.part() == CreepPart.LOAD).count();
        if (loads > 1) {
            reasons.add(CreepReason.CREEP_LATER_LOAD.with(loads));
        }
        if (spikes > 0) {
            reasons.add(CreepReason.CREEP_SPIKES_LEFT_OUT.with(spikes));
        }
        if (correlation > 0) {
            reasons.add(CreepReason.CREEP_NOISE_CORRELATED.with(
                    correlation, Math.sqrt((1 + correlation) / (1 - correlation))));
        }
        if (record.rowsLeftOut() > 0) {
            reasons.add(CreepReason.CREEP_ROWS_MISSING.with(record.rowsLeftOut()));
        }
    }
}
