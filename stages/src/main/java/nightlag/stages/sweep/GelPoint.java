package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.ToDoubleFunction;
import java.util.stream.DoubleStream;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;

/**
 * The gel point of a cure, or of another series at several frequencies: where tan δ no longer depends on the frequency,
 * tan δ = tan(nπ/2) with n the relaxation exponent of the critical gel (Winter &amp; Chambon, J. Rheol. 30 (1986) 367).
 *
 * <p>Before it tan δ falls with frequency, as in a liquid, and after it rises, as in a solid. At any time the loss angles of
 * all frequencies have a slope b over ln ω (weighted least squares); the gel point is where b passes through zero, which is
 * where the weighted spread that ln ω explains vanishes. There all of them have one mean δ, and n = 2δ/π. u(t) = u(b)/|db/dt|,
 * and u(n) has the angles' own part and what u(t) adds along the curves. Where the angles still differ more than their
 * uncertainty allows, u is multiplied by √(χ²/ν).
 */
public final class GelPoint {
    private static final int LEAST_FREQUENCIES = 3;
    private static final int LEAST_POINTS = 4;
    /** A slope over frequency has a sign from this many of its uncertainties on, in two places running. */
    private static final double CLEAR = 4;

    private static final int LEAST_RUN = 2;
    /** Loss angles this far apart, rms in rad, do not meet in one point. */
    private static final double LARGEST_SPREAD = 0.02;

    private static final double BEYOND_NOISE = 3;
    private static final int REFITS = 3;
    private static final int MOST_REFITS = 12;
    private static final int HALVINGS = 200;

    private final SweepName name;
    private final boolean overTime;
    private final OptionalDouble temperatureK;
    private final List<LossAngleCurve> curves;

    private GelPoint(SweepName name, boolean overTime, OptionalDouble temperatureK, List<LossAngleCurve> curves) {
        this.name = name;
        this.overTime = overTime;
        this.temperatureK = temperatureK;
        this.curves = curves;
    }

    /**
     * The gel point.
     *
     * @param name specimen and sweep
     * @param sweeps its sweeps of kind {@code TIME}, or those of kind {@code TEMPERATURE}, each at one frequency; those that
     *     are not, and points without a modulus or without time or temperature, are passed over
     * @param kind which of the two
     */
    public static Findings of(SweepName name, List<Sweep> sweeps, SweepPlan.Kind kind) {
        boolean overTime = kind == SweepPlan.Kind.TIME;
        if (!overTime && kind != SweepPlan.Kind.TEMPERATURE) {
            throw new IllegalArgumentException(
                    "a gel point is looked for over time or temperature, not in a sweep of " + kind);
        }
        ToDoubleFunction<ModulusPoint> place = overTime
                ? point -> point.elapsedS().orElse(Double.NaN)
                : point -> point.temperatureK().orElse(Double.NaN);
        List<Sweep> fit = sweeps.stream()
                .filter(sweep -> sweep.kind() == kind && sweep.frequencyHz().orElse(0) > 0)
                .map(sweep -> sweep.withPoints(sweep.points().stream()
                        .filter(point -> Double.isFinite(place.applyAsDouble(point))
                                && point.moduli()
                                        .filter(moduli -> moduli.complex().isFinite() && moduli.magnitudePa() > 0)
                                        .isPresent())
                        .toList()))
                .toList();
        List<LossAngleCurve> curves = fit.stream()
                .filter(sweep -> !sweep.points().isEmpty())
                .map(sweep -> LossAngleCurve.of(sweep, place))
                .filter(curve -> curve.size() >= LEAST_POINTS)
                .sorted(Comparator.comparingDouble(LossAngleCurve::logAngularFrequency))
                .toList();
        double[] temperatures = fit.stream()
                .flatMapToDouble(sweep -> sweep.temperatureK().stream())
                .toArray();
        return new GelPoint(name, overTime, DoubleStream.of(temperatures).average(), curves).find();
    }

    private Findings find() {
        long frequencies = curves.stream()
                .mapToDouble(LossAngleCurve::logAngularFrequency)
                .distinct()
                .count();
        if (frequencies < LEAST_FREQUENCIES) {
            return absent(
                    GelReason.GEL_TOO_FEW_FREQUENCIES.with(place(), frequencies, LEAST_FREQUENCIES, LEAST_POINTS));
        }
        Optional<Bracket> bracket = bracket();
        if (bracket.isEmpty()) {
            return absent(GelReason.GEL_NOT_CROSSED.with(place()));
        }
        Optional<Crossing> crossing = crossing(bracket.get());
        if (crossing.isEmpty()) {
            return absent(GelReason.GEL_NOT_CROSSED.with(place()));
        }
        Crossing found = crossing.get();
        if (found.atPeak()) {
            return absent(GelReason.GEL_LOSS_PEAK.with(place()));
        }
        if (found.spread() > LARGEST_SPREAD && found.significant()) {
            return absent(GelReason.GEL_NOT_ONE_POINT.with(place(), Math.toDegrees(found.spread())));
        }
        return new Findings(markers(found), List.of());
    }

