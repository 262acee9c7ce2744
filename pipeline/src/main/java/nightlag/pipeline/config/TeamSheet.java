package nightlag.pipeline.config;

import java.nio.file.Path;

/**
 * The team's spreadsheet: the section {@code [team_sheet]}.
 *
 * @param file absolute path of a .csv or .xlsx
 * @param sheet the sheet in an .xlsx
 */
public record TeamSheet(Path file, String sheet) {}
