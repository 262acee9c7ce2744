package nightlag.stages.moduli;

import java.util.OptionalDouble;

/**
 * A grade's own figure at one point.
 *
 * @param key the point
 * @param temperatureK its temperature, K
 * @param frequencyHz its frequency, Hz
 * @param quantity the figure's name
 * @param value its value, in {@code unit}
 * @param u its standard uncertainty, in {@code unit}
 * @param unit as the grade file writes it
 */
public record FigureRow(
        PointKey key,
        OptionalDouble temperatureK,
        OptionalDouble frequencyHz,
        String quantity,
        double value,
        OptionalDouble u,
        String unit) {}
