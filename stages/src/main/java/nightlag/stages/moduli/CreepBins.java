package nightlag.stages.moduli;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * The samples after one step, averaged over stretches of equal length in the logarithm of the time since it. The noise of
 * a stretch is the scatter of its samples about a straight line, taken together with the stretches around it; where
 * neighbouring samples go together, a mean of n samples is worth n (1 − ρ)/(1 + ρ) of them (noise of first order).
 */
final class CreepBins {
    /** Fewer than these would do for any spectrum, whose kernel is broader than a decade. */
    private static final int PER_DECADE = 20;

    private static final int LEAST_FOR_SCATTER = 4;
    private static final int LEAST_FOR_SPIKES = 8;
    private static final double SPIKE = 6;
    private static final double MEDIAN_TO_DEVIATION = 1.4826;
    private static final int ENOUGH_FREEDOM = 30;
    private static final double MOST_CORRELATED = 0.95;

    private final double[] timeS;
    private final double[] strain;
    private final double[] stress;
    private final List<Bin> bins = new ArrayList<>();
    private int spikes;
    private double correlation;

    /**
     * The means over one stretch; {@code spreadS2} is the mean square of the times about theirs, {@code scatter} the sum of squares
     * about its line, with so many degrees of freedom.
     */
    private record Bin(
            int samples,
            double timeS,
            double spreadS2,
            double stressPa,
            double strain,
            double scatter,
            int freedom,
            double products) {}

    /** A mean with the standard uncertainty of its strain. */
    record Mean(double timeS, double stressPa, double strain, double strainU, int samples) {}

    private CreepBins(double[] timeS, double[] strain, double[] stress) {
        this.timeS = timeS;
        this.strain = strain;
        this.stress = stress;
    }

    /** The samples from {@code first} to {@code last}, after a step at {@code atS}. */
    static CreepBins of(double[] timeS, double[] strain, double[] stress, int first, int last, double atS) {
        CreepBins result = new CreepBins(timeS, strain, stress);
        int begin = first;
        while (begin <= last) {
            double stretch = Math.floor(PER_DECADE * Math.log10(timeS[begin] - atS));
            int end = begin;
            while (end < last && Math.floor(PER_DECADE * Math.log10(timeS[end + 1] - atS)) == stretch) {
                end++;
            }
            result.add(begin, end);
            begin = end + 1;
        }
        result.correlate();
        return result;
    }

    /** The means, in the order of time. */
    List<Mean> means() {
        List<Mean> means = new ArrayList<>();
        double worth = (1 - correlation) / (1 + correlation);
        for (int k = 0; k < bins.size(); k++) {
            Bin bin = bins.get(k);
            double deviation = deviationAround(k);
            means.add(new Mean(
                    bin.timeS(),
                    bin.stressPa(),
                    bin.strain() - bin.spreadS2() / 2 * curvature(k),
                    deviation / Math.sqrt(Math.max(1, bin.samples() * worth)),
                    bin.samples()));
        }
        return means;
    }

    /**
     * Second derivative of the strain by time about a mean. The mean of a curve is not its value at the mean time: it is off by half
     * the curvature times the spread of the times.
     */
    private double curvature(int k) {
        if (bins.size() < 3) {
            return 0;
        }
        int middle = Math.max(1, Math.min(bins.size() - 2, k));
        Bin before = bins.get(middle - 1);
        Bin here = bins.get(middle);
        Bin after = bins.get(middle + 1);
        double rising = (here.strain() - before.strain()) / (here.timeS() - before.timeS());
        double further = (after.strain() - here.strain()) / (after.timeS() - here.timeS());
        return 2 * (further - rising) / (after.timeS() - before.timeS());
    }

    /** Isolated spikes left out. */
    int spikes() {
        return spikes;
    }

    /** Correlation of the noise of neighbouring samples, 0 where none is seen. */
    double correlation() {
        return correlation;
    }

