package nightlag.stages.superposition;

import java.util.List;
import nightlag.stages.moduli.Marker;

/**
 * log10 a_T = Ea/(R ln 10) · (1/T − 1/T0), temperatures in kelvin: thermally activated flow, after Arrhenius (Ferry 1980,
 * chapter 11).
 *
 * @param referenceTemperatureK T0, K
 * @param activationEnergy Ea, J/mol
 * @param activationEnergyU its standard uncertainty, J/mol
 * @param quality how well it meets the shifts
 */
public record ArrheniusLaw(
        double referenceTemperatureK, double activationEnergy, double activationEnergyU, LawQuality quality)
        implements FittedLaw {
    @Override
    public double log10A(double temperatureK) {
        return activationEnergy * decadesPerEnergy(temperatureK, referenceTemperatureK);
    }

    @Override
    public boolean reaches(double temperatureK) {
        return temperatureK > 0;
    }

    @Override
    public double log10ACovariance(double firstK, double secondK) {
        return activationEnergyU
                * decadesPerEnergy(firstK, referenceTemperatureK)
                * activationEnergyU
                * decadesPerEnergy(secondK, referenceTemperatureK);
    }

    @Override
    public ArrheniusLaw at(double newReferenceK) {
        return new ArrheniusLaw(newReferenceK, activationEnergy, activationEnergyU, quality);
    }

    @Override
    public List<Marker> markers() {
        return List.of(energyMarker("Arrhenius law"));
    }

    /** (1/T − 1/T0)/(R ln 10), mol/J. */
    static double decadesPerEnergy(double temperatureK, double referenceK) {
        return (referenceK - temperatureK) / (temperatureK * referenceK) / (GAS_CONSTANT * Math.log(10));
    }
}
