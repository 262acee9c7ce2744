package nightlag.pipeline.decode;

import nightlag.pipeline.config.Problem;

/** A raw file, or its run sheet, that cannot be read as its instrument file says; the file is set aside with the problem. */
public final class DecodeException extends Exception {
    private static final long serialVersionUID = 1L;

    private final transient Problem problem;

    /** The problem a technician can act on. */
    public DecodeException(Problem problem) {
        super(problem.sentence());
        this.problem = problem;
    }

    /** What was found where, and what was expected. */
    public Problem problem() {
        return problem;
    }
}
