package nightlag.pipeline.config;

import java.lang.reflect.RecordComponent;
import java.nio.charset.Charset;
import java.util.Collection;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.TreeMap;
import java.util.regex.Pattern;
import nightlag.stages.moduli.PointFunction;
import org.apache.commons.codec.digest.DigestUtils;

/**
 * Digests of values: equal values have equal digests, whatever order or spelling they were written in. A value is a
 * record, list, map, optional, enumeration, number, text, charset or pattern, and whatever these are made of.
 */
public final class Fingerprints {
    private Fingerprints() {}

    /** SHA-256, hex, of the values in this order. */
    public static String of(Object... values) {
        StringBuilder text = new StringBuilder();
        for (Object value : values) {
            write(value, text);
        }
        return DigestUtils.sha256Hex(text.toString());
    }

    /** Writes a value so that no two different values read the same: texts are written with their length. */
    private static void write(Object value, StringBuilder out) {
        if (value instanceof Unit unit) {
            // How a unit was spelt does not matter, only what it does.
            write(unit.factor(), out);
            write(unit.offset(), out);
        } else if (value instanceof TagSource.Fixed fixed && fixed.unit().isPresent()) {
            writeText("Fixed", out);
            write(new Quantity(Double.parseDouble(fixed.value()), fixed.unit().get()).si(), out);
        } else if (value instanceof Record record) {
            writeRecord(record, out);
        } else if (value instanceof Map<?, ?> map) {
            TreeMap<String, Object> sorted = new TreeMap<>();
            map.forEach((key, item) -> sorted.put(key.toString(), item));
            out.append("map").append(sorted.size()).append('{');
            sorted.forEach((key, item) -> {
                writeText(key, out);
                write(item, out);
            });
            out.append('}');
        } else if (value instanceof Collection<?> items) {
            out.append("list").append(items.size()).append('[');
            items.forEach(item -> write(item, out));
            out.append(']');
        } else if (value instanceof Optional<?> optional) {
            optional.ifPresentOrElse(item -> write(item, out), () -> out.append("none;"));
        } else if (value instanceof OptionalDouble optional) {
            optional.ifPresentOrElse(item -> write(item, out), () -> out.append("none;"));
        } else if (value instanceof OptionalInt optional) {
            optional.ifPresentOrElse(item -> write(item, out), () -> out.append("none;"));
        } else if (value instanceof Double number) {
            out.append(number == 0 ? "0.0" : Double.toString(number)).append(';'); // −0 and 0 are one value
        } else if (value instanceof Number || value instanceof Boolean || value instanceof Character) {
            writeText(value.toString(), out);
        } else if (value instanceof Enum<?> constant) {
            writeText(constant.name(), out);
        } else if (value instanceof String || value instanceof Charset || value instanceof Pattern) {
            writeText(value.toString(), out);
        } else {
            throw new IllegalArgumentException(
                    "no fingerprint of a " + value.getClass().getName());
        }
    }

    private static void writeText(String text, StringBuilder out) {
        out.append('"').append(text.length()).append(':').append(text).append(';');
    }

    private static void writeRecord(Record record, StringBuilder out) {
        out.append(record.getClass().getSimpleName()).append('(');
        for (RecordComponent component : record.getClass().getRecordComponents()) {
            if (component.getType() == PointFunction.class) {
                continue; // the expression it was compiled from stands beside it
            }
            out.append(component.getName()).append('=');
            try {
                write(component.getAccessor().invoke(record), out);
            } catch (ReflectiveOperationException e) {
                throw new IllegalArgumentException(
                        "no fingerprint of " + record.getClass().getName(), e);
            }
        }
        out.append(')');
    }
}
