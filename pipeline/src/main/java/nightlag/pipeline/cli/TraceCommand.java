package nightlag.pipeline.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import nightlag.pipeline.config.Configuration;
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
    @Spec
    private CommandSpec spec;

    @Parameters(
            arity = "1..2",
            paramLabel = "[NIGHT.toml] FILE",
            hideParamSyntax = true,
            description = "The night file (" + NightFile.DEFAULT
                    + ") and the raw file: a path to it, or its name in tables, such"
                    + " as melt-bench/L17/1/180C.csv.")
    private List<String> names;

    @Option(names = "--point", paramLabel = "P", description = "The point to follow (the first).")
    private String point;

    @Override
    public Integer call() {
        Path nightFile = Path.of(names.size() == 2 ? names.get(0) : NightFile.DEFAULT);
        return NightFile.read(nightFile, spec.commandLine().getErr(), this::trace);
    }

    private int trace(Configuration configuration) throws NightFault {
        FileTrace trace = FileTrace.of(configuration, names.get(names.size() - 1), Optional.ofNullable(point));
        PrintWriter out = spec.commandLine().getOut();
        new TracePage(trace).lines().forEach(out::println);
        return trace.problem().isEmpty() ? Nightlag.ALL_WELL : Nightlag.SOMETHING_LEFT;
    }
}
