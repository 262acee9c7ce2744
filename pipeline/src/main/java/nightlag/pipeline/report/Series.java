package nightlag.pipeline.report;

import java.util.ArrayList;
import java.util.List;
import java.util.function.ToDoubleFunction;

/**
 * Points of a chart that belong together.
 *
 * @param name what they are, as the legend says it
 * @param look which colour and shape, counted from 0; two series of one look differ by their filling
 * @param filled whether the shapes are filled
 * @param joined whether a line joins them in the order given
 * @param x along the horizontal axis
 * @param y along the vertical axis
 * @param low lower end of the band about each point; empty where there is no band
 * @param high upper end of it
 */
record Series(
        String name,
        int look,
        boolean filled,
        boolean joined,
        List<Double> x,
        List<Double> y,
        List<Double> low,
        List<Double> high) {
    /** More points than this are more than a chart shows. */
    static final int MOST_POINTS = 1000;

    /** Copies the lists. */
    Series {
        x = List.copyOf(x);
        y = List.copyOf(y);
        low = List.copyOf(low);
        high = List.copyOf(high);
    }

    /**
     * A series of items; of many every so manyeth is taken, and what is not finite is left out.
     */
    static <T> Series of(
            String name,
            int look,
            boolean filled,
            boolean joined,
            List<T> items,
            ToDoubleFunction<T> horizontal,
            ToDoubleFunction<T> vertical) {
        int step = 1 + (items.size() - 1) / MOST_POINTS;
        List<Double> x = new ArrayList<>();
        List<Double> y = new ArrayList<>();
        for (int i = 0; i < items.size(); i += step) {
            double across = horizontal.applyAsDouble(items.get(i));
            double up = vertical.applyAsDouble(items.get(i));
            if (Double.isFinite(across) && Double.isFinite(up)) {
                x.add(across);
                y.add(up);
            }
        }
        return new Series(name, look, filled, joined, x, y, List.of(), List.of());
    }

    /** A line with the band its values lie in; all finite and few enough to be shown. */
    static <T> Series withBand(
            String name,
            int look,
            List<T> items,
            ToDoubleFunction<T> horizontal,
            ToDoubleFunction<T> vertical,
            ToDoubleFunction<T> low,
            ToDoubleFunction<T> high) {
        return new Series(
                name,
                look,
                false,
                true,
                each(items, horizontal),
                each(items, vertical),
                each(items, low),
                each(items, high));
    }

    private static <T> List<Double> each(List<T> items, ToDoubleFunction<T> figure) {
        return items.stream().mapToDouble(figure).boxed().toList();
    }
}
