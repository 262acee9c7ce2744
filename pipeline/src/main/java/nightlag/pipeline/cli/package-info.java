/** The command line: its three commands, progress, summary, and what {@code check} and {@code trace} show. */
package nightlag.pipeline.cli;
