package nightlag.stages.superposition;

import java.util.List;
import java.util.Optional;
import nightlag.stages.superposition.OwnCurves.Prepared;

/**
 * How smooth curves are and how much points scatter about them, by the greatest restricted likelihood (Harville, J. Am. Stat.
 * Assoc. 72 (1977) 320) of all isotherms together, each about its own curves. Shifts have no part in it, so material that
 * does not superpose changes neither.
 */
final class SmoothnessSearch {
    /** Standard deviation of ln G that no fit is held to be better than. */
    private static final double LEAST_SCATTER = -6;

    private static final double MOST_SCATTER = 0;
    /** A single relaxation mode, the sharpest bend there is, has third differences of a tenth at this spacing of the splines. */
    private static final double LEAST_STIFFNESS = 1.75;
    /** Isotherms may each be as good as parabolas, the common curve is not. */
    private static final double MOST_STIFFNESS = 4.75;

    private static final double[] COARSE_SCATTER = {LEAST_SCATTER, -4, -3, -2, -1};
    private static final double[] COARSE_STIFFNESS = {1.75, 2.75, 3.75, 4.75};
    /** Scatter of ln G to be expected before any is seen, and to how many decades that is known. */
    private static final double USUAL_SCATTER = -2;

    private static final double USUAL_DECADES = 0.5;
    private static final double LEAST_GAIN = 1e-6;
    private static final double FIRST_STEP = 1;
    private static final double LAST_STEP = 0.1;

    private final List<Prepared> isotherms;
    private final boolean useGiven;
    private Optional<OwnCurves> best = Optional.empty();
    private double least = Double.POSITIVE_INFINITY;

    private SmoothnessSearch(List<Prepared> isotherms, boolean useGiven) {
        this.isotherms = isotherms;
        this.useGiven = useGiven;
    }

    /**
     * The likeliest curves.
     *
     * @param isotherms each with three places or more
     * @param useGiven whether points are weighted by the uncertainties they come with, besides their scatter
     */
    static OwnCurves likeliest(List<Prepared> isotherms, boolean useGiven) {
        SmoothnessSearch search = new SmoothnessSearch(isotherms, useGiven);
        Smoothness start = new Smoothness(new double[] {2, 2}, new double[] {-2, -2});
        search.improves(start);
        for (int modulus = 0; modulus < 2; modulus++) {
            for (double scatter : COARSE_SCATTER) {
                for (double stiffness : COARSE_STIFFNESS) {
                    search.improves(
                            search.current(start).withScatter(modulus, scatter).withStiffness(modulus, stiffness));
                }
            }
        }
        for (double step = FIRST_STEP; step > LAST_STEP; step /= 2) {
            while (search.stepped(step)) {
                // on until no step of this length helps
            }
        }
        return search.best.orElseThrow(() -> new IllegalStateException("no smooth curves through the isotherms"));
    }

    private Smoothness current(Smoothness start) {
        return best.map(OwnCurves::smoothness).orElse(start);
    }

    private boolean stepped(double step) {
        boolean better = false;
        for (int modulus = 0; modulus < 2; modulus++) {
            for (double signed : new double[] {step, -step}) {
                Smoothness at = best.orElseThrow().smoothness();
                better |= improves(at.withStiffness(modulus, at.stiffness()[modulus] + signed));
                at = best.orElseThrow().smoothness();
                better |= improves(at.withScatter(modulus, at.scatter()[modulus] + signed / 2));
            }
        }
        return better;
    }

    private boolean improves(Smoothness smoothness) {
        for (int modulus = 0; modulus < 2; modulus++) {
            double stiffness = smoothness.stiffness()[modulus];
            double scatter = smoothness.scatter()[modulus];
            if (stiffness < LEAST_STIFFNESS
                    || stiffness > MOST_STIFFNESS
                    || scatter < LEAST_SCATTER
                    || scatter > MOST_SCATTER) {
                return false;
            }
        }
        Optional<OwnCurves> curves = OwnCurves.of(isotherms, useGiven, smoothness);
        double deviance = curves.map(OwnCurves::deviance).orElse(Double.POSITIVE_INFINITY) + unusual(smoothness);
        if (deviance < least - LEAST_GAIN) {
            best = curves;
            least = deviance;
            return true;
        }
        return false;
    }

    /** What scatter far from that of common instruments costs: few points could be met exactly by curves that bend enough. */
    private double unusual(Smoothness smoothness) {
        double cost = 0;
        for (int modulus = 0; modulus < 2 && !useGiven; modulus++) {
            double decades = (smoothness.scatter()[modulus] - USUAL_SCATTER) / USUAL_DECADES;
            cost += decades * decades;
        }
        return cost;
    }
}
