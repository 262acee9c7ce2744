package nightlag.stages.spectrum;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.Arrays;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Relaxation to retardation and back where both are closed. */
class GrossRelationTest {
    /** Fifteen decades either side of 1 s. */
    private static final LogTimes WIDE = new LogTimes(-150, 301);

    /** Exact: L of the fractional solid from its H (Cole &amp; Cole 1941). */
    @ParameterizedTest(name = "Ge = {0} Pa, α = {1}")
    @CsvSource({"0.1, 0.5", "0.0001, 0.5", "0.1, 0.8", "0.0001, 0.8"})
    void theFractionalSolid(double equilibriumPa, double exponent) {
        KnownSpectra.FractionalSolid solid = new KnownSpectra.FractionalSolid(equilibriumPa, 1, exponent);
        double[] relaxation = densities(WIDE, solid::relaxationPa);

        double[] retardation = conjugate(new GrossRelation(WIDE, relaxation, equilibriumPa, 0));

        for (int node = 100; node <= 200; node++) {
            double exact = solid.retardationPerPa(WIDE.time(node));
            assertThat(retardation[node]).isCloseTo(exact, within(2e-4 * exact));
        }
    }

    /**
     * Exact: H = 1 Pa between 0.01 s and 100 s has L = 1/(ln²|(τ − t1)/(t2 − τ)| + π²). A jump costs the trapezoidal rule its
     * exactness; 1e-3 is left at a decade's distance from it.
     */
    @ParameterizedTest(name = "{0} s")
    @CsvSource({"0.1, 0.01693785146", "1, 0.03217793436", "10, 0.06801889179"})
    void aBox(double time, double expected) {
        LogTimes times = new LogTimes(-40, 81);
        double[] box = densities(times, t -> {
            boolean edge = Math.abs(Math.abs(Math.log10(t)) - 2) < 0.01;
            return edge ? 0.5 : t > 0.01 && t < 100 ? 1 : 0;
        });

        double[] retardation = conjugate(new GrossRelation(times, box, 0, 0));

        int node = (int) Math.round(10 * Math.log10(time)) + 40;
        assertThat(retardation[node]).isCloseTo(expected, within(1e-3 * expected));
    }

    @Test
    void thereAndBackIsWhatItWas() {
        LogTimes times = new LogTimes(-60, 131);
        double[] relaxation = densities(times, KnownSpectra::doubleLogNormal);
        double instantaneousPa = LogTimes.STEP * Arrays.stream(relaxation).sum();
        double viscosityPaS = LogTimes.STEP
                * IntStream.range(0, times.count())
                        .mapToDouble(i -> relaxation[i] * times.time(i))
                        .sum();

        double[] retardation = conjugate(new GrossRelation(times, relaxation, 0, 0));
        double[] back = reversed(conjugate(
                new GrossRelation(times.inverted(), reversed(retardation), 1 / instantaneousPa, 1 / viscosityPaS)));

        for (int node = 30; node <= 90; node++) {
            assertThat(back[node]).isCloseTo(relaxation[node], within(1e-5));
        }
    }

    /** s·Ĝ(s)·s·Ĵ(s) = 1 with J0 = 1/ΣH and 1/η0 = 1/ΣHτ, the retardation set in the place of an integral. */
    @ParameterizedTest(name = "s = {0} 1/s")
    @CsvSource({"0.001", "0.1", "1", "10", "1000"})
    void bothOperationalFunctionsAreReciprocal(double s) {
        LogTimes times = new LogTimes(-60, 131);
        double[] relaxation = densities(times, KnownSpectra::doubleLogNormal);
        double[] retardation = conjugate(new GrossRelation(times, relaxation, 0, 0));

        double modulus = 0;
        double glass = 0;
        double viscosity = 0;
        double compliance = 0;
        for (int i = 0; i < times.count(); i++) {
            double x = s * times.time(i);
            modulus += LogTimes.STEP * relaxation[i] * x / (1 + x);
            glass += LogTimes.STEP * relaxation[i];
            viscosity += LogTimes.STEP * relaxation[i] * times.time(i);
            compliance += LogTimes.STEP * retardation[i] / (1 + x);
        }
        compliance += 1 / glass + 1 / (viscosity * s);

        assertThat(modulus * compliance).isCloseTo(1, within(1e-6));
    }

    @Test
    void itsDerivativesAreThoseOfSmallSteps() {
        LogTimes times = new LogTimes(-20, 41);
        double[] density = densities(times, KnownSpectra::doubleLogNormal);
        double[] by = new GrossRelation(times, density, 0.3, 0.2).byLogs(17);
        double step = 1e-6;
        for (int k = 0; k < density.length; k++) {
            double[] moved = density.clone();
            moved[k] *= 1 + step;
            assertThat(by[k]).isCloseTo(slope(times, density, moved, 1, 1, step), within(1e-5));
        }
        assertThat(by[density.length]).isCloseTo(slope(times, density, density, 1 + step, 1, step), within(1e-5));
        assertThat(by[density.length + 1]).isCloseTo(slope(times, density, density, 1, 1 + step, step), within(1e-5));
    }

    private static double slope(
            LogTimes times, double[] density, double[] moved, double ofConstant, double ofViscous, double step) {
        double before = new GrossRelation(times, density, 0.3, 0.2).logConjugate()[17];
        double after = new GrossRelation(times, moved, 0.3 * ofConstant, 0.2 * ofViscous).logConjugate()[17];
        return (after - before) / step;
    }

    private static double[] densities(LogTimes times, DoubleUnaryOperator spectrum) {
        return Arrays.stream(times.times()).map(spectrum).toArray();
    }

    private static double[] conjugate(GrossRelation relation) {
        return Arrays.stream(relation.logConjugate()).map(Math::exp).toArray();
    }

    private static double[] reversed(double[] array) {
        return IntStream.range(0, array.length)
                .mapToDouble(i -> array[array.length - 1 - i])
                .toArray();
    }
}
