package nightlag.stages.sweep;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;
import nightlag.stages.moduli.ModulusPoint;

/**
 * What a sweep is called within its lot.
 *
 * @param specimen specimen of the lot
 * @param sweep sweep of the specimen
 */
public record SweepName(String specimen, String sweep) {
    /** The sweep a point belongs to. */
    public static SweepName of(ModulusPoint point) {
        return new SweepName(point.key().specimen(), point.key().sweep());
    }

    /** The points of each sweep; sweeps and points in the order in which they come. */
    public static Map<SweepName, List<ModulusPoint>> group(List<ModulusPoint> points) {
        return points.stream().collect(Collectors.groupingBy(SweepName::of, LinkedHashMap::new, Collectors.toList()));
    }

    /** The points of each sweep and deformation, a modulus in shear being another than one in extension. */
    static List<List<ModulusPoint>> groupByDeformation(List<ModulusPoint> points) {
        return group(points).values().stream()
                .flatMap(sweep -> sweep.stream()
                        .collect(Collectors.groupingBy(
                                ModulusPoint::deformation, LinkedHashMap::new, Collectors.toList()))
                        .values()
                        .stream())
                .toList();
    }
}