    private void add(int begin, int end) {
        int count = end - begin + 1;
        boolean[] out = new boolean[count];
        double[] residuals = residuals(begin, out);
        if (count >= LEAST_FOR_SPIKES) {
            double[] sizes = Arrays.stream(residuals).map(Math::abs).sorted().toArray();
            double limit = SPIKE * MEDIAN_TO_DEVIATION * sizes[count / 2];
            int found = 0;
            for (int i = 0; i < count; i++) {
                out[i] = limit > 0 && Math.abs(residuals[i]) > limit;
                found += out[i] ? 1 : 0;
            }
            if (found > 0 && found <= Math.max(1, count / 20)) {
                spikes += found;
                residuals = residuals(begin, out);
            } else {
                Arrays.fill(out, false);
            }
        }
        int used = 0;
        double[] sums = new double[3];
        double squares = 0;
        double scatter = 0;
        double products = 0;
        for (int i = 0; i < count; i++) {
            if (!out[i]) {
                used++;
                squares += (timeS[begin + i] - timeS[begin]) * (timeS[begin + i] - timeS[begin]);
                sums[0] += timeS[begin + i] - timeS[begin];
                sums[1] += stress[begin + i] - stress[begin];
                sums[2] += strain[begin + i] - strain[begin];
                scatter += residuals[i] * residuals[i];
                products += i > 0 && !out[i - 1] ? residuals[i] * residuals[i - 1] : 0;
            }
        }
        bins.add(new Bin(
                used,
                timeS[begin] + sums[0] / used,
                Math.max(0, squares / used - sums[0] / used * (sums[0] / used)),
                stress[begin] + sums[1] / used,
                strain[begin] + sums[2] / used,
                used < LEAST_FOR_SCATTER ? 0 : scatter,
                used < LEAST_FOR_SCATTER ? 0 : used - 2,
                used < LEAST_FOR_SPIKES ? 0 : products));
    }

    /** Of the strain about its best straight line in time. */
    private double[] residuals(int begin, boolean[] out) {
        int count = out.length;
        double meanTime = 0;
        double meanStrain = 0;
        int used = 0;
        for (int i = 0; i < count; i++) {
            if (!out[i]) {
                used++;
                meanTime += timeS[begin + i] - timeS[begin];
                meanStrain += strain[begin + i] - strain[begin];
            }
        }
        meanTime = timeS[begin] + meanTime / used;
        meanStrain = strain[begin] + meanStrain / used;
        double squares = 0;
        double products = 0;
        for (int i = 0; i < count; i++) {
            if (!out[i]) {
                double since = timeS[begin + i] - meanTime;
                squares += since * since;
                products += since * (strain[begin + i] - meanStrain);
            }
        }
        double slope = squares > 0 ? products / squares : 0;
        double[] residuals = new double[count];
        for (int i = 0; i < count; i++) {
            residuals[i] = strain[begin + i] - meanStrain - slope * (timeS[begin + i] - meanTime);
        }
        return residuals;
    }

    /** A line takes away some correlation: about 2/n of it with n samples. */
    private void correlate() {
        double products = 0;
        double squares = 0;
        int pairs = 0;
        for (Bin bin : bins) {
            if (bin.samples() >= LEAST_FOR_SPIKES) {
                products += bin.products() + bin.scatter() * 2 / bin.samples();
                squares += bin.scatter();
                pairs += bin.samples() - 1;
            }
        }
        double found = squares > 0 ? products / squares : 0;
        boolean seen = pairs > 0 && found > 3 / Math.sqrt(pairs);
        correlation = seen ? Math.min(MOST_CORRELATED, found) : 0;
    }

    /** Standard deviation of a sample about here. */
    private double deviationAround(int k) {
        double scatter = bins.get(k).scatter();
        int freedom = bins.get(k).freedom();
        for (int away = 1; freedom < ENOUGH_FREEDOM && away < bins.size(); away++) {
            for (int other : new int[] {k - away, k + away}) {
                if (other >= 0 && other < bins.size()) {
                    scatter += bins.get(other).scatter();
                    freedom += bins.get(other).freedom();
                }
            }
        }
        return freedom >= LEAST_FOR_SCATTER ? Math.sqrt(scatter / freedom) : besideNeighbours();
    }

    /** From means alone, each against the line through its neighbours in the logarithm of time; by the median. */
    private double besideNeighbours() {
        if (bins.size() < 3) {
            return 0;
        }
        double first = bins.get(0).timeS();
        double[] sizes = new double[bins.size() - 2];
        for (int k = 1; k + 1 < bins.size(); k++) {
            double before = place(bins.get(k - 1).timeS(), first);
            double here = place(bins.get(k).timeS(), first);
            double after = place(bins.get(k + 1).timeS(), first);
            double share = (here - before) / (after - before);
            double off = bins.get(k).strain()
                    - (1 - share) * bins.get(k - 1).strain()
                    - share * bins.get(k + 1).strain();
            double variance = 1.0 / bins.get(k).samples()
                    + (1 - share) * (1 - share) / bins.get(k - 1).samples()
                    + share * share / bins.get(k + 1).samples();
            sizes[k - 1] = Math.abs(off) / Math.sqrt(variance);
        }
        Arrays.sort(sizes);
        return MEDIAN_TO_DEVIATION * sizes[sizes.length / 2];
    }

    private static double place(double time, double first) {
        return Math.log1p(time - first);
    }
}
