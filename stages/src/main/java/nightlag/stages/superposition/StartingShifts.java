package nightlag.stages.superposition;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import nightlag.stages.superposition.OwnCurves.OwnCurve;

/**
 * Where isotherms lie before they are fitted together. Isotherms are neighbours where their |G*| have a stretch in common; of
 * each pair of neighbours the smooth curves are laid over one another, and the shift at which both moduli agree best, with
 * as much in common as can be, is theirs. From one isotherm the others are reached over the neighbours that have most in
 * common.
 */
final class StartingShifts {
    /** The curves are compared at places this far apart in ln ω. */
    private static final double STEP = Math.log(10) / 20;

    /** Ranges of ln|G*| that miss one another by less may be of flat curves with noise. */
    private static final double SLACK = 0.05;

    /** Fewest places two curves are compared at. */
    private static final int FEWEST_PLACES = 4;

    /** Differences of ln G below this count little. */
    private static final double FINE = 0.02;

    /**
     * A pair laid over one another.
     *
     * @param shift how far the second moves, in ln ω, to lie on the first
     * @param shared at how many places both are known
     * @param cost mean squared difference there, over what counts little
     */
    record Match(double shift, int shared, double cost) {
        double worth() {
            return shared / (1 + cost);
        }
    }

    /** An isotherm's curves at even places. */
    private record Sampled(double first, double[][] values, double lowest, double highest) {
        static Sampled of(LogIsotherm isotherm, OwnCurve curve, double vertical) {
            int count = 1 + (int) Math.floor((isotherm.last() - isotherm.first()) / STEP);
            double[] places = new double[count];
            for (int k = 0; k < count; k++) {
                places[k] = isotherm.first() + k * STEP;
            }
            PairDesign design = new PairDesign(curve.pair().design().splines(), places);
            double[][] values = new double[2][count];
            double lowest = Double.POSITIVE_INFINITY;
            double highest = Double.NEGATIVE_INFINITY;
            for (int k = 0; k < count; k++) {
                for (int modulus = 0; modulus < 2; modulus++) {
                    values[modulus][k] = design.value(k, modulus, curve.coefficients()) + vertical;
                }
                double magnitude = lnMagnitude(values[0][k], values[1][k]);
                lowest = Math.min(lowest, magnitude);
                highest = Math.max(highest, magnitude);
            }
            return new Sampled(isotherm.first(), values, lowest, highest);
        }

        private static double lnMagnitude(double storage, double loss) {
            double larger = Math.max(storage, loss);
            return larger + Math.log1p(Math.exp(-2 * Math.abs(storage - loss))) / 2;
        }

        int count() {
            return values[0].length;
        }
    }

    private final Optional<Match>[][] matches;
    private final boolean verticalToo;
    private final double[] weight;

    @SuppressWarnings({"unchecked", "rawtypes"}) // Java has no arrays of a generic type
    private StartingShifts(List<Sampled> curves, Smoothness smoothness, boolean verticalToo) {
        this.verticalToo = verticalToo;
        this.weight = new double[2];
        for (int modulus = 0; modulus < 2; modulus++) {
            weight[modulus] = 1 / (FINE * FINE + smoothness.scatterVariance(modulus));
        }
        int n = curves.size();
        matches = new Optional[n][n];
        for (int i = 0; i < n; i++) {
            matches[i][i] = Optional.empty();
            for (int j = 0; j < i; j++) {
                matches[i][j] = match(curves.get(i), curves.get(j));
                matches[j][i] = matches[i][j].map(match -> new Match(-match.shift(), match.shared(), match.cost()));
            }
        }
    }

    /**
     * Lays all pairs over one another.
     *
     * @param isotherms temperature rising
     * @param own their own curves
     * @param vertical what is added to ln G of each
     * @param verticalToo whether each pair may be moved vertically too, for its best shift
     */
    static StartingShifts of(List<LogIsotherm> isotherms, OwnCurves own, double[] vertical, boolean verticalToo) {
        List<Sampled> curves = new ArrayList<>();
        for (int i = 0; i < isotherms.size(); i++) {
            curves.add(Sampled.of(isotherms.get(i), own.curves().get(i), vertical[i]));
        }
        return new StartingShifts(curves, own.smoothness(), verticalToo);
    }

