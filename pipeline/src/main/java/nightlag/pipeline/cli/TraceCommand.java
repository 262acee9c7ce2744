package nightlag.pipeline.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.ConfigurationException;
import nightlag.pipeline.config.ConfigurationReader;
import nightlag.pipeline.night.FileTrace;
import nightlag.pipeline.night.NightFault;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** {@code trace}: one raw file through the stages. */
@Command(
        name = "trace",
        description = {
            "Takes one raw file through the stages up to its flags, shows what each stage was given, did and found, and names"
                    + " the lot its points would join. Writes nothing.",
            "The archive is not asked: a run sets the file aside if its lot differs only in case from one already known."
        },
        mixinStandardHelpOptions = true,
        versionProvider = Nightlag.Version.class,
        customSynopsis = "nightlag trace [-hV] [--point=P] [NIGHT.toml] FILE",
        exitCodeListHeading = "%nExit codes:%n",
        exitCodeList = {
            "0:the file reduces, whatever its flags",
            "1:a run would set the file aside; the reason is shown",
            "2:the command line or the configuration is wrong, or the file is in none of the intakes"
        })
final class TraceCommand implements Callable<Integer> {
    private static final String DEFAULT_NIGHT = "config/night.toml";

    @Spec
    private CommandSpec spec;

    @Parameters(
            arity = "1..2",
            paramLabel = "[NIGHT.toml] FILE",
            hideParamSyntax = true,
            description =
                    "The night file (" + DEFAULT_NIGHT + ") and the raw file: a path to it, or its name in tables, such"
                            + " as melt-bench/L17/1/180C.csv.")
    private List<String> names;

    @Option(names = "--point", paramLabel = "P", description = "The point to follow (the first).")
    private String point;

    @Override
    public Integer call() {
        PrintWriter out = spec.commandLine().getOut();
        PrintWriter err = spec.commandLine().getErr();
        try {
            Path nightFile = Path.of(names.size() == 2 ? names.get(0) : DEFAULT_NIGHT);
            Configuration configuration = ConfigurationReader.read(nightFile);
            FileTrace trace = FileTrace.of(configuration, names.get(names.size() - 1), Optional.ofNullable(point));
            new TracePage(trace).lines().forEach(out::println);
            return trace.problem().isEmpty() ? Nightlag.ALL_WELL : Nightlag.SOMETHING_LEFT;
        } catch (ConfigurationException e) {
            e.problems().forEach(problem -> err.println(problem.sentence()));
            return Nightlag.CANNOT_BEGIN;
        } catch (NightFault e) {
            err.println("nightlag: " + e.getMessage());
            return e.kind() == NightFault.Kind.CANNOT_BEGIN ? Nightlag.CANNOT_BEGIN : Nightlag.STOPPED;
        }
    }
}
