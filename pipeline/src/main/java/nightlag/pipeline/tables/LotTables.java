package nightlag.pipeline.tables;

import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import java.util.function.BiFunction;
import nightlag.stages.LotResult;

/** Writes the tables of one lot. */
public final class LotTables {
    /** Every table of a lot, in the order they are listed everywhere. */
    static final List<LotTable<?>> TABLES = List.of(
            new LotTable<>(PointsTable.TABLE, (result, from) -> result.points()),
            new LotTable<>(HarmonicsTable.TABLE, (result, from) -> HarmonicsTable.rows(result.points())),
            new LotTable<>(
                    MarkersTable.TABLE,
                    (result, from) -> result.markers().stream()
                            .map(marker -> new MarkersTable.Row(from.grade(), from.lot(), marker))
                            .toList()),
            new LotTable<>(
                    ShiftFactorsTable.TABLE,
                    (result, from) -> result.shiftFactors().stream()
                            .map(shift -> new ShiftFactorsTable.Row(from.grade(), from.lot(), shift))
                            .toList()),
            new LotTable<>(
                    MasterCurveTable.TABLE,
                    (result, from) -> result.masterCurve().stream()
                            .map(point -> new MasterCurveTable.Row(from.grade(), from.lot(), point))
                            .toList()),
            new LotTable<>(
                    SpectrumTable.TABLE,
                    (result, from) -> result.spectrum().stream()
                            .map(mode -> new SpectrumTable.Row(from.grade(), from.lot(), mode))
                            .toList()),
            new LotTable<>(
                    PronyTable.TABLE,
                    (result, from) -> result.prony().stream()
                            .map(mode -> new PronyTable.Row(from.grade(), from.lot(), mode))
                            .toList()),
            new LotTable<>(
                    ResponseTable.TABLE,
                    (result, from) -> result.responses().stream()
                            .map(at -> new ResponseTable.Row(from.grade(), from.lot(), at))
                            .toList()),
            new LotTable<>(DerivedTable.TABLE, (result, from) -> result.derived()),
            new LotTable<>(CreepTable.TABLE, (result, from) -> CreepTable.rows(result.creep())),
            new LotTable<>(
                    AcceptanceTable.TABLE, (result, from) -> AcceptanceTable.rows(result, from.grade(), from.lot())));

    private LotTables() {}

    /**
     * Writes every table and the data package of one lot beside, then swaps each in whole; what a reader sees is always
     * the old or the new one. A lot without points gets tables without rows.
     *
     * @param results the results folder
     * @param result what the lot became
     * @param provenance what it was made from
     * @throws TableInUseException if a table is written but cannot be replaced; it names the table
     * @throws IOException if a table cannot be written
     */
    public static void write(Path results, LotResult result, Provenance provenance) throws IOException {
        DataPackage dataPackage = new DataPackage(provenance);
        try (FolderSwap swap = FolderSwap.into(folder(results, provenance.grade(), provenance.lot()))) {
            for (LotTable<?> table : TABLES) {
                table.write(swap, dataPackage, result, provenance);
            }
            swap.write(DataPackage.FILE_NAME, dataPackage::write);
            swap.swap();
        }
    }

    /** The file names of the tables, in the order they are listed everywhere. */
    public static List<String> fileNames() {
        return TABLES.stream().map(table -> table.table().fileName()).toList();
    }

    /** The folder of a lot below the results folder; never outside it, whatever the names hold. */
    public static Path folder(Path results, String grade, String lot) {
        return results.resolve(SafeName.of(grade)).resolve(SafeName.of(lot));
    }

    /**
     * A table and where its rows come from.
     *
     * @param table its declaration
     * @param rows the rows in a lot's result
     * @param <R> what a row is made of
     */
    record LotTable<R>(Table<R> table, BiFunction<LotResult, Provenance, List<R>> rows) {
        private void write(FolderSwap swap, DataPackage dataPackage, LotResult result, Provenance provenance)
                throws IOException {
            List<R> found = rows.apply(result, provenance);
            dataPackage.add(table, swap.write(table.fileName(), out -> table.write(found, out)));
        }
    }
}
