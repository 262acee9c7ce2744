package nightlag.stages;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.function.IntPredicate;
import java.util.stream.IntStream;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;
import nightlag.stages.moduli.ScreeningPlan;
import nightlag.stages.numeric.Complex;
import nightlag.stages.waveform.Drift;
import nightlag.stages.waveform.ExtractionPlan;
import nightlag.stages.waveform.FrequencySource;
import nightlag.stages.waveform.HarmonicAnalysis;
import nightlag.stages.waveform.RecordWindow;
import nightlag.stages.waveform.SignalFit;
import nightlag.stages.waveform.Waveform;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.EnumSource;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Windows of a temperature ramp. The material is a single relaxation between two moduli with an activation energy:
 * E* = Er + (Eu − Er) ix/(1 + ix), x = f exp[(Ea/R)(1/T − 1/T₀)], f in Hz, Eu = 2 GPa, Er = 20 MPa, Ea = 400 kJ/mol,
 * T₀ = 373.15 K. The stress follows E*(T(t)) at once, σ = Re{E*(T(t)) ε* e^{iωt}}: what is tested is the extraction, not how
 * a specimen forgets the temperature it had. A transition of
 * one relaxation time is the sharpest there is, so it is the hardest case.
 * {@code mvn test -pl stages -Dtest=RollingWindowTest -Dnightlag.study=long} prints the worst errors of the ramp.
 */
class RollingWindowTest {
    private static final int SAMPLES_PER_CYCLE = 200;
    private static final double KELVIN_PER_SECOND = 2.0 / 60;
    private static final double STRAIN = 1e-3;

    /** What the instrument holds at its set amplitude. */
    private enum Held {
        STRAIN,
        STRESS
    }

    private static Complex modulus(double temperatureK, double frequencyHz) {
        double x = frequencyHz * Math.exp(400e3 / 8.314462618 * (1 / temperatureK - 1 / 373.15));
        Complex relaxing = new Complex(0, x).over(new Complex(1, x));
        return relaxing.times(2e9 - 20e6).plus(new Complex(20e6, 0));
    }

    /** A window of a ramp at 1 Hz, its middle at the given temperature. */
    private static final class Window {
        private final double middleK;
        private int cycles = 6;
        private double kelvinPerSecond = KELVIN_PER_SECOND;
        private double frequencyHz = 1;
        private double taggedHz = 1;
        private double recordFromS = 0;
        private double firstS = 600;
        private Held held = Held.STRAIN;
        private double noise;
        private long seed = 1;

        Window(double middleK) {
            this.middleK = middleK;
        }

        Waveform build(boolean window) {
            Random random = new Random(seed);
            int count = cycles * SAMPLES_PER_CYCLE;
            double[] t = new double[count];
            double[] strain = new double[count];
            double[] stress = new double[count];
            double[] temperature = new double[count];
            double stressAmplitude = STRAIN * modulus(middleK, frequencyHz).abs();
            for (int i = 0; i < count; i++) {
                double since = (i - (count - 1) / 2.0) / SAMPLES_PER_CYCLE / taggedHz;
                t[i] = firstS + (double) i / SAMPLES_PER_CYCLE / taggedHz;
                temperature[i] = middleK + kelvinPerSecond * since;
                Complex drive = Complex.polar(1, 2 * Math.PI * frequencyHz * since + 0.7);
                Complex now = modulus(temperature[i], frequencyHz);
                Complex strained = held == Held.STRAIN
                        ? drive.times(STRAIN)
                        : drive.times(stressAmplitude).over(now);
                strain[i] = strained.re() + noise * STRAIN * random.nextGaussian();
                stress[i] = strained.times(now).re() + noise * stressAmplitude * random.nextGaussian();
            }
            return new Waveform(
                    t,
                    strain,
                    stress,
                    temperature,
                    OptionalDouble.of(taggedHz),
                    0,
                    window
                            ? Optional.of(new RecordWindow(recordFromS, firstS, firstS + cycles / taggedHz))
                            : Optional.empty());
        }
    }

