package nightlag.pipeline.tables;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.HashMap;
import java.util.Map;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class SafeNameTest {
    @ParameterizedTest
    @ValueSource(
            strings = {
                "L-17",
                "Heron 3",
                "2026_03",
                "a.b..c",
                "v1.2 beta",
                "Kautschuk-Größe",
                "七号",
                "nightshift",
                "console",
                "com10",
                "auxiliary.1"
            })
    void aHarmlessNameStays(String name) {
        assertThat(SafeName.of(name)).isEqualTo(name);
    }

    // the digits are the beginning of `printf '%s' NAME | sha256sum`
    @ParameterizedTest
    @CsvSource({
        "a/b, a_b-c14cddc0",
        "'..', __-5ec1f7e7",
        "nights, nights-de5c9050",
        "CON, CON-a3dbc4b6",
        "con.txt, con.txt-d3bde286"
    })
    void anyOtherNameIsChangedAndSaysSo(String name, String folder) {
        assertThat(SafeName.of(name)).isEqualTo(folder);
    }

    @ParameterizedTest
    @CsvSource({
        "'../../etc/passwd', '___.._etc_passwd-'",
        "'C:\\temp', 'C__temp-'",
        "' a ', '_a_-'",
        "'.hidden', '_hidden-'",
        "'a. .', 'a___-'",
        "'. a .', '__a__-'",
        "'...', '___-'",
        "'a\tb', 'a_b-'",
        "'a\u00a0b', 'a_b-'",
        "'a<b>|c?*\"', 'a_b__c___-'",
        "'Nights', 'Nights-'",
        "'NUL', 'NUL-'",
        "'lpt1.csv.old', 'lpt1.csv.old-'",
        "'aux .x', 'aux .x-'",
        "'COM\u00b9', 'COM_-'",
        "'archive.sqlite', 'archive.sqlite-'",
        "'index.html', 'index.html-'",
        "'', '_-'",
        "'\ud83d\udd25', '_-'",
        "'e\u0301', 'e_-'",
        "'\u212b', '\u212b-'"
    })
    void whatChangedKeepsItsReadablePart(String name, String front) {
        assertThat(SafeName.of(name)).startsWith(front).hasSize(front.length() + 8);
    }

    @Test
    void aLongNameIsCutToEightyCharacters() {
        String name = "x".repeat(81);

        assertThat(SafeName.of("x".repeat(80))).isEqualTo("x".repeat(80));
        assertThat(SafeName.of(name)).startsWith("x".repeat(80) + "-").hasSize(89);
    }

    @Test
    void aLongNameInAnyScriptFitsIntoTheNameOfAFolder() {
        String rareLetters = "\ud840\udc0b".repeat(100);

        for (String name : new String[] {"七".repeat(500), rareLetters, "x" + rareLetters}) {
            String folder = SafeName.of(name);
            assertThat(folder.getBytes(StandardCharsets.UTF_8)).hasSizeLessThanOrEqualTo(255);
            assertThat(StandardCharsets.UTF_8.newEncoder().canEncode(folder))
                    .as("no half character")
                    .isTrue();
        }
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8})
    void noNameLeavesItsFolderAndTwoNamesAreTwoFolders(long seed) {
        String signs = "ab.. //\\\\:\u0000\n\t*?\"<>|-_'é\u0301\u202e~$%";
        Random random = new Random(seed);
        Path results = Path.of("results").toAbsolutePath();
        Map<String, String> names = new HashMap<>();
        for (int i = 0; i < 2000; i++) {
            String name = random.ints(random.nextInt(6), 0, signs.length())
                    .mapToObj(signs::charAt)
                    .collect(StringBuilder::new, StringBuilder::append, StringBuilder::append)
                    .toString();

            String folder = SafeName.of(name);

            assertThat(results.resolve(folder).normalize().getParent()).isEqualTo(results);
            assertThat(folder)
                    .doesNotContainPattern("[\\\\/:*?\"<>|\\x00-\\x1f]")
                    .doesNotEndWith(".")
                    .doesNotEndWith(" ");
            assertThat(names.merge(folder, name, (old, same) -> old)).isEqualTo(name);
        }
    }
}
