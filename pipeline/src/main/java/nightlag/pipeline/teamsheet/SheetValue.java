package nightlag.pipeline.teamsheet;

import com.fasterxml.jackson.annotation.JsonInclude;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * What a lot has to show for one limit: two cells of its row.
 *
 * @param title what both columns are called
 * @param unit unit of the value; it stands in the heading
 * @param value the value; empty where it is not available
 * @param verdict the verdict's word; empty where there is none
 */
@JsonInclude(JsonInclude.Include.NON_ABSENT)
public record SheetValue(String title, String unit, OptionalDouble value, Optional<String> verdict) {
    /** A value that is not finite is none. */
    public SheetValue {
        value = value.isPresent() && Double.isFinite(value.getAsDouble()) ? value : OptionalDouble.empty();
    }

    String valueHeading() {
        return title + " [" + unit + "]";
    }

    String verdictHeading() {
        return title + " verdict";
    }
}
