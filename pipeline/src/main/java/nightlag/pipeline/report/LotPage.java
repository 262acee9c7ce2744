package nightlag.pipeline.report;

import java.util.List;

/**
 * One lot's part of the page.
 *
 * @param anchor its place on the page
 * @param grade grade
 * @param lot lot
 * @param points how many points, by quality, in words
 * @param limits its verdicts
 * @param figures its markers
 * @param notes what could not be had, and why
 * @param absent figures the data do not support, and why
 * @param charts its charts, as data for the page's script
 */
public record LotPage(
        String anchor,
        String grade,
        String lot,
        String points,
        List<Limit> limits,
        List<Figure> figures,
        List<String> notes,
        List<String> absent,
        String charts) {
    /** Copies the lists. */
    public LotPage {
        limits = List.copyOf(limits);
        figures = List.copyOf(figures);
        notes = List.copyOf(notes);
        absent = List.copyOf(absent);
    }

    /**
     * A marker in words.
     *
     * @param property what it is
     * @param where specimen, sweep, temperature and frequency, as far as they mean something
     * @param value the figure with its uncertainty and unit
     * @param method how it was found
     */
    public record Figure(String property, String where, String value, String method) {}

    /**
     * A verdict in words.
     *
     * @param title what the limit is called
     * @param value the lot's value with its uncertainty and unit; empty text where it is missing
     * @param limits the limits
     * @param verdict the verdict; of a trend whether the lot is like those before it
     * @param conforming whether there is nothing to look at
     * @param note how the value was had
     */
    public record Limit(String title, String value, String limits, String verdict, boolean conforming, String note) {}
}
