package nightlag.pipeline.teamsheet;

import java.io.IOException;
import java.io.OutputStream;
import java.util.Set;

/** One kind of file as rows and columns of cells, both counted from 0. What is put into it shows only in what it writes. */
interface Grid {
    /** Rows up to the last that holds anything. */
    int rows();

    /** Columns up to the last of a row that holds anything. */
    int width(int row);

    /** What a cell shows as text, without spaces around it; empty where nothing stands. */
    String text(int row, int column);

    /** How a text of ours reads in this kind of file: what {@link #text} gives once it is written. */
    String asShown(String text);

    /** Whether a cell says this already. */
    boolean holds(int row, int column, Value value);

    /** Whether a formula stands in a cell; it is its author's, and stays. */
    boolean hasFormula(int row, int column);

    /** What a person calls a cell. */
    String place(int row, int column);

    /**
     * Puts a heading behind the last column of any row.
     *
     * @return its column
     */
    int addColumn(int headingRow, String heading) throws SheetFault;

    /**
     * Makes room for rows below those that are there.
     *
     * @param area where ours are
     * @return the first of them; the others follow it
     */
    int addRows(Area area, int count) throws SheetFault;

    /** Puts a value into a cell. */
    void put(int row, int column, Value value) throws SheetFault;

    /** Writes the whole file. */
    void writeTo(OutputStream out) throws IOException, SheetFault;

    /**
     * Where our rows stand.
     *
     * @param headingRow the row of the headings
     * @param lastRow the last row that names a lot; the row of the headings where there is none
     * @param columns our columns
     * @param grade the column of the grade
     * @param lot the column of the lot
     */
    record Area(int headingRow, int lastRow, Set<Integer> columns, int grade, int lot) {
        /** Copies the set. */
        public Area {
            columns = Set.copyOf(columns);
        }
    }
}
