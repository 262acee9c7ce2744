package nightlag.stages.superposition;

import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;

/**
 * One isotherm on logarithmic axes, frequency rising. A modulus that is not above zero has no logarithm and is missing; a point
 * without either is left out.
 *
 * @param temperatureK its temperature, K
 * @param readings the points that are left
 * @param missing how many moduli are missing, those of points left out included
 */
record LogIsotherm(double temperatureK, List<LogReading> readings, int missing) {
    LogIsotherm {
        readings = List.copyOf(readings);
    }

    /**
     * One point.
     *
     * @param x ln ω
     * @param y ln G' and ln G''; NaN where the modulus is missing
     * @param specimen whose it is
     * @param covariance u²(ln G'), u²(ln G'') and their covariance; empty where none is known
     */
    record LogReading(double x, double[] y, String specimen, Optional<ModuliCovariance> covariance) {
        private static LogReading of(ModulusReading reading, String specimen) {
            Moduli moduli = reading.moduli();
            double storage = moduli.storagePa();
            double loss = moduli.lossPa();
            return new LogReading(
                    Math.log(reading.angularFrequency()),
                    new double[] {log(storage), log(loss)},
                    specimen,
                    moduli.covariance()
                            .map(known -> new ModuliCovariance(
                                    known.storageVariance() / (storage * storage),
                                    known.lossVariance() / (loss * loss),
                                    known.covariance() / (storage * loss))));
        }

        private static double log(double modulus) {
            return modulus > 0 ? Math.log(modulus) : Double.NaN;
        }

        /** The point on reduced axes. */
        LogReading moved(double lnA, double lnB) {
            return new LogReading(x + lnA, new double[] {y[0] + lnB, y[1] + lnB}, specimen, covariance);
        }

        boolean has(int modulus) {
            return !Double.isNaN(y[modulus]);
        }
    }

    static LogIsotherm of(IsothermReadings isotherm) {
        List<LogReading> all = IntStream.range(0, isotherm.readings().size())
                .mapToObj(i -> LogReading.of(
                        isotherm.readings().get(i), isotherm.specimens().get(i)))
                .sorted(Comparator.comparingDouble(LogReading::x))
                .toList();
        int missing = all.stream()
                .mapToInt(reading -> (reading.has(0) ? 0 : 1) + (reading.has(1) ? 0 : 1))
                .sum();
        return new LogIsotherm(
                isotherm.temperatureK(),
                all.stream().filter(reading -> reading.has(0) || reading.has(1)).toList(),
                missing);
    }

    int size() {
        return readings.size();
    }

    /** The fewer of the places at which either modulus is known. */
    int places() {
        return Math.min(places(0), places(1));
    }

    private int places(int modulus) {
        return (int) readings.stream()
                .filter(reading -> reading.has(modulus))
                .mapToDouble(LogReading::x)
                .distinct()
                .count();
    }

    double first() {
        return readings.get(0).x();
    }

    double last() {
        return readings.get(readings.size() - 1).x();
    }

    boolean hasCovariances() {
        return readings.stream().allMatch(reading -> reading.covariance().isPresent());
    }
}
