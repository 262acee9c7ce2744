package nightlag.pipeline.decode;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Locale;
import java.util.Random;
import java.util.function.DoubleFunction;
import java.util.stream.LongStream;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.Layout;
import nightlag.pipeline.config.TagName;
import nightlag.stages.WaveformRecord;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Records written in a dialect drawn at random come back with the values that went in, and every row is accounted for. */
class RoundTripTest {
    private static final List<String> TIME_UNITS = List.of("s", "ms", "min");
    private static final List<Double> SECONDS = List.of(1.0, 1e-3, 60.0);
    private static final List<String> ANGLE_UNITS = List.of("rad", "mrad", "°");
    private static final List<Double> RADIANS = List.of(1.0, 1e-3, Math.PI / 180);
    private static final List<String> TORQUE_UNITS = List.of("N·m", "mN·m", "uN.m");
    private static final List<Double> NEWTON_METRES = List.of(1.0, 1e-3, 1e-6);

    @TempDir
    Path folder;

    static LongStream seeds() {
        return LongStream.rangeClosed(1, 40);
    }

    @ParameterizedTest(name = "seed {0}")
    @MethodSource("seeds")
    void recordsComeBack(long seed) throws Exception {
        Random random = new Random(seed);
        char decimal = random.nextBoolean() ? '.' : ',';
        char delimiter =
                pick(random, decimal == '.' ? List.of(';', '\t', ' ', ',', '|') : List.of(';', '\t', ' ', '|'));
        Charset charset = pick(
                random,
                List.of(
                        StandardCharsets.UTF_8,
                        StandardCharsets.UTF_16LE,
                        StandardCharsets.UTF_16BE,
                        Charset.forName("UTF-32LE")));
        boolean unitRow = random.nextBoolean();
        boolean quoted = random.nextInt(4) == 0;
        // a cell cannot be empty between runs of spaces, unless it is quoted
        boolean mayLack = delimiter != ' ' || quoted;
        int timeUnit = random.nextInt(3);
        int angleUnit = random.nextInt(3);
        int torqueUnit = random.nextInt(3);
        Bench bench = Bench.in(folder)
                .charset(charset)
                .dialect(delimiter, decimal)
                .layout(Layout.COLUMN)
                .column(TagName.POINT, "point", "")
                .channel(ChannelName.TIME, "time", unitRow ? "h" : TIME_UNITS.get(timeUnit))
                .channel(ChannelName.ANGLE, "angle", unitRow ? "deg" : ANGLE_UNITS.get(angleUnit))
                .channel(ChannelName.TORQUE, "torque", unitRow ? "N·m" : TORQUE_UNITS.get(torqueUnit));
        List<String> order = new ArrayList<>(List.of("point", "time", "angle", "torque", "extra"));
        Collections.shuffle(order, random);
        int above = random.nextInt(4);
        bench = random.nextBoolean()
                ? bench.headerLine(above + 1)
                : bench.header((quoted ? "\"" : "") + order.get(0) + (quoted ? "\"" : "") + delimiter);
        if (unitRow) {
            bench = bench.unitRow();
        }

        List<String> lines = new ArrayList<>();
        for (int i = 0; i < above; i++) {
            lines.add("Remark " + i + " on nothing in particular");
        }
        lines.add(row(order, delimiter, quoted, column -> column));
        if (unitRow) {
            lines.add(row(order, delimiter, quoted || delimiter == ' ', column -> switch (column) {
                case "time" -> "[" + TIME_UNITS.get(timeUnit) + "]";
                case "angle" -> "(" + ANGLE_UNITS.get(angleUnit) + ")";
                case "torque" -> TORQUE_UNITS.get(torqueUnit);
                default -> "";
            }));
        }
        DoubleFunction<String> number = numbers(random, decimal);
        List<List<double[]>> written = new ArrayList<>();
        long leftOut = 0;
        for (int record = 0; record < 1 + random.nextInt(4); record++) {
            List<double[]> kept = new ArrayList<>();
            double time = random.nextDouble();
            for (int i = 0; i < 5 + random.nextInt(60); i++) {
                time += 1e-3 + random.nextDouble();
                double[] sample = {time, random.nextGaussian() * 1e-3, random.nextGaussian() * 1e4};
                String lacks =
                        mayLack && random.nextInt(10) == 0 ? pick(random, List.of("time", "angle", "torque")) : "";
                String point = "P" + record;
                lines.add(row(
                        order,
                        delimiter,
                        quoted,
                        column -> column.equals(lacks)
                                ? ""
                                : switch (column) {
                                    case "time" -> number.apply(sample[0]);
                                    case "angle" -> number.apply(sample[1]);
                                    case "torque" -> number.apply(sample[2]);
                                    case "point" -> point;
                                    default -> "ok";
                                }));
                if (lacks.isEmpty()) {
                    kept.add(sample);
                } else {
                    leftOut++;
                }
            }
            written.add(kept);
        }

        Bench.Decoded decoded = Bench.decode(bench.write("a.csv", lines.toArray(String[]::new)));

        long used = written.stream().mapToLong(List::size).sum();
        assertThat(decoded.counts()).isEqualTo(new DecodeCounts(used + leftOut, used, leftOut, written.size()));
        for (int record = 0; record < written.size(); record++) {
            WaveformRecord read = decoded.waveform(record);
            List<double[]> samples = written.get(record);
            assertThat(read.tags().key().point()).isEqualTo("P" + record);
            assertThat(read.waveform().size()).isEqualTo(samples.size());
            for (int i = 0; i < samples.size(); i++) {
                same(read.waveform().timeS()[i], samples.get(i)[0] * SECONDS.get(timeUnit));
                same(read.waveform().deformation()[i], samples.get(i)[1] * RADIANS.get(angleUnit));
                same(read.waveform().load()[i], samples.get(i)[2] * NEWTON_METRES.get(torqueUnit));
            }
        }
    }

    /** The numbers are written with 17 significant digits, so nothing but the change of unit may round. */
    private static void same(double read, double written) {
        assertThat(read).isCloseTo(written, within(1e-15 * Math.abs(written)));
    }

    private static DoubleFunction<String> numbers(Random random, char decimal) {
        String format = random.nextBoolean() ? "%.17g" : "%.16e";
        String sign = random.nextBoolean() ? "+" : "";
        return value -> (value > 0 ? sign : "")
                + String.format(Locale.ROOT, format, value).replace('.', decimal);
    }

    private static String row(
            List<String> order, char delimiter, boolean quoted, java.util.function.UnaryOperator<String> cell) {
        List<String> cells = order.stream()
                .map(cell)
                .map(text -> quoted ? "\"" + text + "\"" : text)
                .toList();
        return String.join(delimiter == ' ' ? "   " : String.valueOf(delimiter), cells);
    }

    private static <T> T pick(Random random, List<T> choices) {
        return choices.get(random.nextInt(choices.size()));
    }
}
