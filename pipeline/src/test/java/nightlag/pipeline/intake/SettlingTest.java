package nightlag.pipeline.intake;

import static org.assertj.core.api.Assertions.assertThat;

import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import nightlag.pipeline.config.FileFormat;
import nightlag.pipeline.config.Instrument;
import nightlag.pipeline.config.Intake;
import nightlag.pipeline.config.Layout;
import nightlag.pipeline.config.RecordFormat;
import nightlag.stages.geometry.Corrections;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class SettlingTest {
    private static final long NOW = 1_700_000_000_000L;

    @ParameterizedTest(name = "changed {0} ms ago, settle {1} s: {2}")
    @CsvSource({
        "0, 0, true",
        "59999, 60, false",
        "60000, 60, true",
        "0, 60, false",
        // a clock that was wrong must not keep a file waiting
        "-1, 60, true",
        "-86400000, 60, true"
    })
    void aFileWaitsUntilItHasBeenLeftAlone(long agoMillis, long settleSeconds, boolean settled) {
        RawFile file = new RawFile(intake(), "a.csv", 4, NOW - agoMillis);
        assertThat(Settling.settled(file, NOW, Duration.ofSeconds(settleSeconds)))
                .isEqualTo(settled);
    }

    private static Intake intake() {
        FileFormat format = new FileFormat(
                "*.csv",
                StandardCharsets.UTF_8,
                ';',
                ',',
                new FileFormat.Header.Line(1),
                false,
                Optional.empty(),
                Optional.empty());
        Instrument instrument = new Instrument(
                "bench",
                "An invented bench",
                format,
                new RecordFormat(Layout.SINGLE, 6, 3, List.of(), 10),
                Map.of(),
                Map.of(),
                Corrections.none(),
                Map.of(),
                Map.of(),
                Optional.empty(),
                "fingerprint");
        return new Intake(Path.of("bench"), "bench", instrument);
    }
}
