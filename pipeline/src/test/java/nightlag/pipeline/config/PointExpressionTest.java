package nightlag.pipeline.config;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.time.Duration;
import java.util.EnumMap;
import java.util.Map;
import nightlag.stages.moduli.PointQuantity;
import org.junit.jupiter.api.Assertions;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** What an expression of {@code [[derived]]} may say, and what it is told when it says something else. */
class PointExpressionTest {
    private static final Map<PointQuantity, Double> POINT = new EnumMap<>(PointQuantity.class);

    static {
        POINT.put(PointQuantity.COMPLEX_MODULUS, 5000.0);
        POINT.put(PointQuantity.STORAGE_MODULUS, 3000.0);
        POINT.put(PointQuantity.LOSS_MODULUS, 4000.0);
        POINT.put(PointQuantity.PHASE_ANGLE, 30.0);
        POINT.put(PointQuantity.TAN_DELTA, 2.0);
        POINT.put(PointQuantity.TEMPERATURE, 64.0);
    }

    @ParameterizedTest(name = "{0} is {1}")
    @CsvSource(
            delimiter = '|',
            value = {
                "complex_modulus / sin(phase_angle) | 10000",
                "complex_modulus * cos(60) | 2500",
                "storage_modulus + loss_modulus * 2 - 1e3 | 10000",
                "-tan_delta^2 | -4",
                "tan_delta^(-1) | 0.5",
                "2^tan_delta^3 | 256",
                "(temperature - 14) / 25 * pi / PI | 2",
                "sqrt(storage_modulus^2 + loss_modulus^2) - complex_modulus + tan_delta | 2",
                "exp(ln(tan_delta)) + log10(1000 * tan_delta / 2) | 5",
                "ln(e) * tan_delta | 2",
                "asin(tan_delta / 4) + acos(0) + atan(1) | 165",
                "min(tan_delta, 3, temperature) + max(tan_delta, 3) + abs(-tan_delta) | 7",
                "if(tan_delta >= 2, storage_modulus, 1 / 0) | 3000",
                "if(tan_delta < 2, 1, if(temperature > 60, 7, 8)) | 7",
                "tan(45) * SIN(90) * tan_delta | 2"
            })
    void itSays(String text, double expected) {
        Parsed<PointExpression.Compiled> parsed = PointExpression.compile(text);

        assertThat(parsed).isInstanceOf(Parsed.Value.class);
        assertThat(parsed.toOptional().orElseThrow().function().valueOf(POINT))
                .isCloseTo(expected, within(1e-12 * Math.abs(expected)));
    }

    @Test
    void itKnowsWhatItUses() {
        assertThat(PointExpression.compile("tan_delta + loss_modulus / tan_delta")
                        .toOptional()
                        .orElseThrow()
                        .uses())
                .containsExactly(PointQuantity.LOSS_MODULUS, PointQuantity.TAN_DELTA);
    }

    @ParameterizedTest(name = "{0}")
    @CsvSource(
            delimiter = '|',
            value = {
                "complex_modulu / 2 | no quantity is called 'complex_modulu', did you mean 'complex_modulus'?",
                "complex_modulus_Pa | no quantity is called 'complex_modulus_Pa', did you mean 'complex_modulus'?",
                "storage_modulus_u_Pa | no quantity is called 'storage_modulus_u_Pa', did you mean 'storage_modulus'?",
                "sine(phase_angle) | no function is called 'sine', did you mean 'sin'?",
                "log(tan_delta) | log does not say to which base",
                "tan_delta^-1 | a power begins with a sign",
                "tan_delta ^ -tan_delta | a power begins with a sign",
                "tan_delta + | at character 11: missing second operand for operator",
                "2 tan_delta | at character 3:",
                "(tan_delta | at character",
                "tan_delta) | at character",
                "tan_delta % 2 | at character",
                "tan_delta = 2 | at character",
                "tan_delta; 2 | at character",
                "tan_delta[1] | at character",
                "tan_delta > 2 | it is true or false, not a number",
                "(tan_delta > 2) + 1 | '>' compares where a number belongs",
                "if(tan_delta, 1, 2) | the first part of if is a number",
                "if(tan_delta > 1, tan_delta > 2, 2) | a part of if compares where a number belongs",
                "if(tan_delta > 1, 2) | at character",
                "sin(tan_delta, 2) | at character",
                "1 + 1 | it names no quantity of a point",
                "1e999 * tan_delta | '1e999' is too large a number",
                "0x1F * tan_delta | '0x1F' is no decimal number",
                "\"a\" + tan_delta | 'a' has no meaning here",
                "random() * tan_delta | no function is called 'random'",
                "fact(tan_delta) | no function is called 'fact'"
            })
    void itIsToldWhatIsWrong(String text, String found) {
        Parsed<PointExpression.Compiled> parsed = PointExpression.compile(text);

        assertThat(parsed).isInstanceOf(Parsed.Refused.class);
        Parsed.Refused<PointExpression.Compiled> refused = (Parsed.Refused<PointExpression.Compiled>) parsed;
        assertThat(refused.found()).startsWith(found);
        assertThat(refused.allowed()).isNotBlank();
    }

    @Test
    void itIsNotAllowedToBeEndless() {
        String endless = "tan_delta" + " + tan_delta".repeat(100);

        assertThat(((Parsed.Refused<PointExpression.Compiled>) PointExpression.compile(endless)).found())
                .isEqualTo("the expression is 1209 characters long");
    }

    /** What could keep exact arithmetic busy for hours costs nothing here, and what has no value is not a number. */
    @ParameterizedTest
    @ValueSource(
            strings = {
                "9^9^9^9^tan_delta",
                "-9^9^9^9^tan_delta",
                "tan_delta / 0",
                "ln(-tan_delta)",
                "sqrt(-tan_delta)",
                "asin(tan_delta)",
                "(0 - tan_delta)^0.5"
            })
    void itEnds(String text) {
        double value = Assertions.assertTimeout(
                Duration.ofSeconds(5),
                () -> PointExpression.compile(text)
                        .toOptional()
                        .orElseThrow()
                        .function()
                        .valueOf(POINT));

        assertThat(Double.isFinite(value)).isFalse();
    }

    @Test
    void deepNestingIsReadToTheEnd() {
        String nested = "(".repeat(190) + "tan_delta" + ")".repeat(190);
        String signs = "-".repeat(390) + "tan_delta";

        assertThat(PointExpression.compile(nested)
                        .toOptional()
                        .orElseThrow()
                        .function()
                        .valueOf(POINT))
                .isEqualTo(2);
        assertThat(PointExpression.compile(signs)
                        .toOptional()
                        .orElseThrow()
                        .function()
                        .valueOf(POINT))
                .isEqualTo(2);
    }
}
