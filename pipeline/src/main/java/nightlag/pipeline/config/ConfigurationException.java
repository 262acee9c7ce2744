package nightlag.pipeline.config;

import java.util.List;
import java.util.stream.Collectors;

/** The night file or an instrument file in use is wrong; all problems of all files are in it. */
public final class ConfigurationException extends Exception {
    private static final long serialVersionUID = 1L;

    private final transient List<Problem> problems;

    /** All problems found, in the order of files and lines. */
    public ConfigurationException(List<Problem> problems) {
        super(problems.stream().map(Problem::sentence).collect(Collectors.joining(System.lineSeparator())));
        this.problems = List.copyOf(problems);
    }

    /** All problems found. */
    public List<Problem> problems() {
        return problems;
    }
}
