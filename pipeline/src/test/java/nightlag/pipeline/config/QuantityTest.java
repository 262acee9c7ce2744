package nightlag.pipeline.config;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class QuantityTest {
    @ParameterizedTest(name = "{0} = {2} in SI")
    @CsvSource(delimiter = '|', quoteCharacter = '"', textBlock = """
                    25 mm          | LENGTH           | 0.025
                    25mm           | LENGTH           | 0.025
                    .5 mm          | LENGTH           | 5e-4
                    10 µm          | LENGTH           | 1e-5
                    180 °C         | TEMPERATURE      | 453.15
                    -20 °C         | TEMPERATURE      | 253.15
                    −20 °C         | TEMPERATURE      | 253.15
                    0.5 mN·m       | TORQUE           | 5e-4
                    2 %            | RATIO            | 0.02
                    1.2e-5 kg·m²   | INERTIA          | 1.2e-5
                    1.2E-5 kg.m2   | INERTIA          | 1.2e-5
                    6.5e-4 1/K     | EXPANSION        | 6.5e-4
                    1 a            | TIME             | 31557600
                    +85 us         | TIME             | 85e-6
                    10 rad/s       | FREQUENCY        | 1.5915494309189535
                    """)
    void reads(String text, QuantityKind kind, double si) {
        assertThat(Quantity.parse(text, kind).toOptional().orElseThrow().si()).isEqualTo(si);
    }

    @ParameterizedTest
    @CsvSource(delimiter = '|', textBlock = """
                    mm          | LENGTH
                    25          | LENGTH
                    25 kg       | LENGTH
                    0,5 mm      | LENGTH
                    1 000 mm    | LENGTH
                    1e999 mm    | LENGTH
                    NaN mm      | LENGTH
                    1.2.3 mm    | LENGTH
                    --1 mm      | LENGTH
                    1 mm 2 mm   | LENGTH
                    """)
    void refuses(String text, QuantityKind kind) {
        assertThat(Quantity.parse(text, kind)).isInstanceOf(Parsed.Refused.class);
    }

    /** One value, however it is spelt: a change of spelling must not have a night's work done again. */
    @Test
    void oneValueWhateverTheUnit() {
        for (int hundredths = 1; hundredths <= 1000; hundredths++) {
            String millimetres =
                    hundredths / 100 + "." + String.format(java.util.Locale.ROOT, "%02d", hundredths % 100);
            double inMillimetres = Quantity.parse(millimetres + " mm", QuantityKind.LENGTH)
                    .toOptional()
                    .orElseThrow()
                    .si();
            double inMicrometres = Quantity.parse(hundredths + "0 µm", QuantityKind.LENGTH)
                    .toOptional()
                    .orElseThrow()
                    .si();
            assertThat(inMicrometres).isEqualTo(inMillimetres).isEqualTo(hundredths / 1e5);
        }
    }

    @Test
    void decimalSignIsNeverGuessed() {
        Optional<Unit> celsius = Units.parse("°C", QuantityKind.TEMPERATURE).toOptional();
        assertThat(Quantity.parse("190,5", QuantityKind.TEMPERATURE, ',', celsius)
                        .toOptional()
                        .orElseThrow()
                        .si())
                .isEqualTo(463.65);
        assertThat(Quantity.parse("0,5 mN.m", QuantityKind.TORQUE, ',', Optional.empty())
                        .toOptional()
                        .orElseThrow()
                        .si())
                .isEqualTo(5e-4);
        assertThat(Quantity.parse("190.5", QuantityKind.TEMPERATURE, ',', celsius))
                .isInstanceOf(Parsed.Refused.class);
        assertThat(Quantity.parse("190,5", QuantityKind.TEMPERATURE, '.', celsius))
                .isInstanceOf(Parsed.Refused.class);
    }
}
