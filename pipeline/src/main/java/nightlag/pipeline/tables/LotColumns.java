package nightlag.pipeline.tables;

import java.util.List;
import java.util.function.Function;
import java.util.stream.Stream;

/** The columns every table of a lot begins with. */
final class LotColumns {
    private LotColumns() {}

    /** {@code grade,lot,specimen}, then the others. */
    static <R> List<Column<R>> before(
            Function<R, String> grade, Function<R, String> lot, Function<R, String> specimen, List<Column<R>> others) {
        Column<R> gradeColumn = Column.text("grade", "material grade", grade);
        Column<R> lotColumn = Column.text("lot", "lot of the grade", lot);
        Column<R> specimenColumn =
                Column.text("specimen", "specimen of the lot; empty where a row is drawn from the whole lot", specimen);
        return Stream.concat(
                        Stream.of(
                                gradeColumn.required().asKey(),
                                lotColumn.required().asKey(),
                                specimenColumn.asKey()),
                        others.stream())
                .toList();
    }
}
