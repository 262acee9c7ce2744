package nightlag.pipeline.cli;

import java.io.Console;
import java.io.PrintWriter;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.util.Optional;
import nightlag.pipeline.night.ProgramVersion;
import picocli.CommandLine;
import picocli.CommandLine.Command;
import picocli.CommandLine.HelpCommand;
import picocli.CommandLine.IVersionProvider;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Spec;

/** The command line as a whole. */
@Command(
        name = "nightlag",
        description = "Reduces a polymer lab's raw oscillation records to moduli, spectra and tidy tables.",
        mixinStandardHelpOptions = true,
        versionProvider = Nightlag.Version.class,
        subcommands = {RunCommand.class, CheckCommand.class, TraceCommand.class, HelpCommand.class})
public final class Nightlag implements Runnable {
    /** All went well. */
    static final int ALL_WELL = 0;

    /** Finished, but something was set aside, could not be read or could not be concluded. */
    static final int SOMETHING_LEFT = 1;

    /** The command line or the configuration is wrong: nothing was touched. */
    static final int CANNOT_BEGIN = 2;

    /** Stopped by a fault: what was done is kept. */
    static final int STOPPED = 3;

    @Spec
    private CommandSpec spec;

    /** Starts the program; the only place that ends the process. */
    public static void main(String[] args) {
        // a Windows console has a code page of its own
        Charset charset =
                Optional.ofNullable(System.console()).map(Console::charset).orElse(StandardCharsets.UTF_8);
        System.exit(
                execute(new PrintWriter(System.out, true, charset), new PrintWriter(System.err, true, charset), args));
    }

    /** Runs one command line against these streams and returns its exit code. */
    static int execute(PrintWriter out, PrintWriter err, String... args) {
        return new CommandLine(new Nightlag())
                .setOut(out)
                .setErr(err)
                .setExpandAtFiles(false)
                .setExecutionExceptionHandler((fault, command, parsed) -> {
                    err.println("nightlag: stopped by an internal fault: " + fault);
                    fault.printStackTrace(err);
                    return STOPPED;
                })
                .execute(args);
    }

    @Override
    public void run() {
        throw new CommandLine.ParameterException(spec.commandLine(), "say what to do: run, check or trace");
    }

    /** The version from the build. */
    static final class Version implements IVersionProvider {
        @Override
        public String[] getVersion() {
            return new String[] {"nightlag " + ProgramVersion.get()};
        }
    }
}
