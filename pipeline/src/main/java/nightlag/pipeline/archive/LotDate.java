package nightlag.pipeline.archive;

import java.time.LocalDate;
import java.time.format.DateTimeFormatter;
import java.time.format.DateTimeParseException;
import java.time.format.ResolverStyle;
import java.util.Collection;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalLong;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * The date in the tag {@code made}: {@code 2026-03-01}, {@code 2026/03/01}, {@code 20260301} or {@code 1.3.2026}; a time behind it
 * is left out. A date with strokes that begins with the day or the month is not read, as nobody can tell which.
 */
final class LotDate {
    private static final Pattern DATE_THEN_TIME = Pattern.compile("(\\S+?)(?:[T\\s].*)?");

    private static final List<DateTimeFormatter> FORMS =
            List.of(form("uuuu-M-d"), form("uuuu/M/d"), form("uuuuMMdd"), form("d.M.uuuu"));

    private LotDate() {}

    private static DateTimeFormatter form(String pattern) {
        return DateTimeFormatter.ofPattern(pattern, Locale.ROOT).withResolverStyle(ResolverStyle.STRICT);
    }

    /** The date; empty where the text is none. */
    static Optional<LocalDate> of(String made) {
        Matcher matcher = DATE_THEN_TIME.matcher(made.strip());
        if (!matcher.matches()) {
            return Optional.empty();
        }
        return FORMS.stream()
                .flatMap(form -> parsed(matcher.group(1), form).stream())
                .findFirst();
    }

    private static Optional<LocalDate> parsed(String text, DateTimeFormatter form) {
        try {
            return Optional.of(LocalDate.parse(text, form));
        } catch (DateTimeParseException ofAnotherForm) {
            return Optional.empty();
        }
    }

    /** The earliest of several as days since 1970-01-01; empty where none can be read. */
    static OptionalLong earliestDay(Collection<String> made) {
        return made.stream()
                .flatMap(text -> of(text).stream())
                .mapToLong(LocalDate::toEpochDay)
                .min();
    }
}
