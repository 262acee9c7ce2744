package nightlag.pipeline.cli;

import java.io.Console;
import java.io.PrintWriter;
import java.util.Locale;
import java.util.Optional;
import me.tongfei.progressbar.ProgressBar;
import me.tongfei.progressbar.ProgressBarBuilder;
import nightlag.pipeline.night.Progress;

/** Shows how far the night has come: a bar on a terminal, a line a minute elsewhere. */
final class ConsoleProgress {
    private static final long LINE_EVERY_NANOS = 60_000_000_000L;

    private ConsoleProgress() {}

    static Progress forThisConsole(PrintWriter err) {
        return Optional.ofNullable(System.console())
                        .filter(ConsoleProgress::isTerminal)
                        .isPresent()
                ? new Bar()
                : new Lines(err);
    }

    /** From Java 22 on there is a console without a terminal too, and a method that tells. */
    private static boolean isTerminal(Console console) {
        try {
            return (boolean) Console.class.getMethod("isTerminal").invoke(console);
        } catch (NoSuchMethodException olderJava) {
            return true;
        } catch (ReflectiveOperationException cannotTell) {
            return false;
        }
    }

    /** A bar with files done, rate and time left. */
    private static final class Bar implements Progress {
        private ProgressBar bar;

        @Override
        public void begin(int files) {
            if (files > 0) {
                bar = new ProgressBarBuilder()
                        .setTaskName("files")
                        .setInitialMax(files)
                        .showSpeed()
                        .build();
            }
        }

        @Override
        public void fileDone() {
            bar.step();
        }

        @Override
        public void end() {
            if (bar != null) {
                bar.close();
            }
        }
    }

    /** One line a minute, for a log or a scheduler's mail. */
    private static final class Lines implements Progress {
        private final PrintWriter err;
        private final long start = System.nanoTime();
        private long lastLine = start;
        private int files;
        private int done;

        Lines(PrintWriter err) {
            this.err = err;
        }

        @Override
        public void begin(int count) {
            files = count;
        }

        @Override
        public void fileDone() {
            done++;
            long now = System.nanoTime();
            if (now - lastLine >= LINE_EVERY_NANOS) {
                lastLine = now;
                double seconds = (now - start) / 1e9;
                double rate = done / seconds;
                err.println(String.format(
                        Locale.ROOT,
                        "%d of %d files, %.1f files/s, %.0f s left",
                        done,
                        files,
                        rate,
                        (files - done) / rate));
            }
        }

        @Override
        public void end() {}
    }
}
