package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.moduli.SharedErrors;

/**
 * The flow curve of a liquid from its moduli, by the rule of Cox and Merz (J. Polym. Sci. 28 (1958) 619): the viscosity at a
 * shear rate is |η*| = |G*|/ω at the angular frequency of the same number. Two laws are fitted to it, that of Cross (1965)
 * and that of Carreau (1972) and Yasuda (1981).
 *
 * <p>A law is given only where the data fix every constant of it to better than its own size, and where more than half of its
 * zero-rate viscosity was measured: beyond that it is the law's shape that speaks, and not the data. The viscosity at
 * infinite rate is zero unless the data show it.
 */
public final class FlowCurve {
    private static final double LARGEST_RELATIVE_U = 1;
    private static final double MOST_BEYOND_MEASURED = 2;
    private static final double SMALLEST_RELATIVE_U = 1e-12;
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;
    private static final int SPARE = 2;

    private final SweepName name;
    private final double temperatureK;
    private final List<ModulusReading> readings;
    private final SharedErrors sharedErrors;
    private final boolean weighted;

    private FlowCurve(SweepName name, double temperatureK, List<ModulusReading> readings, SharedErrors sharedErrors) {
        this.sharedErrors = sharedErrors;
        this.name = name;
        this.temperatureK = temperatureK;
        this.readings = readings;
        this.weighted = readings.stream()
                .allMatch(reading -> reading.moduli().covariance().isPresent());
    }

    /**
     * The constants of both laws.
     *
     * @param name specimen and sweep of the moduli; both texts empty for those of a whole lot
     * @param temperatureK their temperature, K
     * @param readings moduli in shear of a frequency sweep or a master curve, in any order; where any comes without its
     *     covariance all are weighted alike
     * @param sharedErrors what several of them are off by together
     */
    public static Findings of(
            SweepName name, double temperatureK, List<ModulusReading> readings, SharedErrors sharedErrors) {
        int[] rising = IntStream.range(0, readings.size())
                .filter(i -> isUsable(readings.get(i)))
                .boxed()
                .sorted(Comparator.comparingDouble(i -> readings.get(i).angularFrequency()))
                .mapToInt(Integer::intValue)
                .toArray();
        return new FlowCurve(
                        name,
                        temperatureK,
                        IntStream.of(rising).mapToObj(readings::get).toList(),
                        sharedErrors.ofReadings(rising))
                .find();
    }

    private static boolean isUsable(ModulusReading reading) {
        return reading.angularFrequency() > 0
                && reading.moduli().complex().isFinite()
                && reading.moduli().magnitudePa() > 0;
    }

    private Findings find() {
        long frequencies = readings.stream()
                .mapToDouble(ModulusReading::angularFrequency)
                .distinct()
                .count();
        int needed = needed(FlowLaw.CROSS);
        if (frequencies < needed) {
            return Findings.absent(FlowCurveReason.FLOW_CURVE_TOO_FEW_FREQUENCIES.with(place(), frequencies, needed));
        }
        ModulusReading lowest = readings.get(0);
        if (lowest.moduli().storagePa() > lowest.moduli().lossPa()) {
            return Findings.absent(FlowCurveReason.FLOW_CURVE_NO_LIQUID.with(place(), lowest.angularFrequency()));
        }
        FlowFit fit = new FlowFit(
                readings.stream()
                        .mapToDouble(reading -> Math.log(reading.angularFrequency()))
                        .toArray(),
                readings.stream().mapToDouble(FlowCurve::logViscosity).toArray(),
                readings.stream()
                        .mapToDouble(reading -> weighted ? relativeU(reading.moduli()) : 1)
                        .toArray(),
                weighted,
                sharedErrors);
        return Findings.together(fit.fitAll().stream()
                .map(fitted -> frequencies < needed(fitted.law()) ? tooFew(fitted.law()) : findings(fitted))
                .toList());
    }

    private Findings tooFew(FlowLaw law) {
        return Findings.absent(FlowCurveReason.FLOW_LAW_NOT_FIXED.with(place(), law.title(), "constants"));
    }

    private static int needed(FlowLaw law) {
        return FlowLaw.FIRST_SHAPE + law.shapes() + SPARE;
    }

    private static double logViscosity(ModulusReading reading) {
        return Math.log(reading.moduli().magnitudePa() / reading.angularFrequency());
    }

    /** u(|G*|)/|G*| by the law of propagation (JCGM 100:2008, 5.2), the covariance of G' and G'' included. */
    private static double relativeU(Moduli moduli) {
        ModuliCovariance known = moduli.covariance().orElseThrow();
        double square = moduli.magnitudePa() * moduli.magnitudePa();
        double storage = moduli.storagePa();
        double loss = moduli.lossPa();
        double variance = (storage * storage * known.storageVariance()
                        + 2 * storage * loss * known.covariance()
                        + loss * loss * known.lossVariance())
                / (square * square);
        return Math.max(Math.sqrt(Math.max(variance, 0)), SMALLEST_RELATIVE_U);
    }

