package nightlag.pipeline.cli;

import java.io.PrintWriter;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import nightlag.pipeline.config.Configuration;

/** Says in a line each which sections are read and checked but not acted on yet. */
final class NotActedOn {
    private NotActedOn() {}

    static void print(Configuration configuration, PrintWriter out) {
        configuration.notActedOn().forEach(out::println);
        Map<String, List<String>> grades = new LinkedHashMap<>();
        new TreeMap<>(configuration.grades())
                .forEach((name, grade) -> grade.notActedOn()
                        .forEach(line -> grades.computeIfAbsent(line, any -> new ArrayList<>())
                                .add(name)));
        grades.forEach((line, names) -> out.println(line + " (" + String.join(", ", names) + ")"));
    }
}
