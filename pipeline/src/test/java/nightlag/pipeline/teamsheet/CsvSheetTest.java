package nightlag.pipeline.teamsheet;

import static java.nio.charset.StandardCharsets.ISO_8859_1;
import static java.nio.charset.StandardCharsets.UTF_16BE;
import static java.nio.charset.StandardCharsets.UTF_16LE;
import static java.nio.charset.StandardCharsets.UTF_8;
import static nightlag.pipeline.teamsheet.Rows.MARCH_1;
import static nightlag.pipeline.teamsheet.Rows.MARCH_2;
import static nightlag.pipeline.teamsheet.Rows.damping;
import static nightlag.pipeline.teamsheet.Rows.missing;
import static nightlag.pipeline.teamsheet.Rows.row;
import static nightlag.pipeline.teamsheet.Rows.stiffness;
import static nightlag.pipeline.teamsheet.Rows.update;
import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.charset.Charset;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import nightlag.pipeline.teamsheet.SheetOutcome.Refused;
import nightlag.pipeline.teamsheet.SheetOutcome.Written;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** A team sheet in CSV: every dialect stays what it is, and so does every cell that is not ours. */
class CsvSheetTest {
    private static final Charset WINDOWS_1252 = Charset.forName("windows-1252");

    @TempDir
    Path folder;

    private Path file() {
        return folder.resolve("team.csv");
    }

    private SheetOutcome put(SheetUpdate update) {
        return new TeamSheetFile(file(), "lots").update(update);
    }

    private void before(String text, Charset charset) throws IOException {
        Files.write(file(), text.getBytes(charset));
    }

    private String after(Charset charset) throws IOException {
        return new String(Files.readAllBytes(file()), charset);
    }

    @Test
    void aNewFile() throws IOException {
        SheetOutcome outcome = put(update(
                MARCH_1,
                row("L-10", damping(1.25, "conforming"), stiffness(12.5, "undecided")),
                row("L-9", damping(1e-7, "conforming"), missing("loss"))));

        assertThat(outcome).isInstanceOf(Written.class);
        assertThat(after(UTF_8))
                .isEqualTo("grade,lot,updated,damping [1],damping verdict,loss [1],loss verdict,"
                        + "storage_modulus 190 °C 1 Hz [kPa],storage_modulus 190 °C 1 Hz verdict\r\n"
                        + "Heron 3,L-9,2026-03-01,1E-7,conforming,,missing,,\r\n"
                        + "Heron 3,L-10,2026-03-01,1.25,conforming,,,12.5,undecided\r\n");
    }

    @Test
    void theDateChangesOnlyWithACellOfTheRow() throws IOException {
        put(update(MARCH_1, row("A", damping(1, "conforming")), row("B", damping(2, "conforming"))));

        put(update(MARCH_2, row("A", damping(1, "conforming")), row("B", damping(2, "undecided"))));

        assertThat(after(UTF_8).lines())
                .contains("Heron 3,A,2026-03-01,1,conforming", "Heron 3,B,2026-03-02,2,undecided");
    }

    @Test
    void aFileThatSaysEverythingIsNotTouched() throws IOException {
        put(update(MARCH_1, row("A", damping(1, "conforming"))));
        Object written = Files.getAttribute(file(), "lastModifiedTime");

        SheetOutcome outcome = put(update(MARCH_2, row("A", damping(1, "conforming"))));

        assertThat(((Written) outcome).touched()).isFalse();
        assertThat(Files.getAttribute(file(), "lastModifiedTime")).isEqualTo(written);
    }

    @Test
    void otherPeoplesCellsKeepTheirBytes() throws IOException {
        before(
                "sep=;\nOwner; lot ;\"said \"\"so\"\"\";grade;damping [1];date\n"
                        + "Ann;A;\" x;y \";Heron 3;1,50;01.02.2026\n"
                        + "Bob;B;\"two\nlines\";Heron 3;;\n"
                        + ";;;;;\n\n",
                UTF_8);

        put(update(MARCH_1, row("B", damping(0.5, "conforming")), row("C", damping(1234.5, "conforming"))));

        assertThat(after(UTF_8))
                .isEqualTo("sep=;\nOwner; lot ;\"said \"\"so\"\"\";grade;damping [1];date;updated;damping verdict\n"
                        + "Ann;A;\" x;y \";Heron 3;1,50;01.02.2026;;\n"
                        + "Bob;B;\"two\nlines\";Heron 3;0,5;;2026-03-01;conforming\n"
                        + ";C;;Heron 3;1234,5;;2026-03-01;conforming\n"
                        + ";;;;;\n\n");
    }

