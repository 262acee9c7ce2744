/** The command line. */
package nightlag.pipeline.cli;
