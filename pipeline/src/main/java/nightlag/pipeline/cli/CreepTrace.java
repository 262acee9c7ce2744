package nightlag.pipeline.cli;

import java.util.List;
import java.util.function.BiConsumer;
import nightlag.stages.ReductionTrace;
import nightlag.stages.fault.Reason;
import nightlag.stages.geometry.CorrectionMap;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.CreepReading;
import nightlag.stages.moduli.CreepStep;

/** What {@code trace} shows of a creep record: its steps, a few readings after each, its flags. */
final class CreepTrace {
    private static final String SHORT = "%.3g";
    private static final String LONG = "%.6g";
    private static final int MOST_STEPS = 6;
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;

    private final CreepCurve curve;
    private final ReductionTrace followed;

    CreepTrace(CreepCurve curve, ReductionTrace followed) {
        this.curve = curve;
        this.followed = followed;
    }

    /** Hands over its lines, each a label and a text. */
    void lines(BiConsumer<String, String> line) {
        followed.correction().ifPresent(correction -> {
            CorrectionMap still = correction.at(0);
            line.accept(
                    "corrections",
                    still.strainFromLoad().re() == 0
                            ? "none; inertia, friction and delays do not act on a creep record"
                            : "compliance: the movement of the frame is taken off the strain, "
                                    + digits(
                                            SHORT,
                                            Math.abs(still.strainFromLoad().re()))
                                    + " for each unit of load (SI); inertia, friction and delays do not act on a creep record");
        });
        curve.temperatureK()
                .ifPresent(kelvin -> line.accept("temperature", digits(LONG, kelvin - KELVIN_AT_ZERO_CELSIUS) + " °C"));
        int number = 0;
        for (CreepStep step : curve.steps()) {
            number++;
            if (number <= MOST_STEPS) {
                step(number, step, line);
            }
        }
        if (number > MOST_STEPS) {
            line.accept("", (number - MOST_STEPS) + " more steps");
        }
        line.accept("flags", curve.quality().word() + (curve.flags().isEmpty() ? ", no flag" : ""));
        for (Reason reason : curve.reasons()) {
            line.accept("", reason.sentence());
        }
    }

    private void step(int number, CreepStep step, BiConsumer<String, String> line) {
        List<CreepReading> readings = curve.readings().stream()
                .filter(reading -> reading.step() == number)
                .toList();
        line.accept(
                "step " + number,
                step.part().word() + " at " + digits(LONG, step.atS()) + " s, within "
                        + digits(SHORT, step.riseS()) + " s: " + digits(LONG, step.changePa()) + " Pa, u "
                        + digits("%.2g", step.changeUPa()) + " Pa; " + readings.size() + " readings");
        if (!readings.isEmpty()) {
            reading(readings.get(0), line);
        }
        if (readings.size() > 2) {
            reading(readings.get(readings.size() / 2), line);
        }
        if (readings.size() > 1) {
            reading(readings.get(readings.size() - 1), line);
        }
    }

    private static void reading(CreepReading reading, BiConsumer<String, String> line) {
        line.accept(
                "",
                "after " + digits(SHORT, reading.sinceStepS()) + " s: strain " + digits(LONG, reading.strain())
                        + ", compliance " + digits(LONG, reading.compliancePerPa()) + " 1/Pa, u "
                        + digits("%.2g", reading.complianceUPerPa()) + " 1/Pa");
    }

    private static String digits(String format, double value) {
        return Figures.digits(format, value);
    }
}
