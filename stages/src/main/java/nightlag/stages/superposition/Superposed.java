package nightlag.stages.superposition;

import java.util.List;
import nightlag.stages.superposition.OwnCurves.OwnCurve;

/**
 * The isotherms that overlap, about common curves and about their own.
 *
 * @param used which isotherms, rising
 * @param verticalLimited whether vertical shifts had to be limited, or isotherms would have come apart
 * @param common all of them about common curves
 * @param ownSquares Σ rᵀ W r of the same points, each isotherm about its own curves
 * @param ownFreedom its degrees of freedom
 * @param specimensDiffer rms of ln |G*| by which the specimens of an isotherm differed before that was taken off
 */
record Superposed(
        List<Integer> used,
        boolean verticalLimited,
        JointCurves common,
        double ownSquares,
        double ownFreedom,
        double specimensDiffer) {
    /** Own curves that leave fewer degrees of freedom say nothing about scatter. */
    private static final double LEAST_FREEDOM = 4;

    Superposed {
        used = List.copyOf(used);
    }

    static Superposed of(
            List<Integer> used, boolean verticalLimited, JointCurves common, OwnCurves own, SpecimenOffsets specimens) {
        int constants = used.stream().mapToInt(i -> specimens.fitted()[i]).sum();
        List<OwnCurve> each = used.stream().map(own.curves()::get).toList();
        return new Superposed(
                used,
                verticalLimited,
                common,
                each.stream().mapToDouble(OwnCurve::residualSquares).sum(),
                each.stream().mapToDouble(OwnCurve::freedom).sum() - constants,
                specimens.rms());
    }

    /** Degrees of freedom of what common curves add to the squares of own ones. */
    double addedFreedom() {
        return common.freedom() - ownFreedom;
    }

    /** Whether the two scatters can be compared. */
    boolean canBeCompared() {
        return ownFreedom >= LEAST_FREEDOM && addedFreedom() > 0;
    }

    /** What common curves add to the squares per degree of freedom, over the scatter about own ones. */
    double varianceRatio() {
        double added = Math.max(0, common.squares() - ownSquares);
        return added / addedFreedom() / (ownSquares / ownFreedom);
    }
}
