package nightlag.pipeline.decode;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.io.BufferedWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Random;
import java.util.Set;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.intake.RawFile;
import nightlag.stages.WaveformRecord;
import nightlag.stages.waveform.RecordWindow;
import nightlag.stages.waveform.Waveform;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** How one long record is cut into windows, and where its rows go. */
class RollingRowsTest {
    @TempDir
    Path folder;

    private Bench bench() {
        return Bench.melt(folder).rolling(6, 3).fixed(TagName.FREQUENCY, "1 Hz");
    }

    /** Rows at these times, the deformation their number. */
    private static String[] file(double... timeS) {
        List<String> lines = new ArrayList<>(List.of("t;phi;M"));
        for (int i = 0; i < timeS.length; i++) {
            lines.add(String.format(Locale.GERMANY, "%.6f;%d;2", timeS[i], i));
        }
        return lines.toArray(String[]::new);
    }

    /** Four rows a second. */
    private static double[] clock(double fromS, int rows) {
        double[] times = new double[rows];
        Arrays.setAll(times, i -> fromS + i / 4.0);
        return times;
    }

    private static List<String> points(Bench.Decoded decoded) {
        return decoded.records().stream()
                .map(record -> record.tags().key().point())
                .toList();
    }

    private static double first(Bench.Decoded decoded, int window) {
        return decoded.waveform(window).waveform().timeS()[0];
    }

    @Test
    void aRecordIsCutIntoWindowsThatOverlap() throws Exception {
        Bench.Decoded decoded = Bench.decode(bench().write("ramp.csv", file(clock(100, 60))));
        assertThat(decoded.counts()).isEqualTo(new DecodeCounts(60, 60, 0, 4));
        assertThat(points(decoded)).containsExactly("1", "2", "3", "4");
        for (int window = 0; window < 4; window++) {
            Waveform waveform = decoded.waveform(window).waveform();
            assertThat(waveform.timeS()).containsExactly(clock(100 + 3 * window, 24));
            RecordWindow planned = waveform.window().orElseThrow();
            assertThat(planned.recordFromS()).isEqualTo(100);
            assertThat(planned.fromS()).isCloseTo(100 + 3 * window, within(1e-7));
            assertThat(planned.toS()).isCloseTo(106 + 3 * window, within(1e-7));
            assertThat(waveform.nominalFrequencyHz()).hasValue(1);
        }
    }

    @Test
    void rowsBehindTheLastFullWindowAreLeftOut() throws Exception {
        Bench.Decoded decoded = Bench.decode(bench().write("ramp.csv", file(clock(0, 60 + 11))));
        assertThat(decoded.counts()).isEqualTo(new DecodeCounts(71, 60, 11, 11, 4));
    }

    @Test
    void aLastWindowIsFullUpToItsLastSample() throws Exception {
        assertThat(Bench.decode(bench().write("a.csv", file(clock(0, 35)))).counts())
                .isEqualTo(new DecodeCounts(35, 24, 11, 11, 1));
        assertThat(Bench.decode(bench().write("b.csv", file(clock(0, 36)))).counts())
                .isEqualTo(new DecodeCounts(36, 36, 0, 2));
    }

    @Test
    void rowsBetweenWindowsAreLeftOut() throws Exception {
        Bench.Decoded decoded = Bench.decode(bench().rolling(2, 5).write("ramp.csv", file(clock(0, 4 * 12))));
        assertThat(decoded.counts()).isEqualTo(new DecodeCounts(48, 24, 24, 24, 3));
        assertThat(first(decoded, 1)).isEqualTo(5);
        assertThat(first(decoded, 2)).isEqualTo(10);
    }

    @Test
    void rowsWithAnEmptyCellAreCountedInEveryWindowTheyFallInto() throws Exception {
        String[] lines = file(clock(0, 60));
        lines[1 + 14] = "3,5;;2";
        lines[1 + 50] = "12,5;1;";
        Bench.Decoded decoded = Bench.decode(bench().write("ramp.csv", lines));
        assertThat(decoded.counts()).isEqualTo(new DecodeCounts(60, 58, 2, 4));
        assertThat(decoded.records().stream()
                        .map(record -> ((WaveformRecord) record).waveform().rowsLeftOut()))
                .containsExactly(1, 1, 0, 1);
    }

