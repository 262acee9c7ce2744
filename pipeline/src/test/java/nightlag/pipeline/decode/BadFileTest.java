package nightlag.pipeline.decode;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.catchThrowableOfType;

import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.function.UnaryOperator;
import java.util.stream.Stream;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.ColumnRef;
import nightlag.pipeline.config.Layout;
import nightlag.pipeline.config.Problem;
import nightlag.pipeline.config.TagName;
import nightlag.pipeline.config.TagSource;
import nightlag.pipeline.intake.RawFile;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** One fault a file: each is set aside with its line, its column, what was found and what was expected. */
class BadFileTest {
    @TempDir
    Path folder;

    /**
     * A file with one fault.
     *
     * @param name what is wrong
     * @param setUp how the bench differs from the melt bench
     * @param text the file, lines divided by '|'
     * @param line line of the complaint
     * @param place its column or tag
     * @param found part of what was found
     * @param expected part of what is expected
     */
    record Fault(
            String name,
            UnaryOperator<Bench> setUp,
            String text,
            int line,
            String place,
            String found,
            String expected) {
        @Override
        public String toString() {
            return name;
        }
    }

    static Stream<Fault> faults() {
        return Stream.of(
                fault(
                        "text where a number belongs",
                        "t;phi;M|0;1;2|1;n/a;3",
                        3,
                        "column 'phi'",
                        "'n/a'",
                        "such as 1,5"),
                fault("decimal point in a decimal-comma file", "t;phi;M|0;1.5;2", 2, "column 'phi'", "'1.5'", "','"),
                fault("thousands separator", "t;phi;M|0;1.000,5;2", 2, "column 'phi'", "'1.000,5'", "separators"),
                fault(
                        "not a number as a word",
                        "t;phi;M|0;1;NaN",
                        2,
                        "column 'M'",
                        "'NaN', which is not finite",
                        "finite"),
                fault(
                        "infinite as a word",
                        "t;phi;M|0;1;-Inf",
                        2,
                        "column 'M'",
                        "'-Inf', which is not finite",
                        "finite"),
                fault("too large a number", "t;phi;M|0;1;1e400", 2, "column 'M'", "'1e400', which is not", "finite"),
                fault(
                        "row cut off",
                        "t;phi;M|0;1;2|1;2",
                        3,
                        "column 'M'",
                        "a row of 2 cells",
                        "at least 3, as the header"),
                fault(
                        "row cut off in a column nobody asked for",
                        "t;phi;M;T|0;1;2;20|1;2;3",
                        3,
                        "column 'T'",
                        "a row of 3 cells",
                        "at least 4"),
                fault("row too long", "t;phi;M|0;1;2;3", 2, "column 4", "a row of 4 cells", "at most 3"),
                fault(
                        "time stands still",
                        "t;phi;M|0;1;2|0,5;1;2|0,5;2;3",
                        4,
                        "column 't'",
                        "'0,5', no later",
                        "rises"),
                fault("clock jumps back", "t;phi;M|0;1;2|2;1;2||1;2;3", 5, "column 't'", "'1', no later", "rises"),
                fault("text in a row with an empty cell", "t;phi;M|0;;x", 2, "column 'M'", "'x'", "number"),
                fault("no rows", "t;phi;M", 1, "", "no rows below the header", "rows of data"),
                fault("no row with all cells", "t;phi;M|0;;1|1;2;", 3, "", "every one of 2 rows", "needed column"),
                fault("empty file", "", 0, "", "an empty file", "a table"),
                fault("no header", "time;phi;M|0;1;2", 0, "", "no header row in 2 lines", "starts with 't;'"),
                fault("column missing", "t;phi;N|0;1;2", 1, "column 'M'", "no such column", "'t', 'phi', 'N'"),
                fault("column twice", "t;M;phi;M|0;1;2;3", 1, "column 'M'", "columns 2 and 4", "one column"),
                fault("quotation mark left open", "t;phi;M|0;1;\"2|1;2;3", 2, "", "quotation marks", "its own line"),
                fault(
                        "a quote that goes on in the next line",
                        "t;phi;M|0;1;\"2|\";2",
                        2,
                        "",
                        "quotation marks",
                        "line"),
                fault(
                        "header line beyond the end",
                        bench -> bench.headerLine(9),
                        "t;phi;M|0;1;2",
                        0,
                        "",
                        "no header row in 2 lines",
                        "on line 9"),
                fault(
                        "unit row missing",
                        Bench::unitRow,
                        "x|t;phi;M",
                        2,
                        "",
                        "the last line is the header",
                        "a row of units"),
                fault(
                        "unit not known",
                        Bench::unitRow,
                        "t;phi;M|s;mrad;mMn|0;1;2",
                        2,
                        "column 'M'",
                        "'mMn'",
                        "a unit of torque, such as N·m"),
                fault(
                        "unit of something else",
                        Bench::unitRow,
                        "t;phi;M|s;mrad;[mN]|0;1;2",
                        2,
                        "column 'M'",
                        "'mN' is a unit of force",
                        "a unit of torque"),
                fault(
                        "no line of numbers",
                        BadFileTest::headless,
                        "a;b;c|0.1;2.5;3.5",
                        0,
                        "",
                        "no line of numbers in 2 lines",
                        "decimal sign ','"),
                fault(
                        "headless row too short",
                        BadFileTest::headless,
                        "a;b;c|0;1;2|1;2",
                        3,
                        "column 3",
                        "a row of 2 cells",
                        "at least 3"),
                fault(
                        "point comes back",
                        BadFileTest::columnLayout,
                        "t;phi;M;p|0;1;2;a|1;1;2;a|0;1;2;b|5;1;2;a",
                        5,
                        "column 'p'",
                        "'a' again, after other points",
                        "together"),
                fault(
                        "time does not rise within a point",
                        BadFileTest::columnLayout,
                        "t;phi;M;p|0;1;2;a|0;1;2;b|0;1;2;b",
                        4,
                        "column 't'",
                        "'0', no later",
                        "rises"),
                fault(
                        "tag changes within a record",
                        bench -> bench.column(TagName.SPECIMEN, "p", ""),
                        "t;phi;M;p|0;1;2;a|1;1;2;|2;1;2;b",
                        4,
                        "column 'p'",
                        "'b' after 'a'",
                        "one value of the tag specimen throughout"),
                fault(
                        "frequency changes within a record",
                        bench -> bench.channel(ChannelName.FREQUENCY, "f", "Hz"),
                        "t;phi;M;f|0;1;2;1|1;1;2;1,5",
                        3,
                        "column 'f'",
                        "'1,5'",
                        "one frequency"),
                fault(
                        "lot not in the preamble",
                        bench -> bench.preamble(TagName.LOT, "Lot", ""),
                        "Lots: 7|t;phi;M|0;1;2",
                        0,
                        "tag lot",
                        "nothing for it above the header",
                        "a line 'Lot'"),
                fault(
                        "grade column empty",
                        bench -> bench.column(TagName.GRADE, "g", ""),
                        "t;phi;M;g|0;1;2;",
                        2,
                        "tag grade",
                        "an empty cell in column 'g'",
                        "a value"),
                fault(
                        "path not as the pattern says",
                        bench -> bench.path("(?<lot>[^/]+)/.*").pathGroup(TagName.LOT, "lot", ""),
                        "t;phi;M|0;1;2",
                        0,
                        "tag lot",
                        "the path 'bad.csv'",
                        "(?<lot>[^/]+)/.*"),
                fault(
                        "no run sheet",
                        bench -> bench.runSheet("runs.csv").runSheetColumn(TagName.LOT, "lot", ""),
                        "t;phi;M|0;1;2",
                        0,
                        "tag lot",
                        "no row of a run sheet names this file",
                        "'runs.csv' in its folder or a folder above"),
                fault(
                        "quantity without a unit",
                        bench -> bench.preamble(TagName.GAP, "Gap", ""),
                        "Gap: 1,0|t;phi;M|0;1;2",
                        1,
                        "tag gap, 'Gap'",
                        "'1,0' without a unit",
                        "a unit of length, such as mm"),
                fault(
                        "quantity in a unit of something else",
                        bench -> bench.preamble(TagName.GAP, "Gap", "mm"),
                        "x|Gap: 1,0;s|t;phi;M|0;1;2",
                        2,
                        "tag gap, 'Gap'",
                        "'s' is a unit of time",
                        "a unit of length, such as mm"),
                fault(
                        "quantity that is a text",
                        bench -> bench.preamble(TagName.GAP, "Gap", "mm"),
                        "Gap: wide|t;phi;M|0;1;2",
                        1,
                        "tag gap, 'Gap'",
                        "'wide'",
                        "number"),
                fault(
                        "quantity with the wrong decimal sign",
                        bench -> bench.preamble(TagName.GAP, "Gap", "mm"),
                        "Gap: 1.5 mm|t;phi;M|0;1;2",
                        1,
                        "tag gap, 'Gap'",
                        "'1.5 mm'",
                        "such as 1,5"),
                fault(
                        "no clock and no rate",
                        bench -> bench.without(ChannelName.TIME).preamble(TagName.SAMPLE_RATE, "rate", "Hz"),
                        "t;phi;M|0;1;2",
                        0,
                        "tag sample_rate",
                        "nothing for it above the header",
                        "a line 'rate'"),
                fault(
                        "rate of zero",
                        bench -> bench.without(ChannelName.TIME).preamble(TagName.SAMPLE_RATE, "rate", "Hz"),
                        "rate: 0|t;phi;M|0;1;2",
                        1,
                        "tag sample_rate, 'rate'",
                        "'0', which is no frequency",
                        "a frequency above 0"),
                fault(
                        "colder than can be",
                        bench -> bench.preamble(TagName.TEMPERATURE, "T", "°C"),
                        "T: -300|t;phi;M|0;1;2",
                        1,
                        "tag temperature, 'T'",
                        "'-300', which is below absolute zero",
                        "above −273.15 °C"),
                fault(
                        "tag too long",
                        bench -> bench.preamble(TagName.LOT, "Lot", ""),
                        "Lot: " + "x".repeat(1001) + "|t;phi;M|0;1;2",
                        1,
                        "tag lot, 'Lot'",
                        "a text of 1001 characters",
                        "at most 1000"),
                fault(
                        "too many columns",
                        bench -> bench,
                        "t;phi;M|0;1;2" + ";".repeat(10_000),
                        2,
                        "",
                        "10003 cells",
                        "at most 10000"),
                fault(
                        "clock that leaps beyond all windows",
                        BadFileTest::rolling,
                        "t;phi;M|0;1;2|0,5;1;2|1;1;2|1e30;1;2|2e30;1;2|3e30;1;2",
                        5,
                        "column 't'",
                        "'1e30', a time so far from the first row (3.33e+29 windows)",
                        "at most 1000000000 windows after it"),
                fault(
                        "clock too coarse for its windows",
                        BadFileTest::rolling,
                        "t;phi;M|1e30;1;2|2e30;1;2|3e30;1;2",
                        2,
                        "column 't'",
                        "'1e30', a time so large",
                        "nearer to 0"),
                fault(
                        "clock from end to end of the numbers",
                        BadFileTest::rolling,
                        "t;phi;M|0;1;2|1,7e308;1;2",
                        3,
                        "column 't'",
                        "'1,7e308', a time so far from the first row",
                        "windows after it"),
                fault(
                        "rate too slow for a window",
                        bench -> rolling(bench).without(ChannelName.TIME).preamble(TagName.SAMPLE_RATE, "rate", "Hz"),
                        "rate: 1e-30|t;phi;M|0;1;2|1;1;2|2;1;2",
                        4,
                        "tag sample_rate",
                        "a time so far from the first row (3.33e+29 windows)",
                        "windows after it"),
                fault(
                        "frequency too slow for a window",
                        bench -> rolling(bench).preamble(TagName.FREQUENCY, "f", "Hz"),
                        "f: 1e-310|t;phi;M|0;1;2|1;1;2|2;1;2",
                        3,
                        "tag frequency",
                        "too slow",
                        "the frequency the record was driven at"),
                fault(
                        "moduli without a frequency",
                        bench -> moduli(bench).preamble(TagName.FREQUENCY, "f", "Hz"),
                        "t;phi;M|20;1;2",
                        0,
                        "tag frequency",
                        "nothing for it above the header",
                        "a line 'f'"),
                fault(
                        "negative uncertainty",
                        bench -> moduli(bench)
                                .fixed(TagName.FREQUENCY, "1 Hz")
                                .channel(ChannelName.LOSS_MODULUS_U, "u", "Pa"),
                        "t;phi;M;u|20;1;2;-3",
                        2,
                        "column 'u'",
                        "'-3'",
                        "0 or more"));
    }

