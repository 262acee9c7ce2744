package nightlag.pipeline.samples;

import java.nio.charset.StandardCharsets;
import java.util.Map;
import nightlag.stages.numeric.Complex;

/**
 * Lot A12-79 of Alder 12 on the ramp bench: one long record at 1 Hz while the temperature rises evenly. The stress follows
 * the modulus at the temperature of the moment, σ = Re{G*(T(t)) γ* e^{iωt}}.
 */
final class AlderRamp {
    private static final double START_C = -8;
    private static final double KELVIN_PER_S = 2.0 / 60;
    private static final int PER_CYCLE = 16;
    private static final int CYCLES = 756;
    private static final double STRAIN = 1e-3;
    private static final double PHASE = -0.8;

    private AlderRamp() {}

    static void addTo(Map<String, byte[]> files) {
        String path = "ramp-bench/A12-79 ramp.csv";
        Noise noise = new Noise(path.hashCode());
        StringBuilder text = new StringBuilder("Compound = Alder 12\nLot = A12-79\n\nt,strain,stress,T\ns,%,kPa,°C\n");
        for (int sample = 0; sample < PER_CYCLE * CYCLES; sample++) {
            double time = (double) sample / PER_CYCLE;
            double turn = 2 * StrictMath.PI * time;
            double swell = time < 1 ? 0.5 * (1 - StrictMath.cos(turn / 2)) : 1;
            double cosine = swell * STRAIN * StrictMath.cos(turn + PHASE);
            double sine = swell * STRAIN * StrictMath.sin(turn + PHASE);
            Complex modulus = Alder.modulus(1, celsius(time), 1);
            double strain = 2e-4 + cosine + noise.next(2e-4 * STRAIN);
            double stress = modulus.re() * cosine - modulus.im() * sine + noise.next(2e-4 * STRAIN * modulus.abs());
            text.append(Text.fixed(time, 4))
                    .append(',')
                    .append(Text.fixed(100 * strain, 6))
                    .append(',')
                    .append(Text.fixed(1e-3 * stress, 3))
                    .append(',')
                    .append(Text.fixed(celsius(time) + noise.next(0.02), 2))
                    .append('\n');
        }
        files.put(path, text.toString().getBytes(StandardCharsets.UTF_8));
    }

    /** The temperature of the specimen so long after the record's first row. */
    static double celsius(double timeS) {
        return START_C + KELVIN_PER_S * timeS;
    }
}
