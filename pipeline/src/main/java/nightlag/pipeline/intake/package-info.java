/** Which raw files there are, which have settled, and what their content is. */
package nightlag.pipeline.intake;
