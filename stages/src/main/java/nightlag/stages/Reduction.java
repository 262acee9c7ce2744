package nightlag.stages;

import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;

/**
 * What one record gave.
 *
 * @param points its points; one for a record at one frequency, and one that is unusable for a creep record without a curve
 * @param creep the curve of a creep record
 */
public record Reduction(List<ModulusPoint> points, Optional<CreepCurve> creep) {
    /** Copies the list. */
    public Reduction {
        points = List.copyOf(points);
    }

    /** Points alone. */
    public Reduction(List<ModulusPoint> points) {
        this(points, Optional.empty());
    }

    /** What its points, and its curve, are called. */
    public Stream<PointKey> keys() {
        return Stream.concat(
                points.stream().map(ModulusPoint::key), creep.stream().map(CreepCurve::key));
    }

    /** The lot's date as the record tags it. */
    public Optional<String> made() {
        return Stream.concat(
                        points.stream().flatMap(point -> point.made().stream()),
                        creep.stream().flatMap(curve -> curve.made().stream()))
                .findFirst();
    }

    /** How many there are: points, and a curve counts as one. */
    public int count() {
        return points.size() + (creep.isPresent() ? 1 : 0);
    }
}
