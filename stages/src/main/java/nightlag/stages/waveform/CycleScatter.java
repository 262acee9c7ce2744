package nightlag.stages.waveform;

import nightlag.stages.numeric.VarianceRatio;

/**
 * The uncertainty of load / deformation told twice: from the noise beside the fundamental, and from how the ratio scatters
 * from one stretch of whole cycles to the next about a straight line. Both are relative standard uncertainties of one part
 * (real or imaginary) of the ratio over the whole record. What varies slowly stands beside the fundamental and is in both;
 * what comes and goes from cycle to cycle is only in the scatter.
 *
 * @param noiseU from the noise
 * @param noiseFreedom its degrees of freedom
 * @param cyclesU from the scatter
 * @param cyclesFreedom its degrees of freedom
 */
public record CycleScatter(double noiseU, double noiseFreedom, double cyclesU, double cyclesFreedom) {
    /** The scatter's uncertainty over the noise's. */
    public double ratio() {
        return cyclesU / noiseU;
    }

    /** How often noise alone makes so large a ratio or a larger one. */
    public double chance() {
        double ratio = ratio();
        return cyclesU == 0 ? 1 : VarianceRatio.chanceOfMore(ratio * ratio, cyclesFreedom, noiseFreedom);
    }

    /** Weighted squares of the values about their weighted straight line over the places. */
    static double squaresAboutALine(double[] places, double[] weights, double[] values) {
        double sum = 0;
        double middle = 0;
        double mean = 0;
        for (int i = 0; i < values.length; i++) {
            sum += weights[i];
            middle += weights[i] * places[i];
            mean += weights[i] * values[i];
        }
        middle /= sum;
        mean /= sum;
        double spread = 0;
        double slope = 0;
        for (int i = 0; i < values.length; i++) {
            spread += weights[i] * (places[i] - middle) * (places[i] - middle);
            slope += weights[i] * (places[i] - middle) * values[i];
        }
        slope /= spread;
        double squares = 0;
        for (int i = 0; i < values.length; i++) {
            double off = values[i] - mean - slope * (places[i] - middle);
            squares += weights[i] * off * off;
        }
        return squares;
    }
}
