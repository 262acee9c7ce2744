package nightlag.stages.waveform;

/** The polynomial under the oscillation of a channel. */
public enum Drift {
    /** A constant only. */
    NONE(0),
    /** A straight line. */
    LINEAR(1),
    /** A parabola. */
    QUADRATIC(2);

    private final int degree;

    Drift(int degree) {
        this.degree = degree;
    }

    /** The polynomial's degree. */
    public int degree() {
        return degree;
    }
}
