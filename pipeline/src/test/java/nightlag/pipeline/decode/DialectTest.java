package nightlag.pipeline.decode;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.OptionalDouble;
import java.util.stream.Stream;
import nightlag.pipeline.config.Channel;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.ColumnRef;
import nightlag.pipeline.config.QuantityKind;
import nightlag.pipeline.config.TagName;
import nightlag.stages.WaveformRecord;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.waveform.Waveform;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

/** The ways instruments write the same record. */
class DialectTest {
    @TempDir
    Path folder;

    @Test
    void decimalCommaAndSemicolonsBelowAPreamble() throws Exception {
        Bench bench = Bench.melt(folder)
                .channel(ChannelName.TEMPERATURE, "T", "°C")
                .preamble(TagName.GRADE, "Compound", "")
                .preamble(TagName.GAP, "Gap", "mm")
                .preamble(TagName.FREQUENCY, "f", "Hz");
        WaveformRecord record = Bench.decode(bench.write(
                        "p1.csv",
                        "Some bench, an invented one",
                        "Compound: Heron 3",
                        "Gap = 0,95",
                        "f;10;rad/s",
                        "",
                        "t;phi;M;T",
                        "0;0,5;-1,25;180,1",
                        "0,01;1,5e1;+2;180,2"))
                .waveform(0);
        Waveform samples = record.waveform();
        assertThat(samples.timeS()).containsExactly(0, 0.01);
        assertThat(samples.deformation()).containsExactly(new double[] {0.0005, 0.015}, within(1e-18));
        assertThat(samples.load()).containsExactly(new double[] {-0.00125, 0.002}, within(1e-18));
        assertThat(samples.temperatureK()).containsExactly(new double[] {453.25, 453.35}, within(1e-12));
        assertThat(samples.nominalFrequencyHz().orElseThrow()).isCloseTo(10 / (2 * Math.PI), within(1e-15));
        assertThat(record.deformationSignal()).isEqualTo(DeformationSignal.ANGLE);
        assertThat(record.loadSignal()).isEqualTo(LoadSignal.TORQUE);
        assertThat(record.tags().key().grade()).isEqualTo("Heron 3");
        assertThat(record.tags().key().point()).isEqualTo("p1");
        assertThat(record.tags().key().sourceFile()).isEqualTo("bench/p1.csv");
        assertThat(record.tags().dimensions().get(Dimension.GAP)).isCloseTo(0.00095, within(1e-18));
    }

    @Test
    void tabsUtf16AndARowOfUnits() throws Exception {
        Bench bench = Bench.in(folder)
                .charset(StandardCharsets.UTF_16LE)
                .dialect('\t', '.')
                .headerLine(2)
                .unitRow()
                .channel(ChannelName.TIME, "Time", "s")
                .channel(ChannelName.DISPLACEMENT, "Stroke", "mm")
                .channel(ChannelName.FORCE, "Force", "N");
        WaveformRecord record = Bench.decode(bench.write(
                        "a/b.csv", "\uFEFFLot\tX", "Time\tStroke\tForce", "[ms]\t(µm)\t", "0\t1\t2", "1\t-1\t-2"))
                .waveform(0);
        assertThat(record.waveform().timeS()).containsExactly(0, 0.001);
        assertThat(record.waveform().deformation()).containsExactly(new double[] {1e-6, -1e-6}, within(1e-20));
        assertThat(record.waveform().load()).containsExactly(2, -2);
    }

    @Test
    void runsOfSpacesWithoutHeaderOrClock() throws Exception {
        Bench bench = Bench.in(folder)
                .dialect(' ', '.')
                .noHeader()
                .preamble(TagName.SAMPLE_RATE, "rate", "kHz")
                .preamble(TagName.SPECIMEN, "Test piece", "")
                .channel(ChannelName.STRAIN, 2, "%")
                .channel(ChannelName.STRESS, 1, "kPa");
        WaveformRecord record = Bench.decode(bench.write(
                        "x.csv",
                        "# 2 columns",
                        "Test piece: bar 7",
                        "rate 2 kHz",
                        "   1.0    5",
                        " 2.0  -5   ",
                        "3 .5"))
                .waveform(0);
        assertThat(record.tags().key().specimen()).isEqualTo("bar 7");
        assertThat(record.waveform().timeS()).containsExactly(0, 0.0005, 0.001);
        assertThat(record.waveform().deformation()).containsExactly(new double[] {0.05, -0.05, 0.005}, within(1e-17));
        assertThat(record.waveform().load()).containsExactly(1000, 2000, 3000);
    }

