package nightlag.pipeline.samples;

import java.nio.charset.StandardCharsets;
import java.util.Map;
import nightlag.stages.numeric.Complex;

/**
 * Bracken 45, an invented damping elastomer at 23 °C. Lot B45-031 as strips in tension on the damper bench: UTF-16 with a
 * byte-order mark, tabs, a unit row, the strip's sizes above the header. Lot B45-032 as double pads on the shear bench:
 * many points in one file, the force as a recorder's voltage, lot and sizes on a run sheet.
 */
final class Bracken {
    /** Young's modulus at 23 °C; in shear a third of it. */
    static final Maxwell ELASTOMER =
            new Maxwell(1.5e6, new double[] {9e6, 5e6, 2.6e6, 1.2e6, 0.5e6}, new double[] {2e-4, 2e-3, 2e-2, 0.2, 2});

    static final Bench DAMPER_BENCH = new Bench(0.02, 0.05, 0.4e-6, 60e-6);
    static final Bench SHEAR_BENCH = new Bench(0.12, 0.4, 0.05e-6, 12e-6);
    static final double DENSITY = 1120;

    private static final double[] TENSION_HZ = {0.05, 0.1, 0.2, 0.4, 0.8, 1.5, 3, 6, 12, 25, 40, 60};
    private static final double[] SHEAR_HZ = {0.1, 0.25, 0.6, 1.5, 4, 10, 25, 40};
    private static final double FORCE_LIMIT = 0.52;
    private static final double VOLTS_PER_NEWTON = 1.0 / 25;
    private static final double ZERO_VOLTS = 0.013;

    private Bracken() {}

    /** All files of both intakes, by path below the intake folder. */
    static void addTo(Map<String, byte[]> files) {
        for (int step = 1; step <= TENSION_HZ.length; step++) {
            strip(files, "1", step, 5.02e-3, 2.01e-3, 0.003);
        }
        // a second piece, driven so hard that the force amplifier runs into its limit
        strip(files, "2", 7, 5.04e-3, 1.99e-3, 0.006);
        pads(files, "b45-032-1.csv", 2.02e-3, 314.2e-6);
        pads(files, "b45-032-2.csv", 1.97e-3, 314.2e-6);
        String sheet = """
                file,lot,piece,gap_mm,area_mm2,made
                b45-032-1.csv,B45-032,1,2.02,314.2,2026-02-19
                b45-032-2.csv,B45-032,2,1.97,314.2,2026-02-19
                """;
        files.put("shear-bench/runs.csv", sheet.getBytes(StandardCharsets.UTF_8));
    }

    private static void strip(
            Map<String, byte[]> files, String piece, int step, double width, double thickness, double strain) {
        double frequency = TENSION_HZ[step - 1];
        double omega = 2 * StrictMath.PI * frequency;
        double length = 20e-3;
        String path = "damper-bench/B45-031_%s_%02d.txt".formatted(piece, step);
        Noise noise = new Noise(path.hashCode());
        Complex modulus = ELASTOMER.modulus(omega);
        Bench.Recorded recorded =
                DAMPER_BENCH.recorded(modulus.times(width * thickness / length), strain * length, omega);
        double duration = 5.3 / frequency;
        Signal displacement = new Signal(recorded.movement(), omega, 4e-4, 0, 2e-8);
        Signal force = new Signal(
                recorded.load(), omega, 0.3, -0.01 * recorded.loadSize() / duration, 5e-5 + 2e-4 * recorded.loadSize());

        StringBuilder text = new StringBuilder()
                .append("Damper bench\ttension, oscillation\r\n")
                .append("Sample\tBracken 45\r\n")
                .append("Batch\tB45-031\r\n")
                .append("Piece\t%s\r\n".formatted(piece))
                .append("Length\t%s\tmm\r\n".formatted(Text.fixed(1e3 * length, 2)))
                .append("Width\t%s\tmm\r\n".formatted(Text.fixed(1e3 * width, 2)))
                .append("Thickness\t%s\tmm\r\n".formatted(Text.fixed(1e3 * thickness, 2)))
                .append("Frequency\t%s\tHz\r\n".formatted(Text.significant(frequency, 3)))
                .append("Date\t2026-02-17\r\n")
                .append("\r\n")
                .append("Time\tDisplacement\tForce\tTemperature\r\n")
                .append("s\t[µm]\t[mN]\t\r\n");
        int samples = (int) StrictMath.rint(5.3 * 64);
        for (int sample = 0; sample < samples; sample++) {
            double time = Text.stamp(sample / (frequency * 64), 6);
            double newtons = force.at(time, noise);
            text.append(Text.fixed(time, 6))
                    .append('\t')
                    .append(Text.fixed(1e6 * displacement.at(time, noise), 3))
                    .append('\t')
                    .append(Text.fixed(1e3 * StrictMath.min(newtons, FORCE_LIMIT), 3))
                    .append('\t')
                    .append(Text.fixed(23 + noise.next(0.02), 2))
                    .append("\r\n");
        }
        byte[] body = text.toString().getBytes(StandardCharsets.UTF_16LE);
        byte[] marked = new byte[body.length + 2];
        marked[0] = (byte) 0xFF;
        marked[1] = (byte) 0xFE;
        System.arraycopy(body, 0, marked, 2, body.length);
        files.put(path, marked);
    }

    private static void pads(Map<String, byte[]> files, String name, double gap, double area) {
        String path = "shear-bench/" + name;
        Noise noise = new Noise(path.hashCode());
        StringBuilder text = new StringBuilder("shear bench,double pads\n").append("point,f_Hz,t_s,x_mm,U_V,T_C\n");
        for (int step = 1; step <= SHEAR_HZ.length; step++) {
            double frequency = SHEAR_HZ[step - 1];
            double omega = 2 * StrictMath.PI * frequency;
            Complex modulus = ELASTOMER.modulus(omega).times(1.0 / 3);
            Complex atWall = ShearWave.atFixedWall(modulus, DENSITY * omega * omega * gap * gap);
            Bench.Recorded recorded = SHEAR_BENCH.recorded(atWall.times(2 * area / gap), 0.01 * gap, omega);
            Signal displacement = new Signal(recorded.movement(), omega, 0.02e-3, 0, 3e-9);
            Signal force = new Signal(recorded.load(), omega, 0.1, 0, 2e-4 + 2e-4 * recorded.loadSize());
            int samples = (int) StrictMath.rint(5.4 * 48);
            for (int sample = 0; sample < samples; sample++) {
                double time = Text.stamp(sample / (frequency * 48), 6);
                text.append(step)
                        .append(',')
                        .append(Text.significant(frequency, 3))
                        .append(',')
                        .append(Text.fixed(time, 6))
                        .append(',')
                        .append(Text.fixed(1e3 * displacement.at(time, noise), 6))
                        .append(',')
                        .append(Text.fixed(ZERO_VOLTS - VOLTS_PER_NEWTON * force.at(time, noise), 6))
                        .append(',')
                        .append(Text.fixed(23 + noise.next(0.02), 2))
                        .append('\n');
            }
        }
        files.put(path, text.toString().getBytes(StandardCharsets.UTF_8));
    }
}
