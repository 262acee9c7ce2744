package nightlag.stages;

import java.util.List;

/** All reductions of one lot to what is published about it. */
public final class Conclude {
    private Conclude() {}

    /** Concludes one lot. The order of the reductions does not matter. */
    public static LotResult conclude(List<Reduction> reductions, ConclusionPlan plan) {
        throw new UnsupportedOperationException();
    }
}
