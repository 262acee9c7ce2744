package nightlag.pipeline.tables;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Locale;
import java.util.Random;
import nightlag.pipeline.RandomPoints;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class CellsTest {
    @ParameterizedTest
    @CsvSource({
        "0, 0",
        "-0.0, 0",
        "1, 1",
        "-2.50, -2.5",
        "0.1, 0.1",
        "0.001, 0.001",
        "0.00001, 0.00001",
        "0.000001, 1e-6",
        "1.5e-12, 1.5e-12",
        "-1.5e-12, -1.5e-12",
        "123456.789, 123456.789",
        "1e15, 1000000000000000",
        "1e16, 1e16",
        "2.5e16, 2.5e16",
        "2e23, 2e23",
        "1.7976931348623157e308, 1.7976931348623157e308",
        "4.9e-324, 4.94065645841247e-324"
    })
    void numbersReadAsAPersonWouldWriteThem(double value, String cell) {
        assertThat(Cells.number(value)).isEqualTo(cell);
    }

    @Test
    void asManyDigitsAsAreNeededAndNoMore() {
        assertThat(Cells.number(1.0 / 3)).as("15 are not enough, 16 are").isEqualTo("0.3333333333333333");
        assertThat(Cells.number(0.1 + 0.2)).as("16 are not enough").isEqualTo("0.30000000000000004");
        assertThat(Cells.number(3 * Double.MIN_VALUE))
                .as("the smallest numbers")
                .isEqualTo("1.48219693752374e-323");
    }

    @ParameterizedTest
    @ValueSource(doubles = {Double.NaN, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY})
    void whatIsNotFiniteIsEmpty(double value) {
        assertThat(Cells.number(value)).isEmpty();
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 5, 8, 13, 21, 34})
    void everyNumberReadsBackWithTheFewestOfFifteenToSeventeenDigits(long seed) {
        RandomPoints random = new RandomPoints(seed);
        Locale was = Locale.getDefault();
        try {
            Locale.setDefault(Locale.GERMANY);
            for (int i = 0; i < 2000; i++) {
                assertRoundTrip(random.number());
            }
        } finally {
            Locale.setDefault(was);
        }
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 5})
    void numbersOfFewDigitsStayShort(long seed) {
        Random random = new Random(seed);
        for (int i = 0; i < 2000; i++) {
            int digits = random.nextInt(1, 1_000_000);
            int scale = random.nextInt(-30, 30);
            BigDecimal decimal = BigDecimal.valueOf(digits, scale);
            assertThat(new BigDecimal(Cells.number(decimal.doubleValue()))).isEqualByComparingTo(decimal);
        }
    }

    private static void assertRoundTrip(double value) {
        String cell = Cells.number(value);
        assertThat(cell).matches("-?[0-9]+(\\.[0-9]*[1-9])?(e-?[1-9][0-9]*)?");
        assertThat(Double.parseDouble(cell) == value).as(cell).isTrue();
        BigDecimal written = new BigDecimal(cell);
        int digits = Math.max(15, written.stripTrailingZeros().precision());
        assertThat(digits).as(cell).isLessThanOrEqualTo(17);
        if (digits > 15) {
            BigDecimal shorter = new BigDecimal(value).round(new MathContext(digits - 1));
            assertThat(shorter.doubleValue() == value)
                    .as("%s would have done for %s", shorter, cell)
                    .isFalse();
        }
    }

    @ParameterizedTest
    @CsvSource({"463.15, 190", "293.15, 20", "273.15, 0", "0, -273.15", "296.65, 23.5", "373.16, 100.01"})
    void kelvinBecomesTheCelsiusThatWasTagged(double kelvin, String cell) {
        assertThat(Cells.number(Cells.celsius(kelvin))).isEqualTo(cell);
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3})
    void aTemperatureIsRightToANanokelvin(long seed) {
        Random random = new Random(seed);
        for (int i = 0; i < 1000; i++) {
            double kelvin = random.nextDouble(1, 2000);
            assertThat(Cells.celsius(kelvin) + 273.15).isCloseTo(kelvin, within(1e-9));
        }
    }

    @ParameterizedTest
    @ValueSource(strings = {"=1+1", "+1", "-1", "@SUM(A1)", "\tx", "\rx", "="})
    void textLikeAFormulaGetsAnApostrophe(String text) {
        assertThat(Cells.text(text)).isEqualTo("'" + text);
    }

    @ParameterizedTest
    @ValueSource(strings = {"", "L-17", "a=b", "'quoted'", "µ", " =1"})
    void otherTextStaysAsItIs(String text) {
        assertThat(Cells.text(text)).isEqualTo(text);
    }
}
