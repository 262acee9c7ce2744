package nightlag.stages.response;

import java.util.ArrayList;
import java.util.List;
import java.util.TreeSet;
import nightlag.stages.response.ResponsePlan.Step;

/**
 * A stepwise programme cut where anything steps, and the instants it is predicted at: two at every step, before it first, and
 * after every step evenly over log time.
 *
 * @param segments what is held from one step to the next
 * @param instants when, in the order of time
 */
record Programme(List<Segment> segments, List<Instant> instants) {
    /** One more than the 20 that are promised, so that rounding takes none away. */
    private static final int PER_DECADE = 21;

    /** Nearer to a step than this part of its own time an instant could not be told from it. */
    private static final double NEAREST = 1e-12;

    /** Of the whole programme, the part before which nothing after a step is looked at. */
    private static final double SMALLEST_PART = 1e-15;

    /**
     * What is held.
     *
     * @param fromS start, s
     * @param durationS how long, s
     * @param temperatureK temperature, K
     * @param value stress in Pa or strain
     */
    record Segment(double fromS, double durationS, double temperatureK, double value) {}

    /**
     * An instant.
     *
     * @param segment whose values hold; −1 before the first
     * @param sinceS time since its start, s
     * @param timeS time since the start of the programme, s
     */
    record Instant(int segment, double sinceS, double timeS) {}

    /** Copies the lists. */
    Programme {
        segments = List.copyOf(segments);
        instants = List.copyOf(instants);
    }

    /**
     * A programme.
     *
     * @param referenceK temperature where the plan gives none, K
     * @param firstLookS how soon after a step the first instant comes, s
     */
    static Programme of(ResponsePlan plan, double referenceK, double firstLookS) {
        List<Step> temperatures =
                plan.temperaturesK().isEmpty() ? List.of(new Step(0, referenceK)) : plan.temperaturesK();
        TreeSet<Double> starts = new TreeSet<>();
        plan.steps().forEach(step -> starts.add(step.fromS()));
        temperatures.forEach(step -> starts.add(step.fromS()));
        List<Double> edges = new ArrayList<>(starts);
        edges.add(plan.untilS());
        double first = Math.max(firstLookS, SMALLEST_PART * plan.untilS());
        List<Segment> segments = new ArrayList<>();
        List<Instant> instants = new ArrayList<>();
        instants.add(new Instant(-1, 0, 0));
        for (int i = 0; i + 1 < edges.size(); i++) {
            double from = edges.get(i);
            double duration = edges.get(i + 1) - from;
            segments.add(new Segment(from, duration, at(temperatures, from), at(plan.steps(), from)));
            instants.add(new Instant(i, 0, from));
            double nearest = Math.max(first, NEAREST * from);
            for (int k = (int) Math.floor(PER_DECADE * Math.log10(nearest)); since(k) < duration * (1 - NEAREST); k++) {
                if (since(k) >= nearest) {
                    instants.add(new Instant(i, since(k), from + since(k)));
                }
            }
            instants.add(new Instant(i, duration, edges.get(i + 1)));
        }
        return new Programme(segments, instants);
    }

    private static double since(int k) {
        return Math.pow(10, (double) k / PER_DECADE);
    }

    private static double at(List<Step> steps, double timeS) {
        return steps.stream()
                .filter(step -> step.fromS() <= timeS)
                .reduce((before, after) -> after)
                .map(Step::value)
                .orElse(0.0);
    }

    /** How much the prescribed value steps at the start of a segment. */
    double stepAt(int segment) {
        return segments.get(segment).value()
                - (segment == 0 ? 0 : segments.get(segment - 1).value());
    }
}
