package nightlag.pipeline.report;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.List;
import java.util.OptionalDouble;
import java.util.stream.Collectors;
import nightlag.stages.LotResult;
import nightlag.stages.acceptance.Judgement;
import nightlag.stages.acceptance.LimitPlan;
import nightlag.stages.acceptance.Trend;
import nightlag.stages.acceptance.Verdict;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;

/** A lot's result in the words of the page. */
final class LotPages {

    private LotPages() {}

    static LotPage of(String anchor, String grade, String lot, LotResult result) {
        return new LotPage(
                anchor,
                grade,
                lot,
                counts(result),
                limits(result),
                result.markers().stream().map(LotPages::figure).toList(),
                AlikeTogether.lines(result.notes()),
                AlikeTogether.lines(result.absent()),
                ChartJson.of(LotCharts.of(result)));
    }

    private static String counts(LotResult result) {
        List<String> parts = new ArrayList<>();
        if (!result.points().isEmpty() || result.creep().isEmpty()) {
            parts.add(counts(
                    "points",
                    result.points().stream().map(ModulusPoint::quality).toList()));
        }
        if (!result.creep().isEmpty()) {
            parts.add(counts(
                    "creep curves",
                    result.creep().stream().map(CreepCurve::quality).toList()));
        }
        return String.join("; ", parts);
    }

    private static String counts(String what, List<Quality> found) {
        return found.size() + " " + what + ": "
                + Arrays.stream(Quality.values())
                        .map(quality -> Collections.frequency(found, quality) + " " + quality.word())
                        .collect(Collectors.joining(", "));
    }

    private static List<LotPage.Limit> limits(LotResult result) {
        List<LotPage.Limit> limits = new ArrayList<>();
        for (Judgement judged : result.acceptance()) {
            LimitPlan limit = judged.limit();
            limits.add(new LotPage.Limit(
                    limit.title(),
                    judged.value().isPresent()
                            ? VerdictWords.value(limit, judged.value().getAsDouble(), judged.u())
                            : "",
                    VerdictWords.limits(limit),
                    judged.verdict().word(),
                    judged.verdict() == Verdict.CONFORMING,
                    judged.note()));
            result.trend().stream()
                    .filter(trend -> trend.limit().equals(limit))
                    .map(LotPages::trend)
                    .forEach(limits::add);
        }
        return limits;
    }

    private static LotPage.Limit trend(Trend trend) {
        boolean usual = trend.verdict() == Verdict.CONFORMING;
        return new LotPage.Limit(
                trend.limit().title() + ", among earlier lots",
                VerdictWords.value(trend.limit(), trend.value(), OptionalDouble.empty()),
                "usual " + VerdictWords.between(trend.limit().shown(), trend.lower(), trend.upper()),
                usual ? "usual" : "unusual",
                usual,
                trend.note());
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
        marker.temperatureK().ifPresent(kelvin -> parts.add(Written.celsius(kelvin)));
        marker.frequencyHz().ifPresent(hz -> parts.add(Written.fourDigits(hz) + " Hz"));
        return String.join(", ", parts);
    }

    private static String value(Marker marker) {
        double value = marker.unit().equals("°C") ? Written.toCelsius(marker.value()) : marker.value();
        String unit = marker.unit().equals("1") ? "" : " " + marker.unit();
        OptionalDouble u = marker.u();
        return u.isPresent() && u.getAsDouble() > 0
                ? Written.withUncertainty(value, u.getAsDouble()) + unit
                : Written.fourDigits(value) + unit;
    }
}
