package nightlag.stages.superposition;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.numeric.Cholesky;
import nightlag.stages.numeric.EvenSplines;
import nightlag.stages.numeric.LevenbergMarquardt;
import nightlag.stages.superposition.FollowedCurves.Push;
import nightlag.stages.superposition.LogIsotherm.LogReading;

/**
 * All isotherms about one pair of smooth curves, shifts and curves fitted together. For given shifts the curves are linear in
 * their coefficients and follow at once, so the search is over the shifts alone (separable least squares: Golub &amp;
 * Pereyra, SIAM J. Numer. Anal. 10 (1973) 413; derivatives after Kaufman, BIT 15 (1975) 49), with the penalty on roughness
 * as further residuals.
 */
final class JointFit implements LevenbergMarquardt.Problem {
    /** How far a shift may go from where it starts before the splines are laid out anew, in ln ω. */
    private static final double REACH = 1.5 * Math.log(10);

    private static final int MOST_LAYOUTS = 4;
    private static final double ENOUGH = 1e-10;
    private static final int MOST_STEPS = 60;
    private static final double UNKNOWN_PRECISION = 1e-4;
    private static final double ROUNDING = 1e-12;

    private final List<LogReading> readings;
    private final int[] isotherm;
    private final int[] firstPoint;
    private final int isotherms;
    private final int anchor;
    private final double[] vertical;
    private final boolean fitVertical;
    private final double verticalLimit;
    private final SpecimenOffsets specimens;
    private final boolean fitLevels;
    private final Smoothness smoothness;
    private final Weights weights;
    private EvenSplines splines = new EvenSplines(0, 1, 1);
    private Optional<Condensed> last = Optional.empty();

    /**
     * Isotherms that overlap.
     *
     * @param used the isotherms
     * @param anchor the one that stays where it is
     * @param vertical ln b; where it is fitted, where it starts, zero for the anchor
     * @param verticalLimit the most that ln b may become; empty where it is not fitted
     * @param specimens what was taken off the points of these isotherms before
     * @param weights of all points, one isotherm after the other
     * @param smoothness of the curves
     */
    JointFit(
            List<LogIsotherm> used,
            int anchor,
            double[] vertical,
            OptionalDouble verticalLimit,
            SpecimenOffsets specimens,
            Weights weights,
            Smoothness smoothness) {
        this.readings = used.stream().flatMap(one -> one.readings().stream()).toList();
        this.isotherms = used.size();
        this.isotherm = new int[readings.size()];
        this.firstPoint = new int[isotherms + 1];
        for (int i = 0; i < isotherms; i++) {
            firstPoint[i + 1] = firstPoint[i] + used.get(i).size();
            Arrays.fill(isotherm, firstPoint[i], firstPoint[i + 1], i);
        }
        this.anchor = anchor;
        this.vertical = vertical.clone();
        this.fitVertical = verticalLimit.isPresent();
        this.verticalLimit = verticalLimit.orElse(Double.POSITIVE_INFINITY);
        this.specimens = specimens;
        this.fitLevels =
                !fitVertical && Arrays.stream(specimens.levelVariances()).anyMatch(one -> one > 0);
        this.smoothness = smoothness;
        this.weights = weights;
    }

    /**
     * Fits from where shifts start.
     *
     * @param horizontal ln a, zero for the anchor
     */
    JointCurves from(double[] horizontal) {
        double[] place = new double[isotherms + (fitVertical || fitLevels ? isotherms : 0)];
        System.arraycopy(horizontal, 0, place, 0, isotherms);
        if (fitVertical) {
            System.arraycopy(vertical, 0, place, isotherms, isotherms);
        }
        double[] free = freeOf(place);
        boolean inside = false;
        for (int layout = 0; layout < MOST_LAYOUTS && !inside; layout++) {
            layOut(allOf(free));
            double[] lower = new double[free.length];
            double[] upper = new double[free.length];
            for (int k = 0; k < free.length; k++) {
                boolean ofA = k < isotherms - 1;
                lower[k] = ofA ? free[k] - REACH : -verticalLimit;
                upper[k] = ofA ? free[k] + REACH : verticalLimit;
            }
            free = free.length == 0
                    ? free
                    : LevenbergMarquardt.minimise(this, free, lower, upper, ENOUGH, MOST_STEPS)
                            .parameters();
            inside = true;
            for (int k = 0; k < isotherms - 1; k++) {
                inside &= free[k] > lower[k] && free[k] < upper[k];
            }
        }
        return new State(free).curves();
    }

