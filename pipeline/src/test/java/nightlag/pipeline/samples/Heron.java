package nightlag.pipeline.samples;

import java.nio.charset.StandardCharsets;
import java.util.Map;
import nightlag.stages.numeric.Complex;

/**
 * Heron 3, an invented melt between 25 mm plates at a gap of 1 mm, on the melt bench: decimal comma, semicolons, tags above
 * the header, one record a file, torque and angle.
 */
final class Heron {
    /** At 190 °C. */
    static final Maxwell MELT =
            new Maxwell(0, new double[] {1.4e5, 7.5e4, 3.0e4, 8e3, 9e2}, new double[] {3e-4, 2e-3, 1.2e-2, 7e-2, 0.35});

    static final Maxwell SECOND_LOT = MELT.scaled(1.06, 1.15);
    static final double REFERENCE_C = 190;
    static final double WLF_C1 = 4.1;
    static final double WLF_C2 = 260;
    static final Bench BENCH = new Bench(1.2e-5, 2e-6, 0.003, 85e-6);

    private static final double RADIUS = 12.5e-3;
    private static final double GAP = 1e-3;
    private static final double STRAIN = 0.08;
    private static final int SAMPLES_PER_CYCLE = 64;
    private static final double[] ISOTHERMS_C = {160, 175, 190, 205, 220};
    private static final double[] FREQUENCIES_HZ = {30, 15, 8, 4, 2, 1, 0.5, 0.25, 0.12, 0.06};
    private static final int[] SHORT_SWEEP = {1, 3, 5, 7};

    private Heron() {}

    /** All files of the intake, by path below it. */
    static void addTo(Map<String, byte[]> files) {
        for (double isotherm : ISOTHERMS_C) {
            for (int step = 1; step <= FREQUENCIES_HZ.length; step++) {
                put(files, record("H3-0417", "A", isotherm, step, 5.3, MELT));
            }
        }
        for (int step = 1; step <= FREQUENCIES_HZ.length; step++) {
            put(files, record("H3-0418", "A", 190, step, 5.3, SECOND_LOT));
        }
        for (double isotherm : new double[] {175, 205}) {
            for (int step : SHORT_SWEEP) {
                // somebody stopped the slowest one at 175 °C early
                double cycles = isotherm == 175 && step == 7 ? 3.2 : 5.3;
                put(files, record("H3-0418", "A", isotherm, step, cycles, SECOND_LOT));
            }
        }
        Sample spoilt = record("H3-0418", "B", 190, 1, 5.3, SECOND_LOT);
        put(files, new Sample(spoilt.path(), overloaded(spoilt.text())));
    }

    /** log10 a_T by Williams, Landel and Ferry. */
    static double shift(double celsius) {
        return StrictMath.pow(10, -WLF_C1 * (celsius - REFERENCE_C) / (WLF_C2 + celsius - REFERENCE_C));
    }

    private static Sample record(
            String lot, String specimen, double celsius, int step, double cycles, Maxwell material) {
        double frequency = FREQUENCIES_HZ[step - 1];
        double omega = 2 * StrictMath.PI * frequency;
        String path = "melt-bench/%s/%s/%sC-%02d.csv".formatted(lot, specimen, Text.fixed(celsius, 0), step);
        Noise noise = new Noise(path.hashCode());
        Complex modulus = material.modulus(omega * shift(celsius));
        double polar = StrictMath.PI * RADIUS * RADIUS * RADIUS * RADIUS / 2;
        Bench.Recorded recorded = BENCH.recorded(modulus.times(polar / GAP), STRAIN * GAP / RADIUS, omega);
        double loadSize = recorded.loadSize();
        double duration = cycles / frequency;
        Signal angle = new Signal(recorded.movement(), omega, 4e-5, 1e-5 / duration, 1.5e-6);
        Signal torque = new Signal(recorded.load(), omega, 5e-6, 0.01 * loadSize / duration, 1e-7 + 2e-4 * loadSize);

        StringBuilder text = new StringBuilder()
                .append("Melt bench;oscillation\r\n")
                .append("Compound: Heron 3\r\n")
                .append("Made = 2026-02-%s\r\n".formatted(lot.equals("H3-0417") ? "16" : "18"))
                .append("T;%s;°C\r\n".formatted(Text.comma(celsius, 1)))
                .append("f;%s;Hz\r\n".formatted(Text.significant(frequency, 3).replace('.', ',')))
                .append("\r\n")
                .append("t;phi;M;T\r\n");
        int samples = (int) StrictMath.rint(cycles * SAMPLES_PER_CYCLE);
        for (int sample = 0; sample < samples; sample++) {
            double time = Text.stamp(sample / (frequency * SAMPLES_PER_CYCLE), 6);
            text.append(Text.comma(time, 6))
                    .append(';')
                    .append(Text.comma(1e3 * angle.at(time, noise), 5))
                    .append(';')
                    .append(Text.comma(1e3 * torque.at(time, noise), 6))
                    .append(';')
                    .append(Text.comma(celsius + noise.next(0.03), 2))
                    .append("\r\n");
        }
        return new Sample(path, text.toString());
    }

    /** Puts the recorder's sign for an overload where a torque belongs: third column of line 57. */
    private static String overloaded(String text) {
        String[] lines = text.split("\r\n", -1);
        String[] cells = lines[56].split(";", -1);
        cells[2] = "OVL";
        lines[56] = String.join(";", cells);
        return String.join("\r\n", lines);
    }

    private static void put(Map<String, byte[]> files, Sample sample) {
        files.put(sample.path(), sample.text().getBytes(StandardCharsets.UTF_8));
    }

    private record Sample(String path, String text) {}
}
