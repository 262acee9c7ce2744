package nightlag.pipeline.config;

/**
 * A place in a configuration file.
 *
 * @param file the file, as the person would name it
 * @param line line from 1; 0: the file as a whole
 */
record At(String file, int line) {}
