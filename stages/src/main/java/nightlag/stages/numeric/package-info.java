/**
 * Numerical tools under all stages: complex numbers, the transform, least squares, non-negative least squares, root
 * brackets. The only package that imports Commons Math or JTransforms; none of their types leaves it.
 */
package nightlag.stages.numeric;
