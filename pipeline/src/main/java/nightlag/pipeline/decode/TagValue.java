package nightlag.pipeline.decode;

import java.util.OptionalDouble;

/**
 * A fact about a record and where it came from.
 *
 * @param text as written, trimmed; not empty
 * @param si SI value, for a quantity
 * @param from where it came from, for a person
 */
record TagValue(String text, OptionalDouble si, String from) {}
