package nightlag.stages.waveform;

import java.util.Arrays;
import nightlag.stages.numeric.Cholesky;
import nightlag.stages.waveform.ScreeningFigures.Figure;

/**
 * Whether a sweep's record begins at rest. What the specimen remembers of a deformation before the first sample is in the
 * load and nowhere in the deformation; hypot(γ − γ_rest, γ̇/ω) over the sweep's amplitude at the first sample, 0 at rest and 1 in
 * full swing, says how much there may be to remember.
 */
public final class SweepStart {
    /** From here on a record begins in motion. */
    public static final double AT_REST = 0.1;

    /** As few first samples are looked at as tell the figure so well, because a taper may be short … */
    private static final double KNOWN_TO = 0.02;
    /** … but no more than in this part of a cycle. */
    private static final double MOST_CYCLES = 0.1;

    private static final int FEWEST_SAMPLES = 6;
    private static final double NEARLY_ALL = 0.95;

    private SweepStart() {}

    /**
     * The figure.
     *
     * @param noise standard deviation of the deformation's noise
     */
    static Figure of(Samples samples, SweepLaw law, double noise) {
        double[] rest = rest(samples, law);
        double[] seconds = samples.seconds();
        double[] about = samples.channels()[Samples.DEFORMATION].clone();
        for (int i = 0; i < about.length; i++) {
            about[i] -= rest[0] + rest[1] * seconds[i];
        }
        double[] sizes = Arrays.stream(about).map(Math::abs).sorted().toArray();
        double amplitude = sizes[(int) (NEARLY_ALL * (sizes.length - 1))];
        if (amplitude == 0) {
            return new Figure(0, 0);
        }
        double omega = 2 * Math.PI * Math.max(law.slowestHz(), Math.min(law.fastestHz(), law.frequencyHz(seconds[0])));
        int count = Math.min(FEWEST_SAMPLES, about.length);
        Figure figure = motion(seconds, about, count, omega, amplitude, noise);
        while (figure.u() > KNOWN_TO
                && count < about.length
                && (seconds[count] - seconds[0]) * omega < 2 * Math.PI * MOST_CYCLES) {
            count = Math.min(about.length, count + count / 3);
            figure = motion(seconds, about, count, omega, amplitude, noise);
        }
        return figure;
    }

    /** hypot(γ, γ̇/ω) over the amplitude at the first sample, from a parabola through some samples. */
    private static Figure motion(
            double[] seconds, double[] about, int count, double omega, double amplitude, double noise) {
        double[][] gram = new double[3][3];
        double[] moments = new double[3];
        for (int i = 0; i < count; i++) {
            double phase = omega * (seconds[i] - seconds[0]);
            add(new double[] {1, phase, phase * phase}, 1, about[i], gram, moments);
        }
        return Cholesky.of(gram)
                .map(normal -> {
                    double[] state = normal.solve(moments);
                    double variance =
                            normal.inverseForm(new double[] {1, 0, 0}) + normal.inverseForm(new double[] {0, 1, 0});
                    return new Figure(
                            Math.hypot(state[0], state[1]) / amplitude, noise * Math.sqrt(variance) / amplitude);
                })
                .orElse(new Figure(0, 0));
    }

    /**
     * Where the deformation rests: a straight line in time, from all samples weighted by the sweep's frequency, because a fast wave
     * averages out over a short time and a slow one does not.
     */
    private static double[] rest(Samples samples, SweepLaw law) {
        double[][] gram = new double[2][2];
        double[] moments = new double[2];
        double[] seconds = samples.seconds();
        for (int i = 0; i < seconds.length; i++) {
            double inside = Math.max(law.beginS(), Math.min(law.endS(), seconds[i]));
            double value = samples.channels()[Samples.DEFORMATION][i];
            add(new double[] {1, seconds[i]}, law.frequencyHz(inside), value, gram, moments);
        }
        return Cholesky.of(gram).map(normal -> normal.solve(moments)).orElse(new double[] {0, 0});
    }

    private static void add(double[] row, double weight, double value, double[][] gram, double[] moments) {
        for (int p = 0; p < row.length; p++) {
            moments[p] += weight * row[p] * value;
            for (int q = 0; q <= p; q++) {
                gram[p][q] += weight * row[p] * row[q];
            }
        }
    }
}
