package nightlag.stages.sweep;

import nightlag.stages.fault.ReasonCode;

/** Why a figure of the grade's own is absent. */
public enum FigureReason implements ReasonCode {
    /** Figure, points without it, points looked at, what it needs. */
    FIGURE_WITHOUT_VALUE("{0}: no value at {1} of {2} usable points; it needs {3}, and a result that is a number"),
    /** Marker, figure, along what. */
    FIGURE_MARKER_NO_CURVE("no {0}: no specimen has {1} at two places along {2}{3}"),
    /** Marker, specimen, sweep, where, figure, smallest, largest value, unit, value to reach. */
    FIGURE_MARKER_NOT_REACHED(
            "no {0} of specimen {1}, sweep {2}{3}: {4} stays between {5} and {6} {7} and does not reach {8} {7}"),
    /** Marker, specimen, sweep, curves without, curves, figure, value to reach, unit. */
    FIGURE_MARKER_NOT_REACHED_ON(
            "{0} of specimen {1}, sweep {2}: none on {3} of {4} curves, where {5} does not reach {6} {7}"),
    /** Marker, specimen, sweep, where, figure, value to reach, unit, place, unit of the place. */
    FIGURE_MARKER_BY_NOISE(
            "no {0} of specimen {1}, sweep {2}{3} near {7} {8}: {4} comes near {5} {6} there, and noise alone takes it across and"
                    + " back"),
    /** Marker, specimen, sweep, where, figure. */
    FIGURE_MARKER_NO_LOGARITHM(
            "no {0} of specimen {1}, sweep {2}{3}: {4} is not above zero throughout; scale = \"linear\" would do without its"
                    + " logarithm"),
    /** Marker, specimen, sweep, where, figure reported. */
    FIGURE_MARKER_NOT_REPORTED("no {0} of specimen {1}, sweep {2}{3}: no {4} where it would be read off");

    private final String template;

    FigureReason(String template) {
        this.template = template;
    }

    @Override
    public String template() {
        return template;
    }
}
