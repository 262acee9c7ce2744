package nightlag.stages.numeric;

import org.apache.commons.math3.stat.correlation.SpearmansCorrelation;

/** How nearly one figure rises with another, whatever the curve (Spearman's coefficient; Spearman 1904, Am. J. Psychol.). */
public final class RankCorrelation {
    private RankCorrelation() {}

    /**
     * The correlation of the ranks, ties at their mean rank: 1 where the second figure rises throughout with the first, −1
     * where it falls throughout, not a number where either never changes.
     *
     * @param x first figures, two or more
     * @param y second figures, as many
     */
    public static double of(double[] x, double[] y) {
        return new SpearmansCorrelation().correlation(x, y);
    }
}