    @ParameterizedTest(name = "{0}, {1}, mark {2}")
    @CsvSource({
        "UTF-8, CRLF, ''",
        "UTF-8, LF, EFBBBF",
        "UTF-16LE, CRLF, FFFE",
        "UTF-16BE, LF, FEFF",
        "UTF-16LE, CR, ''",
        "windows-1252, CRLF, ''",
        "ISO-8859-1, CR, ''"
    })
    void charsetMarkAndLineEndsStay(String charsetName, String lineEnd, String mark) throws IOException {
        Charset charset = Charset.forName(charsetName);
        String end = lineEnd.replace("CR", "\r").replace("LF", "\n");
        // 0x81 is no character of Windows-1252, but one of ISO 8859-1
        String foreign = charset.equals(ISO_8859_1) ? "Gr\u00fcn \u0081" : "Gr\u00fcn \u2013 gr\u00f6\u00dfer";
        String text = "grade\tlot\tNotiz\tH\u00f6he [\u00b0C]" + end + "Heron 3\tA\t" + foreign + "\t1.5" + end;
        byte[] markBytes = java.util.HexFormat.of().parseHex(mark);
        Files.write(file(), concat(markBytes, text.getBytes(charset)));

        SheetOutcome outcome = put(update(
                MARCH_1,
                row(
                        "A",
                        new SheetValue(
                                "H\u00f6he",
                                "\u00b0C",
                                damping(2.5, "").value(),
                                java.util.Optional.of("conforming")))));

        assertThat(outcome).isInstanceOf(Written.class);
        String expected = "grade\tlot\tNotiz\tH\u00f6he [\u00b0C]\tupdated\tH\u00f6he verdict" + end + "Heron 3\tA\t"
                + foreign + "\t2.5\t2026-03-01\tconforming" + end;
        assertThat(Files.readAllBytes(file())).isEqualTo(concat(markBytes, expected.getBytes(charset)));
    }

    private static byte[] concat(byte[] one, byte[] other) {
        byte[] both = java.util.Arrays.copyOf(one, one.length + other.length);
        System.arraycopy(other, 0, both, one.length, other.length);
        return both;
    }

    @Test
    void aLastRowWithoutALineEndGetsOneAndTheNewLastRowHasNone() throws IOException {
        before("grade,lot\nHeron 3,A", UTF_8);

        put(update(MARCH_1, row("B")));

        assertThat(after(UTF_8)).isEqualTo("grade,lot,updated\nHeron 3,A,\nHeron 3,B,2026-03-01");
    }

    @Test
    void aHeadingThatSomebodyRenamedIsTheirsAndOursComesAnewForEveryLot() throws IOException {
        before("grade,lot,updated,loss factor,damping verdict\r\nHeron 3,A,2026-01-01,1,conforming\r\n", UTF_8);

        SheetOutcome outcome = put(new SheetUpdate(
                List.of(row("B", damping(2, "conforming"))), List.of(row("A", damping(1, "conforming"))), MARCH_1));

        assertThat(outcome).isEqualTo(new Written(1, 1, List.of("damping [1]"), List.of()));
        assertThat(after(UTF_8).lines())
                .containsExactly(
                        "grade,lot,updated,loss factor,damping verdict,damping [1]",
                        "Heron 3,A,2026-03-01,1,conforming,1",
                        "Heron 3,B,2026-03-01,,conforming,2");
    }

    @Test
    void aRowThatSomebodyTookOutStaysOutUntilItsLotIsDue() throws IOException {
        before("grade,lot,updated,damping [1],damping verdict\r\n", UTF_8);

        put(new SheetUpdate(
                List.of(row("B", damping(2, "conforming"))), List.of(row("A", damping(1, "conforming"))), MARCH_1));

        assertThat(after(UTF_8)).doesNotContain("Heron 3,A");
    }

