package nightlag.stages.superposition;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.moduli.SharedErrors;
import nightlag.stages.numeric.EvenSplines;
import nightlag.stages.superposition.SuperpositionPlan.VerticalShift;

/** All isotherms of a lot to one master curve. */
public final class Superposition {
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;
    private static final double LN_10 = Math.log(10);

    private final SuperpositionPlan plan;
    private final List<IsothermReadings> isotherms;
    private final List<Reason> notes = new ArrayList<>();

    private Superposition(List<IsothermReadings> isotherms, SuperpositionPlan plan) {
        this.isotherms = isotherms;
        this.plan = plan;
    }

    /**
     * Superposes isotherms of one deformation mode.
     *
     * @param isotherms in any order, each at another temperature
     * @param plan how
     * @throws ReductionFault if there is no isotherm, or the reference temperature is outside those that can be superposed
     */
    public static MasterCurve of(List<IsothermReadings> isotherms, SuperpositionPlan plan) throws ReductionFault {
        List<IsothermReadings> rising = isotherms.stream()
                .filter(isotherm -> !isotherm.readings().isEmpty())
                .sorted(Comparator.comparingDouble(IsothermReadings::temperatureK))
                .toList();
        if (rising.isEmpty()) {
            throw new ReductionFault(SuperpositionReason.SUPERPOSITION_NO_ISOTHERMS.with());
        }
        return new Superposition(rising, plan).masterCurve();
    }

    private MasterCurve masterCurve() throws ReductionFault {
        double[] temperatures =
                isotherms.stream().mapToDouble(IsothermReadings::temperatureK).toArray();
        List<LogIsotherm> logs = isotherms.stream().map(LogIsotherm::of).toList();
        int[] enough = IntStream.range(0, logs.size())
                .filter(i -> logs.get(i).places() >= EvenSplines.SMOOTH_COEFFICIENTS)
                .toArray();
        if (enough.length < 2) {
            int alone = enough.length == 1 ? enough[0] : nearest(temperatures);
            tooFew(logs, new int[] {alone});
            return single(alone);
        }
        tooFew(logs, enough);
        Superposed superposed =
                Superposing.of(IntStream.of(enough).mapToObj(logs::get).toList(), plan);
        int[] used = superposed.used().stream().mapToInt(k -> enough[k]).toArray();
        IntStream.of(enough)
                .filter(i -> IntStream.of(used).noneMatch(k -> k == i))
                .forEach(i -> notes.add(SuperpositionReason.ISOTHERM_WITHOUT_OVERLAP.with(celsius(temperatures[i]))));
        if (used.length == 1) {
            return single(used[0]);
        }
        if (superposed.verticalLimited()) {
            notes.add(SuperpositionReason.VERTICAL_SHIFT_LIMITED.with());
        }
        for (int i : used) {
            if (logs.get(i).missing() > 0) {
                notes.add(SuperpositionReason.MODULI_WITHOUT_LOGARITHM.with(
                        logs.get(i).missing(), celsius(temperatures[i])));
            }
        }
        return superposed(used, superposed);
    }

    private int nearest(double[] temperatures) {
        return IntStream.range(0, temperatures.length)
                .boxed()
                .min(Comparator.comparingDouble(i -> Math.abs(temperatures[i] - plan.referenceTemperatureK())))
                .orElseThrow();
    }

    private void tooFew(List<LogIsotherm> logs, int[] enough) {
        List<LogIsotherm> left = IntStream.range(0, logs.size())
                .filter(i -> IntStream.of(enough).noneMatch(k -> k == i))
                .mapToObj(logs::get)
                .toList();
        if (!left.isEmpty()) {
            notes.add(TooFewFrequencies.of(left));
        }
    }

    /** One isotherm alone is the master curve: no shift, no law, no misfit. */
    private MasterCurve single(int index) throws ReductionFault {
        IsothermReadings isotherm = isotherms.get(index);
        if (!ReferencePlace.isAt(isotherm.temperatureK(), plan.referenceTemperatureK())) {
            throw outside(isotherm.temperatureK(), isotherm.temperatureK());
        }
        double lnB = Superposing.knownLnB(isotherm.temperatureK(), plan);
        List<ShiftFactor> shifts = new ArrayList<>();
        for (int i = 0; i < isotherms.size(); i++) {
            shifts.add(
                    i == index
                            ? new ShiftFactor(
                                    plan.referenceTemperatureK(),
                                    isotherm.temperatureK(),
                                    OptionalDouble.of(0),
                                    OptionalDouble.of(0),
                                    OptionalDouble.of(lnB / LN_10),
                                    plan.verticalShift() == VerticalShift.FITTED
                                            ? OptionalDouble.of(0)
                                            : OptionalDouble.empty(),
                                    OptionalDouble.empty(),
                                    OptionalDouble.empty(),
                                    true)
                            : leftOut(i));
        }
        return new MasterCurve(
                shifts, sorted(moved(isotherm, 0, lnB)), SharedErrors.none(), List.of(), Optional.empty(), notes);
    }

