package nightlag.stages.moduli;

import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * A figure of every point: a column of {@code points}, or what a grade derives from several of them.
 *
 * @param name its name, words in small letters joined by {@code _}
 * @param unit the unit its values are in
 * @param expression what it is, as written; two figures of the same expression are the same
 * @param uses the quantities it needs, in the order of {@link PointQuantity}
 * @param function the expression at work
 */
public record Figure(String name, String unit, String expression, List<PointQuantity> uses, PointFunction function) {
    /**
     * Step of the central differences as a part of the modulus stepped: their error, of its square, and that of rounding are
     * both near 1e-10 of the derivative.
     */
    private static final double STEP = 1e-5;
    /** Of |G*|, where the modulus stepped is smaller. */
    private static final double SMALLEST_STEP = 1e-11;

    /** Copies the list. */
    public Figure {
        uses = List.copyOf(uses);
    }

    /** A column as it stands. */
    public static Figure column(PointQuantity quantity) {
        return new Figure(
                quantity.word(), quantity.unit(), quantity.word(), List.of(quantity), values -> values.get(quantity));
    }

    /**
     * A figure at a point and how it moves with what was measured there.
     *
     * @param value its value
     * @param byStorage its derivative by G', 1/Pa of its unit
     * @param byLoss its derivative by G''
     * @param byThird its derivative by the relative third harmonic
     */
    public record Value(double value, double byStorage, double byLoss, double byThird) {
        /**
         * u² by the law of propagation (JCGM 100:2008, 5.2.2) from the covariance of G' and G'', on which all moduli, the
         * phase angle and tan δ hang together, and from u of the third harmonic. Strain amplitude, frequency, temperature and
         * time are taken as exact. Empty where what it hangs on has no u, or it hangs on nothing that was measured.
         */
        public OptionalDouble variance(ModulusPoint point) {
            double variance = 0;
            if (byStorage != 0 || byLoss != 0) {
                Optional<ModuliCovariance> known = point.moduli().flatMap(Moduli::covariance);
                if (known.isEmpty()) {
                    return OptionalDouble.empty();
                }
                variance += byStorage * byStorage * known.get().storageVariance()
                        + 2 * byStorage * byLoss * known.get().covariance()
                        + byLoss * byLoss * known.get().lossVariance();
            }
            if (byThird != 0) {
                OptionalDouble u = PointQuantity.thirdHarmonicU(point);
                if (u.isEmpty()) {
                    return OptionalDouble.empty();
                }
                variance += byThird * byThird * u.getAsDouble() * u.getAsDouble();
            }
            return byStorage == 0 && byLoss == 0 && byThird == 0
                    ? OptionalDouble.empty()
                    : OptionalDouble.of(Math.max(variance, 0));
        }
    }

    /** Its value at a point, with its derivatives; empty where a quantity it uses is missing or it has no finite value. */
    public Optional<Value> at(ModulusPoint point) {
        Map<PointQuantity, Double> quantities = new EnumMap<>(PointQuantity.class);
        for (PointQuantity quantity : uses) {
            OptionalDouble value = quantity.of(point);
            if (value.isEmpty() || !Double.isFinite(value.getAsDouble())) {
                return Optional.empty();
            }
            quantities.put(quantity, value.getAsDouble());
        }
        double value = function.valueOf(quantities);
        if (!Double.isFinite(value)) {
            return Optional.empty();
        }
        double byStorage = 0;
        double byLoss = 0;
        if (point.moduli().isPresent() && uses.stream().anyMatch(this::movesWithTheModulus)) {
            Moduli moduli = point.moduli().get();
            double least = SMALLEST_STEP * moduli.magnitudePa();
            double storageStep = Math.max(STEP * Math.abs(moduli.storagePa()), least);
            double lossStep = Math.max(STEP * Math.abs(moduli.lossPa()), least);
            byStorage = derivative(point, quantities, storageStep, 0);
            byLoss = derivative(point, quantities, 0, lossStep);
        }
        double byThird = quantities.containsKey(PointQuantity.RELATIVE_THIRD_HARMONIC) ? byThird(quantities) : 0;
        return Double.isFinite(byStorage + byLoss + byThird)
                ? Optional.of(new Value(value, byStorage, byLoss, byThird))
                : Optional.empty();
    }

    private boolean movesWithTheModulus(PointQuantity quantity) {
        return quantity.ofTheModulus() || quantity == PointQuantity.STRESS_AMPLITUDE;
    }

    private double derivative(ModulusPoint point, Map<PointQuantity, Double> at, double storageStep, double lossStep) {
        double step = storageStep + lossStep;
        if (step == 0) {
            return 0;
        }
        double above = function.valueOf(moved(point, at, storageStep, lossStep));
        double below = function.valueOf(moved(point, at, -storageStep, -lossStep));
        return (above - below) / (2 * step);
    }

    /** The point's quantities if its modulus were another one, under the same strain. */
    private static Map<PointQuantity, Double> moved(
            ModulusPoint point, Map<PointQuantity, Double> at, double storageStep, double lossStep) {
        Moduli here = point.moduli().orElseThrow();
        Moduli there = new Moduli(here.storagePa() + storageStep, here.lossPa() + lossStep, Optional.empty());
        OptionalDouble omega = PointQuantity.ANGULAR_FREQUENCY.of(point);
        Map<PointQuantity, Double> moved = new EnumMap<>(at);
        moved.replaceAll((quantity, value) -> quantity == PointQuantity.STRESS_AMPLITUDE
                ? value * there.magnitudePa() / here.magnitudePa()
                : quantity.of(there, omega).orElse(value));
        return moved;
    }

    private double byThird(Map<PointQuantity, Double> at) {
        double third = at.get(PointQuantity.RELATIVE_THIRD_HARMONIC);
        double step = Math.max(STEP * Math.abs(third), SMALLEST_STEP);
        Map<PointQuantity, Double> moved = new EnumMap<>(at);
        moved.put(PointQuantity.RELATIVE_THIRD_HARMONIC, third + step);
        double above = function.valueOf(moved);
        moved.put(PointQuantity.RELATIVE_THIRD_HARMONIC, third - step);
        return (above - function.valueOf(moved)) / (2 * step);
    }
}
