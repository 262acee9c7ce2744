package nightlag.stages.moduli;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.fault.Reason;
import nightlag.stages.geometry.DeformationMode;

/**
 * What a record of steps of stress gave.
 *
 * @param key what it is called
 * @param made the lot's date as tagged
 * @param deformation shear or extension
 * @param temperatureK the channel's mean if there is one, else the tag, K
 * @param taggedTemperatureK the tag, K
 * @param fromRest whether the record begins before the first load, so that the whole history of the stress is in it
 * @param steps the steps in the order of time; at least one
 * @param readings readings after each step, in the order of time
 * @param quality how far it can be trusted
 * @param flags why it is not sound, in the order of {@link Flag}
 * @param samplesUsed samples behind the readings
 * @param reasons the figure and the threshold behind each flag, and whatever else is worth knowing
 */
public record CreepCurve(
        PointKey key,
        Optional<String> made,
        DeformationMode deformation,
        OptionalDouble temperatureK,
        OptionalDouble taggedTemperatureK,
        boolean fromRest,
        List<CreepStep> steps,
        List<CreepReading> readings,
        Quality quality,
        List<Flag> flags,
        int samplesUsed,
        List<Reason> reasons) {
    /** Copies the lists. */
    public CreepCurve {
        steps = List.copyOf(steps);
        readings = List.copyOf(readings);
        flags = List.copyOf(flags);
        reasons = List.copyOf(reasons);
    }
}
