package nightlag.stages.sweep;

import java.util.List;
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
 */
public record Sweep(
        SweepName name,
        SweepPlan.Kind kind,
        OptionalDouble temperatureK,
        OptionalDouble frequencyHz,
        List<ModulusPoint> points) {
    /** Copies the list. */
    public Sweep {
        points = List.copyOf(points);
    }
}
