package nightlag.stages.fault;

/** A record, or a lot, that cannot be taken through a stage; the reason says what was found and what was needed. */
public final class ReductionFault extends Exception {
    private static final long serialVersionUID = 1L;

    private final transient Reason reason;

    /** A fault with the reason a person will read. */
    public ReductionFault(Reason reason) {
        super(reason.sentence());
        this.reason = reason;
    }

    /** What was found and what was needed. */
    public Reason reason() {
        return reason;
    }
}
