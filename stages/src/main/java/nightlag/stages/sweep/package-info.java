/** Points that belong together: sweeps, and the isotherms of a lot. */
package nightlag.stages.sweep;
