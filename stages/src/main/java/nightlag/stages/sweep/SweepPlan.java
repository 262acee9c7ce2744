package nightlag.stages.sweep;

import java.util.Locale;

/**
 * How points become sweeps: the section {@code [sweeps]} of a grade.
 *
 * @param kind what varies, or found from the points
 * @param repeats whether repeats stay apart or are averaged by weight
 * @param onsetAxis the axis of the storage onset's tangents
 */
public record SweepPlan(Kind kind, Repeats repeats, OnsetAxis onsetAxis) {
    /** What varies in a sweep. */
    public enum Kind {
        AUTO,
        AMPLITUDE,
        FREQUENCY,
        TEMPERATURE,
        TIME;

        /** The word in configuration and notes. */
        public String word() {
            return name().toLowerCase(Locale.ROOT);
        }
    }

    /** What becomes of repeats. */
    public enum Repeats {
        APART,
        AVERAGED
    }

    /** The axis of the storage modulus for the onset. */
    public enum OnsetAxis {
        LINEAR,
        LOG
    }

    /** Kind found from the points, repeats apart, linear axis. */
    public static SweepPlan withDefaults() {
        return new SweepPlan(Kind.AUTO, Repeats.APART, OnsetAxis.LINEAR);
    }
}
