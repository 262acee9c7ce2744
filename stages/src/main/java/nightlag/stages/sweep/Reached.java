package nightlag.stages.sweep;

import java.util.OptionalDouble;

/**
 * Where a figure reaches a value.
 *
 * @param place where, Hz or K
 * @param value the marker's value: the place itself or the figure reported there, temperatures in K
 * @param u its standard uncertainty; empty where the points come without and are too few to tell
 * @param how what it was read off, in words
 * @param source where u comes from
 */
record Reached(double place, double value, OptionalDouble u, String how, FigureNoise.Source source) {}
