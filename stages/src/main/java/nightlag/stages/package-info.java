/**
 * The three pure functions that are the program: {@link nightlag.stages.Reduce}, {@link nightlag.stages.Conclude}, and
 * the plans that steer them. SI inside; no files, clock, threads, locale, logging or configuration syntax.
 */
package nightlag.stages;
