package nightlag.stages.spectrum;

import java.util.List;
import java.util.Locale;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import java.util.stream.Stream;

/**
 * One mode of a discrete spectrum, or one node of a continuous one.
 *
 * @param referenceTemperatureK the temperature it holds at, K
 * @param kind relaxation or retardation
 * @param form discrete or continuous
 * @param timeS relaxation or retardation time, s
 * @param value modulus in Pa or compliance in 1/Pa (continuous: per unit of ln time)
 * @param low lower end of the 95 % band
 * @param high upper end of the 95 % band
 */
public record SpectrumRow(
        double referenceTemperatureK,
        Kind kind,
        Form form,
        double timeS,
        double value,
        OptionalDouble low,
        OptionalDouble high) {
    /** Which spectrum. */
    public enum Kind {
        RELAXATION("Pa"),
        RETARDATION("1/Pa");

        private final String unit;

        Kind(String unit) {
            this.unit = unit;
        }

        /** The unit of the values. */
        public String unit() {
            return unit;
        }

        /** The word in tables. */
        public String word() {
            return name().toLowerCase(Locale.ROOT);
        }
    }

    /** Modes or a density. */
    public enum Form {
        DISCRETE,
        CONTINUOUS;

        /** The word in tables. */
        public String word() {
            return name().toLowerCase(Locale.ROOT);
        }
    }

    /**
     * Two discrete sets that are each other's inverse, relaxation first, times rising.
     *
     * @param temperatureK temperature they hold at, K
     */
    static List<SpectrumRow> discrete(double temperatureK, RelaxationModes relaxation, RetardationModes retardation) {
        return Stream.concat(
                        discrete(temperatureK, Kind.RELAXATION, relaxation.timesS(), relaxation.strengthsPa()),
                        discrete(temperatureK, Kind.RETARDATION, retardation.timesS(), retardation.strengthsPerPa()))
                .toList();
    }

    private static Stream<SpectrumRow> discrete(double temperatureK, Kind kind, double[] ofModes, double[] strengths) {
        return IntStream.range(0, ofModes.length)
                .mapToObj(i -> new SpectrumRow(
                        temperatureK,
                        kind,
                        Form.DISCRETE,
                        ofModes[i],
                        strengths[i],
                        OptionalDouble.empty(),
                        OptionalDouble.empty()));
    }
}