    @ParameterizedTest(name = "{0}")
    @MethodSource("faults")
    void isSetAsideWithAReason(Fault fault) {
        Bench bench = fault.setUp().apply(Bench.melt(folder));
        RawFile file = fault.text().isEmpty()
                ? bench.writeBytes("bad.csv", new byte[0])
                : bench.write("bad.csv", fault.text().split("\\|", -1));
        Problem problem = catchThrowableOfType(DecodeException.class, () -> Bench.decode(file))
                .problem();
        assertThat(problem.file()).isEqualTo("bench/bad.csv");
        assertThat(problem.line()).as(problem.sentence()).isEqualTo(fault.line());
        assertThat(problem.place()).as(problem.sentence()).isEqualTo(fault.place());
        assertThat(problem.found()).contains(fault.found());
        assertThat(problem.allowed()).contains(fault.expected());
    }

    @Test
    void aPathPatternCannotHangANight() {
        RawFile file = Bench.melt(folder)
                .path("(?<lot>.*.*.*.*.*.*.*)!")
                .pathGroup(TagName.LOT, "lot", "")
                .write("a".repeat(40) + ".csv", "t;phi;M", "0;1;2");
        Problem problem = catchThrowableOfType(DecodeException.class, () -> Bench.decode(file))
                .problem();
        assertThat(problem.found()).startsWith("path_pattern takes for ever on 'aaaa");
        assertThat(problem.allowed()).contains("fewer repetitions");
    }

