package nightlag.stages.moduli;

import java.util.Locale;
import java.util.OptionalDouble;

/**
 * What an expression can speak of: the numbers of a row of {@code points}, under their columns' names without the unit's
 * suffix and in their columns' units, °C and degrees included.
 */
public enum PointQuantity {
    TEMPERATURE("°C"),
    FREQUENCY("Hz"),
    ANGULAR_FREQUENCY("rad/s"),
    ELAPSED("s"),
    STRAIN_AMPLITUDE("1"),
    STRESS_AMPLITUDE("Pa"),
    STORAGE_MODULUS("Pa"),
    LOSS_MODULUS("Pa"),
    COMPLEX_MODULUS("Pa"),
    PHASE_ANGLE("°"),
    TAN_DELTA("1"),
    COMPLEX_VISCOSITY("Pa·s"),
    RELATIVE_THIRD_HARMONIC("1");

    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;
    private static final int THIRD = 3;

    private final String unit;

    PointQuantity(String unit) {
        this.unit = unit;
    }

    /** The name in expressions and in the keys of a grade. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }

    /** The unit of its column. */
    public String unit() {
        return unit;
    }

    /** Whether it is worked out of G' and G''. */
    boolean ofTheModulus() {
        return switch (this) {
            case STORAGE_MODULUS, LOSS_MODULUS, COMPLEX_MODULUS, PHASE_ANGLE, TAN_DELTA, COMPLEX_VISCOSITY -> true;
            default -> false;
        };
    }

    /** Its value at a point, in the column's unit; empty where the column is. */
    public OptionalDouble of(ModulusPoint point) {
        return switch (this) {
            case TEMPERATURE -> shifted(point.temperatureK());
            case FREQUENCY -> point.frequencyHz();
            case ANGULAR_FREQUENCY -> angularFrequency(point);
            case ELAPSED -> point.elapsedS();
            case STRAIN_AMPLITUDE -> point.strainAmplitude();
            case STRESS_AMPLITUDE -> point.stressAmplitudePa();
            case RELATIVE_THIRD_HARMONIC ->
                point.harmonics().stream()
                        .filter(harmonic -> harmonic.order() == THIRD)
                        .mapToDouble(Harmonic::relativeIntensity)
                        .findFirst();
            default ->
                point.moduli().isEmpty()
                        ? OptionalDouble.empty()
                        : of(point.moduli().get(), angularFrequency(point));
        };
    }

    /** The u of the third harmonic, the one quantity beside the modulus that has one. */
    static OptionalDouble thirdHarmonicU(ModulusPoint point) {
        return point.harmonics().stream()
                .filter(harmonic -> harmonic.order() == THIRD)
                .findFirst()
                .map(Harmonic::relativeIntensityU)
                .orElse(OptionalDouble.empty());
    }

    /** One that is worked out of the modulus. */
    OptionalDouble of(Moduli moduli, OptionalDouble angularFrequency) {
        return switch (this) {
            case STORAGE_MODULUS -> OptionalDouble.of(moduli.storagePa());
            case LOSS_MODULUS -> OptionalDouble.of(moduli.lossPa());
            case COMPLEX_MODULUS -> OptionalDouble.of(moduli.magnitudePa());
            case PHASE_ANGLE -> OptionalDouble.of(Math.toDegrees(moduli.phaseRad()));
            case TAN_DELTA -> OptionalDouble.of(moduli.tanDelta());
            case COMPLEX_VISCOSITY ->
                angularFrequency.isPresent()
                        ? OptionalDouble.of(moduli.magnitudePa() / angularFrequency.getAsDouble())
                        : OptionalDouble.empty();
            default -> OptionalDouble.empty();
        };
    }

    private static OptionalDouble angularFrequency(ModulusPoint point) {
        return point.frequencyHz().isPresent()
                ? OptionalDouble.of(2 * Math.PI * point.frequencyHz().getAsDouble())
                : OptionalDouble.empty();
    }

    private static OptionalDouble shifted(OptionalDouble kelvin) {
        return kelvin.isPresent()
                ? OptionalDouble.of(kelvin.getAsDouble() - KELVIN_AT_ZERO_CELSIUS)
                : OptionalDouble.empty();
    }
}
