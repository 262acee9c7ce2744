package nightlag.pipeline.report;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;
import java.util.stream.Collectors;
import nightlag.stages.LotResult;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Quality;

/** A lot's result in the words of the page. */
final class LotPages {
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;
    private static final MathContext FIGURES = new MathContext(4);
    private static final MathContext FIGURES_OF_U = new MathContext(2);
    /** Decades within which a number is written without a power of ten. */
    private static final int SMALLEST_PLAIN = -4;

    private static final int LARGEST_PLAIN = 5;

    private LotPages() {}

    static LotPage of(String anchor, String grade, String lot, LotResult result) {
        return new LotPage(
                anchor,
                grade,
                lot,
                counts(result),
                result.markers().stream().map(LotPages::figure).toList(),
                result.notes().stream().map(Reason::sentence).toList(),
                result.absent().stream().map(Reason::sentence).toList(),
                ChartJson.of(LotCharts.of(result)));
    }

    private static String counts(LotResult result) {
        return result.points().size() + " points: "
                + Arrays.stream(Quality.values())
                        .map(quality -> result.points().stream()
                                        .filter(point -> point.quality() == quality)
                                        .count()
                                + " " + quality.word())
                        .collect(Collectors.joining(", "));
    }

    private static LotPage.Figure figure(Marker marker) {
        return new LotPage.Figure(marker.property().replace('_', ' '), where(marker), value(marker), marker.method());
    }

    private static String where(Marker marker) {
        List<String> parts = new ArrayList<>();
        if (!marker.specimen().isEmpty()) {
            parts.add("specimen " + marker.specimen());
        }
        if (!marker.sweep().isEmpty()) {
            parts.add("sweep " + marker.sweep());
        }
        marker.temperatureK()
                .ifPresent(t -> parts.add(plain(new BigDecimal(t - KELVIN_AT_ZERO_CELSIUS).round(FIGURES)) + " °C"));
        marker.frequencyHz().ifPresent(f -> parts.add(plain(new BigDecimal(f).round(FIGURES)) + " Hz"));
        return String.join(", ", parts);
    }

    private static String value(Marker marker) {
        double value = marker.unit().equals("°C") ? marker.value() - KELVIN_AT_ZERO_CELSIUS : marker.value();
        String unit = marker.unit().equals("1") ? "" : " " + marker.unit();
        OptionalDouble u = marker.u();
        return u.isPresent() && u.getAsDouble() > 0
                ? withUncertainty(value, u.getAsDouble()) + unit
                : plain(new BigDecimal(value).round(FIGURES)) + unit;
    }

    /** Two digits of the uncertainty, and the value to the same place (JCGM 100:2008, 7.2.6). */
    private static String withUncertainty(double value, double u) {
        BigDecimal rounded = new BigDecimal(u).round(FIGURES_OF_U);
        BigDecimal same = new BigDecimal(value).setScale(rounded.scale(), RoundingMode.HALF_EVEN);
        int exponent = exponent(same.abs().max(rounded));
        if (exponent >= SMALLEST_PLAIN && exponent <= LARGEST_PLAIN) {
            return same.toPlainString() + " ± " + rounded.toPlainString();
        }
        return "(" + same.movePointLeft(exponent).toPlainString() + " ± "
                + rounded.movePointLeft(exponent).toPlainString() + ")·10^" + exponent;
    }

    private static String plain(BigDecimal number) {
        BigDecimal value = number.stripTrailingZeros();
        int exponent = exponent(value);
        return value.signum() == 0 || (exponent >= SMALLEST_PLAIN && exponent <= LARGEST_PLAIN)
                ? value.toPlainString()
                : value.movePointLeft(exponent).toPlainString() + "·10^" + exponent;
    }

    private static int exponent(BigDecimal value) {
        return value.precision() - value.scale() - 1;
    }
}
