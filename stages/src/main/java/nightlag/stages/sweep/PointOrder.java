package nightlag.stages.sweep;

import java.util.Comparator;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;

/** The order of points in a table: by key from left to right, last by source file. */
public final class PointOrder {
    /**
     * Grade, lot, specimen, sweep, point, source file. Points of one file with the same key go by what they hold, so that
     * the order never depends on the order in which they came.
     */
    public static final Comparator<ModulusPoint> BY_KEY = by(PointKey::grade)
            .thenComparing(by(PointKey::lot))
            .thenComparing(by(PointKey::specimen))
            .thenComparing(by(PointKey::sweep))
            .thenComparing(by(PointKey::point))
            .thenComparing(by(PointKey::sourceFile))
            .thenComparing(byNumber(point -> point.temperatureK().orElse(0)))
            .thenComparing(byNumber(point -> point.frequencyHz().orElse(0)))
            .thenComparing(byNumber(point -> point.elapsedS().orElse(0)))
            .thenComparing(byNumber(point -> point.strainAmplitude().orElse(0)))
            .thenComparing(byNumber(
                    point -> point.moduli().map(moduli -> moduli.storagePa()).orElse(0.0)))
            .thenComparing(byNumber(
                    point -> point.moduli().map(moduli -> moduli.lossPa()).orElse(0.0)));

    private PointOrder() {}

    private static Comparator<ModulusPoint> by(Function<PointKey, String> part) {
        return Comparator.comparing(point -> part.apply(point.key()), NaturalOrder::compare);
    }

    private static Comparator<ModulusPoint> byNumber(ToDoubleFunction<ModulusPoint> number) {
        return Comparator.comparingDouble(number);
    }
}