    private void layOut(double[] all) {
        double from = Double.POSITIVE_INFINITY;
        double to = Double.NEGATIVE_INFINITY;
        for (int p = 0; p < isotherm.length; p++) {
            double reduced = readings.get(p).x() + all[isotherm[p]];
            from = Math.min(from, reduced);
            to = Math.max(to, reduced);
        }
        last = Optional.empty();
        splines = EvenSplines.covering(from - REACH, to + REACH, OwnCurves.SPLINE_STEP);
    }

    private double[] freeOf(double[] all) {
        return parameters().mapToDouble(k -> all[k]).toArray();
    }

    private double[] allOf(double[] free) {
        double[] all = new double[2 * isotherms];
        int[] parameters = parameters().toArray();
        for (int k = 0; k < parameters.length; k++) {
            all[parameters[k]] = free[k];
        }
        return all;
    }

    private double verticalOf(double[] all, int i) {
        return fitVertical ? all[isotherms + i] : vertical[i];
    }

    private double levelOf(double[] all, int i) {
        return fitLevels ? all[isotherms + i] : 0;
    }

    /** The curves for given shifts. */
    private final class State {
        private final SmoothPair pair;
        private final double[] coefficients;
        private final double[] differences;
        private final double[] all;

        State(double[] free) {
            all = allOf(free);
            double[] places = new double[isotherm.length];
            for (int p = 0; p < places.length; p++) {
                places[p] = readings.get(p).x() + all[isotherm[p]];
            }
            pair = SmoothPair.of(new PairDesign(splines, places), weights, smoothness)
                    .orElseThrow(() -> new IllegalStateException("no smooth curves through all isotherms"));
            double[] observed = new double[2 * places.length];
            for (int p = 0; p < places.length; p++) {
                LogReading reading = readings.get(p);
                double up = verticalOf(all, isotherm[p]) + levelOf(all, isotherm[p]);
                weights.whiten(
                        p,
                        reading.has(0) ? reading.y()[0] + up : 0,
                        reading.has(1) ? reading.y()[1] + up : 0,
                        observed);
            }
            coefficients = pair.coefficients(observed);
            differences = pair.fitted(coefficients);
            for (int i = 0; i < differences.length; i++) {
                differences[i] -= observed[i];
            }
        }

        /** What each shift does to its own points while the curves stay. */
        private Push push(int parameter) {
            int own = parameter % isotherms;
            boolean horizontal = parameter < isotherms;
            int from = firstPoint[own];
            double[] values = new double[2 * (firstPoint[own + 1] - from)];
            for (int p = from; p < firstPoint[own + 1]; p++) {
                weights.whiten(
                        p,
                        p - from,
                        horizontal ? pair.design().slope(p, 0, coefficients) : -1,
                        horizontal ? pair.design().slope(p, 1, coefficients) : -1,
                        values);
            }
            return new Push(from, values);
        }

        /** With what is known of levels, which counts as one more residual each. */
        private FollowedCurves followed() {
            FollowedCurves followed =
                    FollowedCurves.of(pair, parameters().mapToObj(this::push).toList(), differences);
            int[] parameters = parameters().toArray();
            for (int k = 0; fitLevels && k < parameters.length; k++) {
                if (parameters[k] >= isotherms) {
                    double variance = specimens.levelVariances()[parameters[k] - isotherms];
                    followed.information()[k][k] += 1 / variance;
                    followed.gradient()[k] += all[parameters[k]] / variance;
                }
            }
            return followed;
        }

        private double squares() {
            double squares = Arrays.stream(differences).map(one -> one * one).sum();
            for (int i = 0; fitLevels && i < isotherms; i++) {
                squares += levelOf(all, i) * levelOf(all, i) / specimens.levelVariances()[i];
            }
            return squares;
        }

