package nightlag.stages.acceptance;

/**
 * A figure at one point.
 *
 * @param isothermK mean temperature of the isotherm the point belongs to, K
 * @param temperatureK the point's own temperature, K
 * @param lnFrequency ln of its frequency in Hz
 * @param value the figure
 * @param variance its u² from the record's own noise; NaN where none is known
 * @param doubtful whether the point is doubtful
 */
record Reading(
        double isothermK, double temperatureK, double lnFrequency, double value, double variance, boolean doubtful) {
    Reading withVariance(double known) {
        return new Reading(isothermK, temperatureK, lnFrequency, value, known, doubtful);
    }
}
