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
 * @param min lower limit, SI
 * @param max upper limit, SI
 * @param unit unit of the limits in SI without prefix, "1" for none
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
        double coverage) {}
