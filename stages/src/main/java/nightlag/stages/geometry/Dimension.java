package nightlag.stages.geometry;

import java.util.Locale;

/** A dimension of the specimen or its holder, in SI: m, but rad for the cone angle, m² for the area, kg/m³ for the density. */
public enum Dimension {
    DIAMETER,
    GAP,
    CONE_ANGLE,
    LENGTH,
    WIDTH,
    THICKNESS,
    INNER_DIAMETER,
    OUTER_DIAMETER,
    AREA,
    DENSITY;

    /** The word in configuration and tags. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}
