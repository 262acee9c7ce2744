package nightlag.pipeline.tables;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import nightlag.pipeline.NodeCheck;
import nightlag.stages.LotResult;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * A lot's tables against their own {@code datapackage.json}, judged by the reference implementation of the standard for
 * Node (package {@code datapackage} 1.1.10).
 */
class DataPackageValidationTest {
    private static final Provenance FROM = new Provenance(
            "Heron 3",
            "L-17",
            List.of(new Provenance.Input("bench/a.csv", "00ff")),
            List.of(new Provenance.Plan("conclusion", "ab12")),
            "1.2.3");

    @TempDir
    Path results;

    @BeforeAll
    static void needsTheReferenceImplementation() {
        NodeCheck.needs("datapackage");
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3})
    void aLotKeepsToTheStandardAndToItsOwnDescription(long seed) throws IOException, InterruptedException {
        LotResult result = new RandomLot(seed).result(FROM.grade(), FROM.lot());
        LotTables.write(results, result, FROM);

        int rows = result.points().size()
                + HarmonicsTable.rows(result.points()).size()
                + result.markers().size()
                + result.shiftFactors().size()
                + result.masterCurve().size()
                + result.spectrum().size()
                + result.derived().size()
                + result.responses().size()
                + result.acceptance().size()
                + result.trend().size()
                + result.prony().size();
        assertThat(check(FROM)).containsExactly("rows read: " + rows);
    }

    @Test
    void aLotWithoutPointsAndWithAHostileNameKeepsToItToo() throws IOException, InterruptedException {
        Provenance hostile = new Provenance("=七<b>", "../ ", List.of(), List.of(), "1.2.3");
        LotTables.write(results, LotResult.EMPTY, hostile);

        assertThat(check(hostile)).containsExactly("rows read: 0");
    }

    /** Each planted error is found: the check above would not pass a wrong table. */
    @ParameterizedTest(name = "{0}: {1} for {2}")
    @CsvSource(
            delimiter = '|',
            value = {
                "spectrum.csv | ,0.0001, | ,\"0,0001\", | spectrum, row 2: ",
                "spectrum.csv | ,relaxation, | ,relax, | spectrum, row 2: ",
                "spectrum.csv | ,0.0001, | ,soon, | spectrum, row 2: ",
                "spectrum.csv | ,0.0001, | ,-1, | spectrum, row 2: ",
                "spectrum.csv | Heron 3,L-17 | Heron 3, | spectrum, row 2: ",
                "spectrum.csv | ,time_s, | ,time, | spectrum, row 2: The column header",
                "datapackage.json | \"type\": \"number\" | \"type\": \"length\" | package: ",
                "datapackage.json | \"path\": \"points.csv\" | \"path\": \"../points.csv\" | cannot check: Local path",
                "datapackage.json | \"name\": \"heron-3.l-17\" | \"name\": \"Heron 3\" | package: "
            })
    void aPlantedErrorIsFound(String file, String right, String wrong, String finding)
            throws IOException, InterruptedException {
        LotTables.write(results, new RandomLot(1).result(FROM.grade(), FROM.lot()), FROM);
        Path target = LotTables.folder(results, FROM.grade(), FROM.lot()).resolve(file);
        String text = Files.readString(target);
        assertThat(text).contains(right);
        int at = text.indexOf(right);
        Files.writeString(target, text.substring(0, at) + wrong + text.substring(at + right.length()));

        assertThat(check(FROM)).anyMatch(line -> line.startsWith(finding.stripTrailing()));
    }

    private List<String> check(Provenance of) throws IOException, InterruptedException {
        Path descriptor = LotTables.folder(results, of.grade(), of.lot()).resolve(DataPackage.FILE_NAME);
        return NodeCheck.lines("check-package.js", descriptor.toString());
    }
}
