package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collections;
import java.util.IdentityHashMap;
import java.util.List;
import java.util.Set;
import java.util.function.ToDoubleFunction;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;
import nightlag.stages.numeric.RankCorrelation;

/**
 * The amplitude sweeps of a lot: points of one specimen, sweep and deformation, at one temperature and frequency, in which
 * the strain varies.
 *
 * @param sweeps the sweeps, the points of each with strain rising
 * @param others the points of none
 */
public record AmplitudeSweeps(List<List<ModulusPoint>> sweeps, List<ModulusPoint> others) {
    /** The strain must vary by more. */
    private static final double LEAST_STRAIN_RATIO = 1.5;
    /** And the stress by more: in a run at constant stress the strain follows the modulus. A paste that yields needs little. */
    private static final double LEAST_STRESS_RATIO = 1.2;
    /** Two points rise or fall by chance, and two frequency sweeps at two strains are no amplitude sweeps. */
    private static final int LEAST_STRAINS = 3;
    /** Of the ranks of strain and stress: nearly every larger strain has a larger stress. */
    private static final double LEAST_CORRELATION = 0.9;

    /** Copies the lists. */
    public AmplitudeSweeps {
        sweeps = sweeps.stream().map(List::copyOf).toList();
        others = List.copyOf(others);
    }

    /**
     * Finds them. Points without a modulus or a strain, and those unusable for more than their third harmonic, belong to none.
     * Nor do windows of a longer record, unless asked for.
     *
     * @param points the lot's points
     * @param kind what varies, as configured; {@code AUTO}: over three strains or more, up to that of the largest stress,
     *     the strain must vary by more than a factor of 1.5, the stress by more than 1.2, and the stress must rise with the
     *     strain; beyond it a specimen may yield or slip; {@code AMPLITUDE}: every group of two strains is a sweep; else there are none
     */
    public static AmplitudeSweeps among(List<ModulusPoint> points, SweepPlan.Kind kind) {
        List<List<ModulusPoint>> sweeps = new ArrayList<>();
        if (kind == SweepPlan.Kind.AUTO || kind == SweepPlan.Kind.AMPLITUDE) {
            List<ModulusPoint> candidates =
                    points.stream().filter(point -> canBelong(point, kind)).toList();
            for (List<ModulusPoint> sweep : SweepName.groupByDeformation(candidates)) {
                for (List<ModulusPoint> isotherm : PointGroups.byIsotherm(sweep)) {
                    for (List<ModulusPoint> group : PointGroups.byFrequency(isotherm)) {
                        List<List<ModulusPoint>> strains = strains(group);
                        if (strains.size() > 1 && (kind == SweepPlan.Kind.AMPLITUDE || isDriven(strains))) {
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
        return PointGroups.byStrain(points);
    }

    /** A point's strain amplitude. */
    static double strain(ModulusPoint point) {
        return point.strainAmplitude().orElseThrow();
    }

    private static boolean canBelong(ModulusPoint point, SweepPlan.Kind kind) {
        // in one long record strain is not made to vary step by step: it follows the specimen
        boolean mayBeDriven =
                kind == SweepPlan.Kind.AMPLITUDE || point.windowS().isEmpty();
        boolean trusted = point.quality() != Quality.UNUSABLE
                || point.unusableOnlyBy().filter(flag -> flag == Flag.NONLINEAR).isPresent();
        return trusted
                && mayBeDriven
                && point.frequencyHz().orElse(0) > 0
                && point.strainAmplitude().orElse(0) > 0
                && point.stressAmplitudePa().orElse(0) > 0
                && point.moduli().filter(moduli -> moduli.complex().isFinite()).isPresent();
    }

    /**
     * Whether the strain was made to vary. Where a specimen changes by itself on a frame that gives, or at a stress that the
     * instrument holds, stress falls or stays as strain rises.
     */
    private static boolean isDriven(List<List<ModulusPoint>> strains) {
        double[] strain = means(strains, AmplitudeSweeps::strain);
        double[] stress = means(strains, point -> point.stressAmplitudePa().orElseThrow());
        int largest = 0;
        for (int k = 1; k < stress.length; k++) {
            if (stress[k] > stress[largest]) {
                largest = k;
            }
        }
        int rising = largest + 1;
        if (rising < LEAST_STRAINS) {
            return false;
        }
        double[] strainToPeak = Arrays.copyOf(strain, rising);
        double[] stressToPeak = Arrays.copyOf(stress, rising);
        return ratio(strainToPeak) > LEAST_STRAIN_RATIO
                && ratio(stressToPeak) > LEAST_STRESS_RATIO
                && RankCorrelation.of(strainToPeak, stressToPeak) >= LEAST_CORRELATION;
    }

    private static double[] means(List<List<ModulusPoint>> strains, ToDoubleFunction<ModulusPoint> figure) {
        return strains.stream()
                .mapToDouble(
                        points -> points.stream().mapToDouble(figure).average().orElseThrow())
                .toArray();
    }

    private static double ratio(double[] figures) {
        return Arrays.stream(figures).max().orElseThrow()
                / Arrays.stream(figures).min().orElseThrow();
    }
}
