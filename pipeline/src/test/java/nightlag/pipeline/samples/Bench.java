package nightlag.pipeline.samples;

import nightlag.stages.numeric.Complex;

/**
 * What a machine makes of a specimen: its frame gives, its moving parts have inertia and rub, its load channel is late.
 * Torque and angle, or force and displacement; SI.
 *
 * @param inertia kg·m², or kg
 * @param friction N·m·s, or N·s/m
 * @param compliance rad/(N·m), or m/N
 * @param loadDelayS the load comes this much late, s
 */
record Bench(double inertia, double friction, double compliance, double loadDelayS) {
    /**
     * The amplitudes a record holds.
     *
     * @param specimenStiffness load per movement of the specimen alone
     * @param specimenMovement amplitude of the specimen alone
     * @param omega rad/s
     */
    Recorded recorded(Complex specimenStiffness, double specimenMovement, double omega) {
        Complex own = specimenStiffness.times(specimenMovement);
        Complex movement = new Complex(specimenMovement, 0).plus(own.times(compliance));
        Complex machine = new Complex(-inertia * omega * omega, friction * omega);
        Complex felt = own.plus(movement.times(machine));
        double angle = -omega * loadDelayS;
        return new Recorded(movement, felt.times(new Complex(StrictMath.cos(angle), StrictMath.sin(angle))));
    }

    /**
     * Complex amplitudes of both channels.
     *
     * @param movement rad or m
     * @param load N·m or N
     */
    record Recorded(Complex movement, Complex load) {
        /** Size of the load's amplitude. */
        double loadSize() {
            return StrictMath.hypot(load.re(), load.im());
        }
    }
}
