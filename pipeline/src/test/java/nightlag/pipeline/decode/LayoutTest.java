package nightlag.pipeline.decode;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.nio.file.Path;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.Layout;
import nightlag.pipeline.config.TagName;
import nightlag.stages.GivenModuli;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.waveform.Waveform;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** How records stand in a file, and where its rows go. */
class LayoutTest {
    @TempDir
    Path folder;

    @Test
    void aRowWithAnEmptyCellIsLeftOutAndCounted() throws Exception {
        Bench.Decoded decoded = Bench.decode(
                Bench.melt(folder).write("a.csv", "t;phi;M", "0;1;2", "1;;2", "2;1; ", ";1;2", ";;", "3;1;2"));
        assertThat(decoded.counts()).isEqualTo(new DecodeCounts(6, 2, 4, 1));
        assertThat(decoded.waveform(0).waveform().timeS()).containsExactly(0, 3);
        assertThat(decoded.waveform(0).waveform().rowsLeftOut()).isEqualTo(4);
    }

    @Test
    void aRowLeftOutKeepsItsPlaceOnTheClockOfASampleRate() throws Exception {
        Bench bench = Bench.melt(folder).without(ChannelName.TIME).preamble(TagName.SAMPLE_RATE, "rate", "Hz");
        Bench.Decoded decoded = Bench.decode(bench.write("a.csv", "rate;4", "t;phi;M", "x;1;2", "x;;2", "x;1;2"));
        assertThat(decoded.waveform(0).waveform().timeS()).containsExactly(0, 0.5);
    }

    @Test
    void aClockGoesBeforeASampleRate() throws Exception {
        Bench bench = Bench.melt(folder).preamble(TagName.SAMPLE_RATE, "rate", "Hz");
        Bench.Decoded decoded = Bench.decode(bench.write("a.csv", "rate;4", "t;phi;M", "0;1;2", "7;1;2"));
        assertThat(decoded.waveform(0).waveform().timeS()).containsExactly(0, 7);
    }

    @Test
    void temperaturesWrittenLessOftenThanTheSignalsAreFilledIn() throws Exception {
        Bench bench =
                Bench.melt(folder).channel(ChannelName.TEMPERATURE, "T", "K").preamble(TagName.TEMPERATURE, "T", "°C");
        Bench.Decoded decoded = Bench.decode(bench.write(
                "a.csv", "T: 27,0", "t;phi;M;T", "0;1;2;", "1;1;2;300", "2;1;2;", "4;1;2;", "5;1;2;304", "6;1;2;"));
        assertThat(decoded.counts()).isEqualTo(new DecodeCounts(6, 6, 0, 1));
        assertThat(decoded.waveform(0).waveform().temperatureK())
                .containsExactly(new double[] {300, 300, 301, 303, 304, 304}, within(1e-12));
        assertThat(decoded.waveform(0).tags().temperatureK()).hasValue(300.15);
    }

    @Test
    void aTemperatureColumnWithoutAReadingCountsAsNotSet() throws Exception {
        Bench bench = Bench.melt(folder).channel(ChannelName.TEMPERATURE, "T", "K");
        Waveform waveform = Bench.decode(bench.write("a.csv", "t;phi;M;T", "0;1;2;", "1;1;2;"))
                .waveform(0)
                .waveform();
        assertThat(waveform.temperatureK()).isEmpty();
        assertThat(waveform.size()).isEqualTo(2);
    }

    @Test
    void manyRecordsInOneFileAreToldApartByTheirPoint() throws Exception {
        Bench bench = Bench.melt(folder)
                .layout(Layout.COLUMN)
                .column(TagName.POINT, "p", "")
                .column(TagName.FREQUENCY, "f", "Hz")
                .column(TagName.TEMPERATURE, "T", "°C");
        Bench.Decoded decoded = Bench.decode(bench.write(
                "a.csv",
                "t;phi;M;p;f;T",
                "0;1;2;A;1,0;20",
                "1;1;2;A;1,00;",
                "2;1;;A;1;20",
                "0;1;2;;3;20",
                "0;5;6;B;2;",
                "1;5;6;B;2;30",
                "0;;6;C;3;30"));
        assertThat(decoded.counts()).isEqualTo(new DecodeCounts(7, 4, 3, 3));
        assertThat(decoded.records().stream().map(record -> record.tags().key().point()))
                .containsExactly("A", "B", "C");
        assertThat(decoded.waveform(0).waveform().rowsLeftOut()).isEqualTo(1);
        assertThat(decoded.waveform(0).waveform().nominalFrequencyHz()).hasValue(1);
        assertThat(decoded.waveform(1).waveform().nominalFrequencyHz()).hasValue(2);
        assertThat(decoded.waveform(1).waveform().timeS()).containsExactly(0, 1);
        assertThat(decoded.waveform(1).tags().temperatureK()).hasValue(303.15);
        // a point whose every row lacks a value is still a record: it is the reduction that says so
        assertThat(decoded.waveform(2).waveform().size()).isZero();
        assertThat(decoded.waveform(2).waveform().rowsLeftOut()).isEqualTo(1);
    }

