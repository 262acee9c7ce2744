package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;

/**
 * Averages the repeats of a sweep: in a frequency sweep points at one frequency and strain, in any other points of equal key
 * where strain, temperature or time agree.
 *
 * <p>The mean is weighted by the inverse covariances. Where repeats scatter by more than these say, the sweep's points all
 * have that much larger a covariance, χ²/ν with χ² and ν summed over its repeats (Birge, Phys. Rev. 40 (1932) 207): of two
 * repeats alone it could hardly be told. Where one of the repeats has no covariance the mean is plain, and its covariance
 * comes from the relative scatter of all such repeats.
 */
final class Repeats {
    /** Frequency sweeps at two strains this far apart, relatively, are no repeats. */
    private static final double OTHER_STRAIN = 0.1;
    /** Times this close, relatively, are one. */
    private static final double SAME_TIME = 0.01;

    private final Sweep sweep;
    private final List<List<ModulusPoint>> groups;
    private final double widening;
    private final Optional<ModuliCovariance> relativeScatter;

    private Repeats(Sweep sweep, List<List<ModulusPoint>> groups) {
        this.sweep = sweep;
        this.groups = groups;
        List<List<Moduli>> repeated = groups.stream()
                .filter(group -> group.size() > 1)
                .map(Repeats::moduli)
                .toList();
        List<List<Moduli>> known = repeated.stream().filter(Repeats::isKnown).toList();
        List<List<Moduli>> unknown =
                repeated.stream().filter(group -> !isKnown(group)).toList();
        int freedom = known.stream().mapToInt(group -> 2 * (group.size() - 1)).sum();
        double chiSquared = known.stream().mapToDouble(WeightedMean::chiSquared).sum();
        this.widening = freedom == 0 ? 1 : Math.max(1, chiSquared / freedom);
        this.relativeScatter = unknown.isEmpty() ? Optional.empty() : Optional.of(relativeScatter(unknown));
    }

    /** The repeats of a sweep. */
    static Repeats of(Sweep sweep) {
        return new Repeats(sweep, groups(sweep));
    }

    /** The sweep with one point in place of each set of repeats. */
    Sweep averaged() {
        return areThereAny()
                ? sweep.withPoints(groups.stream().map(this::together).toList())
                : sweep;
    }

    /** How many points became how many, if there are repeats. */
    Optional<Reason> note() {
        return areThereAny()
                ? Optional.of(SweepReason.SWEEP_REPEATS_TOGETHER.with(
                        sweep.name().specimen(),
                        sweep.name().sweep(),
                        sweep.points().size(),
                        groups.size(),
                        Math.sqrt(widening)))
                : Optional.empty();
    }

    private boolean areThereAny() {
        return groups.size() < sweep.points().size();
    }

    /** The points that are repeats of each other, in the order of the sweep. */
    private static List<List<ModulusPoint>> groups(Sweep sweep) {
        List<ModulusPoint> points = sweep.points();
        return switch (sweep.kind()) {
            case FREQUENCY -> split(PointGroups.byFrequency(points), Repeats::byRoughStrain);
            case AMPLITUDE -> split(PointGroups.byStrain(points), Repeats::byPoint);
            case TEMPERATURE -> inOrder(split(byPoint(points), PointGroups::byIsotherm), PointGroups::temperatureK);
            case TIME, AUTO ->
                inOrder(
                        split(byPoint(points), group -> PointGroups.byNearness(group, Repeats::elapsed, SAME_TIME)),
                        Repeats::elapsed);
        };
    }

    private static List<List<ModulusPoint>> split(
            List<List<ModulusPoint>> groups, Function<List<ModulusPoint>, List<List<ModulusPoint>>> further) {
        return groups.stream().flatMap(group -> further.apply(group).stream()).toList();
    }

    private static List<List<ModulusPoint>> inOrder(
            List<List<ModulusPoint>> groups, ToDoubleFunction<ModulusPoint> figure) {
        return groups.stream()
                .sorted(Comparator.comparingDouble(
                        group -> RecordedSweep.mean(group, figure).orElseThrow()))
                .toList();
    }

    private static List<List<ModulusPoint>> byPoint(List<ModulusPoint> points) {
        return List.copyOf(points.stream()
                .collect(Collectors.groupingBy(point -> point.key().point(), LinkedHashMap::new, Collectors.toList()))
                .values());
    }

    private static List<List<ModulusPoint>> byRoughStrain(List<ModulusPoint> points) {
        return PointGroups.byNearness(points, point -> point.strainAmplitude().orElse(0), OTHER_STRAIN);
    }