    private MasterCurve superposed(int[] used, Superposed superposed) throws ReductionFault {
        JointCurves common = superposed.common();
        double[] temperatures = IntStream.of(used)
                .mapToDouble(i -> isotherms.get(i).temperatureK())
                .toArray();
        double reference = plan.referenceTemperatureK();
        ReferencePlace place = ReferencePlace.of(temperatures, reference)
                .orElseThrow(() -> outside(temperatures[0], temperatures[temperatures.length - 1]));
        LawOutcome law = LawFit.fit(
                temperatures,
                scaled(common.horizontal(), 1 / LN_10),
                scaled(common.covariance(), common.widening() / (LN_10 * LN_10)),
                common.anchor(),
                reference,
                plan.law());
        notes.addAll(law.notes());
        double zeroA = place.mean(common.horizontal()) - bend(place, temperatures, law.law());
        if (law.law().isEmpty() && !place.isIsotherm()) {
            notes.add(SuperpositionReason.REFERENCE_INTERPOLATED.with(
                    celsius(reference), celsius(place.lowerK()), celsius(place.upperK())));
        }
        // a density shift is zero at the reference by its formula
        boolean fitted = plan.verticalShift() == VerticalShift.FITTED;
        double zeroB = fitted ? place.mean(common.vertical()) : 0;
        double[][] covariance = scaled(place.ofDifferences(common.covariance()), common.widening());

        List<ShiftFactor> shifts = new ArrayList<>();
        List<MasterPoint> points = new ArrayList<>();
        for (int i = 0; i < isotherms.size(); i++) {
            int index = i;
            int k = IntStream.range(0, used.length)
                    .filter(m -> used[m] == index)
                    .findFirst()
                    .orElse(-1);
            if (k < 0) {
                shifts.add(leftOut(i));
                continue;
            }
            double lnA = common.horizontal()[k] - zeroA;
            double lnB = common.vertical()[k] - zeroB;
            shifts.add(new ShiftFactor(
                    reference,
                    temperatures[k],
                    OptionalDouble.of(lnA / LN_10),
                    OptionalDouble.of(u(covariance[k][k])),
                    OptionalDouble.of(lnB / LN_10),
                    fitted
                            ? OptionalDouble.of(u(covariance[used.length + k][used.length + k]))
                            : OptionalDouble.empty(),
                    law.law()
                            .map(found -> OptionalDouble.of(found.log10A(temperatures[k])))
                            .orElse(OptionalDouble.empty()),
                    OptionalDouble.of(common.misfitDecades(k)),
                    true));
            points.addAll(moved(isotherms.get(i), lnA, lnB));
        }
        List<Marker> markers = new ArrayList<>(law.markers());
        Verdict verdict = Verdict.of(superposed, plan);
        markers.add(verdict.marker(reference));
        verdict.doubt().ifPresent(notes::add);
        List<MasterPoint> rising = sorted(points);
        int[] isothermOf = rising.stream()
                .mapToInt(point -> Arrays.binarySearch(temperatures, point.temperatureK()))
                .toArray();
        return new MasterCurve(shifts, rising, SharedErrors.of(isothermOf, covariance), markers, law.law(), notes);
    }

    /**
     * ln a by which a law lies below the straight line between the isotherms beside the reference; of an isotherm that is only
     * near it, the law's way from there to the reference, which next to a glass transition is a tenth of a decade in half a kelvin.
     */
    private static double bend(ReferencePlace place, double[] temperatures, Optional<FittedLaw> law) {
        return law.isEmpty()
                ? 0
                : LN_10
                        * place.mean(Arrays.stream(temperatures)
                                .map(law.get()::log10A)
                                .toArray());
    }

    private static double u(double variance) {
        return Math.sqrt(Math.max(0, variance)) / LN_10;
    }

    private static double[] scaled(double[] values, double factor) {
        return Arrays.stream(values).map(value -> value * factor).toArray();
    }

    private static double[][] scaled(double[][] values, double factor) {
        return Arrays.stream(values).map(row -> scaled(row, factor)).toArray(double[][]::new);
    }

    private ReductionFault outside(double lowestK, double highestK) {
        return new ReductionFault(SuperpositionReason.SUPERPOSITION_REFERENCE_OUTSIDE.with(
                celsius(plan.referenceTemperatureK()), celsius(lowestK), celsius(highestK)));
    }

    private static double celsius(double kelvin) {
        return kelvin - KELVIN_AT_ZERO_CELSIUS;
    }

    private ShiftFactor leftOut(int index) {
        OptionalDouble none = OptionalDouble.empty();
        return new ShiftFactor(
                plan.referenceTemperatureK(),
                isotherms.get(index).temperatureK(),
                none,
                none,
                none,
                none,
                none,
                none,
                false);
    }

    private List<MasterPoint> moved(IsothermReadings isotherm, double lnA, double lnB) {
        double a = Math.exp(lnA);
        double b = Math.exp(lnB);
        return isotherm.readings().stream()
                .map(reading -> new MasterPoint(
                        plan.referenceTemperatureK(),
                        isotherm.temperatureK(),
                        new ModulusReading(a * reading.angularFrequency(), times(reading.moduli(), b))))
                .toList();
    }

    private static Moduli times(Moduli moduli, double b) {
        return new Moduli(
                b * moduli.storagePa(),
                b * moduli.lossPa(),
                moduli.covariance()
                        .map(known -> new ModuliCovariance(
                                b * b * known.storageVariance(),
                                b * b * known.lossVariance(),
                                b * b * known.covariance())));
    }

    private static List<MasterPoint> sorted(List<MasterPoint> points) {
        return points.stream()
                .sorted(Comparator.<MasterPoint>comparingDouble(
                                point -> point.reduced().angularFrequency())
                        .thenComparingDouble(MasterPoint::temperatureK))
                .toList();
    }
}
