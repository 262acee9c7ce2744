/**
 * The team's own spreadsheet, a {@code .csv} or an {@code .xlsx}, in which each lot has a row.
 *
 * <p>It belongs to the people who work in it. Only the cells of our own columns are ever written, in the rows of our own
 * lots; everything else is copied as it stands, byte for byte. {@link nightlag.pipeline.teamsheet.Merge} decides which cells
 * these are, the same for both kinds of file; a {@link nightlag.pipeline.teamsheet.Grid} is one kind of file, taken apart
 * just as far as it takes to put a cell into it.
 */
package nightlag.pipeline.teamsheet;
