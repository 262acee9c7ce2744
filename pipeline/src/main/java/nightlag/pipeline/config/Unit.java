package nightlag.pipeline.config;

/**
 * A unit as somebody wrote it: SI value = number · factor + offset (the offset is there for temperature readings only).
 *
 * @param symbol as written
 * @param factor SI units in one of it
 * @param offset SI value of its zero
 */
public record Unit(String symbol, double factor, double offset) {
    /** The SI value of a number in this unit. */
    public double toSi(double number) {
        return number * factor + offset;
    }
}