    @Test
    void theReasonReadsAsASentence() {
        RawFile file = Bench.melt(folder).write("a.csv", "t;phi;M", "0;1;n/a");
        assertThat(catchThrowableOfType(DecodeException.class, () -> Bench.decode(file)))
                .hasMessage("bench/a.csv, line 2, column 'M': 'n/a'; expected a number such as 1,5 (its decimal sign"
                        + " ',', no thousands separators)");
    }

    @Test
    void whatIsShownOfAFileIsShortAndOnOneLine() {
        RawFile file = Bench.melt(folder)
                .writeBytes("a.csv", ("t;phi;M\n0;1;x\u0007" + "y".repeat(100)).getBytes(StandardCharsets.UTF_8));
        assertThat(catchThrowableOfType(DecodeException.class, () -> Bench.decode(file))
                        .problem()
                        .found())
                .isEqualTo("'x·" + "y".repeat(58) + "…'");
    }

    private static Fault fault(String name, String text, int line, String place, String found, String expected) {
        return fault(name, bench -> bench, text, line, place, found, expected);
    }

    private static Fault fault(
            String name,
            UnaryOperator<Bench> setUp,
            String text,
            int line,
            String place,
            String found,
            String expected) {
        return new Fault(name, setUp, text, line, place, found, expected);
    }

    private static Bench headless(Bench bench) {
        return bench.noHeader()
                .channel(ChannelName.TIME, 1, "s")
                .channel(ChannelName.ANGLE, 2, "mrad")
                .channel(ChannelName.TORQUE, 3, "mN·m");
    }

    private static Bench columnLayout(Bench bench) {
        return bench.layout(Layout.COLUMN)
                .tag(TagName.POINT, new TagSource.DataColumn(ColumnRef.named("p"), java.util.Optional.empty()));
    }

    private static Bench rolling(Bench bench) {
        return bench.rolling(6, 3).fixed(TagName.FREQUENCY, "1 Hz");
    }

    private static Bench moduli(Bench bench) {
        return bench.layout(Layout.MODULI)
                .without(ChannelName.TIME)
                .without(ChannelName.ANGLE)
                .without(ChannelName.TORQUE)
                .channel(ChannelName.TEMPERATURE, "t", "°C")
                .channel(ChannelName.STORAGE_MODULUS, "phi", "Pa")
                .channel(ChannelName.LOSS_MODULUS, "M", "Pa");
    }
}
