/** Coded reasons: why a record, a point or a figure could not be had, as values that carry their parts. */
package nightlag.stages.fault;