    private static ModulusPoint reduce(Waveform waveform, ExtractionPlan extraction, OptionalDouble elapsedS) {
        return Reduce.reduce(
                        new WaveformRecord(
                                new RecordTags(
                                        new PointKey("Alder 2", "L-1", "1", "1", "1", "bench/ramp.csv"),
                                        Optional.empty(),
                                        OptionalDouble.empty(),
                                        elapsedS,
                                        Map.of()),
                                DeformationSignal.STRAIN,
                                LoadSignal.STRESS,
                                waveform),
                        new ReductionPlan(
                                Corrections.none(),
                                Map.of(),
                                Map.of(),
                                Optional.empty(),
                                extraction,
                                ScreeningPlan.withDefaults()))
                .points()
                .get(0);
    }

    private static ModulusPoint reduce(Waveform waveform) {
        return reduce(waveform, ExtractionPlan.withDefaults(), OptionalDouble.empty());
    }

    /** The larger of the relative errors of storage and loss modulus. */
    private static double error(ModulusPoint point, double temperatureK, double frequencyHz) {
        Moduli found =
                point.moduli().orElseThrow(() -> new AssertionError("at " + temperatureK + " K: " + point.reasons()));
        Complex truth = modulus(temperatureK, frequencyHz);
        return Math.max(Math.abs(found.storagePa() / truth.re() - 1), Math.abs(found.lossPa() / truth.im() - 1));
    }

    private static double worstError(Held held, boolean window, FrequencySource source) {
        double worst = 0;
        double stepK = Study.isLong() ? 0.05 : 0.5;
        for (double temperature = 358; temperature <= 392; temperature += stepK) {
            Window made = new Window(temperature);
            made.held = held;
            ModulusPoint point =
                    reduce(made.build(window), new ExtractionPlan(0, 7, Drift.LINEAR, source), OptionalDouble.empty());
            worst = Math.max(worst, error(point, temperature, 1));
        }
        return worst;
    }

    @Tag("study")
    @ParameterizedTest(name = "the instrument holds the {0}")
    @EnumSource(Held.class)
    void aRampThroughTheGlassTransitionGivesBothModuliToFivePartsInAHundredThousand(Held held) {
        double signal = worstError(held, true, FrequencySource.SIGNAL);
        double tag = worstError(held, true, FrequencySource.TAG);
        Study.row("| the instrument holds the %s | %.1e | %.1e |", held, signal, tag);
        assertThat(signal).isLessThan(5e-5);
        assertThat(tag).isLessThan(5e-5);
    }

    /** No frequency with constant amplitudes settles here; the windows beside it all settle. */
    @Test
    void aWindowInWhichConstantAmplitudesDoNotSettleIsReducedAllTheSame() {
        Window made = new Window(370.15000000000276);
        made.held = Held.STRESS;
        assertThat(error(reduce(made.build(true)), made.middleK, 1)).isLessThan(5e-5);
    }

    @Test
    void takenForAWholeRecordTheSameSamplesMissItByFar() {
        double whole = worstError(Held.STRAIN, false, FrequencySource.SIGNAL);
        Study.row("| taken for a whole record | %.1e | |", whole);
        assertThat(whole).isGreaterThan(5e-4);
    }

