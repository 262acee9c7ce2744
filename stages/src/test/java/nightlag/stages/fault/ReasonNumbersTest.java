package nightlag.stages.fault;

import static org.assertj.core.api.Assertions.assertThat;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Figures in sentences are for people: four digits, and whole numbers as they are. */
class ReasonNumbersTest {
    private enum Told implements ReasonCode {
        FIGURE("{0} of it");

        private final String template;

        Told(String template) {
            this.template = template;
        }

        @Override
        public String template() {
            return template;
        }
    }

    @ParameterizedTest(name = "{0} is {1}")
    @CsvSource({
        "13.9996, 14",
        "0.0353982, 0.0354",
        "0.02, 0.02",
        "146.8501, 146.85",
        "-20181.4, -20180",
        "12345, 12345",
        "1.23456e-7, 1.235e-7",
        "0, 0",
        "NaN, NaN"
    })
    void figuresAreRounded(double figure, String written) {
        assertThat(Told.FIGURE.with(figure).sentence()).isEqualTo(written + " of it");
    }

    @Test
    void whatIsQuotedStaysAsItIs() {
        assertThat(Told.FIGURE.with("0.0353982").sentence()).isEqualTo("0.0353982 of it");
    }
}
