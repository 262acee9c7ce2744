package nightlag.pipeline.config;

import java.nio.file.Path;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;

/** Reads a night file and everything it leads to. */
public final class ConfigurationReader {
    private ConfigurationReader() {}

    /**
     * Reads and checks the night file, every instrument file in use and every grade file.
     *
     * @param nightFile the night file
     * @throws ConfigurationException if the night file or an instrument file in use is wrong; all problems of all files,
     *     grade files included, are in it
     */
    public static Configuration read(Path nightFile) throws ConfigurationException {
        Path absolute = nightFile.toAbsolutePath().normalize();
        Path folder = absolute.getParent() == null ? absolute : absolute.getParent();
        FileNames names = new FileNames(folder);
        TomlFile toml = TomlFile.read(absolute, names.name(absolute));
        Problems problems = new Problems(!toml.whole());
        NightReader reader = new NightReader(folder, names, toml, problems);
        NightReader.Night night = reader.read();
        GradeFolder grades =
                night.grades().map(path -> GradeFolder.read(path, names)).orElseGet(GradeFolder::empty);
        if (!problems.isEmpty() || !reader.instrumentProblems().isEmpty()) {
            List<Problem> all = new ArrayList<>(problems.inOrder());
            all.addAll(reader.instrumentProblems());
            all.addAll(grades.problems());
            throw new ConfigurationException(all);
        }
        int workers = night.workers().orElseThrow();
        return new Configuration(
                absolute,
                night.results().orElseThrow(),
                workers == 0 ? Runtime.getRuntime().availableProcessors() : workers,
                Duration.ofNanos(Math.round(night.settleS().orElseThrow() * 1e9)),
                night.intakes(),
                night.teamSheet(),
                night.keepNights(),
                grades.right(),
                grades.wrong(),
                grades.problems(),
                reader.notActedOn());
    }
}
