package nightlag.stages;

import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.sweep.NaturalOrder;

/** The creep curves of a lot. */
final class LotCreep {
    private static final Comparator<CreepCurve> ORDER = Comparator.comparing(
                    (CreepCurve curve) -> curve.key().specimen(), NaturalOrder::compare)
            .thenComparing(curve -> curve.key().sweep(), NaturalOrder::compare)
            .thenComparing(curve -> curve.key().point(), NaturalOrder::compare)
            .thenComparing(curve -> curve.key().sourceFile(), NaturalOrder::compare);

    private LotCreep() {}

    /** All of them in an order of their own, whatever that of the reductions. */
    static List<CreepCurve> inOrder(List<Reduction> reductions) {
        return reductions.stream()
                .map(Reduction::creep)
                .flatMap(Optional::stream)
                .sorted(ORDER)
                .toList();
    }
}
