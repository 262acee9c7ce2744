package nightlag.stages;

import java.util.List;
import nightlag.stages.moduli.Marker;
import nightlag.stages.response.TemperatureShift;
import nightlag.stages.spectrum.FittedSpectrum;
import nightlag.stages.superposition.MasterCurve;

/**
 * A discrete spectrum as it is published: rows, markers, the set for a simulation and predictions are all drawn from it.
 *
 * @param modes the modes, whatever they were fitted to
 * @param shift how they move with temperature; its reference is the temperature of the modes
 * @param inDoubt whether they were fitted to a master curve that does not superpose
 */
record PublishedSpectrum(FittedSpectrum modes, TemperatureShift shift, boolean inDoubt) {
    /** Temperature it holds at, K. */
    double temperatureK() {
        return shift.referenceK();
    }

    /** What completes the modes, and what follows from them. */
    List<Marker> markers() {
        return modes.markers(temperatureK()).stream()
                .map(marker -> inDoubt ? marker.saying(MasterCurve.IN_DOUBT) : marker)
                .toList();
    }
}
