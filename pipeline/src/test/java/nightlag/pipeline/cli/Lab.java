package nightlag.pipeline.cli;

import java.io.IOException;
import java.io.PrintWriter;
import java.io.StringWriter;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.attribute.FileTime;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Stream;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVParser;
import org.apache.commons.csv.CSVRecord;

/** A small invented lab in a folder of its own: one bench that writes stress and strain, one grade, and the program itself. */
final class Lab {
    private static final double[] FREQUENCIES_HZ = {0.1, 0.3, 1, 3, 10, 30};

    private final Path root;

    Lab(Path root) {
        this.root = root;
        write("config/night.toml", """
                results = "../results"
                grades = "grades"
                instruments = "instruments"
                workers = 2

                [[intake]]
                folder = "../bench"
                instrument = "bench"
                """);
        write("config/instruments/bench.toml", """
                name = "Bench"

                [files]
                match = "**/*.csv"
                header = "t,"

                [channels]
                time = { column = "t", unit = "s" }
                strain = { column = "strain", unit = "1" }
                stress = { column = "stress", unit = "Pa" }

                [tags]
                grade = { preamble = "grade" }
                lot = { preamble = "lot" }
                temperature = { value = "25 °C" }
                frequency = { preamble = "f", unit = "Hz" }
                """);
        grade("plover", "");
    }

    /** Writes a grade file that asks for a discrete spectrum, with more lines behind it. */
    void grade(String name, String more) {
        write(
                "config/grades/" + name + ".toml",
                "grade = \"" + name + "\"\n[spectrum]\nequilibrium = \"none\"\ncontinuous = false\n" + more);
    }

    /** Leaves a whole frequency sweep of a two-mode liquid in the intake, a file a frequency. */
    void sweep(String grade, String lot) {
        for (int i = 0; i < FREQUENCIES_HZ.length; i++) {
            record("bench/" + lot + "/p" + (i + 1) + ".csv", grade, lot, FREQUENCIES_HZ[i], 1);
        }
    }

    /** Leaves one record of a two-mode liquid, its moduli multiplied by a factor. */
    void record(String file, String grade, String lot, double frequencyHz, double factor) {
        write(file, recordText(grade, lot, frequencyHz, factor));
    }

    static String recordText(String grade, String lot, double frequencyHz, double factor) {
        double omega = 2 * Math.PI * frequencyHz;
        double[] moduli = moduli(omega);
        StringBuilder text = new StringBuilder()
                .append("grade,")
                .append(grade)
                .append('\n')
                .append("lot,")
                .append(lot)
                .append('\n')
                .append("f,")
                .append(frequencyHz)
                .append('\n')
                .append("t,strain,stress\n");
        for (int i = 0; i < 64 * 4; i++) {
            double time = i / (64 * frequencyHz);
            double strain = 0.01 * Math.sin(omega * time);
            double stress = factor * 0.01 * (moduli[0] * Math.sin(omega * time) + moduli[1] * Math.cos(omega * time));
            text.append(time)
                    .append(',')
                    .append(strain)
                    .append(',')
                    .append(stress)
                    .append('\n');
        }
        return text.toString();
    }

    /** G' and G'' in Pa of the liquid: 10 kPa at 0.01 s and 1 kPa at 1 s. */
    static double[] moduli(double omega) {
        double[] strengths = {1e4, 1e3};
        double[] times = {0.01, 1};
        double storage = 0;
        double loss = 0;
        for (int i = 0; i < times.length; i++) {
            double x = omega * times[i];
            storage += strengths[i] * x * x / (1 + x * x);
            loss += strengths[i] * x / (1 + x * x);
        }
        return new double[] {storage, loss};
    }

    Path path(String name) {
        return root.resolve(name);
    }

    void write(String name, String text) {
        try {
            Files.createDirectories(path(name).getParent());
            Files.writeString(path(name), text);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    String read(String name) {
        try {
            return Files.readString(path(name));
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    void delete(String name) {
        try {
            Files.delete(path(name));
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** What a command line printed, and its exit code. */
    record Ended(int exitCode, String out, String err) {}

    /** Runs one night, as a user would. */
    Ended run(String... options) {
        return command("run", options);
    }

    Ended command(String command, String... options) {
        List<String> line =
                new ArrayList<>(List.of(command, path("config/night.toml").toString()));
        line.addAll(Arrays.asList(options));
        StringWriter out = new StringWriter();
        StringWriter err = new StringWriter();
        int exitCode =
                Nightlag.execute(new PrintWriter(out, true), new PrintWriter(err, true), line.toArray(String[]::new));
        return new Ended(exitCode, out.toString(), err.toString());
    }

    /** The rows of a lot's table. */
    List<Map<String, String>> table(String grade, String lot, String table) {
        return rows(path("results/" + grade + "/" + lot + "/" + table + ".csv"));
    }

    /** The rows of the newest night's {@code files.csv}. */
    List<Map<String, String>> files() {
        try (Stream<Path> nights = Files.list(path("results/nights"))) {
            return rows(newest(nights).resolve("files.csv"));
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** The lines of the newest night's log that hold some words. */
    List<String> logLines(String words) {
        try (Stream<Path> nights = Files.list(path("results/nights"))) {
            return Files.readAllLines(newest(nights).resolve("night.log")).stream()
                    .filter(line -> line.contains(words))
                    .toList();
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    private static Path newest(Stream<Path> nights) {
        // names within a second end in -2, -3 …; modified times order them
        return nights.max(java.util.Comparator.comparing(Lab::modified)
                        .thenComparing(night -> night.getFileName().toString().length())
                        .thenComparing(Path::toString))
                .orElseThrow();
    }

    private static FileTime modified(Path path) {
        try {
            return Files.getLastModifiedTime(path);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    private static List<Map<String, String>> rows(Path file) {
        try (CSVParser parser = CSVParser.parse(
                Files.readString(file),
                CSVFormat.RFC4180
                        .builder()
                        .setHeader()
                        .setSkipHeaderRecord(true)
                        .get())) {
            return parser.getRecords().stream().map(CSVRecord::toMap).toList();
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** Every file below the results folder but for the nights, with its modified time and content. */
    Map<String, String> state() {
        return contents(true);
    }

    /** Every table and data package below the results folder, with its content. */
    Map<String, String> tables() {
        return contents(false);
    }

    private Map<String, String> contents(boolean everything) {
        Path results = path("results");
        Map<String, String> state = new TreeMap<>();
        try (Stream<Path> files = Files.walk(results)) {
            for (Path file : files.toList()) {
                String name = results.relativize(file).toString().replace('\\', '/');
                boolean table = name.endsWith(".csv") || name.endsWith(".json");
                if (name.startsWith("nights") || !Files.isRegularFile(file) || (!everything && !table)) {
                    continue;
                }
                String stamp = everything ? modified(file) + " " : "";
                state.put(name, String.format(Locale.ROOT, "%s%s", stamp, hex(Files.readAllBytes(file))));
            }
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        return state;
    }

    private static String hex(byte[] bytes) {
        return java.util.HexFormat.of().formatHex(bytes);
    }
}
