package nightlag.pipeline.teamsheet;

import java.util.Map;

/**
 * Where new rows go: right below the last lot where nothing stands in the way, else below everything. Formulas filled down
 * ahead of the lots, from those in the row of the last one, are waiting for a lot and do not stand in the way.
 */
final class RoomBelow {
    private final SheetPart sheet;
    private final Grid.Area area;

    RoomBelow(SheetPart sheet, Grid.Area area) {
        this.sheet = sheet;
        this.area = area;
    }

    /**
     * The first row that can be taken.
     *
     * @param rows rows up to the last that holds anything
     */
    int firstRow(int rows) {
        for (Map.Entry<Integer, BookRow> row :
                sheet.rows().tailMap(area.lastRow(), false).entrySet()) {
            if (!isFree(row.getValue())) {
                return rows;
            }
        }
        return area.lastRow() + 1;
    }

    private boolean isFree(BookRow row) {
        return row.cells().stream().allMatch(cell -> !cell.hasContent() || isFilledDown(cell));
    }

    private boolean isFilledDown(BookCell cell) {
        return cell.hasFormula()
                && !area.columns().contains(cell.column())
                && area.lastRow() > area.headingRow()
                && sheet.rows()
                        .get(area.lastRow())
                        .cell(cell.column())
                        .filter(above -> above.formula().isSameAs(cell.formula()))
                        .isPresent();
    }
}
