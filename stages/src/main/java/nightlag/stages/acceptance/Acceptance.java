package nightlag.stages.acceptance;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Stream;
import nightlag.stages.moduli.Figure;
import nightlag.stages.moduli.PointQuantity;
import nightlag.stages.sweep.OwnFigures;

/** A lot against the limits of its grade. */
public final class Acceptance {
    private static final List<Verdict> WORST_FIRST =
            List.of(Verdict.NONCONFORMING, Verdict.UNDECIDED, Verdict.CONFORMING);

    private final OwnFigures own;
    private final Lot lot;
    private final List<Lot.Moved> moved;

    private Acceptance(OwnFigures own, Lot lot, List<Lot.Moved> moved) {
        this.own = own;
        this.lot = lot;
        this.moved = moved;
    }

    /**
     * Judges a lot.
     *
     * @param limits the grade's limits; one on a figure of the points has a temperature and a frequency
     * @param own figures the grade defines for itself
     * @param lot the lot
     * @param moved the lot as each influence that many records share would have it
     * @return a judgement for each limit, in their order
     */
    public static List<Judgement> of(List<LimitPlan> limits, OwnFigures own, Lot lot, List<Lot.Moved> moved) {
        Acceptance acceptance = new Acceptance(own, lot, moved);
        return limits.stream().map(acceptance::judge).toList();
    }

    private Judgement judge(LimitPlan limit) {
        Optional<Figure> figure = figure(limit.property());
        if (figure.isEmpty()) {
            MarkerLimits.Outcome outcome = MarkerLimits.of(limit, own, lot, moved);
            return outcome.estimates().isEmpty()
                    ? missing(limit, outcome.missing())
                    : worst(limit, outcome.estimates());
        }
        PointLimits.Outcome outcome = PointLimits.of(limit, figure.get(), lot, moved);
        return outcome.estimate().isEmpty()
                ? missing(limit, outcome.missing())
                : judged(limit, outcome.estimate().get());
    }

    /** A figure of the grade's own, or a column of the points. */
    private Optional<Figure> figure(String property) {
        return Stream.concat(
                        own.derived().stream(),
                        Arrays.stream(PointQuantity.values()).map(Figure::column))
                .filter(figure -> figure.name().equals(property))
                .findFirst();
    }

    private static Judgement missing(LimitPlan limit, String why) {
        return new Judgement(limit, OptionalDouble.empty(), OptionalDouble.empty(), Verdict.MISSING, why);
    }

    private static Judgement judged(LimitPlan limit, Estimate estimate) {
        if (!Double.isFinite(estimate.value())) {
            return missing(limit, AcceptanceReason.ACCEPTANCE_NOT_FINITE.with().sentence());
        }
        List<String> notes = new ArrayList<>(estimate.notes());
        if (estimate.u().isEmpty() && limit.coverage() > 0) {
            notes.add(AcceptanceReason.ACCEPTANCE_WITHOUT_U.with().sentence());
        }
        return new Judgement(
                limit,
                OptionalDouble.of(estimate.value()),
                estimate.u(),
                GuardBand.verdict(estimate.value(), estimate.u(), limit),
                String.join("; ", notes));
    }

    /** Of several values that stand apart the one that speaks most against the lot. */
    private static Judgement worst(LimitPlan limit, List<Estimate> estimates) {
        List<Judgement> judged =
                estimates.stream().map(estimate -> judged(limit, estimate)).toList();
        Judgement worst = judged.stream()
                .min(Comparator.comparingInt((Judgement one) -> WORST_FIRST.indexOf(one.verdict()))
                        .thenComparingDouble(one -> one.value().isPresent()
                                ? GuardBand.margin(one.value().getAsDouble(), one.u(), limit)
                                : Double.POSITIVE_INFINITY))
                .orElseThrow();
        return judged.size() == 1
                ? worst
                : new Judgement(
                        limit,
                        worst.value(),
                        worst.u(),
                        worst.verdict(),
                        "the worst of " + judged.size() + ": " + worst.note());
    }
}
