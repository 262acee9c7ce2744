package nightlag.pipeline.teamsheet;

import java.time.LocalDate;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/** Rows for tests: one limit, "damping", and rows of several. */
final class Rows {
    static final LocalDate MARCH_1 = LocalDate.of(2026, 3, 1);
    static final LocalDate MARCH_2 = LocalDate.of(2026, 3, 2);

    private Rows() {}

    static SheetRow row(String lot, SheetValue... values) {
        return new SheetRow("Heron 3", lot, List.of(values));
    }

    static SheetValue damping(double value, String verdict) {
        return new SheetValue("damping", "1", OptionalDouble.of(value), Optional.of(verdict));
    }

    static SheetValue stiffness(double value, String verdict) {
        return new SheetValue("storage_modulus 190 °C 1 Hz", "kPa", OptionalDouble.of(value), Optional.of(verdict));
    }

    static SheetValue missing(String title) {
        return new SheetValue(title, "1", OptionalDouble.empty(), Optional.of("missing"));
    }

    static SheetUpdate update(LocalDate today, SheetRow... due) {
        return new SheetUpdate(Arrays.asList(due), List.of(), today);
    }
}
