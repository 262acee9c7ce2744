package nightlag.pipeline.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.time.Clock;
import java.time.ZoneId;
import java.util.LinkedHashSet;
import java.util.OptionalInt;
import java.util.Set;
import java.util.concurrent.Callable;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.night.Night;
import nightlag.pipeline.night.NightFault;
import nightlag.pipeline.night.NightOutcome;
import nightlag.pipeline.night.Progress;
import nightlag.pipeline.night.RunOptions;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code run}: one night's work. */
@Command(
        name = "run",
        description = {
            "One night's work: takes up settled raw files that are new or changed, reduces them, and rebuilds the tables of"
                    + " every lot they touch."
        },
        mixinStandardHelpOptions = true,
        versionProvider = Nightlag.Version.class,
        exitCodeListHeading = "%nExit codes:%n",
        exitCodeList = {
            "0:all went well; files that wait, and files set aside earlier and not changed since, count as well",
            "1:finished, but files were set aside, an intake could not be read, or a lot could not be concluded; each is named",
            "2:the command line, the night file or an instrument file is wrong, or no intake can be read: nothing was touched",
            "3:stopped by a fault; what was done is kept and the same command carries on"
        })
final class RunCommand implements Callable<Integer> {
    @Spec
    private CommandSpec spec;

    @Parameters(
            index = "0",
            arity = "0..1",
            paramLabel = "NIGHT.toml",
            defaultValue = NightFile.DEFAULT,
            description = "The night file (${DEFAULT-VALUE}).")
    private Path nightFile;

    @Option(names = "--grade", paramLabel = "G", description = "Only this grade; may be given several times.")
    private Set<String> grades = new LinkedHashSet<>();

    @Option(names = "--lot", paramLabel = "L", description = "Only this lot; may be given several times.")
    private Set<String> lots = new LinkedHashSet<>();

    @Option(names = "--redo", description = "Reduce again what is already done.")
    private boolean redo;

    @Option(
            names = "--workers",
            paramLabel = "N",
            description = "Files reduced side by side; takes the place of the night file's.")
    private Integer workers;

    @Option(names = "--quiet", description = "No progress and no summary; warnings and errors still show.")
    private boolean quiet;

    @Override
    public Integer call() {
        if (workers != null && workers < 0) {
            throw new ParameterException(
                    spec.commandLine(), "--workers is " + workers + "; it must be 0 (one per processor) or more");
        }
        return NightFile.read(nightFile, spec.commandLine().getErr(), this::run);
    }

    private int run(Configuration configuration) throws NightFault {
        PrintWriter out = spec.commandLine().getOut();
        if (!quiet) {
            NotActedOn.print(configuration, out);
        }
        Night night = new Night(
                configuration,
                new RunOptions(grades, lots, redo, requestedWorkers()),
                quiet
                        ? Progress.silent()
                        : ConsoleProgress.forThisConsole(spec.commandLine().getErr()),
                Clock.system(ZoneId.systemDefault()));
        NightOutcome outcome = night.run();
        if (!quiet) {
            new Summary(configuration, outcome).print(out);
        }
        return outcome.allWell() ? Nightlag.ALL_WELL : Nightlag.SOMETHING_LEFT;
    }

    private OptionalInt requestedWorkers() {
        if (workers == null) {
            return OptionalInt.empty();
        }
        return OptionalInt.of(workers == 0 ? Runtime.getRuntime().availableProcessors() : workers);
    }
}
