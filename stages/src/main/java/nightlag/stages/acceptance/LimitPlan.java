package nightlag.stages.acceptance;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * One limit of a grade: a table {@code [[limit]]}.
 *
 * @param name the column in the team sheet, where one is given
 * @param property a quantity of the points without its unit suffix, or a property of the markers
 * @param temperatureK temperature, K; required for a quantity of the points
 * @param frequencyHz frequency, Hz; required for a quantity of the points
 * @param conditions temperature and frequency as the grade file writes them, for the team sheet's column
 * @param min lower limit, in {@code unit}, but in K for a temperature
 * @param max upper limit, likewise
 * @param unit unit of the values, as the property has it in the tables; "1" for none
 * @param shown the unit the grade file writes the limits in
 * @param coverage the guard band in standard uncertainties
 */
public record LimitPlan(
        Optional<String> name,
        String property,
        OptionalDouble temperatureK,
        OptionalDouble frequencyHz,
        String conditions,
        OptionalDouble min,
        OptionalDouble max,
        String unit,
        ShownUnit shown,
        double coverage) {
    /** What it is called: its name, else property and conditions as the grade file writes them. No two of a grade are alike. */
    public String title() {
        return name.orElseGet(() -> (property + " " + conditions).strip());
    }

    /**
     * What it is on: property, temperature and frequency, whatever it is called and wherever its bounds lie. Values of lots can
     * be compared where it is the same.
     */
    public String quantity() {
        return property
                + (temperatureK.isPresent() ? " " + temperatureK.getAsDouble() + " K" : "")
                + (frequencyHz.isPresent() ? " " + frequencyHz.getAsDouble() + " Hz" : "");
    }
}