    private static Findings absent(Reason why) {
        return Findings.absent(why);
    }

    /**
     * Two places between which the slope over frequency changes its sign for good.
     *
     * @param before the last place of one sign
     * @param after the first place of the other
     * @param guess where a straight line between them is zero
     */
    private record Bracket(double before, double after, double guess) {}

    /** The first change from falling to rising with frequency; without one, the first from rising to falling. */
    private Optional<Bracket> bracket() {
        double from = curves.stream().mapToDouble(LossAngleCurve::first).max().orElseThrow();
        double to = curves.stream().mapToDouble(LossAngleCurve::last).min().orElseThrow();
        double[] places = curves.stream()
                .flatMapToDouble(curve -> DoubleStream.of(curve.places()))
                .filter(place -> place >= from && place <= to)
                .distinct()
                .sorted()
                .toArray();
        List<List<AngleSlope>> runs = new ArrayList<>();
        for (double place : places) {
            AngleSlope slope = AngleSlope.of(
                    place,
                    curves,
                    curves.stream().map(curve -> curve.between(place)).toList());
            if (Math.abs(slope.value()) > CLEAR * Math.sqrt(slope.variance())) {
                List<AngleSlope> last = runs.isEmpty() ? List.of() : runs.get(runs.size() - 1);
                if (last.isEmpty() || last.get(0).value() * slope.value() < 0) {
                    runs.add(new ArrayList<>());
                }
                runs.get(runs.size() - 1).add(slope);
            }
        }
        runs.removeIf(run -> run.size() < LEAST_RUN);
        Optional<Bracket> melting = Optional.empty();
        for (int i = 1; i < runs.size(); i++) {
            List<AngleSlope> earlier = runs.get(i - 1);
            AngleSlope before = earlier.get(earlier.size() - 1);
            AngleSlope after = runs.get(i).get(0);
            if (before.value() * after.value() < 0) {
                double share = before.value() / (before.value() - after.value());
                Bracket found = new Bracket(
                        before.place(), after.place(), before.place() + share * (after.place() - before.place()));
                if (before.value() < 0) {
                    return Optional.of(found);
                }
                melting = melting.or(() -> Optional.of(found));
            }
        }
        return melting;
    }

    /**
     * Where the curves cross.
     *
     * @param place time in s or temperature in K
     * @param placeU its standard uncertainty
     * @param angle δ there, rad
     * @param angleU its standard uncertainty
     * @param spread rms of the angles about their mean, rad
     * @param chiPerFreedom χ²/ν of the angles about their mean
     * @param freedom ν
     * @param atPeak whether some curves rise and others fall there
     */
    private record Crossing(
            double place,
            double placeU,
            double angle,
            double angleU,
            double spread,
            double chiPerFreedom,
            int freedom,
            boolean atPeak) {
        /** Whether noise alone would hardly make the spread. */
        boolean significant() {
            return chiPerFreedom > 1 + BEYOND_NOISE * Math.sqrt(2.0 / freedom);
        }
    }

    /**
     * Local cubics about the place guessed, then about their own crossing, until they stand on it; where they have none, noise
     * misled the guess, and the next ones stand at the end of their points where the slope is the smaller.
     */
    private Optional<Crossing> crossing(Bracket bracket) {
        double place = bracket.guess();
        int onCrossing = 0;
        for (int refit = 0; refit < MOST_REFITS; refit++) {
            List<LossAngleCurve.Piece> pieces = pieces(place);
            if (pieces.size() < curves.size()) {
                return Optional.empty();
            }
            double low = pieces.stream()
                    .mapToDouble(LossAngleCurve.Piece::from)
                    .max()
                    .orElseThrow();
            double high =
                    pieces.stream().mapToDouble(LossAngleCurve.Piece::to).min().orElseThrow();
            OptionalDouble zero = zero(pieces, Math.max(low, bracket.before()), Math.min(high, bracket.after()));
            if (zero.isEmpty()) {
                zero = zero(pieces, low, high);
            }
            if (zero.isPresent()) {
                place = zero.getAsDouble();
                onCrossing++;
                if (onCrossing == REFITS) {
                    return Optional.of(crossing(place, pieces));
                }
            } else {
                place = Math.abs(slope(low, pieces).value())
                                < Math.abs(slope(high, pieces).value())
                        ? low
                        : high;
            }
        }
        return Optional.empty();
    }

