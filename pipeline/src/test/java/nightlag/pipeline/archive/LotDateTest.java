package nightlag.pipeline.archive;

import static org.assertj.core.api.Assertions.assertThat;

import java.time.LocalDate;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class LotDateTest {
    @ParameterizedTest(name = "{0}")
    @ValueSource(
            strings = {
                "2026-03-01",
                "2026-3-1",
                "2026/03/01",
                "20260301",
                "01.03.2026",
                "1.3.2026",
                " 2026-03-01 ",
                "2026-03-01T06:30:00",
                "01.03.2026 06:30"
            })
    void formsThatReadOneWay(String made) {
        assertThat(LotDate.of(made)).hasValue(LocalDate.of(2026, 3, 1));
    }

    @ParameterizedTest(name = "\"{0}\"")
    @ValueSource(strings = {"", "03/01/2026", "1/3/2026", "2026-02-30", "week 9", "1.3.26", "2026"})
    void whatIsNoDateOrReadsTwoWaysIsNone(String made) {
        assertThat(LotDate.of(made)).isEmpty();
    }

    @Test
    void theEarliestDateOfALotCounts() {
        assertThat(LotDate.earliestDay(List.of("2.3.2026", "soon", "28.2.2026")))
                .hasValue(LocalDate.of(2026, 2, 28).toEpochDay());
        assertThat(LotDate.earliestDay(List.of("soon"))).isEmpty();
    }
}
