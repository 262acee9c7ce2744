package nightlag.pipeline.report;

import java.util.OptionalDouble;
import nightlag.stages.acceptance.Judgement;
import nightlag.stages.acceptance.LimitPlan;
import nightlag.stages.acceptance.ShownUnit;
import nightlag.stages.acceptance.Trend;

/** Verdicts and trends in words, in the units of the grade file. */
public final class VerdictWords {
    private VerdictWords() {}

    /** Name, value and limits of what was judged, with the note. */
    public static String of(Judgement judged) {
        LimitPlan limit = judged.limit();
        String value = judged.value().isPresent() ? value(limit, judged.value().getAsDouble(), judged.u()) + ", " : "";
        String note = judged.note().isEmpty() ? "" : " (" + judged.note() + ")";
        return limit.title() + " " + judged.verdict().word() + ": " + value + limits(limit) + note;
    }

    /** Name and value of a lot that is outside of what was usual before. */
    public static String of(Trend trend) {
        LimitPlan limit = trend.limit();
        return limit.title() + ": " + value(limit, trend.value(), OptionalDouble.empty()) + ", usual is "
                + between(limit.shown(), trend.lower(), trend.upper()) + " after " + trend.lots() + " lots";
    }

    /** A value with its uncertainty and unit. */
    static String value(LimitPlan limit, double value, OptionalDouble u) {
        ShownUnit shown = limit.shown();
        double number = shown.of(value);
        return (u.isPresent() && u.getAsDouble() > 0
                        ? Written.withUncertainty(number, shown.ofU(u.getAsDouble()))
                        : Written.fourDigits(number))
                + unit(shown);
    }

    /** The limits with their unit. */
    static String limits(LimitPlan limit) {
        ShownUnit shown = limit.shown();
        if (limit.min().isPresent() && limit.max().isPresent()) {
            return "limits "
                    + between(shown, limit.min().getAsDouble(), limit.max().getAsDouble());
        }
        return limit.min().isPresent()
                ? "at least " + Written.fourDigits(shown.of(limit.min().getAsDouble())) + unit(shown)
                : "at most " + Written.fourDigits(shown.of(limit.max().orElseThrow())) + unit(shown);
    }

    static String between(ShownUnit shown, double low, double high) {
        return Written.fourDigits(shown.of(low)) + " to " + Written.fourDigits(shown.of(high)) + unit(shown);
    }

    private static String unit(ShownUnit shown) {
        return shown.symbol().equals("1") ? "" : " " + shown.symbol();
    }
}
