package nightlag.pipeline.decode;

import java.util.Arrays;

/** The samples of the record being read; the arrays grow as rows come. */
final class Samples {
    private static final int AT_FIRST = 1024;

    private final boolean withTemperature;
    private double[] time = new double[AT_FIRST];
    private double[] deformation = new double[AT_FIRST];
    private double[] load = new double[AT_FIRST];
    private double[] temperature;
    private int size;

    Samples(boolean withTemperature) {
        this.withTemperature = withTemperature;
        this.temperature = new double[withTemperature ? AT_FIRST : 0];
    }

    int size() {
        return size;
    }

    void clear() {
        size = 0;
    }

    /** Forgets the oldest ones. */
    void drop(int count) {
        size -= count;
        System.arraycopy(time, count, time, 0, size);
        System.arraycopy(deformation, count, deformation, 0, size);
        System.arraycopy(load, count, load, 0, size);
        if (withTemperature) {
            System.arraycopy(temperature, count, temperature, 0, size);
        }
    }

    /** The time of one. */
    double timeAt(int index) {
        return time[index];
    }

    /** Adds one; the temperature may be NaN for "not known". */
    void add(double timeS, double deformationSi, double loadSi, double temperatureK) {
        if (size == time.length) {
            int room = 2 * size;
            time = Arrays.copyOf(time, room);
            deformation = Arrays.copyOf(deformation, room);
            load = Arrays.copyOf(load, room);
            temperature = withTemperature ? Arrays.copyOf(temperature, room) : temperature;
        }
        time[size] = timeS;
        deformation[size] = deformationSi;
        load[size] = loadSi;
        if (withTemperature) {
            temperature[size] = temperatureK;
        }
        size++;
    }

    /** Times divided by a rate: samples of a file without a clock carry their row's number. */
    double[] timeOver(double rateHz) {
        double[] seconds = time();
        for (int i = 0; i < seconds.length; i++) {
            seconds[i] /= rateHz;
        }
        return seconds;
    }

    double[] time() {
        return Arrays.copyOf(time, size);
    }

    double[] deformation() {
        return Arrays.copyOf(deformation, size);
    }

    double[] load() {
        return Arrays.copyOf(load, size);
    }

    /**
     * Temperatures, those not known taken from the straight line in time between their neighbours, or from the nearest at the
     * ends; empty if none is known.
     */
    double[] temperature(double[] timeS) {
        return temperature(timeS, true);
    }

    /** The same, but those before the first and after the last known one stay NaN: in a ramp the nearest would mislead. */
    double[] temperatureBetweenReadings(double[] timeS) {
        return temperature(timeS, false);
    }

    private double[] temperature(double[] timeS, boolean toTheEnds) {
        if (!withTemperature) {
            return new double[0];
        }
        double[] filled = Arrays.copyOf(temperature, size);
        int before = -1;
        for (int i = 0; i < size; i++) {
            if (!Double.isNaN(filled[i])) {
                if (before >= 0 || toTheEnds) {
                    fill(filled, timeS, before, i);
                }
                before = i;
            }
        }
        if (before < 0) {
            return new double[0];
        }
        if (toTheEnds) {
            fill(filled, timeS, before, size);
        }
        return filled;
    }

    private static void fill(double[] values, double[] timeS, int before, int after) {
        for (int i = before + 1; i < after; i++) {
            if (before < 0) {
                values[i] = values[after];
            } else if (after == values.length) {
                values[i] = values[before];
            } else {
                double share = (timeS[i] - timeS[before]) / (timeS[after] - timeS[before]);
                values[i] = values[before] + share * (values[after] - values[before]);
            }
        }
    }
}
