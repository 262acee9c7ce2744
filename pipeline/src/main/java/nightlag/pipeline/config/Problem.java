package nightlag.pipeline.config;

/**
 * One thing wrong with a file a person wrote or an instrument left: where it stands, what was found, what is allowed.
 *
 * @param file the file, as the person would name it
 * @param line line from 1; 0: the file as a whole
 * @param place the key, or the column of a raw file; empty text where neither applies
 * @param found what was found, as a clause
 * @param allowed what is allowed or expected, as a clause; empty text where that goes without saying
 */
public record Problem(String file, int line, String place, String found, String allowed) {
    /** The one line a person reads. */
    public String sentence() {
        StringBuilder text = new StringBuilder(file);
        if (line > 0) {
            text.append(", line ").append(line);
        }
        if (!place.isEmpty()) {
            text.append(", ").append(place);
        }
        text.append(": ").append(found);
        if (!allowed.isEmpty()) {
            text.append("; expected ").append(allowed);
        }
        return text.toString();
    }
}
