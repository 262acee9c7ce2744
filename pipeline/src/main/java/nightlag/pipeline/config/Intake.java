package nightlag.pipeline.config;

import java.nio.file.Path;

/**
 * One folder that raw files come in by.
 *
 * @param folder absolute, normalised
 * @param name the folder's own name, the first part of a file's name in tables
 * @param instrument the instrument that writes there
 */
public record Intake(Path folder, String name, Instrument instrument) {}
