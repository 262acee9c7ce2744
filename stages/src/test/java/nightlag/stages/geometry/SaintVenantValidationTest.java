package nightlag.stages.geometry;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import org.assertj.core.data.Offset;
import org.assertj.core.data.Percentage;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Saint-Venant's torsion factors of a rectangle against printed tables and against the series summed to 40 digits. */
class SaintVenantValidationTest {
    /** Exact: both series summed to 40 digits with tanh and cosh as they stand. */
    @ParameterizedTest(name = "w/t = {0}")
    @CsvSource({
        "1,    0.140577014955153716, 0.208165259932504412",
        "1.1,  0.153983648224806465, 0.213932406926819657",
        "1.2,  0.16611891007882513,  0.218933545014241391",
        "1.5,  0.195760708875544025, 0.230969126885519282",
        "2,    0.228681677119570765, 0.245878342023427517",
        "2.5,  0.24936507470818638,  0.257589941557053511",
        "3,    0.263316931001500106, 0.267208046183104977",
        "5,    0.291316754187988869, 0.291500204374685003",
        "10,   0.312325037457205386, 0.312325113760866258",
        "40,   0.328081259364301109, 0.328081259364301109",
        "1000, 0.333123250374572044, 0.333123250374572044"
    })
    void bothSeriesAreSummedToTheLastDigits(double ratio, double stiffness, double stress) {
        assertThat(SaintVenant.stiffnessFactor(ratio)).isCloseTo(stiffness, relative(1e-14, stiffness));
        assertThat(SaintVenant.stressFactor(ratio)).isCloseTo(stress, relative(1e-14, stress));
    }

    /** Three-figure table of β printed in textbooks; .175 at 1.3 and .186 at 1.4 look cut, not rounded. */
    @ParameterizedTest(name = "w/t = {0}")
    @CsvSource({
        "1, .141",
        "1.1, .154",
        "1.2, .166",
        "1.5, .196",
        "2, .229",
        "2.5, .249",
        "3, .263",
        "4, .281",
        "5, .291",
        "10, .312"
    })
    void stiffnessFactorAgreesWithTheTextbookTable(double ratio, double printed) {
        assertThat(SaintVenant.stiffnessFactor(ratio)).isCloseTo(printed, within(0.0005));
    }

    /** Timoshenko's row for the largest stress (from memory). */
    @ParameterizedTest(name = "w/t = {0}")
    @CsvSource({"1, .208", "1.2, .219", "1.5, .231", "2, .246", "2.5, .258", "3, .267", "4, .282", "5, .291", "10, .312"
    })
    void stressFactorAgreesWithTimoshenko(double ratio, double printed) {
        // .291 at 5 is cut, exact .29150
        assertThat(SaintVenant.stressFactor(ratio)).isCloseTo(printed, within(0.00051));
    }

    /** Exact: β → ⅓(1 − 0.630250…·t/w) and k₂ → β for a thin strip. */
    @Test
    void aThinStripTendsToOneThird() {
        assertThat(SaintVenant.stiffnessFactor(1e9)).isCloseTo(1.0 / 3, Percentage.withPercentage(1e-6));
        assertThat(SaintVenant.stressFactor(1e9)).isEqualTo(SaintVenant.stiffnessFactor(1e9));
    }

    private static Offset<Double> relative(double share, double of) {
        return within(share * Math.abs(of));
    }
}
