package nightlag.pipeline.report;

import java.util.List;

/**
 * One chart of the page.
 *
 * @param title what it is
 * @param caption what is to be seen in it, in a sentence or two
 * @param x horizontal axis
 * @param y vertical axis
 * @param series what is drawn
 */
record Chart(String title, String caption, Axis x, Axis y, List<Series> series) {
    /** Copies the list. */
    Chart {
        series = List.copyOf(series);
    }

    /** Whether there is anything to draw. */
    boolean hasPoints() {
        return series.stream().anyMatch(one -> !one.x().isEmpty());
    }
}
