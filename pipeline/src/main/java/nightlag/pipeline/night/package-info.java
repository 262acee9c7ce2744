/** The run itself: intake, decode, reduce, archive, conclude, tables. The only package that knows all the others. */
package nightlag.pipeline.night;
