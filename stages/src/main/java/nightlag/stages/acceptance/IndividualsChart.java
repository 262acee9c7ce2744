package nightlag.stages.acceptance;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * An individuals chart with moving ranges of two (ISO 7870-2:2023, Shewhart control charts): control limits are mean ± 3 σ
 * with σ estimated as the mean moving range over d₂ = 1.128, so mean ± 2.66 mean moving ranges. The limits a value is held
 * against are those of the values before it; it does not move them itself.
 */
public final class IndividualsChart {
    /** With fewer earlier values there are no limits. */
    public static final int FEWEST = 8;

    /** 3/d₂ with d₂ = 1.128 for ranges of two. */
    static final double FACTOR = 2.66;

    /** So many earlier lots are kept with a trend, to be shown. */
    private static final int MOST_SHOWN = 60;

    private final LimitPlan limit;
    private final List<Trend.LotValue> values = new ArrayList<>();
    private double sum;
    private double ranges;

    /** An empty chart of the values held against a limit. */
    public IndividualsChart(LimitPlan limit) {
        this.limit = limit;
    }

    /**
     * Puts the next lot on the chart.
     *
     * @param lot its name
     * @param value its value, in the limit's unit, K for a temperature
     * @return where it stands among those before it; empty where these are too few
     */
    public Optional<Trend> next(String lot, double value) {
        Optional<Trend> trend = values.size() < FEWEST ? Optional.empty() : Optional.of(among(value));
        // about the first one, so that no digits are lost
        if (!values.isEmpty()) {
            sum += value - values.get(0).value();
            ranges += Math.abs(value - values.get(values.size() - 1).value());
        }
        values.add(new Trend.LotValue(lot, value));
        return trend;
    }

    private Trend among(double value) {
        int n = values.size();
        double mean = values.get(0).value() + sum / n;
        double half = FACTOR * ranges / (n - 1);
        return new Trend(
                limit, value, mean, mean - half, mean + half, n, values.subList(Math.max(0, n - MOST_SHOWN), n));
    }
}
