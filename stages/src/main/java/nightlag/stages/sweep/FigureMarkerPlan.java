package nightlag.stages.sweep;

import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.moduli.Figure;

/**
 * A marker of the grade's own: where a figure reaches a value, or what another figure is there.
 *
 * @param name the marker's property
 * @param figure what is followed
 * @param reaches the value it reaches, in the figure's unit
 * @param along over what it is followed
 * @param scale how it is interpolated between two points
 * @param temperatureK only at this temperature (0.5 K), K; along frequency
 * @param frequencyHz only at this frequency (1 %), Hz; along temperature
 * @param report the figure whose value there is the marker's; empty: the marker's value is the place
 */
public record FigureMarkerPlan(
        String name,
        Figure figure,
        double reaches,
        Along along,
        Scale scale,
        OptionalDouble temperatureK,
        OptionalDouble frequencyHz,
        Optional<Figure> report) {
    /** Over what. */
    public enum Along {
        FREQUENCY,
        TEMPERATURE
    }

    /** What of the figure is taken as straight, over ln of a frequency or over the temperature itself. */
    public enum Scale {
        /** Its logarithm. */
        LOG,
        /** The figure itself. */
        LINEAR
    }

    /** The same of the figure itself, neither its logarithm nor another one. */
    FigureMarkerPlan raw() {
        return new FigureMarkerPlan(
                name, figure, reaches, along, Scale.LINEAR, temperatureK, frequencyHz, Optional.empty());
    }

    /** The unit of the marker's value. */
    public String unit() {
        return report.map(Figure::unit).orElse(along == Along.FREQUENCY ? "Hz" : "°C");
    }
}
