package nightlag.stages.moduli;

import java.util.stream.IntStream;

/**
 * Errors that readings share: those of a group are all off by the same in ln ω and by the same in the logarithm of both moduli, as
 * the points of an isotherm on a master curve are by what is not known of its shifts. The scatter of readings does not show
 * them.
 */
public final class SharedErrors {
    private static final SharedErrors NONE = new SharedErrors(new int[0], new double[0][]);

    private final int[] groups;
    private final double[][] covariance;

    private SharedErrors(int[] groups, double[][] covariance) {
        this.groups = groups;
        this.covariance = covariance;
    }

    /** Readings that err each for itself. */
    public static SharedErrors none() {
        return NONE;
    }

    /**
     * Errors of groups.
     *
     * @param groups the group of each reading, counted from 0
     * @param covariance n × n for n/2 groups: the errors of ln ω, one a group, followed by those of the logarithm of the moduli
     */
    public static SharedErrors of(int[] groups, double[][] covariance) {
        double[][] copy = new double[covariance.length][];
        for (int i = 0; i < copy.length; i++) {
            copy[i] = covariance[i].clone();
        }
        return new SharedErrors(groups.clone(), copy);
    }

    /** Whether there are none. */
    public boolean isNone() {
        return covariance.length == 0;
    }

    /** Those of some of the readings, given by their numbers, in that order. */
    public SharedErrors ofReadings(int[] numbers) {
        return isNone()
                ? this
                : new SharedErrors(IntStream.of(numbers).map(i -> groups[i]).toArray(), covariance);
    }

    /**
     * What they add to the variance of a figure drawn from the readings (JCGM 100:2008, 5.2.2).
     *
     * @param byLnFrequency its derivatives by ln ω of each reading
     * @param byLnModulus its derivatives by a logarithm common to both moduli of each reading
     */
    public double variance(double[] byLnFrequency, double[] byLnModulus) {
        if (isNone()) {
            return 0;
        }
        int half = covariance.length / 2;
        double[] byGroup = new double[2 * half];
        for (int i = 0; i < groups.length; i++) {
            byGroup[groups[i]] += byLnFrequency[i];
            byGroup[half + groups[i]] += byLnModulus[i];
        }
        double variance = 0;
        for (int i = 0; i < byGroup.length; i++) {
            for (int j = 0; j < byGroup.length; j++) {
                variance += byGroup[i] * covariance[i][j] * byGroup[j];
            }
        }
        return Math.max(0, variance);
    }
}