    private List<LossAngleCurve.Piece> pieces(double place) {
        double reach =
                curves.stream().mapToDouble(curve -> curve.reach(place)).min().orElseThrow();
        return curves.stream()
                .flatMap(curve -> curve.near(place, reach).stream())
                .toList();
    }

    private AngleSlope slope(double place, List<LossAngleCurve.Piece> pieces) {
        return AngleSlope.of(
                place, curves, pieces.stream().map(piece -> piece.at(place)).toList());
    }

    /** Where the slope passes zero between two places. */
    private OptionalDouble zero(List<LossAngleCurve.Piece> pieces, double from, double to) {
        double low = from;
        double high = to;
        double atLow = slope(low, pieces).value();
        if (!(low < high && atLow * slope(high, pieces).value() <= 0)) {
            return OptionalDouble.empty();
        }
        for (int step = 0; step < HALVINGS; step++) {
            double middle = (low + high) / 2;
            if (middle <= low || middle >= high) {
                break;
            }
            if (slope(middle, pieces).value() * atLow > 0) {
                low = middle;
            } else {
                high = middle;
            }
        }
        return OptionalDouble.of((low + high) / 2);
    }

    private Crossing crossing(double place, List<LossAngleCurve.Piece> pieces) {
        AngleSlope there = slope(place, pieces);
        double weights = 0;
        double logarithm = 0;
        double meanSlope = 0;
        double spread = 0;
        for (int k = 0; k < pieces.size(); k++) {
            double weight = 1 / pieces.get(k).at(place).variance();
            double slope = pieces.get(k).slope(place);
            weights += weight;
            logarithm += weight * curves.get(k).logAngularFrequency();
            meanSlope += weight * slope;
            spread += Math.pow(pieces.get(k).at(place).value() - there.mean(), 2) / pieces.size();
        }
        logarithm /= weights;
        meanSlope /= weights;
        double turning = 0;
        for (int k = 0; k < pieces.size(); k++) {
            double weight = 1 / pieces.get(k).at(place).variance();
            double off = curves.get(k).logAngularFrequency() - logarithm;
            turning += there.variance() * weight * off * pieces.get(k).slope(place);
        }
        int freedom = curves.size() - 2;
        double chiPerFreedom = there.chiSquared() / freedom;
        double scale = Math.sqrt(Math.max(1, chiPerFreedom));
        double placeU = Math.sqrt(there.variance()) / Math.abs(turning);
        double angleU = Math.hypot(Math.sqrt(there.meanVariance()), meanSlope * placeU);
        return new Crossing(
                place,
                scale * placeU,
                there.mean(),
                scale * angleU,
                Math.sqrt(spread),
                chiPerFreedom,
                freedom,
                pieces.stream().anyMatch(piece -> piece.trend() > 0)
                        && pieces.stream().anyMatch(piece -> piece.trend() < 0));
    }

    private List<Marker> markers(Crossing found) {
        String method = String.format(
                Locale.ROOT,
                "tan δ alike at %d frequencies, %.3g to %.3g rad/s, where it is %.4g; local cubics of δ%s%s",
                curves.size(),
                Math.exp(curves.get(0).logAngularFrequency()),
                Math.exp(curves.get(curves.size() - 1).logAngularFrequency()),
                Math.tan(found.angle()),
                curves.stream().allMatch(LossAngleCurve::uKnown)
                        ? ", u from the moduli"
                        : ", u from the scatter about neighbours",
                found.chiPerFreedom() > 1
                        ? String.format(
                                Locale.ROOT,
                                "; the angles differ more than that, u times %.3g",
                                Math.sqrt(found.chiPerFreedom()))
                        : "");
        OptionalDouble temperature = overTime ? temperatureK : OptionalDouble.of(found.place());
        Marker exponent = marker(
                "gel_exponent", temperature, 2 / Math.PI * found.angle(), 2 / Math.PI * found.angleU(), "1", method);
        Marker where = overTime
                ? marker("gel_time", temperature, found.place(), found.placeU(), "s", method)
                : marker("gel_temperature", temperature, found.place(), found.placeU(), "°C", method);
        return List.of(exponent, where);
    }

    private Marker marker(
            String property, OptionalDouble temperature, double value, double u, String unit, String method) {
        return new Marker(
                name.specimen(),
                name.sweep(),
                property,
                temperature,
                OptionalDouble.empty(),
                value,
                OptionalDouble.of(u),
                unit,
                method);
    }

    private String place() {
        return "specimen " + name.specimen() + ", sweep " + name.sweep();
    }
}