    private static double elapsed(ModulusPoint point) {
        return point.elapsedS().orElseThrow();
    }

    private static List<Moduli> moduli(List<ModulusPoint> points) {
        return points.stream().map(point -> point.moduli().orElseThrow()).toList();
    }

    private static boolean isKnown(List<Moduli> moduli) {
        return moduli.stream().allMatch(WeightedMean::canWeigh);
    }

    /** Covariance of one of the repeats, each modulus relative to the size of the group's mean. */
    private static ModuliCovariance relativeScatter(List<List<Moduli>> groups) {
        double storage = 0;
        double loss = 0;
        double both = 0;
        int freedom = 0;
        for (List<Moduli> group : groups) {
            Moduli mean = plainMean(group);
            double storageSize = Math.abs(mean.storagePa());
            double lossSize = Math.abs(mean.lossPa());
            for (Moduli one : group) {
                double first = (one.storagePa() - mean.storagePa()) / storageSize;
                double second = (one.lossPa() - mean.lossPa()) / lossSize;
                storage += first * first;
                loss += second * second;
                both += first * second;
            }
            freedom += group.size() - 1;
        }
        return new ModuliCovariance(storage / freedom, loss / freedom, both / freedom);
    }

    private static Moduli plainMean(List<Moduli> group) {
        return new Moduli(
                group.stream().mapToDouble(Moduli::storagePa).average().orElseThrow(),
                group.stream().mapToDouble(Moduli::lossPa).average().orElseThrow(),
                Optional.empty());
    }

    private ModulusPoint together(List<ModulusPoint> group) {
        List<Moduli> moduli = moduli(group);
        ModulusPoint first = group.get(0);
        if (group.size() == 1) {
            return first.withModuli(widened(moduli.get(0)));
        }
        Moduli mean = isKnown(moduli) ? widened(WeightedMean.of(moduli)) : scattering(plainMean(moduli), moduli.size());
        return new ModulusPoint(
                first.key(),
                first.made(),
                first.deformation(),
                mean(group, ModulusPoint::temperatureK),
                mean(group, ModulusPoint::taggedTemperatureK),
                mean(group, ModulusPoint::frequencyHz),
                mean(group, ModulusPoint::elapsedS),
                mean(group, ModulusPoint::strainAmplitude),
                mean(group, ModulusPoint::stressAmplitudePa),
                Optional.of(mean),
                List.of(),
                worst(group),
                flags(group),
                OptionalDouble.empty(),
                group.stream().mapToInt(ModulusPoint::samplesUsed).sum(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                List.of(SweepReason.SWEEP_REPEATS_AVERAGED.with(group.size())),
                List.of(),
                first.torqueGeometry(),
                Optional.empty(),
                Optional.empty(),
                first.windowS(),
                first.shared());
    }

    private Moduli widened(Moduli moduli) {
        return new Moduli(
                moduli.storagePa(),
                moduli.lossPa(),
                moduli.covariance()
                        .map(own -> new ModuliCovariance(
                                widening * own.storageVariance(),
                                widening * own.lossVariance(),
                                widening * own.covariance())));
    }

    private Moduli scattering(Moduli mean, int repeats) {
        double storageSize = Math.abs(mean.storagePa());
        double lossSize = Math.abs(mean.lossPa());
        return new Moduli(
                mean.storagePa(),
                mean.lossPa(),
                relativeScatter.map(relative -> new ModuliCovariance(
                        relative.storageVariance() * storageSize * storageSize / repeats,
                        relative.lossVariance() * lossSize * lossSize / repeats,
                        relative.covariance() * storageSize * lossSize / repeats)));
    }

    /** Empty where one of the points has none. */
    private static OptionalDouble mean(List<ModulusPoint> group, Function<ModulusPoint, OptionalDouble> figure) {
        return group.stream().allMatch(point -> figure.apply(point).isPresent())
                ? RecordedSweep.mean(group, point -> figure.apply(point).orElseThrow())
                : OptionalDouble.empty();
    }

    private static Quality worst(List<ModulusPoint> group) {
        return Stream.of(Quality.values())
                .filter(quality -> group.stream().anyMatch(point -> point.quality() == quality))
                .reduce((better, worse) -> worse)
                .orElseThrow();
    }

    private static List<Flag> flags(List<ModulusPoint> group) {
        List<Flag> flags = new ArrayList<>();
        for (Flag flag : Flag.values()) {
            if (group.stream().anyMatch(point -> point.flags().contains(flag))) {
                flags.add(flag);
            }
        }
        return flags;
    }
}
