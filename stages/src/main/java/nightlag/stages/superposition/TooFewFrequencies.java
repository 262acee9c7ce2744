package nightlag.stages.superposition;

import java.util.DoubleSummaryStatistics;
import java.util.IntSummaryStatistics;
import java.util.List;
import java.util.stream.Collectors;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReasonCode;
import nightlag.stages.numeric.EvenSplines;

/** What is said of isotherms too short for a curve of their own: one sentence for all, however many they are. */
final class TooFewFrequencies {
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;

    /** Temperatures beyond these are told by their range. */
    private static final int NAMED = 5;

    private TooFewFrequencies() {}

    /** The sentence about isotherms left out, one at least, temperature rising. */
    static Reason of(List<LogIsotherm> left) {
        return SuperpositionReason.ISOTHERM_TOO_FEW_FREQUENCIES.with(
                isotherms(left), frequencies(left), EvenSplines.SMOOTH_COEFFICIENTS);
    }

    private static String isotherms(List<LogIsotherm> left) {
        List<String> celsius =
                left.stream().map(one -> celsius(one.temperatureK())).toList();
        int last = celsius.size() - 1;
        if (last == 0) {
            return "the isotherm at " + celsius.get(0) + " °C is";
        }
        if (celsius.size() <= NAMED) {
            return celsius.stream().limit(last).collect(Collectors.joining(", ", "the isotherms at ", ""))
                    + " and "
                    + celsius.get(last)
                    + " °C are";
        }
        DoubleSummaryStatistics range =
                left.stream().mapToDouble(LogIsotherm::temperatureK).summaryStatistics();
        return celsius.size()
                + " isotherms between "
                + celsius(range.getMin())
                + " and "
                + celsius(range.getMax())
                + " °C are";
    }

    private static String frequencies(List<LogIsotherm> left) {
        IntSummaryStatistics counts =
                left.stream().mapToInt(LogIsotherm::places).summaryStatistics();
        if (counts.getMin() < counts.getMax()) {
            return counts.getMin() + " to " + counts.getMax() + " frequencies";
        }
        return counts.getMax() == 1 ? "1 frequency" : counts.getMax() + " frequencies";
    }

    private static String celsius(double kelvin) {
        return ReasonCode.shortest(kelvin - KELVIN_AT_ZERO_CELSIUS);
    }
}