    @Test
    void textThatBeginsLikeAFormulaIsMadeHarmlessAndStillFound() throws IOException {
        SheetRow lot = row("=HYPERLINK(\"x\")", damping(-1, "conforming"));
        put(update(MARCH_1, lot));

        assertThat(after(UTF_8)).contains("Heron 3,\"'=HYPERLINK(\"\"x\"\")\",2026-03-01,-1,conforming\r\n");
        assertThat(put(update(MARCH_2, lot))).isEqualTo(new Written(0, 0, List.of(), List.of()));
    }

    @ParameterizedTest
    @ValueSource(strings = {"=x", "+x", "-x", "@x", "\tx", "\rx"})
    void everyWayAFormulaBegins(String text) {
        assertThat(CsvDialect.harmless(text)).isEqualTo("'" + text);
    }

    @Test
    void aRowOfATypedLotIsTakenOver() throws IOException {
        before("lot;grade\n 17 ;Heron 3\n", UTF_8);

        put(update(MARCH_1, row("17", damping(1.5, "conforming"))));

        assertThat(after(UTF_8))
                .isEqualTo("lot;grade;updated;damping [1];damping verdict\n 17 ;Heron 3;2026-03-01;1,5;conforming\n");
    }

    @Test
    void twoRowsOfOneLotAreAskedAbout() throws IOException {
        before("grade,lot\nHeron 3,A\nHeron 3,B\nHeron 3,A\n", UTF_8);

        assertThat(put(update(MARCH_1, row("B"))).getClass()).isEqualTo(Written.class);
        assertThat(put(update(MARCH_1, row("A"))))
                .isEqualTo(new Refused("Heron 3 lot A stands in more than one row (row 2, column 2, row 4, column 2);"
                        + " leave one of them, or name the lot differently in the others"));
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "Sorte,Charge\\nHeron 3,A\\n | no row of headings with the cells \"grade\" and \"lot\" in the first 100 rows;"
                        + " these two have to keep their names, any other may be renamed",
                "grade,lot,updated,updated\\n | the heading \"updated\" stands more than once (row 1, column 3, row 1,"
                        + " column 4); rename all but ours",
                "grade,lot\\n\"Heron | row 2: a quotation mark at the start of a cell is never closed; put it right, or in"
                        + " quotation marks and doubled"
            })
    void whatAPersonHasToPutRight(String text, String reason) throws IOException {
        String before = text.replace("\\n", "\n");
        before(before, UTF_8);

        assertThat(put(update(MARCH_1, row("A")))).isEqualTo(new Refused(reason));
        assertThat(after(UTF_8)).isEqualTo(before);
    }

    @Test
    void aTextThatTheCharsetCannotHold() throws IOException {
        before("grade,lot,Pr\u00fcfer\nHeron 3,A,J\u00f6rg\n", WINDOWS_1252);

        assertThat(put(update(MARCH_1, row("\u03a9-7"))))
                .isEqualTo(new Refused(
                        "the file is in windows-1252, which cannot hold \"\u03a9-7\"; save it once as CSV in UTF-8"));
    }

    @Test
    void twoHundredUpdatesLeaveForeignCellsAlone() throws IOException {
        StringBuilder text = new StringBuilder("grade;lot;note;who\n");
        for (int lot = 0; lot < 20; lot++) {
            text.append("Heron 3;")
                    .append(lot)
                    .append(";\"n;")
                    .append(lot)
                    .append("\";")
                    .append(lot * 0.5)
                    .append('\n');
        }
        before(text.toString().replace('.', ','), UTF_16LE);

        for (int i = 0; i < 200; i++) {
            put(update(MARCH_1.plusDays(i), row(String.valueOf(i % 25), damping(i / 7.0, "conforming"))));
        }

        List<String> lines = after(UTF_16LE).lines().toList();
        assertThat(lines).hasSize(26);
        for (int lot = 0; lot < 20; lot++) {
            String foreign = ("Heron 3;" + lot + ";\"n;" + lot + "\";" + lot * 0.5 + ";").replace('.', ',');
            double last = (175 + lot) / 7.0;
            assertThat(lines.get(lot + 1))
                    .isEqualTo(foreign + MARCH_1.plusDays(175 + lot) + ";"
                            + String.valueOf(last).replaceAll("\\.0$", "").replace('.', ',') + ";conforming");
        }
        assertThat(after(UTF_16BE)).isNotEqualTo(after(UTF_16LE));
    }
}
