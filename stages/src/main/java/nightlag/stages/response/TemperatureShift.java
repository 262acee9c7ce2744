package nightlag.stages.response;

import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Function;
import nightlag.stages.fault.Reason;
import nightlag.stages.superposition.FittedLaw;
import nightlag.stages.superposition.MasterCurve;
import nightlag.stages.superposition.ShiftFactor;

/**
 * How much slower the material is at a temperature than at the spectrum's own: log10 a_T by the fitted law, without one on
 * straight lines between the isotherms beside it. Without several isotherms it is known at one temperature only.
 */
public final class TemperatureShift {
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;

    /** As near as this a temperature is that of an isotherm, K. */
    private static final double SAME_K = 0.5;

    private final double referenceK;
    private final List<ShiftFactor> isotherms;
    private final Optional<FittedLaw> law;

    private TemperatureShift(double referenceK, List<ShiftFactor> isotherms, Optional<FittedLaw> law) {
        this.referenceK = referenceK;
        this.isotherms = isotherms;
        this.law = law;
    }

    /**
     * The shift of a lot.
     *
     * @param referenceK temperature of its spectrum, K
     * @param master its master curve, where there is one
     */
    public static TemperatureShift of(double referenceK, Optional<MasterCurve> master) {
        return new TemperatureShift(
                referenceK,
                master.map(curve -> curve.shifts().stream()
                                .filter(ShiftFactor::used)
                                .sorted(Comparator.comparingDouble(ShiftFactor::temperatureK))
                                .toList())
                        .orElse(List.of()),
                master.flatMap(MasterCurve::law));
    }

    /** Temperature of the spectrum, K. */
    public double referenceK() {
        return referenceK;
    }

    /** Why there is no shift for a temperature in K; empty where there is one. */
    Optional<Reason> refusal(String response, double temperatureK) {
        double asked = temperatureK - KELVIN_AT_ZERO_CELSIUS;
        if (law.isPresent()) {
            return law.get().reaches(temperatureK)
                    ? Optional.empty()
                    : Optional.of(ResponseReason.RESPONSE_BEYOND_POLE.with(response, asked));
        }
        if (isWithin(temperatureK)) {
            return Optional.empty();
        }
        return Optional.of(
                isotherms.size() > 1
                        ? ResponseReason.RESPONSE_TEMPERATURE_OUTSIDE.with(
                                response,
                                asked,
                                lowestK() - KELVIN_AT_ZERO_CELSIUS,
                                highestK() - KELVIN_AT_ZERO_CELSIUS)
                        : ResponseReason.RESPONSE_OTHER_TEMPERATURE.with(
                                response, asked, referenceK - KELVIN_AT_ZERO_CELSIUS));
    }

    /** Whether a temperature in K is among the isotherms. */
    public boolean isWithin(double temperatureK) {
        return temperatureK >= lowestK() - SAME_K && temperatureK <= highestK() + SAME_K;
    }

    /** The lowest isotherm, K. */
    public double lowestK() {
        return isotherms.isEmpty() ? referenceK : isotherms.get(0).temperatureK();
    }

    /** The highest isotherm, K. */
    public double highestK() {
        return isotherms.isEmpty()
                ? referenceK
                : isotherms.get(isotherms.size() - 1).temperatureK();
    }

    /** Whether there are several isotherms, so that times are known to move between them. */
    public boolean hasIsotherms() {
        return isotherms.size() > 1;
    }

    /** log10 a_T at a temperature in K that is not refused. */
    public double log10A(double temperatureK) {
        if (law.isPresent()) {
            return law.get().log10A(temperatureK);
        }
        if (temperatureK == referenceK || isotherms.size() < 2) {
            return 0;
        }
        Place place = place(temperatureK);
        return place.between(
                place.lower().log10A().orElseThrow(), place.upper().log10A().orElseThrow());
    }

    /**
     * Covariance of log10 a_T at two temperatures in K. Off straight lines, shifts on one side of the reference are taken to err
     * together, as they hang on one another, and those on two sides apart.
     */
    public double covariance(double firstK, double secondK) {
        if (law.isPresent()) {
            return law.get().log10ACovariance(firstK, secondK);
        }
        boolean oneSide = (firstK - referenceK) * (secondK - referenceK) > 0;
        return oneSide && isotherms.size() > 1 ? u(firstK) * u(secondK) : 0;
    }

    /** log10 b_T at a temperature in K, on straight lines between the isotherms: a reduced modulus is b times the modulus. */
    public double log10B(double temperatureK) {
        return between(temperatureK, ShiftFactor::log10B);
    }

    /** Covariance of log10 b_T at two temperatures in K, by the rule of {@link #covariance}; 0 where it is not fitted. */
    public double verticalCovariance(double firstK, double secondK) {
        boolean oneSide = (firstK - referenceK) * (secondK - referenceK) > 0;
        return oneSide ? between(firstK, ShiftFactor::log10BU) * between(secondK, ShiftFactor::log10BU) : 0;
    }

    private double between(double temperatureK, Function<ShiftFactor, OptionalDouble> figure) {
        if (isotherms.isEmpty()) {
            return 0;
        }
        Place place = place(temperatureK);
        return place.between(
                figure.apply(place.lower()).orElse(0),
                figure.apply(place.upper()).orElse(0));
    }

    private double u(double temperatureK) {
        Place place = place(temperatureK);
        return place.between(
                place.lower().log10AU().orElse(0), place.upper().log10AU().orElse(0));
    }

    /** A temperature between two points of known shift, one of which may be the reference itself. */
    private record Place(ShiftFactor lower, ShiftFactor upper, double share) {
        double between(double low, double high) {
            return low + share * (high - low);
        }
    }

    private Place place(double temperatureK) {
        ShiftFactor lower = isotherms.stream()
                .filter(one -> one.temperatureK() <= temperatureK)
                .reduce((first, second) -> second)
                .orElse(isotherms.get(0));
        ShiftFactor upper = isotherms.stream()
                .filter(one -> one.temperatureK() > temperatureK)
                .findFirst()
                .orElse(isotherms.get(isotherms.size() - 1));
        double width = upper.temperatureK() - lower.temperatureK();
        return new Place(lower, upper, width > 0 ? (temperatureK - lower.temperatureK()) / width : 0);
    }
}
