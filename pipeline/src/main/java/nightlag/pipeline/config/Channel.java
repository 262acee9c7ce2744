package nightlag.pipeline.config;

import java.util.OptionalDouble;

/**
 * One column that carries a signal. SI value of a cell: with v = unit(cell) − zero, reversed in sign if inverted, it is v,
 * or v · sensitivity where the column holds a voltage. A {@code unit_row} replaces {@code unit} but for an empty cell.
 *
 * @param column the column
 * @param unit the unit of its cells
 * @param sensitivity SI of the quantity per SI of the cell's unit, for a raw voltage
 * @param zero what the column reads at rest, SI of the cell's unit
 * @param invert whether the sign is reversed
 * @param delayS the column comes this much late, s
 */
public record Channel(
        ColumnRef column, Unit unit, OptionalDouble sensitivity, double zero, boolean invert, double delayS) {}