    private Optional<Match> match(Sampled fixed, Sampled moved) {
        if (Math.min(fixed.highest(), moved.highest()) < Math.max(fixed.lowest(), moved.lowest()) - SLACK) {
            return Optional.empty();
        }
        int fewest = Math.min(FEWEST_PLACES, Math.min(fixed.count(), moved.count()));
        int from = fewest - moved.count();
        int to = fixed.count() - fewest;
        double[] scores = new double[to - from + 1];
        int best = 0;
        for (int k = 0; k < scores.length; k++) {
            int shared = shared(fixed, moved, from + k);
            scores[k] = cost(fixed, moved, from + k) + 1.0 / shared;
            if (scores[k] < scores[best]) {
                best = k;
            }
        }
        double fine =
                best > 0 && best < scores.length - 1 ? vertex(scores[best - 1], scores[best], scores[best + 1]) : 0;
        int offset = from + best;
        return Optional.of(new Match(
                fixed.first() - moved.first() + (offset + fine) * STEP,
                shared(fixed, moved, offset),
                cost(fixed, moved, offset)));
    }

    /** Where between −½ and ½ the parabola through three values is lowest, the middle one being the least. */
    private static double vertex(double before, double least, double after) {
        double curvature = before - 2 * least + after;
        return curvature > 0 ? (before - after) / (2 * curvature) : 0;
    }

    private static int shared(Sampled fixed, Sampled moved, int offset) {
        return Math.min(fixed.count(), moved.count() + offset) - Math.max(0, offset);
    }

    private double cost(Sampled fixed, Sampled moved, int offset) {
        int start = Math.max(0, offset);
        int count = shared(fixed, moved, offset);
        double sum = 0;
        double squares = 0;
        for (int modulus = 0; modulus < 2; modulus++) {
            double[] left = fixed.values()[modulus];
            double[] right = moved.values()[modulus];
            for (int k = start; k < start + count; k++) {
                double difference = left[k] - right[k - offset];
                sum += weight[modulus] * difference;
                squares += weight[modulus] * difference * difference;
            }
        }
        double total = count * (weight[0] + weight[1]);
        return (squares - (verticalToo ? sum * sum / total : 0)) / (2 * count);
    }

    /**
     * The isotherms in groups that hang together over neighbours, each rising; that of the lowest isotherm first.
     */
    List<List<Integer>> chains() {
        List<List<Integer>> chains = new ArrayList<>();
        boolean[] grouped = new boolean[matches.length];
        for (int start = 0; start < matches.length; start++) {
            if (grouped[start]) {
                continue;
            }
            Optional<Double>[] shifts = shiftsFrom(start);
            List<Integer> chain = new ArrayList<>();
            for (int i = 0; i < shifts.length; i++) {
                if (shifts[i].isPresent()) {
                    chain.add(i);
                    grouped[i] = true;
                }
            }
            chains.add(chain);
        }
        return chains;
    }

    /**
     * How far each isotherm moves in ln ω to lie on one of them; empty where it cannot be reached. The tree of best overlaps
     * grows by one isotherm a time (Prim, Bell System Technical Journal 36 (1957) 1389), in steps as many as isotherms reached
     * times isotherms.
     */
    @SuppressWarnings({"unchecked", "rawtypes"}) // Java has no arrays of a generic type
    Optional<Double>[] shiftsFrom(int start) {
        int n = matches.length;
        Optional<Double>[] shifts = new Optional[n];
        Arrays.fill(shifts, Optional.empty());
        double[] worth = new double[n];
        int[] over = new int[n];
        double shift = 0;
        int next = start;
        while (next >= 0) {
            shifts[next] = Optional.of(shift);
            offer(next, shifts, worth, over);
            next = best(shifts, worth, over);
            if (next >= 0) {
                shift = shifts[over[next]].orElseThrow()
                        + matches[over[next]][next].orElseThrow().shift();
            }
        }
        return shifts;
    }

    /** Of equal worth the neighbour of the lowest index counts. */
    private void offer(int reached, Optional<Double>[] shifts, double[] worth, int[] over) {
        for (int j = 0; j < shifts.length; j++) {
            if (shifts[j].isPresent() || matches[reached][j].isEmpty()) {
                continue;
            }
            double offered = matches[reached][j].get().worth();
            if (offered > worth[j] || (offered == worth[j] && reached < over[j])) {
                worth[j] = offered;
                over[j] = reached;
            }
        }
    }

    /** The isotherm not reached yet that has most in common with one reached; negative where none has anything. */
    private static int best(Optional<Double>[] shifts, double[] worth, int[] over) {
        int best = -1;
        for (int j = 0; j < shifts.length; j++) {
            if (shifts[j].isPresent() || !(worth[j] > 0)) {
                continue;
            }
            if (best < 0 || worth[j] > worth[best] || (worth[j] == worth[best] && over[j] < over[best])) {
                best = j;
            }
        }
        return best;
    }
}
