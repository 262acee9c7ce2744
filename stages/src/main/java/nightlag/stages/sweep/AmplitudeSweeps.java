package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Collections;
import java.util.Comparator;
import java.util.IdentityHashMap;
import java.util.List;
import java.util.Set;
import java.util.function.ToDoubleFunction;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;

/**
 * The amplitude sweeps of a lot: points of one specimen and sweep, at one temperature and frequency, in which the strain
 * varies.
 *
 * @param sweeps the sweeps, the points of each with strain rising
 * @param others the points of none
 */
public record AmplitudeSweeps(List<List<ModulusPoint>> sweeps, List<ModulusPoint> others) {
    /** Strains and frequencies this close, relatively, are one. */
    private static final double SAME = 0.01;
    /** Strain and stress must both vary by more: in a run at constant stress the strain follows the modulus. */
    private static final double LEAST_RATIO = 1.5;

    /** Copies the lists. */
    public AmplitudeSweeps {
        sweeps = sweeps.stream().map(List::copyOf).toList();
        others = List.copyOf(others);
    }

    /**
     * Finds them. Points without a modulus or a strain, and those unusable for more than their third harmonic, belong to none.
     *
     * @param points the lot's points
     * @param kind what varies, as configured; {@code AUTO}: strain and stress must both vary by more than a factor of 1.5
     *     between at least two points; {@code AMPLITUDE}: every group of two strains is a sweep; else there are none
     */
    public static AmplitudeSweeps among(List<ModulusPoint> points, SweepPlan.Kind kind) {
        List<List<ModulusPoint>> sweeps = new ArrayList<>();
        if (kind == SweepPlan.Kind.AUTO || kind == SweepPlan.Kind.AMPLITUDE) {
            List<ModulusPoint> candidates =
                    points.stream().filter(AmplitudeSweeps::canBelong).toList();
            for (List<ModulusPoint> sweep : SweepName.group(candidates).values()) {
                for (List<ModulusPoint> isotherm : isotherms(sweep)) {
                    for (List<ModulusPoint> group : byNearness(isotherm, AmplitudeSweeps::frequency)) {
                        List<List<ModulusPoint>> strains = strains(group);
                        if (strains.size() > 1 && (kind == SweepPlan.Kind.AMPLITUDE || varies(group))) {
                            sweeps.add(strains.stream().flatMap(List::stream).toList());
                        }
                    }
                }
            }
        }
        Set<ModulusPoint> taken = Collections.newSetFromMap(new IdentityHashMap<>());
        sweeps.forEach(taken::addAll);
        return new AmplitudeSweeps(
                sweeps, points.stream().filter(point -> !taken.contains(point)).toList());
    }

    /** The points of a sweep by strain, those within a hundredth of each other together, strain rising. */
    static List<List<ModulusPoint>> strains(List<ModulusPoint> points) {
        return byNearness(points, AmplitudeSweeps::strain);
    }

    /** A point's strain amplitude. */
    static double strain(ModulusPoint point) {
        return point.strainAmplitude().orElseThrow();
    }

    private static double frequency(ModulusPoint point) {
        return point.frequencyHz().orElseThrow();
    }

    private static boolean canBelong(ModulusPoint point) {
        boolean trusted = point.quality() != Quality.UNUSABLE
                || point.unusableOnlyBy().filter(flag -> flag == Flag.NONLINEAR).isPresent();
        return trusted
                && point.frequencyHz().orElse(0) > 0
                && point.strainAmplitude().orElse(0) > 0
                && point.stressAmplitudePa().orElse(0) > 0
                && point.moduli().filter(moduli -> moduli.complex().isFinite()).isPresent();
    }

    /** By temperature; points without one are together. */
    private static List<List<ModulusPoint>> isotherms(List<ModulusPoint> points) {
        List<List<ModulusPoint>> groups = new ArrayList<>();
        Isotherms.group(points).forEach(isotherm -> groups.add(isotherm.points()));
        groups.add(
                points.stream().filter(point -> point.temperatureK().isEmpty()).toList());
        return groups;
    }

    private static List<List<ModulusPoint>> byNearness(
            List<ModulusPoint> points, ToDoubleFunction<ModulusPoint> figure) {
        List<List<ModulusPoint>> groups = new ArrayList<>();
        double first = 0;
        for (ModulusPoint point :
                points.stream().sorted(Comparator.comparingDouble(figure)).toList()) {
            if (groups.isEmpty() || figure.applyAsDouble(point) > first * (1 + SAME)) {
                groups.add(new ArrayList<>());
                first = figure.applyAsDouble(point);
            }
            groups.get(groups.size() - 1).add(point);
        }
        return groups;
    }

    private static boolean varies(List<ModulusPoint> points) {
        return ratio(points, AmplitudeSweeps::strain) > LEAST_RATIO
                && ratio(points, point -> point.stressAmplitudePa().orElseThrow()) > LEAST_RATIO;
    }

    private static double ratio(List<ModulusPoint> points, ToDoubleFunction<ModulusPoint> figure) {
        return points.stream().mapToDouble(figure).max().orElseThrow()
                / points.stream().mapToDouble(figure).min().orElseThrow();
    }
}
