package nightlag.pipeline.teamsheet;

import com.fasterxml.jackson.core.JsonProcessingException;
import com.fasterxml.jackson.databind.ObjectMapper;
import com.fasterxml.jackson.databind.json.JsonMapper;
import com.fasterxml.jackson.datatype.jdk8.Jdk8Module;
import java.util.List;

/**
 * The row of one lot.
 *
 * @param grade the grade
 * @param lot the lot
 * @param values one a limit, in the order of the grade file
 */
public record SheetRow(String grade, String lot, List<SheetValue> values) {
    private static final ObjectMapper JSON =
            JsonMapper.builder().addModule(new Jdk8Module()).build();

    /** Copies the list. */
    public SheetRow {
        values = List.copyOf(values);
    }

    /** The row as one line of JSON, to be kept until it can be written. */
    public String toJson() {
        try {
            return JSON.writeValueAsString(this);
        } catch (JsonProcessingException cause) {
            throw new IllegalStateException("a row that cannot be written as JSON", cause);
        }
    }

    /**
     * The row that {@link #toJson} wrote.
     *
     * @throws IllegalArgumentException if it is none
     */
    public static SheetRow fromJson(String text) {
        try {
            return JSON.readValue(text, SheetRow.class);
        } catch (JsonProcessingException cause) {
            throw new IllegalArgumentException("no row of the team sheet: " + text, cause);
        }
    }
}