    @Test
    void overAGapInTheClockTheWindowsKeepTheirNumbers() throws Exception {
        double[] before = clock(0, 36);
        double[] after = clock(1e7, 60);
        double[] times = Arrays.copyOf(before, 96);
        System.arraycopy(after, 0, times, 36, 60);
        Bench.Decoded decoded = Bench.decode(bench().write("ramp.csv", file(times)));
        // windows 1 and 2 are full before the gap; 3 would hold half of its rows at most
        assertThat(points(decoded).subList(0, 2)).containsExactly("1", "2");
        assertThat(points(decoded).get(2)).isEqualTo(Long.toString(Math.round(Math.floor(1e7 / 3)) + 1));
        assertThat(decoded.counts().rows()).isEqualTo(96);
    }

    @Test
    @Timeout(value = 20, threadMode = Timeout.ThreadMode.SEPARATE_THREAD)
    void aClockThatLeapsEndsAtOnce() {
        List<String> lines = new ArrayList<>(List.of(file(clock(0, 1000))));
        lines.addAll(List.of("1e30;1;2", "2e30;1;2", "3e30;1;2"));
        assertThatThrownBy(() -> Bench.decode(bench().write("ramp.csv", lines.toArray(String[]::new))))
                .isInstanceOfSatisfying(
                        DecodeException.class,
                        e -> assertThat(e.problem().sentence())
                                .contains("line 1002", "column 't'", "so far from the first row"));
    }

    @Test
    @Timeout(value = 20, threadMode = Timeout.ThreadMode.SEPARATE_THREAD)
    void farFromZeroWindowsFollowOneAnotherAsNumbersDo() throws Exception {
        // 2⁵³ s: numbers stand 2 s apart, nearer than windows do
        double far = 0x1p53;
        double[] times = new double[60];
        Arrays.setAll(times, i -> far + 2 * i);
        Bench.Decoded decoded = Bench.decode(bench().write("ramp.csv", file(times)));
        assertThat(decoded.counts().rows()).isEqualTo(60);
        assertThat(decoded.counts().records()).isPositive();
    }

    @Test
    void aRecordShorterThanAWindowIsSetAside() {
        assertThatThrownBy(() -> Bench.decode(bench().write("ramp.csv", file(clock(0, 20)))))
                .isInstanceOfSatisfying(
                        DecodeException.class,
                        e -> assertThat(e.problem().sentence())
                                .contains("line 2", "ends 4.75 s after its first row", "6 cycles at 1 Hz are 6 s"));
    }

    @Test
    void aFileWithoutAFrequencyIsSetAside() {
        Bench untagged = bench().preamble(TagName.FREQUENCY, "f", "Hz");
        assertThatThrownBy(() -> Bench.decode(untagged.write("ramp.csv", file(clock(0, 60)))))
                .isInstanceOfSatisfying(
                        DecodeException.class,
                        e -> assertThat(e.problem().sentence()).contains("tag frequency", "a line 'f'"));
        Bench zero = bench().fixed(TagName.FREQUENCY, "0 Hz");
        assertThatThrownBy(() -> Bench.decode(zero.write("ramp.csv", file(clock(0, 60)))))
                .isInstanceOfSatisfying(
                        DecodeException.class,
                        e -> assertThat(e.problem().sentence()).contains("tag frequency", "a frequency above 0"));
    }

    @Test
    void aTimeThatDoesNotRiseSetsTheFileAside() {
        String[] lines = file(clock(0, 60));
        lines[41] = lines[40];
        assertThatThrownBy(() -> Bench.decode(bench().write("ramp.csv", lines)))
                .isInstanceOfSatisfying(
                        DecodeException.class,
                        e -> assertThat(e.problem().sentence()).contains("line 42", "no later than the row before"));
    }

    @Test
    void aSampleRateMakesTheClock() throws Exception {
        Bench bench = bench().without(ChannelName.TIME).fixed(TagName.SAMPLE_RATE, "4 Hz");
        Bench.Decoded decoded = Bench.decode(bench.write("ramp.csv", file(clock(0, 60))));
        assertThat(decoded.counts().records()).isEqualTo(4);
        assertThat(decoded.waveform(3).waveform().timeS()).containsExactly(clock(9, 24));
    }

