package nightlag.stages.fault;

/**
 * Why something is as it is, for a person and for a test.
 *
 * @param code stable code, the name of a {@link ReasonCode}
 * @param sentence what a technician reads, without a full stop at its end
 */
public record Reason(String code, String sentence) {}
