package nightlag.pipeline.config;

import java.nio.file.Path;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalInt;

/**
 * A night's whole configuration: night and instrument files are right, grade files may be wrong.
 *
 * @param nightFile the night file
 * @param results everything a run writes goes below this
 * @param workers records reduced side by side, at least 1
 * @param settle a file changed less than this ago waits
 * @param intakes the folders raw files come in by, in the order of the night file
 * @param teamSheet the team's spreadsheet
 * @param keepNights how many folders of nights are kept; empty: all
 * @param grades right grades by name
 * @param wrongGrades problems of wrong grade files, by the grade's name
 * @param gradeProblems every problem of every grade file, those whose grade is not even known included, in file order
 * @param notActedOn what of instrument files is read and checked but not acted on, because the layout has no use for it
 */
public record Configuration(
        Path nightFile,
        Path results,
        int workers,
        Duration settle,
        List<Intake> intakes,
        Optional<TeamSheet> teamSheet,
        OptionalInt keepNights,
        Map<String, Grade> grades,
        Map<String, List<Problem>> wrongGrades,
        List<Problem> gradeProblems,
        List<String> notActedOn) {
    /** Copies the collections. */
    public Configuration {
        intakes = List.copyOf(intakes);
        grades = Map.copyOf(grades);
        wrongGrades = Map.copyOf(wrongGrades);
        gradeProblems = List.copyOf(gradeProblems);
        notActedOn = List.copyOf(notActedOn);
    }
}
