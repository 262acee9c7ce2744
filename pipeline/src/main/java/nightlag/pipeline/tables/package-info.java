/** The tidy tables, each declared once: columns, units, meanings, getters; CSV and data package come from that. */
package nightlag.pipeline.tables;
