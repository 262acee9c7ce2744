package nightlag.stages.sweep;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.moduli.ModulusPoint;

/**
 * Points of one specimen and sweep in which one thing varies. They are usable, of one deformation, and in the order of what
 * varies, rising.
 *
 * @param name what it is called; the same for several sweeps where the recorded one varies in two things
 * @param kind what varies, never {@code AUTO}
 * @param temperatureK the temperature of a sweep at one temperature, K
 * @param frequencyHz the frequency of a sweep at one frequency, Hz
 * @param points its points; repeats stand side by side, or are averaged where the plan says so
 * @param leg which part of a ramp that turns; empty for all others
 */
public record Sweep(
        SweepName name,
        SweepPlan.Kind kind,
        OptionalDouble temperatureK,
        OptionalDouble frequencyHz,
        List<ModulusPoint> points,
        Optional<Leg> leg) {
    /** Copies the list. */
    public Sweep {
        points = List.copyOf(points);
    }

    /** A sweep that is no part of a ramp that turns. */
    public Sweep(
            SweepName name,
            SweepPlan.Kind kind,
            OptionalDouble temperatureK,
            OptionalDouble frequencyHz,
            List<ModulusPoint> points) {
        this(name, kind, temperatureK, frequencyHz, points, Optional.empty());
    }

    /**
     * What lies between two turns of a ramp.
     *
     * @param number the first is 1
     * @param heating whether the temperature rises
     */
    public record Leg(int number, boolean heating) {
        /** In words. */
        public String words() {
            return "leg " + number + ", " + (heating ? "heating" : "cooling");
        }
    }

    /** The same with other points. */
    Sweep withPoints(List<ModulusPoint> others) {
        return new Sweep(name, kind, temperatureK, frequencyHz, others, leg);
    }

    /** The sweep's name with its leg, for a reason. */
    String title() {
        return leg.map(own -> name.sweep() + " (" + own.words() + ")").orElse(name.sweep());
    }
}
