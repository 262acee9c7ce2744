package nightlag.stages;

import nightlag.stages.response.TemperatureShift;
import nightlag.stages.spectrum.FittedSpectrum;

/**
 * A discrete spectrum as it is published: rows, markers, the set for a simulation and predictions are all drawn from it.
 *
 * @param modes the modes, whatever they were fitted to
 * @param shift how they move with temperature; its reference is the temperature of the modes
 */
record PublishedSpectrum(FittedSpectrum modes, TemperatureShift shift) {
    /** Temperature it holds at, K. */
    double temperatureK() {
        return shift.referenceK();
    }
}
