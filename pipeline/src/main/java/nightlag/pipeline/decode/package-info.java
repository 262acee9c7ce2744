/**
 * From the bytes of a raw file to records in SI, one at a time; every row is used, left out or a reason to set the file aside.
 *
 * <p>{@link nightlag.pipeline.decode.RawFileDecoder} is the way in, {@link nightlag.pipeline.decode.RunSheets} finds the row
 * of a run sheet that goes with a file. How awkward input is read:
 *
 * <ul>
 *   <li>A byte-order mark decides the charset. Bytes that are no text in it, and zero characters, set the file aside.
 *   <li>Lines end with LF, CR LF or CR and are counted as an editor counts them. Lines without a character that counts are no
 *       rows, wherever they stand; a line of delimiters alone is a row of empty cells.
 *   <li>Blanks around a cell mean nothing. A cell in quotation marks may hold delimiters, but ends on its line.
 *   <li>A number has the decimal sign of the instrument file and no thousands separators; there is no guessing.
 *   <li>Where columns go by their header, a row as wide as the header is asked for: a narrower one is cut off, even where
 *       only a column nobody asked for is missing, as the number before may be cut off too; a wider one that has something in
 *       the cells beyond was cut up by a wrong decimal sign. Where all columns go by number, a row need only reach them.
 *   <li>Without a header the data begin at the first line that has a number or nothing in every channel, and one at least.
 *   <li>An empty cell leaves a row out where the column is needed: time, deformation, load, the point of the layout
 *       {@code column}; frequency, temperature (unless a tag stands in) and the moduli of the layout {@code moduli}. An empty
 *       temperature among samples is filled in from its neighbours in time. An empty cell of a tag says nothing.
 *   <li>A row that is left out keeps its number, on the clock of a sample rate and as the name of a point.
 *   <li>Time rises within a record, rows left out included.
 * </ul>
 *
 * <p>Numbers go from characters to doubles without a text for each; a line with a quotation mark goes to Commons CSV.
 * Nothing is held but one line and one record, and {@code Bounds} says how long either may be.
 */
package nightlag.pipeline.decode;
