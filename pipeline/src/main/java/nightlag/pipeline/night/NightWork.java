package nightlag.pipeline.night;

import nightlag.pipeline.archive.Archive;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.report.NightReport;

/**
 * What both halves of a night work with.
 *
 * @param configuration the night's configuration
 * @param options what the command line asks
 * @param version the program's version
 * @param workers how many files or lots are worked on side by side
 * @param archive the archive; only the night's own thread uses it
 * @param tally counts what becomes of everything
 * @param report takes each lot as it is rebuilt
 */
record NightWork(
        Configuration configuration,
        RunOptions options,
        String version,
        int workers,
        Archive archive,
        Tally tally,
        NightReport report) {}
