package nightlag.stages.sweep;

import java.util.List;
import nightlag.stages.moduli.Figure;

/**
 * The figures a grade defines for itself.
 *
 * @param derived figures of every point, in the order of the configuration
 * @param markers where figures reach values, in the order of the configuration
 */
public record OwnFigures(List<Figure> derived, List<FigureMarkerPlan> markers) {
    /** None. */
    public static final OwnFigures NONE = new OwnFigures(List.of(), List.of());

    /** Copies the lists. */
    public OwnFigures {
        derived = List.copyOf(derived);
        markers = List.copyOf(markers);
    }
}