    @Test
    void temperaturesAreFilledInBetweenReadingsOnly() throws Exception {
        String[] lines = file(clock(0, 24));
        lines[0] += ";T";
        for (int i = 1; i < lines.length; i++) {
            lines[i] += i == 3 ? ";300" : i == 5 ? ";302" : ";";
        }
        Bench.Decoded decoded =
                Bench.decode(bench().channel(ChannelName.TEMPERATURE, "T", "K").write("ramp.csv", lines));
        assertThat(Arrays.copyOf(decoded.waveform(0).waveform().temperatureK(), 6))
                .containsExactly(Double.NaN, Double.NaN, 300, 301, 302, Double.NaN);
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8, 9, 10})
    void everyRowIsInAWindowOrLeftOut(long seed) throws Exception {
        Random random = new Random(seed);
        int rows = 400 + random.nextInt(200);
        double[] times = new double[rows];
        double now = 1000 * random.nextDouble();
        for (int i = 0; i < rows; i++) {
            now += 0.05 + 0.2 * random.nextDouble() + (random.nextInt(60) == 0 ? 20 * random.nextDouble() : 0);
            times[i] = now;
        }
        String[] lines = file(times);
        int empty = 0;
        for (int i = 0; i < rows; i++) {
            if (random.nextInt(10) == 0) {
                lines[1 + i] = lines[1 + i].replaceAll(";2$", ";");
                empty++;
            }
        }
        int window = 1 + random.nextInt(8);
        int advance = 1 + random.nextInt(10);
        Bench.Decoded decoded = Bench.decode(bench().rolling(window, advance).write("ramp.csv", lines));
        Set<Double> seen = new HashSet<>();
        double begin = decoded.waveform(0).waveform().window().orElseThrow().recordFromS();
        for (int i = 0; i < decoded.records().size(); i++) {
            Waveform waveform = decoded.waveform(i).waveform();
            long number = Long.parseLong(decoded.records().get(i).tags().key().point());
            double from = begin + (number - 1.0) * advance;
            assertThat(waveform.timeS()[0]).isGreaterThanOrEqualTo(from - 1e-6);
            assertThat(waveform.timeS()[waveform.size() - 1]).isLessThan(from + window);
            Arrays.stream(waveform.timeS()).forEach(seen::add);
        }
        assertThat(decoded.counts().used()).isEqualTo(seen.size());
        assertThat(decoded.counts().leftOut()).isEqualTo(rows - seen.size());
        assertThat(decoded.counts().outsideWindows()).isEqualTo(decoded.counts().leftOut() - empty);
    }

    @Test
    void twoHoursAtTwoHundredHertzAreDecodedHoldingOneWindow() throws Exception {
        int rows = 2 * 3600 * 200;
        Path path = folder.resolve("long.csv");
        try (BufferedWriter out = Files.newBufferedWriter(path)) {
            out.write("t;phi;M\n");
            for (int i = 0; i < rows; i++) {
                out.write(i / 200 + "," + (1000 + i % 200 * 5) % 1000 / 100 + i % 200 * 5 / 10 % 10 + i % 200 * 5 % 10);
                out.write(";1;2\n");
            }
        }
        RawFile file = new RawFile(
                bench().intake(),
                "long.csv",
                Files.size(path),
                Files.getLastModifiedTime(path).toMillis());
        Complaints complaints = new Complaints(file.tableName());
        int[] windows = new int[1];
        int most = 0;
        try (RawTable table = RawTable.open(file, complaints)) {
            Tally tally = new Tally(
                    record -> {
                        windows[0]++;
                        assertThat(((WaveformRecord) record).waveform().size()).isEqualTo(6 * 200);
                    },
                    complaints);
            RollingRows taker = new RollingRows(
                    FileFacts.of(file, Optional.empty(), table, complaints),
                    file.intake().instrument().records(),
                    tally);
            while (table.nextRow()) {
                taker.row(table.cells(), table.line());
                most = Math.max(most, taker.held());
            }
            taker.end();
            assertThat(tally.counts(table.rows())).isEqualTo(new DecodeCounts(rows, rows, 0, 2399));
        }
        assertThat(windows[0]).isEqualTo(2399);
        assertThat(most).isEqualTo(6 * 200);
    }
}