    private Findings findings(FlowFit.Fitted fitted) {
        Optional<Reason> why = refusal(fitted);
        if (why.isPresent()) {
            return Findings.absent(why.get());
        }
        FlowLaw law = fitted.law();
        double[] p = fitted.parameters();
        double[] u = fitted.u().orElseThrow();
        String method = method(fitted);
        List<Marker> markers = new ArrayList<>();
        // a law that misses the points has no say beyond them: what it adds to the highest viscosity measured is in u
        double beyond = fitted.misses() ? Math.log(beyondMeasured(fitted)) : 0;
        markers.add(logarithmic(
                law.property("zero_rate_viscosity"),
                p[FlowLaw.VISCOSITY],
                Math.hypot(u[FlowLaw.VISCOSITY], beyond),
                "Pa·s",
                method));
        markers.add(logarithmic(law.property("time"), p[FlowLaw.TIME], u[FlowLaw.TIME], "s", method));
        for (int i = 0; i < law.shapes(); i++) {
            int at = FlowLaw.FIRST_SHAPE + i;
            markers.add(marker(law.property(law.shape().get(i).word()), p[at], u[at], "1", method));
        }
        if (fitted.hasInfinite()) {
            int last = p.length - 1;
            markers.add(logarithmic(law.property("infinite_rate_viscosity"), p[last], u[last], "Pa·s", method));
        }
        return new Findings(markers, List.of());
    }

    private Optional<Reason> refusal(FlowFit.Fitted fitted) {
        FlowLaw law = fitted.law();
        double beyond = beyondMeasured(fitted);
        if (beyond > MOST_BEYOND_MEASURED) {
            return Optional.of(FlowCurveReason.FLOW_LAW_NO_PLATEAU.with(place(), law.title(), beyond));
        }
        if (fitted.u().isEmpty()) {
            return Optional.of(FlowCurveReason.FLOW_LAW_NOT_FIXED.with(place(), law.title(), "constants"));
        }
        double[] u = fitted.u().get();
        double[] p = fitted.parameters();
        if (u[FlowLaw.VISCOSITY] > LARGEST_RELATIVE_U) {
            return notFixed(law, "zero-rate viscosity");
        }
        if (u[FlowLaw.TIME] > LARGEST_RELATIVE_U) {
            return notFixed(law, "time");
        }
        if (u[FlowLaw.FIRST_SHAPE] > LARGEST_RELATIVE_U * law.width(p)) {
            return notFixed(law, law.shape().get(0).word());
        }
        int last = FlowLaw.FIRST_SHAPE + law.shapes() - 1;
        return u[last] > LARGEST_RELATIVE_U * Math.abs(law.power(p))
                ? notFixed(law, law.shape().get(law.shapes() - 1).word())
                : Optional.empty();
    }

    private Optional<Reason> notFixed(FlowLaw law, String constant) {
        return Optional.of(FlowCurveReason.FLOW_LAW_NOT_FIXED.with(place(), law.title(), constant));
    }

    private double beyondMeasured(FlowFit.Fitted fitted) {
        double highest =
                readings.stream().mapToDouble(FlowCurve::logViscosity).max().orElseThrow();
        return Math.exp(fitted.parameters()[FlowLaw.VISCOSITY] - highest);
    }

    private String method(FlowFit.Fitted fitted) {
        return String.format(
                Locale.ROOT,
                "Cox–Merz rule, %s law fitted to |η*| at %d points, %s, rms misfit %.2g %%%s%s",
                fitted.law().title(),
                readings.size(),
                weighted ? "weighted by u" : "weighted alike, u from the scatter",
                100 * fitted.rms(),
                fitted.misses() ? ", more than chance would make, and in u" : "",
                fitted.hasInfinite() ? "" : ", no viscosity at infinite rate");
    }

    private String place() {
        String celsius = String.format(Locale.ROOT, "at %.1f °C", temperatureK - KELVIN_AT_ZERO_CELSIUS);
        return name.specimen().isEmpty() && name.sweep().isEmpty()
                ? celsius
                : "specimen " + name.specimen() + ", sweep " + name.sweep() + ", " + celsius;
    }

    private Marker logarithmic(String property, double logarithm, double u, String unit, String method) {
        double value = Math.exp(logarithm);
        return marker(property, value, u * value, unit, method);
    }

    private Marker marker(String property, double value, double u, String unit, String method) {
        return new Marker(
                name.specimen(),
                name.sweep(),
                property,
                OptionalDouble.of(temperatureK),
                OptionalDouble.empty(),
                value,
                OptionalDouble.of(u),
                unit,
                method);
    }
}
