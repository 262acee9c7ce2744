package nightlag.pipeline.decode;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.ByteArrayOutputStream;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.Random;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.Layout;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.intake.RawFile;
import nightlag.stages.MeasuredRecord;
import nightlag.stages.WaveformRecord;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Good files with bytes changed at random: each ends with counted rows or with a reason, never with anything else. */
class MutatedFileTest {
    private static final byte[] TELLING =
            "\n\r;,.\"\t 0123456789eE+-:=°x\0\u007f".getBytes(StandardCharsets.ISO_8859_1);

    @TempDir
    Path folder;

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void endsWithCountsOrAReason(long seed) throws Exception {
        Random random = new Random(seed);
        int read = 0;
        int refused = 0;
        for (int i = 0; i < 400; i++) {
            Bench bench = bench(random);
            RawFile file = bench.writeBytes("a.csv", mutated(text(bench), random));
            try {
                Bench.Decoded decoded = Bench.decode(file);
                check(decoded);
                read++;
            } catch (DecodeException e) {
                assertThat(e.problem().sentence()).startsWith("bench/").doesNotContain("\n", "\0");
                assertThat(e.problem().found()).isNotBlank();
                assertThat(e.problem().allowed()).isNotBlank();
                refused++;
            }
        }
        assertThat(read).as("files read").isGreaterThan(20);
        assertThat(refused).as("files refused").isGreaterThan(60);
    }

    private static void check(Bench.Decoded decoded) {
        DecodeCounts counts = decoded.counts();
        assertThat(counts.rows()).isEqualTo(counts.used() + counts.leftOut());
        assertThat(counts.records()).isEqualTo(decoded.records().size());
        for (MeasuredRecord record : decoded.records()) {
            if (record instanceof WaveformRecord samples) {
                double before = Double.NEGATIVE_INFINITY;
                for (double time : samples.waveform().timeS()) {
                    assertThat(time).isFinite().isGreaterThan(before);
                    before = time;
                }
            }
        }
    }

    private Bench bench(Random random) {
        Bench bench = Bench.melt(folder)
                .charset(random.nextInt(3) == 0 ? StandardCharsets.UTF_16LE : StandardCharsets.UTF_8)
                .preamble(TagName.LOT, "Lot", "")
                .preamble(TagName.GAP, "Gap", "mm");
        return switch (random.nextInt(4)) {
            case 0 -> bench.layout(Layout.COLUMN).column(TagName.POINT, "p", "");
            case 1 ->
                bench.layout(Layout.MODULI)
                        .without(ChannelName.TIME)
                        .without(ChannelName.ANGLE)
                        .without(ChannelName.TORQUE)
                        .fixed(TagName.TEMPERATURE, "20 °C")
                        .channel(ChannelName.FREQUENCY, "t", "Hz")
                        .channel(ChannelName.STORAGE_MODULUS, "phi", "Pa")
                        .channel(ChannelName.LOSS_MODULUS, "M", "Pa");
            case 2 ->
                bench.noHeader()
                        .channel(ChannelName.TIME, 1, "s")
                        .channel(ChannelName.ANGLE, 2, "mrad")
                        .channel(ChannelName.TORQUE, 3, "mN·m");
            default -> bench.column(TagName.SPECIMEN, "p", "");
        };
    }

    private static byte[] text(Bench bench) {
        String text = String.join(
                "\r\n",
                "Lot: L-17;;",
                "Gap;1,0;mm",
                "t;phi;M;p",
                "0,0;1,5;-2,25;A",
                "0,1;2,5e1;;A",
                "0,2;\"3\";+4;A",
                "",
                "0,3;4;5;A",
                "");
        Charset charset = bench.instrument().files().charset();
        return text.getBytes(charset);
    }

    private static byte[] mutated(byte[] bytes, Random random) {
        byte[] changed = bytes;
        for (int change = 0; change < 1 + random.nextInt(3); change++) {
            int at = random.nextInt(changed.length);
            ByteArrayOutputStream out = new ByteArrayOutputStream();
            out.write(changed, 0, at);
            byte any = random.nextInt(4) == 0 ? (byte) random.nextInt() : TELLING[random.nextInt(TELLING.length)];
            switch (random.nextInt(4)) {
                case 0 -> {
                    out.write(any);
                    out.write(changed, at + 1, changed.length - at - 1);
                }
                case 1 -> {
                    out.write(any);
                    out.write(changed, at, changed.length - at);
                }
                case 2 -> out.write(changed, at + 1, changed.length - at - 1);
                default -> {
                    if (random.nextInt(3) > 0) {
                        int from = random.nextInt(changed.length);
                        out.write(changed, from, Math.min(20, changed.length - from));
                        out.write(changed, at, changed.length - at);
                    }
                }
            }
            changed = out.size() == 0 ? bytes : out.toByteArray();
        }
        return changed;
    }
}
