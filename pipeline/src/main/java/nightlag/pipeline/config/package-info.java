/**
 * The configuration: night, instrument and grade files read, checked whole, and turned into plain values in SI. Every
 * key is declared once.
 */
package nightlag.pipeline.config;
