package nightlag.pipeline.decode;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Random;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class NumeralsTest {
    @ParameterizedTest(name = "{0} with decimal {1}")
    @CsvSource(
            delimiter = '|',
            value = {
                "0|.|0",
                "-0|.|-0.0",
                "+12|.|12",
                "1.5|.|1.5",
                "1,5|,|1.5",
                ".5|.|0.5",
                "5.|.|5",
                "-,25e-3|,|-0.00025",
                "−7|.|-7",
                "1E+03|.|1000",
                "1e−3|.|0.001",
                "9007199254740993|.|9007199254740992",
                "0.000000000000000000000000000001|.|1e-30",
                "123456789012345678901234567890|.|123456789012345678901234567890",
                "1e999|.|Infinity",
                "-1e999|.|-Infinity",
                "1e-999|.|0",
                "0e99999999999|.|0"
            })
    void reads(String text, char decimal, double expected) {
        assertThat(Numerals.parse(text, decimal)).isEqualTo(expected);
    }

    @ParameterizedTest(name = "''{0}''")
    @ValueSource(
            strings = {
                "",
                "-",
                ".",
                "e5",
                "1e",
                "1e+",
                "1.2.3",
                "1,5",
                "1'000",
                "1 000",
                "1.000,5",
                "0x10",
                "1d",
                "1f",
                "NaN",
                "Infinity",
                "--1",
                "1-",
                "٣",
                "1e5.0",
                "1e5e5"
            })
    void refuses(String text) {
        assertThat(Numerals.parse(text, '.')).isNaN();
    }

    /** The short way for ordinary numbers must give the very double the JDK gives. */
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4})
    void agreesWithTheJdkToTheLastBit(long seed) {
        Random random = new Random(seed);
        List<String> different = new ArrayList<>();
        for (int i = 0; i < 20_000; i++) {
            String text = anyNumber(random);
            double expected = Double.parseDouble(text);
            if (Numerals.parse(text, '.') != expected || Numerals.parse(text.replace('.', ','), ',') != expected) {
                different.add(text);
            }
        }
        assertThat(different).isEmpty();
    }

    private static String anyNumber(Random random) {
        double value = random.nextGaussian() * Math.pow(10, random.nextInt(600) - 300);
        return switch (random.nextInt(3)) {
            case 0 -> Double.toString(value);
            case 1 -> String.format(Locale.ROOT, "%." + random.nextInt(18) + "e", value);
            default -> String.format(Locale.ROOT, "%." + random.nextInt(18) + "f", random.nextGaussian());
        };
    }
}