        private double cost() {
            return squares()
                    + Arrays.stream(pair.penalties(coefficients))
                            .map(one -> one * one)
                            .sum();
        }

        private JointCurves curves() {
            FollowedCurves followed = followed();
            double[][] covariance = factored(followed.information()).inverse();
            int further = (fitLevels ? isotherms : 0)
                    - Arrays.stream(specimens.fitted()).sum();
            double freedom = pair.freedom(followed.follow(), covariance) + further;
            double[] up = new double[isotherms];
            double[] levels = new double[isotherms];
            for (int i = 0; i < isotherms; i++) {
                up[i] = verticalOf(all, i);
                levels[i] = levelOf(all, i);
            }
            double[][] departures = new double[isotherm.length][2];
            for (int p = 0; p < isotherm.length; p++) {
                for (int modulus = 0; modulus < 2; modulus++) {
                    departures[p][modulus] = readings.get(p).y()[modulus]
                            + up[isotherm[p]]
                            + levels[isotherm[p]]
                            - pair.design().value(p, modulus, coefficients);
                }
            }
            int[] index = parameters().toArray();
            double[][] ofAll = new double[2 * isotherms][2 * isotherms];
            for (int i = 0; i < index.length; i++) {
                for (int j = 0; j < index.length; j++) {
                    // a level is none of the shifts
                    if (!fitLevels || Math.max(index[i], index[j]) < isotherms) {
                        ofAll[index[i]][index[j]] = covariance[i][j];
                    }
                }
            }
            for (int i = 0; fitVertical && i < isotherms; i++) {
                ofAll[isotherms + i][isotherms + i] += specimens.levelVariances()[i];
            }
            return new JointCurves(
                    anchor,
                    Arrays.copyOf(all, isotherms),
                    up,
                    levels,
                    ofAll,
                    squares(),
                    cost(),
                    freedom,
                    isotherm,
                    departures);
        }
    }

    /**
     * The search's own, smaller problem at a place: as many residuals as there are shifts and one more, with the same sum of
     * squares, the same gradient and the same JᵀJ as all of them have.
     */
    private final class Condensed {
        private final double[] place;
        private final double[] residuals;
        private final double[][] jacobian;

        Condensed(double[] free) {
            place = free.clone();
            State state = new State(free);
            FollowedCurves followed = state.followed();
            Cholesky factored = factored(followed.information());
            double[] along = factored.whiten(followed.gradient());
            double rest =
                    state.cost() - Arrays.stream(along).map(one -> one * one).sum();
            residuals = Arrays.copyOf(along, along.length + 1);
            residuals[along.length] = Math.sqrt(Math.max(0, rest));
            jacobian = Arrays.stream(factored.columns())
                    .map(column -> Arrays.copyOf(column, column.length + 1))
                    .toArray(double[][]::new);
        }
    }

    private Condensed at(double[] free) {
        if (last.isEmpty() || !Arrays.equals(last.get().place, free)) {
            last = Optional.of(new Condensed(free));
        }
        return last.get();
    }

    @Override
    public double[] residuals(double[] free) {
        return at(free).residuals;
    }

    @Override
    public double[][] jacobian(double[] free) {
        return at(free).jacobian;
    }

    /**
     * The numbers of what is fitted: isotherms for ln a, and isotherms from their count on for ln b or for their levels. The
     * anchor has no shift, but a level like the others.
     */
    private IntStream parameters() {
        return IntStream.range(0, fitVertical || fitLevels ? 2 * isotherms : isotherms)
                .filter(k -> k % isotherms != anchor || (fitLevels && k >= isotherms));
    }

    /** JᵀJ, where nothing is known of a shift a hundred e-folds either way. */
    private static Cholesky factored(double[][] information) {
        double[][] known = new double[information.length][];
        for (int i = 0; i < known.length; i++) {
            known[i] = information[i].clone();
            known[i][i] += UNKNOWN_PRECISION + ROUNDING * known[i][i];
        }
        return Cholesky.of(known).orElseThrow(() -> new IllegalStateException("shifts without information"));
    }
}
