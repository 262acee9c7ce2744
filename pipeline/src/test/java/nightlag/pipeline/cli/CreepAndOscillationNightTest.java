package nightlag.pipeline.cli;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/**
 * A night on one lot that was measured on two benches: moduli from 0.1 Hz up and creep until it flows. The material has 10 kPa at
 * 0.02 s, 1 kPa at 1 s and 100 Pa at 60 s, of which the moduli hardly show the last; η0 = 7200 Pa·s.
 */
class CreepAndOscillationNightTest {
    private static final double[] STRENGTHS_PA = {1e4, 1e3, 100};
    private static final double[] TIMES_S = {0.02, 1, 60};
    private static final double VISCOSITY = 7200;
    private static final double STEP_S = 0.05;

    @TempDir
    private Path folder;

    private Lab lab;

    @BeforeEach
    void twoBenches() {
        lab = new Lab(folder);
        lab.write("config/night.toml", """
                results = "../results"
                grades = "grades"
                instruments = "instruments"
                workers = 2

                [[intake]]
                folder = "../sweeps"
                instrument = "table"

                [[intake]]
                folder = "../creep"
                instrument = "creep"
                """);
        lab.write("config/instruments/table.toml", """
                [files]
                match = "*.csv"
                header = "f,"

                [records]
                layout = "moduli"

                [channels]
                frequency = { column = "f", unit = "Hz" }
                temperature = { column = "T", unit = "°C" }
                storage_modulus = { column = "G1", unit = "Pa" }
                loss_modulus = { column = "G2", unit = "Pa" }

                [tags]
                grade = { value = "plover" }
                lot = { value = "L1" }

                [geometry]
                kind = "none"
                deformation = "shear"
                """);
        lab.write("config/instruments/creep.toml", """
                [files]
                match = "*.csv"
                header = "t,"

                [records]
                layout = "creep"

                [channels]
                time = { column = "t", unit = "s" }
                strain = { column = "strain", unit = "1" }
                stress = { column = "stress", unit = "Pa" }
                temperature = { column = "T", unit = "°C" }

                [tags]
                grade = { value = "plover" }
                lot = { value = "L1" }
                """);
        lab.grade("plover", """
                [[response]]
                name = "ten minutes"
                stress = [["0 s", "10 Pa"], ["5 min", "0 Pa"]]
                until = "9 min"
                """);
        lab.write("sweeps/sweep.csv", sweep());
        lab.write("creep/notes.txt", "nothing measured yet");
    }

    /** Moduli without u, written down to four digits. */
    private static String sweep() {
        StringBuilder text = new StringBuilder("f,T,G1,G2\n");
        for (int i = 0; i <= 24; i++) {
            double hz = Math.pow(10, -1 + i / 8.0);
            double storage = 0;
            double loss = 0;
            for (int k = 0; k < TIMES_S.length; k++) {
                double x = 2 * Math.PI * hz * TIMES_S[k];
                storage += STRENGTHS_PA[k] * x * x / (1 + x * x);
                loss += STRENGTHS_PA[k] * x / (1 + x * x);
            }
            text.append(String.format(Locale.ROOT, "%.5g,25,%.4g,%.4g%n", hz, storage, loss));
        }
        return text.toString();
    }