    @Test
    void aRawVoltageHasZeroSignAndSensitivity() throws Exception {
        Channel torque = new Channel(
                ColumnRef.named("M"),
                Bench.unit("V", QuantityKind.VOLTAGE),
                OptionalDouble.of(0.02),
                0.013,
                true,
                12e-6);
        Bench bench = Bench.melt(folder).unitRow().channel(ChannelName.TORQUE, torque);
        Waveform samples = Bench.decode(bench.write("a.csv", "t;phi;M", "s;mrad;mV", "0;0;1013", "1;0;-987"))
                .waveform(0)
                .waveform();
        // −(1.013 V − 0.013 V) · 0.02 N·m/V; the delay is left to the corrections
        assertThat(samples.load()).containsExactly(new double[] {-0.02, 0.02}, within(1e-16));
        assertThat(samples.timeS()).containsExactly(0, 1);
    }

    @Test
    void quotedCellsMayHoldTheDelimiter() throws Exception {
        Bench bench = Bench.in(folder)
                .header("\"t, s\"")
                .dialect(',', '.')
                .preamble(TagName.LOT, "Lot", "")
                .channel(ChannelName.TIME, "t, s", "s")
                .channel(ChannelName.ANGLE, "phi", "rad")
                .channel(ChannelName.TORQUE, "M \"raw\"", "N·m");
        Bench.Decoded decoded = Bench.decode(bench.write(
                "a.csv", "\"Lot\",\"17, second\"", "\"t, s\",phi,\"M \"\"raw\"\"\"", "\"0\", \"1.5\" ,2", "1,2,3"));
        assertThat(decoded.waveform(0).tags().key().lot()).isEqualTo("17, second");
        assertThat(decoded.waveform(0).waveform().deformation()).containsExactly(1.5, 2);
    }

    static Stream<Arguments> marks() {
        return Stream.of(
                Arguments.of("UTF-8", new byte[] {(byte) 0xEF, (byte) 0xBB, (byte) 0xBF}),
                Arguments.of("UTF-16LE", new byte[] {(byte) 0xFF, (byte) 0xFE}),
                Arguments.of("UTF-16BE", new byte[] {(byte) 0xFE, (byte) 0xFF}),
                Arguments.of("UTF-32LE", new byte[] {(byte) 0xFF, (byte) 0xFE, 0, 0}),
                Arguments.of("UTF-32BE", new byte[] {0, 0, (byte) 0xFE, (byte) 0xFF}));
    }

    @ParameterizedTest(name = "{0}")
    @MethodSource("marks")
    void aByteOrderMarkWinsOverTheCharset(String written, byte[] mark) throws Exception {
        Bench bench = Bench.melt(folder)
                .charset(StandardCharsets.ISO_8859_1)
                .header("t°;")
                .channel(ChannelName.TIME, "t°", "s");
        byte[] text = "t°;phi;M\r\n0;1;2\r\n1;3;4".getBytes(Charset.forName(written));
        byte[] all = new byte[mark.length + text.length];
        System.arraycopy(mark, 0, all, 0, mark.length);
        System.arraycopy(text, 0, all, mark.length, text.length);
        Bench.Decoded decoded = Bench.decode(bench.writeBytes("a.csv", all));
        assertThat(decoded.counts()).isEqualTo(new DecodeCounts(2, 2, 0, 1));
        assertThat(decoded.waveform(0).waveform().deformation())
                .containsExactly(new double[] {1e-3, 3e-3}, within(1e-18));
    }

    @ParameterizedTest(name = "line ends {0}")
    @MethodSource("lineEnds")
    void anyLineEnd(String name, String lineEnd) throws Exception {
        String text = String.join(lineEnd, "Compound: x", "", "t;phi;M", "0;1;2", "", "1;3;4", "", "");
        Bench bench = Bench.melt(folder);
        Bench.Decoded decoded = Bench.decode(bench.writeBytes("a.csv", text.getBytes(StandardCharsets.UTF_8)));
        assertThat(decoded.counts()).isEqualTo(new DecodeCounts(2, 2, 0, 1));
    }

    static Stream<Arguments> lineEnds() {
        return Stream.of(Arguments.of("LF", "\n"), Arguments.of("CR LF", "\r\n"), Arguments.of("CR", "\r"));
    }
}
