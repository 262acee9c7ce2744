package nightlag.stages.superposition;

import java.util.OptionalDouble;

/**
 * How isotherms are superposed: the section {@code [superposition]} of a grade.
 *
 * @param referenceTemperatureK reference temperature, K
 * @param verticalShift whether moduli are shifted too
 * @param expansionPerK volumetric expansion, 1/K, for a density shift
 * @param law the law fitted to the shifts
 * @param toleranceDecades a misfit below this superposes, decades of modulus
 */
public record SuperpositionPlan(
        double referenceTemperatureK,
        VerticalShift verticalShift,
        OptionalDouble expansionPerK,
        ShiftLaw law,
        double toleranceDecades) {
    /** What is done about vertical shifts. */
    public enum VerticalShift {
        NONE,
        FITTED,
        DENSITY
    }

    /** The law of the horizontal shifts. */
    public enum ShiftLaw {
        AUTO,
        WLF,
        ARRHENIUS,
        NONE
    }
}