    /**
     * Creep under 10 Pa for ten minutes, from a strain that follows G(t) step by step: the convolution of G and the rate of strain
     * is the stress, solved by the trapezoidal rule for each mode.
     */
    private static String creep(double celsius, double stressPa) {
        StringBuilder text = new StringBuilder("t,strain,stress,T\n");
        double[] ofModes = new double[TIMES_S.length];
        double strain = 0;
        double sum = 0;
        for (double strength : STRENGTHS_PA) {
            sum += strength;
        }
        for (int i = 0; i < 12200; i++) {
            double time = (i - 200) * STEP_S + STEP_S / 2;
            double stress = time > 0 ? stressPa : 0;
            if (time > 0) {
                // a mode's stress decays and takes up its share of the strain's change, evenly over the step
                double step = time < STEP_S ? STEP_S / 2 : STEP_S;
                double decayed = 0;
                double takenUp = 0;
                double[] fall = new double[TIMES_S.length];
                double[] share = new double[TIMES_S.length];
                boolean first = time < STEP_S;
                if (first) {
                    double jump = stressPa / sum;
                    strain += jump;
                    for (int k = 0; k < TIMES_S.length; k++) {
                        ofModes[k] += STRENGTHS_PA[k] * jump;
                    }
                }
                for (int k = 0; k < TIMES_S.length; k++) {
                    fall[k] = Math.exp(-step / TIMES_S[k]);
                    share[k] = STRENGTHS_PA[k] * TIMES_S[k] / step * -Math.expm1(-step / TIMES_S[k]);
                    decayed += ofModes[k] * fall[k];
                    takenUp += share[k];
                }
                double change = (stressPa - decayed) / takenUp;
                strain += change;
                for (int k = 0; k < TIMES_S.length; k++) {
                    ofModes[k] = ofModes[k] * fall[k] + share[k] * change;
                }
            }
            text.append(String.format(Locale.ROOT, "%.3f,%.9f,%.4f,%.2f%n", time, strain, stress, celsius));
        }
        return text.toString();
    }

    @Test
    void oneSpectrumIsOfBothBenchesAndAllIsDrawnFromIt() {
        lab.run();
        double alone = Double.parseDouble(marker("zero_shear_viscosity").get("value"));
        assertThat(alone).isLessThan(0.9 * VISCOSITY);
        assertThat(last().get("inside_data")).isEqualTo("false");

        lab.write("creep/run.csv", creep(25.1, 10));
        Lab.Ended ended = lab.run();

        assertThat(ended.exitCode()).as(ended.out() + ended.err()).isZero();
        Map<String, String> viscosity = marker("zero_shear_viscosity");
        assertThat(Double.parseDouble(viscosity.get("value"))).isCloseTo(VISCOSITY, within(0.01 * VISCOSITY));
        assertThat(viscosity.get("method"))
                .contains("creep and oscillation together, the moduli's u from their scatter");
        assertThat(Double.parseDouble(marker("instantaneous_modulus").get("value")))
                .isCloseTo(11100, within(300.0));
        assertThat(lab.table("plover", "L1", "spectrum"))
                .extracting(row -> row.get("reference_temperature_C"))
                .containsOnly("25");
        List<Map<String, String>> prony = lab.table("plover", "L1", "prony");
        assertThat(prony.stream()
                        .mapToDouble(row -> Double.parseDouble(row.get("relative_modulus")))
                        .sum())
                .isCloseTo(1, within(1e-12));
        assertThat(Double.parseDouble(prony.get(prony.size() - 1).get("time_s")))
                .isCloseTo(60, within(3.0));
        // five minutes of flow under 10 Pa
        assertThat(Double.parseDouble(last().get("strain_never"))).isCloseTo(3000 / VISCOSITY, within(0.01));
        assertThat(last().get("inside_data")).isEqualTo("true");
    }

    @Test
    void creepAtAnotherTemperatureStandsBesideAndIsSaid() {
        lab.write("creep/run.csv", creep(40, 10));

        lab.run();

        assertThat(lab.table("plover", "L1", "spectrum").stream()
                        .map(row -> row.get("reference_temperature_C"))
                        .distinct())
                .containsExactly("25", "40");
        assertThat(lab.logLines("creep at 40 °C has a spectrum of its own: the moduli are of 25 °C"))
                .hasSize(1);
    }

    private Map<String, String> marker(String property) {
        return lab.table("plover", "L1", "markers").stream()
                .filter(row ->
                        row.get("property").equals(property) && row.get("sweep").isEmpty())
                .findFirst()
                .orElseThrow();
    }

    private Map<String, String> last() {
        List<Map<String, String>> rows = lab.table("plover", "L1", "response");
        return rows.get(rows.size() - 1);
    }
}
