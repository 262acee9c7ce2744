package nightlag.pipeline.night;

import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import org.apache.logging.log4j.Level;
import org.apache.logging.log4j.LogManager;
import org.apache.logging.log4j.core.LoggerContext;
import org.apache.logging.log4j.core.appender.FileAppender;
import org.apache.logging.log4j.core.config.Configuration;
import org.apache.logging.log4j.core.layout.PatternLayout;

/** Sends what the night has to say to its own log file as well, until closed. */
final class NightLog implements AutoCloseable {
    private static final String NAME = "night";

    private final LoggerContext context;
    private final FileAppender appender;

    private NightLog(LoggerContext context, FileAppender appender) {
        this.context = context;
        this.appender = appender;
    }

    /** Opens {@code night.log} in the night's folder. */
    static NightLog open(Path nightFolder) {
        LoggerContext context = (LoggerContext) LogManager.getContext(false);
        Configuration configuration = context.getConfiguration();
        FileAppender appender = FileAppender.newBuilder()
                .setName(NAME)
                .setConfiguration(configuration)
                .setFileName(nightFolder.resolve("night.log").toString())
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
