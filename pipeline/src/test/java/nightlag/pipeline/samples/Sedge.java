package nightlag.pipeline.samples;

import java.nio.charset.StandardCharsets;
import java.util.Map;

/**
 * Sedge 7, an invented sealant at 23 °C: creep under 2 kPa for ten minutes and recovery for twenty, between plates on the
 * creep bench. Samples come ever more slowly after each step. The strain follows from the compliance by superposition.
 */
final class Sedge {
    static final double INSTANTANEOUS_PER_PA = 2e-6;
    static final double VISCOSITY_PA_S = 4e9;
    static final double[] TIMES_S = {0.8, 9, 110};
    static final double[] STRENGTHS_PER_PA = {3e-6, 5e-6, 8e-6};

    static final double STRESS_PA = 2000;
    private static final double RADIUS = 12.5e-3;
    private static final double GAP = 2e-3;
    private static final double FRAME_RAD_PER_NM = 0.01;
    private static final double LOADED_S = 600;
    private static final double END_S = 1800;
    /** Steps fall between two samples. */
    private static final double OFF_BEAT_S = 0.025;

    private Sedge() {}

    static void addTo(Map<String, byte[]> files) {
        String path = "creep-bench/S7-05_1.dat";
        Noise noise = new Noise(path.hashCode());
        StringBuilder text = new StringBuilder("# creep bench\n# material: Sedge 7\n# lot: S7-05\n# piece: 1\n")
                .append("time/s  phi/mrad  M/mNm  T/degC\n");
        double before = -10;
        while (before < 0) {
            row(text, before + OFF_BEAT_S, noise);
            before += 0.5;
        }
        after(text, 0, LOADED_S, noise);
        after(text, LOADED_S, END_S, noise);
        files.put(path, text.toString().getBytes(StandardCharsets.UTF_8));
    }

    private static void after(StringBuilder text, double step, double end, Noise noise) {
        double time = step - OFF_BEAT_S;
        while (time < end - OFF_BEAT_S) {
            row(text, time, noise);
            double since = time - step;
            time += since < 5 ? 2 * OFF_BEAT_S : since < 60 ? 0.5 : 3;
        }
    }

    private static void row(StringBuilder text, double time, Noise noise) {
        double torquePerPa = StrictMath.PI * RADIUS * RADIUS * RADIUS / 2;
        double torque = torquePerPa * (time >= 0 && time < LOADED_S ? STRESS_PA : 0) + noise.next(2e-6);
        double strain = STRESS_PA * (compliance(time) - compliance(time - LOADED_S));
        double angle = strain * GAP / RADIUS + FRAME_RAD_PER_NM * torque + noise.next(2e-6);
        text.append(Text.fixed(time, 3))
                .append("  ")
                .append(Text.fixed(1e3 * angle, 5))
                .append("  ")
                .append(Text.fixed(1e3 * torque, 5))
                .append("  ")
                .append(Text.fixed(23 + noise.next(0.02), 2))
                .append('\n');
    }

    /** J(t), 1/Pa. */
    static double compliance(double time) {
        if (time < 0) {
            return 0;
        }
        double sum = INSTANTANEOUS_PER_PA + time / VISCOSITY_PA_S;
        for (int i = 0; i < TIMES_S.length; i++) {
            sum -= STRENGTHS_PER_PA[i] * StrictMath.expm1(-time / TIMES_S[i]);
        }
        return sum;
    }
}