    @Test
    void everyPointOfAFileWithoutClockBeginsAtZero() throws Exception {
        Bench bench = Bench.melt(folder)
                .layout(Layout.COLUMN)
                .without(ChannelName.TIME)
                .fixed(TagName.SAMPLE_RATE, "2 Hz")
                .column(TagName.POINT, "p", "");
        Bench.Decoded decoded =
                Bench.decode(bench.write("a.csv", "t;phi;M;p", "x;1;2;A", "x;1;2;A", "x;1;2;B", "x;1;2;B", "x;1;2;B"));
        assertThat(decoded.waveform(0).waveform().timeS()).containsExactly(0, 0.5);
        assertThat(decoded.waveform(1).waveform().timeS()).containsExactly(0, 0.5, 1);
    }

    @Test
    void aFrequencyInAColumnGoesBeforeTheTag() throws Exception {
        Bench bench =
                Bench.melt(folder).channel(ChannelName.FREQUENCY, "f", "rad/s").fixed(TagName.FREQUENCY, "9 Hz");
        Waveform waveform = Bench.decode(bench.write("a.csv", "t;phi;M;f", "0;1;2;", "1;1;2;5", "2;1;2;5,0"))
                .waveform(0)
                .waveform();
        assertThat(waveform.nominalFrequencyHz().orElseThrow()).isCloseTo(5 / (2 * Math.PI), within(1e-15));
    }

    @Test
    void eachRowOfModuliIsAPoint() throws Exception {
        Bench bench = moduli().channel(ChannelName.STORAGE_MODULUS, "G1", "kPa")
                .channel(ChannelName.LOSS_MODULUS, "G2", "kPa")
                .channel(ChannelName.STRAIN, "g", "%")
                .channel(ChannelName.STORAGE_MODULUS_U, "u1", "Pa")
                .column(TagName.LOT, "lot", "")
                .column(TagName.GAP, "gap", "mm");
        Bench.Decoded decoded = Bench.decode(bench.write(
                "a.csv",
                "T;w;G1;G2;g;u1;lot;gap",
                "10;1;5;6;1;7;A;1,5",
                "10;2;;6;1;7;A;1,5",
                "10;;5;6;1;7;A;1,5",
                ";3;5;6;1;7;A;1,5",
                "12;4;5;6;;;B;"));
        assertThat(decoded.counts()).isEqualTo(new DecodeCounts(5, 2, 3, 2));
        GivenModuli first = decoded.moduli(0);
        assertThat(first.frequencyHz()).isCloseTo(1 / (2 * Math.PI), within(1e-16));
        assertThat(first.tags().temperatureK()).hasValue(283.15);
        assertThat(first.storagePa()).isEqualTo(5000);
        assertThat(first.lossPa()).isEqualTo(6000);
        assertThat(first.strainAmplitude()).hasValue(0.01);
        assertThat(first.storageUPa()).hasValue(7);
        assertThat(first.lossUPa()).isEmpty();
        assertThat(first.tags().key().point()).isEqualTo("1");
        assertThat(first.tags().dimensions().get(Dimension.GAP)).isCloseTo(0.0015, within(1e-18));
        GivenModuli last = decoded.moduli(1);
        // rows left out keep their number
        assertThat(last.tags().key().point()).isEqualTo("5");
        assertThat(last.tags().key().lot()).isEqualTo("B");
        assertThat(last.strainAmplitude()).isEmpty();
        assertThat(last.storageUPa()).isEmpty();
        assertThat(last.tags().dimensions()).isEmpty();
    }

    @Test
    void moduliByMagnitudeAndPhase() throws Exception {
        Bench bench =
                moduli().channel(ChannelName.COMPLEX_MODULUS, "G", "MPa").channel(ChannelName.PHASE_ANGLE, "d", "°");
        GivenModuli row =
                Bench.decode(bench.write("a.csv", "T;w;G;d", "10;1;2;30")).moduli(0);
        assertThat(row.storagePa()).isCloseTo(Math.sqrt(3) * 1e6, within(1e-9));
        assertThat(row.lossPa()).isCloseTo(1e6, within(1e-9));
    }

    @Test
    void aTagStandsInForAnEmptyCell() throws Exception {
        Bench bench = moduli().channel(ChannelName.STORAGE_MODULUS, "G1", "Pa")
                .channel(ChannelName.LOSS_MODULUS, "G2", "Pa")
                .fixed(TagName.FREQUENCY, "1 Hz")
                .fixed(TagName.TEMPERATURE, "20 °C");
        Bench.Decoded decoded = Bench.decode(bench.write("a.csv", "T;w;G1;G2", ";;5;6"));
        assertThat(decoded.moduli(0).frequencyHz()).isEqualTo(1);
        assertThat(decoded.moduli(0).tags().temperatureK()).hasValue(293.15);
    }

    private Bench moduli() {
        return Bench.in(folder)
                .layout(Layout.MODULI)
                .header("T;")
                .channel(ChannelName.TEMPERATURE, "T", "°C")
                .channel(ChannelName.FREQUENCY, "w", "rad/s");
    }
}
