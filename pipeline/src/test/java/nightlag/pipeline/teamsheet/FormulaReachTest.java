package nightlag.pipeline.teamsheet;

import static org.assertj.core.api.Assertions.assertThat;

import nightlag.pipeline.teamsheet.FormulaReach.Block;
import nightlag.pipeline.teamsheet.FormulaReach.Corner;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** What a formula looks at. */
class FormulaReachTest {
    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "D4*2 | [D4]",
                "SUM($A$1:B20,-C3)/1.5E+3% | [$A$1:B20, C3]",
                "IF(A1>=\"B2\",lots!C3,'my \"\"lots''s'!D4) | [A1, lots!C3, my \"\"lots's!D4]",
                "SUM(C:D)+COUNT($3:7) | [C:D, $3:7]",
                "LOG10(A1)+ATAN2(B1,TRUE) | [A1, B1]",
                "1+1 | []"
            })
    void cells(String formula, String expected) {
        FormulaReach reach = FormulaReach.of(formula);

        assertThat(reach.anything()).isFalse();
        assertThat(reach.blocks().stream().map(FormulaReachTest::told).toList()).hasToString(expected);
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "price*2",
                "INDIRECT(\"A1\")",
                "OFFSET(A1,1,1)",
                "Table1[count]",
                "SUM(first:last!A1)",
                "A1:INDEX(B:B,3)",
                "[1]other!A1",
                "#REF!+1",
                "?"
            })
    void whatDoesNotTellMayLookAtAnything(String formula) {
        assertThat(FormulaReach.of(formula).anything()).isTrue();
    }

    @Test
    void aBlockMovesWithAFormulaThatIsFilledDown() {
        Block block = FormulaReach.of("$B3:C$4").blocks().get(0);

        assertThat(block.from().rowAt(10, 0)).isEqualTo(12);
        assertThat(block.from().columnAt(5, 0)).isEqualTo(1);
        assertThat(block.to().rowAt(10, 0)).isEqualTo(3);
        assertThat(block.to().columnAt(5, 0)).isEqualTo(7);
    }

    private static String told(Block block) {
        String from = told(block.from());
        String to = told(block.to());
        return (block.sheet().isEmpty() ? "" : block.sheet() + "!") + (from.equals(to) ? from : from + ":" + to);
    }

    private static String told(Corner corner) {
        String cell = corner.row() < 0
                ? new CellReference(0, corner.column()).name().replaceFirst("1$", "")
                : corner.column() < 0 ? "" : new CellReference(corner.row(), corner.column()).name();
        String letters = cell.replaceAll("[0-9]", "");
        String row = corner.row() < 0 ? "" : String.valueOf(corner.row() + 1);
        return (letters.isEmpty() ? "" : (corner.columnStays() ? "$" : "") + letters)
                + (corner.rowStays() ? "$" : "")
                + row;
    }
}
