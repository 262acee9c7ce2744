package nightlag.stages.spectrum;

import java.util.List;
import java.util.function.ToDoubleFunction;

/**
 * What a fit leaves open of a material: the likeliest one, and pairs that lie a step either way along independent
 * directions of the posterior. A step is one standard deviation, or the part of one that moves no strength by more than 60 %: what the
 * data fix is fixed by sums of strengths, and these hold together only for steps as small.
 *
 * @param likeliest the material at the posterior's mean
 * @param pairs the others
 */
public record MaterialSpread(RelaxationModes likeliest, List<Pair> pairs) {
    /** Copies the list. */
    public MaterialSpread {
        pairs = List.copyOf(pairs);
    }

    /**
     * Two materials, a step either way.
     *
     * @param above with what the direction adds
     * @param below with what it takes away
     * @param step the step in standard deviations, at most 1
     */
    public record Pair(RelaxationModes above, RelaxationModes below, double step) {}

    /** The standard uncertainty the spectrum gives a figure: u² = Σ ((f(above) − f(below))/(2 step))². */
    public double u(ToDoubleFunction<RelaxationModes> figure) {
        double square = 0;
        for (Pair pair : pairs) {
            double half = (figure.applyAsDouble(pair.above()) - figure.applyAsDouble(pair.below())) / (2 * pair.step());
            square += half * half;
        }
        return Math.sqrt(square);
    }
}
