package nightlag.pipeline.night;

import java.util.Collection;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Collectors;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.Fingerprints;
import nightlag.pipeline.config.Grade;
import nightlag.pipeline.config.Instrument;
import nightlag.pipeline.config.Problem;

/**
 * What decides about a file besides its content, as text that the archive keeps: one line for program, instrument and
 * run-sheet row, then a line for each grade the file holds. The grades stand in it by name, so that a later night can
 * tell whether it still holds without decoding the file.
 */
final class ReductionState {
    /** Never current: a file that carries it is looked at again the next night. */
    static final String TRY_AGAIN = "";

    private static final String NEW_LINE = "\n";

    private ReductionState() {}

    /** The state of a file that holds these grades. */
    static String of(
            String version,
            Instrument instrument,
            String runSheetDigest,
            Collection<String> grades,
            Configuration configuration) {
        Map<String, String> states = new TreeMap<>();
        for (String grade : grades) {
            states.put(grade, gradeState(grade, configuration));
        }
        return Fingerprints.of(version, instrument.fingerprint(), runSheetDigest)
                + states.entrySet().stream()
                        .map(entry -> NEW_LINE + entry.getValue() + " " + entry.getKey())
                        .collect(Collectors.joining());
    }

    /** Whether a state from the archive is what the configuration would give today. */
    static boolean isCurrent(
            String archived,
            String version,
            Instrument instrument,
            String runSheetDigest,
            Configuration configuration) {
        if (archived.equals(TRY_AGAIN)) {
            return false;
        }
        return archived.equals(of(
                version,
                instrument,
                runSheetDigest,
                archived.lines()
                        .skip(1)
                        .map(line -> line.substring(line.indexOf(' ') + 1))
                        .toList(),
                configuration));
    }

    private static String gradeState(String grade, Configuration configuration) {
        Grade right = configuration.grades().get(grade);
        if (right != null) {
            return right.reductionFingerprint();
        }
        if (configuration.wrongGrades().containsKey(grade)) {
            return "wrong-"
                    + Fingerprints.of(configuration.wrongGrades().get(grade).stream()
                            .map(Problem::sentence)
                            .toArray());
        }
        return "absent";
    }
}
