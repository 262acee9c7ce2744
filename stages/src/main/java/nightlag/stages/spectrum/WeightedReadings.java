package nightlag.stages.spectrum;

import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.function.ToDoubleFunction;
import java.util.stream.IntStream;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;

/**
 * Readings brought to residuals of unit variance: two rows a reading, the difference of G' and G'' times the inverse
 * Cholesky factor of their covariance.
 *
 * <p>Where any reading comes without a covariance, all count by an {@link ErrorModel} and how large the scatter is has to
 * come from the fit. No modulus is taken for truer than a hundred-thousandth of itself, so that what its last digits hold
 * is not chased with ever more modes.
 */
final class WeightedReadings {
    /** Smallest standard uncertainty as a share of the modulus itself, and of |G*|. */
    private static final double FLOOR = 1e-5;

    /** What the relative variance is not taken below where it has to come from the fit. */
    static final double LEAST_UNKNOWN_VARIANCE = FLOOR * FLOOR;

    private static final double FLOOR_OF_MAGNITUDE = 1e-8;
    /** What arithmetic leaves of equality. */
    private static final double SAME = 1e-12;

    private static final int TELLING_REPEATS = 3;

    private final double[] angularFrequencies;
    private final double[] first;
    private final double[] mixed;
    private final double[] second;
    private final double[] target;
    private final boolean scatterKnown;
    private final double largest;
    private final boolean repeating;

    private WeightedReadings(List<ModulusReading> readings, List<ModuliCovariance> covariances, boolean scatterKnown) {
        int count = readings.size();
        this.scatterKnown = scatterKnown;
        angularFrequencies = new double[count];
        first = new double[count];
        mixed = new double[count];
        second = new double[count];
        target = new double[2 * count];
        repeating = repeats(readings) >= TELLING_REPEATS;
        largest = readings.stream()
                .mapToDouble(reading -> reading.moduli().magnitudePa())
                .max()
                .orElseThrow();
        for (int i = 0; i < count; i++) {
            Moduli moduli = readings.get(i).moduli();
            angularFrequencies[i] = readings.get(i).angularFrequency();
            ModuliCovariance covariance = covariances.get(i);
            double storageU = covariance.storageU();
            double tied = covariance.covariance() / storageU;
            double freeVariance = covariance.lossVariance() - tied * tied;
            double lossU = Math.sqrt(Math.max(freeVariance, 1e-12 * covariance.lossVariance()));
            first[i] = 1 / storageU;
            mixed[i] = -tied / (storageU * lossU);
            second[i] = 1 / lossU;
            put(target, i, moduli.storagePa(), moduli.lossPa());
        }
    }

    private WeightedReadings(WeightedReadings other, double[] target) {
        angularFrequencies = other.angularFrequencies;
        first = other.first;
        mixed = other.mixed;
        second = other.second;
        scatterKnown = other.scatterKnown;
        largest = other.largest;
        repeating = other.repeating;
        this.target = target;
    }

    /** Whether every reading has a covariance one can weigh by. */
    static boolean haveCovariances(List<ModulusReading> readings) {
        return readings.stream()
                .allMatch(reading -> reading.moduli()
                        .covariance()
                        .filter(WeightedReadings::isSound)
                        .isPresent());
    }

    /** Readings weighted by their own covariances, which they all have. */
    static WeightedReadings byCovariances(List<ModulusReading> readings) {
        return new WeightedReadings(
                readings,
                readings.stream().map(reading -> floored(reading.moduli())).toList(),
                true);
    }

    /**
     * Readings weighted by a model of their errors.
     *
     * @param moduli about where the moduli are, one a reading; where one is zero the reading itself says it
     */
    static WeightedReadings byModel(List<ModulusReading> readings, ErrorModel model, List<Complex> moduli) {
        return new WeightedReadings(
                readings,
                IntStream.range(0, readings.size())
                        .mapToObj(i -> moduli.get(i).abs() > 0
                                ? moduli.get(i)
                                : readings.get(i).moduli().complex())
                        .map(model::covariance)
                        .toList(),
                false);
    }

    /** The readings without a contribution, given as its rows at unit strength. */
    WeightedReadings less(double[] column, double strength) {
        double[] rest = target.clone();
        for (int row = 0; row < rest.length; row++) {
            rest[row] -= strength * column[row];
        }
        return new WeightedReadings(this, rest);
    }

    private static boolean isSound(ModuliCovariance covariance) {
        return covariance.storageVariance() >= 0
                && covariance.lossVariance() >= 0
                && Double.isFinite(covariance.storageVariance() + covariance.lossVariance() + covariance.covariance());
    }