    @Test
    void intervalsCoverTheModulusInTheSteepestPartOfARampWithNoise() {
        double temperature = 376;
        Complex truth = modulus(temperature, 1);
        int draws = 600;
        int covered = 0;
        for (int seed = 0; seed < draws; seed++) {
            Window made = new Window(temperature);
            made.noise = 1e-3;
            made.seed = seed;
            Moduli found = reduce(made.build(true)).moduli().orElseThrow();
            // Student's t(0.975) of some 50 degrees of freedom
            double wide = 2.01;
            covered += Math.abs(found.storagePa() - truth.re()) <= wide * storageU(found) ? 1 : 0;
            covered += Math.abs(found.lossPa() - truth.im()) <= wide * lossU(found) ? 1 : 0;
        }
        assertThat(covered / (2.0 * draws)).isBetween(0.93, 0.97);
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8})
    void aSteadySpecimenGivesTheSameModuliAsAWindowAndAsARecord(long seed) {
        Random random = new Random(seed);
        Window made = new Window(350 + 45 * random.nextDouble());
        made.kelvinPerSecond = 0;
        made.cycles = 2 + random.nextInt(12);
        made.frequencyHz = 1 + 0.002 * random.nextGaussian();
        Moduli whole = reduce(made.build(false)).moduli().orElseThrow();
        Moduli window = reduce(made.build(true)).moduli().orElseThrow();
        assertThat(window.complex().minus(whole.complex()).abs()).isLessThan(1e-9 * whole.magnitudePa());
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4})
    void aSteadySpecimenCostsAWindowNoCertainty(long seed) {
        Window made = new Window(372);
        made.kelvinPerSecond = 0;
        made.noise = 1e-3;
        made.seed = seed;
        Moduli whole = reduce(made.build(false)).moduli().orElseThrow();
        Moduli window = reduce(made.build(true)).moduli().orElseThrow();
        double u = storageU(whole);
        assertThat(window.storagePa()).isCloseTo(whole.storagePa(), within(0.5 * u));
        assertThat(storageU(window)).isCloseTo(u, within(0.1 * u));
    }

    @ParameterizedTest(name = "the instrument holds the {0} at {1} K")
    @CsvSource({"STRAIN, 366", "STRAIN, 374", "STRESS, 374", "STRAIN, 381", "STRESS, 381"})
    void theFrequencyIsThatOfTheSignalTheInstrumentHolds(Held held, double temperature) throws Exception {
        Window made = new Window(temperature);
        made.held = held;
        made.frequencyHz = 1.002;
        SignalFit fit = HarmonicAnalysis.analyse(made.build(true), ExtractionPlan.withDefaults());
        assertThat(fit.frequencyHz()).isCloseTo(1.002, within(2e-6));
        assertThat(error(reduce(made.build(true)), temperature, 1.002)).isLessThan(5e-5);
    }

    @ParameterizedTest(name = "tag {0} Hz, flagged {1}")
    @CsvSource({"1.0005, false", "1.002, true"})
    void aTagThatIsTakenAsItIsMayStillBeWrong(double taggedHz, boolean flagged) {
        Window made = new Window(355);
        made.taggedHz = taggedHz;
        ModulusPoint point = reduce(
                made.build(true), new ExtractionPlan(0, 7, Drift.LINEAR, FrequencySource.TAG), OptionalDouble.empty());
        assertThat(point.flags()).isEqualTo(flagged ? List.of(Flag.FREQUENCY_MISMATCH) : List.of());
        assertThat(error(point, 355, 1)).isLessThan(5e-5);
    }

    @Test
    void spikesInARampAreLeftOut() {
        Waveform clean = new Window(377).build(true);
        double[] load = clean.load().clone();
        for (int place : new int[] {11, 300, 777}) {
            load[place] += 10 * STRAIN * modulus(377, 1).abs();
        }
        Waveform spiked = new Waveform(
                clean.timeS(),
                clean.deformation(),
                load,
                clean.temperatureK(),
                clean.nominalFrequencyHz(),
                0,
                clean.window());
        ModulusPoint point = reduce(spiked);
        assertThat(point.samplesUsed()).isEqualTo(clean.size() - 3);
        assertThat(error(point, 377, 1)).isLessThan(5e-5);
    }

    @Test
    void aWindowOfOneCycleTakesTheSpecimenForSteadyAndSaysSo() {
        Window made = new Window(375);
        made.cycles = 1;
        ModulusPoint point = reduce(made.build(true));
        assertThat(point.reasons())
                .extracting(reason -> reason.sentence())
                .anyMatch(sentence -> sentence.startsWith("amplitudes taken as constant within the window: "));
        assertThat(error(point, 375, 1)).isLessThan(5e-3);
    }

    /**
     * Two cycles do not tell a curved change from drift and harmonics; u has room for it, and without noise that is all there
     * is. Outside these temperatures both are below 4e-6 of |E*|.
     */
    @Test
    void aWindowOfTwoCyclesCountsInWhatItsCurvatureMayHide() {
        double squares = 0;
        double largest = 0;
        int count = 0;
        for (double temperature = 369; temperature <= 391; temperature += 0.5) {
            Window made = new Window(temperature);
            made.cycles = 2;
            Moduli found = reduce(made.build(true)).moduli().orElseThrow();
            Complex truth = modulus(temperature, 1);
            double storage = (found.storagePa() - truth.re()) / storageU(found);
            double loss = (found.lossPa() - truth.im()) / lossU(found);
            largest = Math.max(largest, Math.max(Math.abs(storage), Math.abs(loss)));
            squares += storage * storage + loss * loss;
            count += 2;
        }
        assertThat(largest).isLessThan(2);
        assertThat(Math.sqrt(squares / count)).isBetween(0.2, 0.9);
    }

    @Test
    void aPointStandsAtTheMiddleOfItsWindowInTimeAndTemperature() {
        Waveform whole = new Window(375).build(true);
        ModulusPoint point = reduce(whole, ExtractionPlan.withDefaults(), OptionalDouble.of(30));
        double half = (whole.timeS()[whole.size() - 1] - whole.timeS()[0]) / 2;
        assertThat(point.elapsedS().orElseThrow()).isCloseTo(30 + 600 + half, within(1e-9));
        assertThat(point.temperatureK().orElseThrow()).isCloseTo(375, within(1e-9));
    }

    @Test
    void missingRowsOnOneSideLeaveTimeTemperatureAndModulusInTheMiddle() {
        Waveform whole = new Window(375).build(true);
        ModulusPoint point = reduce(onlySamples(whole, i -> i < 100 || i > 400));
        assertThat(point.temperatureK().orElseThrow()).isCloseTo(375, within(1e-9));
        assertThat(error(point, 375, 1)).isLessThan(5e-5);
    }

    private static Waveform onlySamples(Waveform whole, IntPredicate kept) {
        int[] places = IntStream.range(0, whole.size()).filter(kept).toArray();
        return new Waveform(
                pick(whole.timeS(), places),
                pick(whole.deformation(), places),
                pick(whole.load(), places),
                pick(whole.temperatureK(), places),
                whole.nominalFrequencyHz(),
                0,
                whole.window());
    }

    /** A window of 1200 samples of a steady specimen of which the clock, before and after, has not all. */
    @ParameterizedTest(name = "samples {0} to {1}: {2} missing, {3} {4}")
    @CsvSource({
        "0, 1200, 0, SOUND,",
        "0, 1178, 0.0183, SOUND,",
        "0, 1172, 0.0233, DOUBTFUL, GAPS",
        "30, 1200, 0.0242, DOUBTFUL, GAPS",
        "20, 1180, 0.0325, DOUBTFUL, GAPS",
        "0, 850, 0.2917, DOUBTFUL, GAPS",
        "0, 720, 0.4, UNUSABLE, GAPS",
        "500, 1200, 0.4158, UNUSABLE, GAPS"
    })
    void whatAWindowWasPlannedToHoldAndDoesNotIsAGap(int from, int to, double missing, Quality quality, Flag flag)
            throws Exception {
        Window made = new Window(345);
        made.kelvinPerSecond = 0;
        Waveform cut = onlySamples(made.build(true), i -> i >= from && i < to);

        assertThat(HarmonicAnalysis.analyse(cut, ExtractionPlan.withDefaults())
                        .screening()
                        .gapShare())
                .isCloseTo(missing, within(1e-3));
        ModulusPoint point = reduce(cut);
        assertThat(point.flags()).isEqualTo(flag == null ? List.of() : List.of(flag));
        assertThat(point.quality()).isEqualTo(quality);
        assertThat(error(point, 345, 1)).isLessThan(1e-9);
    }

    @Test
    void ofTheStartUpCyclesNothingIsMissing() throws Exception {
        ExtractionPlan plan = new ExtractionPlan(2.5, 7, Drift.LINEAR, FrequencySource.SIGNAL);
        Window made = new Window(345);
        made.recordFromS = 600;
        assertThat(HarmonicAnalysis.analyse(made.build(true), plan).screening().gapShare())
                .isZero();
        Waveform without = onlySamples(made.build(true), i -> i != 1199 && i != 900);
        // of 3.5 cycles, 200 samples each, one between two others and the last
        assertThat(HarmonicAnalysis.analyse(without, plan).screening().gapShare())
                .isCloseTo(2 / 700.0, within(1e-5));
    }

    /** That the samples beyond a jump are left out is what the flag of the clock says. */
    @Test
    void aJumpOfTheClockWithinAWindowIsNoGapAsWell() {
        Window made = new Window(345);
        made.kelvinPerSecond = 0;
        Waveform whole = made.build(true);
        double[] timeS = whole.timeS().clone();
        for (int i = 800; i < timeS.length; i++) {
            timeS[i] += 0.3;
        }
        Waveform jumped = onlySamples(
                new Waveform(
                        timeS,
                        whole.deformation(),
                        whole.load(),
                        whole.temperatureK(),
                        whole.nominalFrequencyHz(),
                        0,
                        whole.window()),
                i -> timeS[i] < whole.window().orElseThrow().toS());
        ModulusPoint point = reduce(jumped);
        assertThat(point.flags()).containsExactly(Flag.UNEVEN_CLOCK);
        assertThat(point.quality()).isEqualTo(Quality.DOUBTFUL);
        assertThat(point.samplesUsed()).isEqualTo(800);
    }

    @Test
    void startUpCyclesAreThoseOfTheWholeRecord() {
        ExtractionPlan plan = new ExtractionPlan(8, 7, Drift.LINEAR, FrequencySource.SIGNAL);
        Window made = new Window(375);
        made.recordFromS = 600;
        ModulusPoint within = reduce(made.build(true), plan, OptionalDouble.empty());
        assertThat(within.quality()).isEqualTo(Quality.UNUSABLE);
        assertThat(within.reasons())
                .singleElement()
                .satisfies(
                        reason -> assertThat(reason.sentence())
                                .startsWith(
                                        "start_up_cycles leaves out the first 8 cycles of the record, and this window ends after 5.99"));
        made.recordFromS = 597;
        ModulusPoint partly = reduce(made.build(true), plan, OptionalDouble.empty());
        assertThat(partly.samplesUsed()).isEqualTo(SAMPLES_PER_CYCLE);
        made.recordFromS = 592;
        ModulusPoint behind = reduce(made.build(true), plan, OptionalDouble.empty());
        assertThat(behind.samplesUsed()).isEqualTo(6 * SAMPLES_PER_CYCLE);
    }

    @ParameterizedTest(name = "at {0} K: unsettled {1}")
    @CsvSource({"364, false", "375, true"})
    void aModulusThatChangesByMoreThanItsLimitOverTheWindowIsSaid(double temperature, boolean unsettled) {
        Window made = new Window(temperature);
        double begin = temperature - 3 * made.kelvinPerSecond;
        double end = temperature + 3 * made.kelvinPerSecond;
        double change = 1 - modulus(end, 1).abs() / modulus(begin, 1).abs();
        assertThat(change > 0.02).isEqualTo(unsettled);
        assertThat(reduce(made.build(true)).flags())
                .containsExactlyElementsOf(unsettled ? List.of(Flag.UNSETTLED) : List.of());
    }

    @Test
    void aSteepChangeIsFollowedAndMakesAWindowDoubtfulAtMost() {
        Window made = new Window(376);
        made.kelvinPerSecond = 0.15;
        double change = 1 - modulus(376.45, 1).abs() / modulus(375.55, 1).abs();
        assertThat(change).isGreaterThan(0.2);

        ModulusPoint window = reduce(made.build(true));
        ModulusPoint record = reduce(made.build(false));

        assertThat(window.flags()).containsExactly(Flag.UNSETTLED);
        assertThat(window.quality()).isEqualTo(Quality.DOUBTFUL);
        assertThat(error(window, 376, 1)).isLessThan(5e-3);
        assertThat(record.quality()).isEqualTo(Quality.UNUSABLE);
    }

    @Test
    void aRampIsNoWanderingTemperatureButWhatLeavesItIs() {
        Window made = new Window(345);
        made.kelvinPerSecond = 0.2;
        Waveform ramp = made.build(true);
        assertThat(reduce(ramp).flags()).isEmpty();
        double[] stepped = ramp.temperatureK().clone();
        for (int i = stepped.length / 2; i < stepped.length; i++) {
            stepped[i] += 2;
        }
        Waveform leavesIt = new Waveform(
                ramp.timeS(), ramp.deformation(), ramp.load(), stepped, ramp.nominalFrequencyHz(), 0, ramp.window());
        assertThat(reduce(leavesIt).flags()).containsExactly(Flag.TEMPERATURE_WANDER);
    }

    private static double storageU(Moduli moduli) {
        return moduli.covariance().orElseThrow().storageU();
    }

    private static double lossU(Moduli moduli) {
        return moduli.covariance().orElseThrow().lossU();
    }

    private static double[] pick(double[] values, int[] places) {
        return Arrays.stream(places).mapToDouble(i -> values[i]).toArray();
    }
}
