package nightlag.stages.geometry;

/**
 * What an instrument adds to a signal, in SI; 0 is "nothing to correct".
 *
 * @param deformationDelayS the deformation channel comes this much late, s
 * @param loadDelayS the load channel comes this much late, s (the channel's own delay and {@code signal_delay} together)
 * @param inertiaKgM2 inertia between transducer and specimen, kg·m²
 * @param frictionNMS bearing friction, N·m·s (per rad)
 * @param movingMassKg the same as inertia for a force instrument, kg
 * @param dampingNSPerM the same as friction for a force instrument, N·s/m
 * @param angularComplianceRadPerNM what the frame turns under torque, rad/(N·m)
 * @param linearComplianceMPerN what the frame gives under force, m/N
 * @param wall the wall that carries the transducer
 */
public record Corrections(
        double deformationDelayS,
        double loadDelayS,
        double inertiaKgM2,
        double frictionNMS,
        double movingMassKg,
        double dampingNSPerM,
        double angularComplianceRadPerNM,
        double linearComplianceMPerN,
        MeasuringWall wall) {
    /** Nothing to correct. */
    public static Corrections none() {
        return new Corrections(0, 0, 0, 0, 0, 0, 0, 0, MeasuringWall.FIXED);
    }
}