    private static ModuliCovariance floored(Moduli moduli) {
        ModuliCovariance given = moduli.covariance().orElseThrow();
        double least = square(FLOOR_OF_MAGNITUDE * moduli.magnitudePa());
        return new ModuliCovariance(
                given.storageVariance() + square(FLOOR * moduli.storagePa()) + least,
                given.lossVariance() + square(FLOOR * moduli.lossPa()) + least,
                given.covariance());
    }

    private static double square(double value) {
        return value * value;
    }

    /** Whether the residuals' variance is known to be 1; else it has to be had from the fit. */
    boolean scatterKnown() {
        return scatterKnown;
    }

    /**
     * Whether values of |G*|, G' or G'' come back to the last digit at other frequencies: then they were rounded, and where
     * they hardly change they all err alike.
     */
    boolean repeating() {
        return repeating;
    }

    private static int repeats(List<ModulusReading> readings) {
        return Math.max(
                repeats(readings, Moduli::magnitudePa),
                Math.max(repeats(readings, Moduli::storagePa), repeats(readings, Moduli::lossPa)));
    }

    /** How many of the readings have a neighbour in frequency of the same value. */
    private static int repeats(List<ModulusReading> readings, ToDoubleFunction<Moduli> part) {
        List<ModulusReading> rising = readings.stream()
                .sorted(Comparator.comparingDouble(ModulusReading::angularFrequency))
                .toList();
        return (int) IntStream.range(1, rising.size())
                .filter(i ->
                        rising.get(i).angularFrequency() > rising.get(i - 1).angularFrequency())
                .filter(i -> {
                    double value = part.applyAsDouble(rising.get(i).moduli());
                    double before = part.applyAsDouble(rising.get(i - 1).moduli());
                    return Math.abs(value - before) <= SAME * Math.abs(value);
                })
                .count();
    }

    /** The smallest variance of the residuals worth looking at. */
    double leastVariance() {
        return scatterKnown ? 1 : LEAST_UNKNOWN_VARIANCE;
    }

    int rows() {
        return target.length;
    }

    double lowestFrequency() {
        return Arrays.stream(angularFrequencies).min().orElseThrow();
    }

    double highestFrequency() {
        return Arrays.stream(angularFrequencies).max().orElseThrow();
    }

    double decades() {
        return Math.log10(highestFrequency() / lowestFrequency());
    }

    double largestModulus() {
        return largest;
    }

    double[] target() {
        return target.clone();
    }

    double[] angularFrequencies() {
        return angularFrequencies.clone();
    }

    /** The modulus behind the two rows of a reading. */
    Complex unweighted(double[] rows, int i) {
        double storage = rows[2 * i] / first[i];
        return new Complex(storage, (rows[2 * i + 1] - mixed[i] * storage) / second[i]);
    }

    /** What moduli, one a reading, add to each row. */
    double[] weighted(List<Complex> moduli) {
        double[] column = new double[rows()];
        for (int i = 0; i < angularFrequencies.length; i++) {
            put(column, i, moduli.get(i).re(), moduli.get(i).im());
        }
        return column;
    }

    /** What a viscosity that follows at once adds to each row, scaled to 1 Pa at the highest frequency. */
    double[] viscosity() {
        double highest = highestFrequency();
        double[] column = new double[rows()];
        for (int i = 0; i < angularFrequencies.length; i++) {
            put(column, i, 0, angularFrequencies[i] / highest);
        }
        return column;
    }

    /** What a mode of unit strength adds to each row. */
    double[] mode(double time) {
        double[] column = new double[rows()];
        for (int i = 0; i < angularFrequencies.length; i++) {
            double x = angularFrequencies[i] * time;
            double share = x / (1 + x * x);
            put(column, i, share * x, share);
        }
        return column;
    }

    /** Its derivative by ln τ. */
    double[] modeByLogTime(double time) {
        double[] column = new double[rows()];
        for (int i = 0; i < angularFrequencies.length; i++) {
            double x = angularFrequencies[i] * time;
            double share = x / (1 + x * x);
            put(column, i, 2 * share * share, share * (1 - x * x) / (1 + x * x));
        }
        return column;
    }

    /** What an equilibrium modulus of 1 Pa adds to each row. */
    double[] equilibrium() {
        double[] column = new double[rows()];
        for (int i = 0; i < angularFrequencies.length; i++) {
            put(column, i, 1, 0);
        }
        return column;
    }

    /** What a viscosity of 1 Pa·s that nothing relaxes adds to each row. */
    double[] viscous() {
        double[] column = new double[rows()];
        for (int i = 0; i < angularFrequencies.length; i++) {
            put(column, i, 0, angularFrequencies[i]);
        }
        return column;
    }

    private void put(double[] rows, int i, double storage, double loss) {
        rows[2 * i] = first[i] * storage;
        rows[2 * i + 1] = mixed[i] * storage + second[i] * loss;
    }
}
