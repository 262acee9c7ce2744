package nightlag.stages.superposition;

import java.util.List;
import java.util.Locale;
import java.util.OptionalDouble;
import nightlag.stages.moduli.Marker;

/**
 * How the horizontal shift depends on temperature, fitted to the shifts of the isotherms. log10 a_T is zero at the
 * reference temperature.
 */
public sealed interface FittedLaw permits WlfLaw, ArrheniusLaw {
    /** The molar gas constant R, J/(mol K), exact since the SI of 2019. */
    double GAS_CONSTANT = 8.31446261815324;

    /** Where log10 a_T is zero, K. */
    double referenceTemperatureK();

    /** log10 a_T at a temperature in K. */
    double log10A(double temperatureK);

    /** Whether the law says anything at a temperature in K: a WLF law ends at its pole. */
    boolean reaches(double temperatureK);

    /** Its standard uncertainty from the fit; zero at the reference temperature. */
    default double log10AU(double temperatureK) {
        return Math.sqrt(Math.max(0, log10ACovariance(temperatureK, temperatureK)));
    }

    /** Covariance of log10 a_T at two temperatures in K, from the fit. */
    double log10ACovariance(double firstK, double secondK);

    /** The same law with another reference temperature, K. */
    FittedLaw at(double referenceTemperatureK);

    /** Activation energy, J/mol; under WLF the apparent one at the reference temperature. */
    double activationEnergy();

    /** Its standard uncertainty, J/mol. */
    double activationEnergyU();

    /** How well the law meets the shifts. */
    LawQuality quality();

    /** The law's constants and the activation energy, at the reference temperature, drawn from all points of the lot. */
    List<Marker> markers();

    /** The activation energy as a marker. */
    default Marker energyMarker(String method) {
        return marker("activation_energy", activationEnergy(), activationEnergyU(), "J/mol", method);
    }

    /** One figure of the law as a marker. */
    default Marker marker(String property, double value, double u, String unit, String method) {
        return new Marker(
                "",
                "",
                property,
                OptionalDouble.of(referenceTemperatureK()),
                OptionalDouble.empty(),
                value,
                OptionalDouble.of(u),
                unit,
                String.format(Locale.ROOT, "%s, %s", method, quality().words()));
    }
}
