package nightlag.pipeline.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.time.Clock;
import java.time.ZoneId;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import java.util.stream.Collectors;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.Intake;
import nightlag.pipeline.decode.FileDescription;
import nightlag.pipeline.decode.FileDescription.DescribedChannel;
import nightlag.pipeline.decode.FileDescription.DescribedTag;
import nightlag.pipeline.intake.RawFile;
import nightlag.pipeline.night.NightFault;
import nightlag.pipeline.night.Preview;
import nightlag.pipeline.night.Preview.FirstFile;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code check}: the configuration, and what the next run would do. */
@Command(
        name = "check",
        description = {
            "Reads and checks the whole configuration, lists what the next run would take up, and shows how the first file of"
                    + " each intake decodes. Writes nothing."
        },
        mixinStandardHelpOptions = true,
        versionProvider = Nightlag.Version.class,
        exitCodeListHeading = "%nExit codes:%n",
        exitCodeList = {"0:the configuration is right", "2:something in the configuration is wrong; all of it is listed"
        })
final class CheckCommand implements Callable<Integer> {
    /** Of so many files the names show; a first night takes up thousands. */
    private static final int MOST_LISTED = 10;

    @Spec
    private CommandSpec spec;

    @Parameters(
            index = "0",
            arity = "0..1",
            paramLabel = "NIGHT.toml",
            defaultValue = NightFile.DEFAULT,
            description = "The night file (${DEFAULT-VALUE}).")
    private Path nightFile;

    @Override
    public Integer call() {
        PrintWriter err = spec.commandLine().getErr();
        return NightFile.read(
                nightFile,
                err,
                configuration -> check(configuration, spec.commandLine().getOut(), err));
    }

    private static int check(Configuration configuration, PrintWriter out, PrintWriter err) throws NightFault {
        print(configuration, out);
        Preview preview = Preview.of(configuration, Clock.system(ZoneId.systemDefault()));
        print(preview, out);
        configuration.gradeProblems().forEach(problem -> err.println(problem.sentence()));
        boolean right = configuration.gradeProblems().isEmpty() && preview.someIntakeReadable();
        return right ? Nightlag.ALL_WELL : Nightlag.CANNOT_BEGIN;
    }

    private static void print(Configuration configuration, PrintWriter out) {
        out.println(
                "grades    " + configuration.grades().keySet().stream().sorted().collect(Collectors.joining(", ")));
        NotActedOn.print(configuration, out);
    }

    private static void print(Preview preview, PrintWriter out) {
        int files = preview.toLookAt().size();
        int again = preview.again().size();
        out.println("next run  takes up " + files + (files == 1 ? " file" : " files")
                + (again == 0 ? "" : ", looks again at " + again + " set aside")
                + ", waits for "
                + preview.waiting().size() + ", leaves " + preview.left() + " as they are");
        list(out, "takes up", preview.toLookAt());
        list(out, "looks again at", preview.again());
        list(out, "waits for", preview.waiting());
        preview.unreadable().forEach(line -> out.println("cannot be read: " + line));
        preview.firstFiles().forEach((intake, first) -> print(out, intake, first));
        List<String> problems = preview.firstFiles().values().stream()
                .flatMap(Optional::stream)
                .map(FirstFile::problem)
                .filter(problem -> !problem.isEmpty())
                .toList();
        if (!problems.isEmpty()) {
            out.println();
            out.println("look at: first files that would be set aside (" + problems.size() + ")");
            problems.forEach(problem -> out.println("  " + problem));
        }
    }

    private static void list(PrintWriter out, String heading, List<RawFile> files) {
        files.stream().limit(MOST_LISTED).forEach(file -> out.println("  " + heading + " " + file.tableName()));
        if (files.size() > MOST_LISTED) {
            out.println("  " + heading + " " + (files.size() - MOST_LISTED) + " more");
        }
    }

    private static void print(PrintWriter out, Intake intake, Optional<FirstFile> first) {
        out.println();
        out.println("intake " + intake.folder() + ", instrument "
                + intake.instrument().name());
        if (first.isEmpty()) {
            out.println("  no file matches " + intake.instrument().files().match());
            return;
        }
        first.get().description().ifPresent(description -> print(out, description));
        if (!first.get().problem().isEmpty()) {
            out.println("  would be set aside: " + first.get().problem());
        }
    }

    private static void print(PrintWriter out, FileDescription file) {
        out.println("  " + file.file() + ": " + DecodingWords.head(file));
        for (DescribedChannel channel : file.channels()) {
            out.println("  " + channel.name().word() + " from " + DecodingWords.channel(channel));
        }
        for (DescribedTag tag : file.tags()) {
            out.println("  " + tag.name().word() + " = " + tag.text()
                    + tag.value().map(value -> " = " + value).orElse("") + " from " + tag.from());
        }
    }
}
