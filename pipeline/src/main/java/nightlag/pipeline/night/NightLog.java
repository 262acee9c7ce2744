package nightlag.pipeline.night;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import org.apache.logging.log4j.Level;
import org.apache.logging.log4j.LogManager;
import org.apache.logging.log4j.core.LoggerContext;
import org.apache.logging.log4j.core.appender.OutputStreamAppender;
import org.apache.logging.log4j.core.config.Configuration;
import org.apache.logging.log4j.core.layout.PatternLayout;

/** Sends what the night has to say to its own log file as well, until closed. */
final class NightLog implements AutoCloseable {
    private static final String NAME = "night";

    private final LoggerContext context;
    private final OutputStreamAppender appender;

    private NightLog(LoggerContext context, OutputStreamAppender appender) {
        this.context = context;
        this.appender = appender;
    }

    /** Opens {@code night.log} in the night's folder. */
    static NightLog open(Path nightFolder) throws IOException {
        LoggerContext context = (LoggerContext) LogManager.getContext(false);
        Configuration configuration = context.getConfiguration();
        // a stream of our own: the appender for files takes the name through the platform's charset
        OutputStreamAppender appender = OutputStreamAppender.newBuilder()
                .setName(NAME)
                .setConfiguration(configuration)
                .setTarget(Files.newOutputStream(nightFolder.resolve("night.log")))
                .setLayout(PatternLayout.newBuilder()
                        .setConfiguration(configuration)
                        .setCharset(StandardCharsets.UTF_8)
                        .setPattern("%d{HH:mm:ss} %-5level %replace{%msg}{[\\r\\n]+}{ | }%n%throwable")
                        .build())
                .build();
        appender.start();
        configuration.getRootLogger().addAppender(appender, Level.INFO, null);
        context.updateLoggers();
        return new NightLog(context, appender);
    }

    /** Writes the first line. */
    void info(String line) {
        context.getLogger(NightLog.class).info(line);
    }

    @Override
    public void close() {
        context.getConfiguration().getRootLogger().removeAppender(NAME);
        context.updateLoggers();
        appender.stop();
    }
}
