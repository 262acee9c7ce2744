package nightlag.stages.response;

import java.util.List;

/**
 * One prediction asked for: a table {@code [[response]]} of a grade.
 *
 * @param name unique name
 * @param temperaturesK temperature steps, K; empty: the reference temperature throughout
 * @param controlled what is prescribed
 * @param steps its steps, Pa or strain
 * @param untilS end of the prediction, s
 */
public record ResponsePlan(
        String name, List<Step> temperaturesK, Controlled controlled, List<Step> steps, double untilS) {
    /** Copies the lists. */
    public ResponsePlan {
        temperaturesK = List.copyOf(temperaturesK);
        steps = List.copyOf(steps);
    }

    /** What is prescribed. */
    public enum Controlled {
        STRESS,
        STRAIN
    }

    /**
     * A value held from a time on.
     *
     * @param fromS start, s
     * @param value the value from there on, SI
     */
    public record Step(double fromS, double value) {}
}
