/**
 * The night's report: one self-contained page, problems first, then each lot with its curves.
 *
 * <p>What a chart shows is decided here, as data; how it is drawn is the page's own script, on the plotting library inlined
 * once a page.
 */
package nightlag.pipeline.report;
