package nightlag.stages.geometry;

/** How a geometry is driven, and so which raw signals and which corrections belong to it. */
public enum Movement {
    /** Torque and angle; inertia, friction and a compliance in rad/(N·m) act on it. */
    TURN,
    /** Force and displacement; moving mass, damping and a compliance in m/N act on it. */
    LINE,
    /** Stress and strain only, as the file gives them; nothing but a delay can be corrected. */
    UNKNOWN;

    /** Whether a deformation of this kind can come from such a drive; strain always can. */
    boolean gives(DeformationSignal signal) {
        return switch (signal) {
            case STRAIN -> true;
            case ANGLE -> this == TURN;
            case DISPLACEMENT -> this == LINE;
        };
    }

    /** Whether a load of this kind can come from such a drive; stress always can. */
    boolean gives(LoadSignal signal) {
        return switch (signal) {
            case STRESS -> true;
            case TORQUE -> this == TURN;
            case FORCE -> this == LINE;
        };
    }

    /** What a person calls the signals of such a drive. */
    String signals() {
        return switch (this) {
            case TURN -> "torque and angle, or stress and strain";
            case LINE -> "force and displacement, or stress and strain";
            case UNKNOWN -> "stress and strain";
        };
    }
}
