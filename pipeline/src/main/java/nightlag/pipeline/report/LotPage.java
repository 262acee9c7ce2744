package nightlag.pipeline.report;

import java.util.List;

/**
 * One lot's part of the page.
 *
 * @param anchor its place on the page
 * @param grade grade
 * @param lot lot
 * @param points how many points, by quality, in words
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
        List<Figure> figures,
        List<String> notes,
        List<String> absent,
        String charts) {
    /** Copies the lists. */
    public LotPage {
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
}
