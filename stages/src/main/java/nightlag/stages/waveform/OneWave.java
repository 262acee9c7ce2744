package nightlag.stages.waveform;

import java.util.Optional;
import nightlag.stages.numeric.Complex;

/**
 * One square or triangle wave, whose lines look like those of a multisine. Its lines stand at the odd multiples n of one
 * frequency; of a square they are −i A e^{inφ}/n, of a triangle −i A e^{inφ} (−1)^{(n−1)/2}/n². Nobody designs a multisine with
 * these amplitudes and these phases, because the sum of them is that wave.
 *
 * @param shape what a person calls it
 * @param frequencyHz its frequency, Hz
 */
record OneWave(String shape, double frequencyHz) {
    /** Lines looked at: orders 1, 3, 5, 7 and 9. */
    private static final int LINES = 5;

    private static final int HIGHEST_ORDER = 2 * LINES - 1;
    /** A line stands this near a multiple of the slowest one, in bins. */
    private static final double NEAR_BINS = 1;
    /** Part of the amplitude its shape asks for by which a line may be off. */
    private static final double OFF_SHAPE = 0.1;

    /**
     * Whether a record is one such wave.
     *
     * @param found the angular frequencies of the lines found, rising, rad/s
     * @param driftDegree what is fitted for the drift
     */
    static Optional<OneWave> of(Samples samples, ToneSearch search, double[] found, int driftDegree) {
        double bin = 2 * Math.PI / samples.durationS();
        double slowest = found[0];
        double perOrder = 0;
        int seen = 0;
        for (double omega : found) {
            long order = Math.round(omega / slowest);
            boolean multiple = Math.abs(omega - order * slowest) < Math.max(NEAR_BINS, 0.1 * order) * bin;
            boolean ofSeries = order % 2 == 1 && multiple;
            if (ofSeries && order <= HIGHEST_ORDER) {
                seen++;
                perOrder = omega / order;
            } else if (!ofSeries && search.amplitude(omega) > search.amplitude(slowest) / HIGHEST_ORDER) {
                return Optional.empty();
            }
        }
        double fastest = HIGHEST_ORDER * perOrder;
        if (seen < LINES || fastest * samples.intervalS() >= Math.PI) {
            return Optional.empty();
        }
        double[] series = new double[LINES];
        for (int k = 0; k < LINES; k++) {
            series[k] = (2 * k + 1) * perOrder;
        }
        ToneFit fit = new ToneFit(samples, LINES, driftDegree, ToneFit.Freedom.EACH);
        return fit.fit(series).flatMap(result -> shape(lines(fit.basis(), result), samples, result));
    }

    private static Complex[] lines(ToneBasis basis, ToneFit.Result result) {
        double[] x = result.coefficients()[Samples.DEFORMATION];
        Complex[] lines = new Complex[LINES];
        for (int k = 0; k < LINES; k++) {
            int column = basis.cosineColumn(k);
            lines[k] = new Complex(x[column], -x[column + 1]);
        }
        return lines;
    }

    private static Optional<OneWave> shape(Complex[] lines, Samples samples, ToneFit.Result result) {
        double omega = result.angularFrequencies()[0];
        double hz = omega / (2 * Math.PI);
        double half = omega * samples.intervalS() / 2;
        if (isShape(lines, 1, 1, half)) {
            return Optional.of(new OneWave("square", hz));
        }
        return isShape(lines, 2, -1, half) ? Optional.of(new OneWave("triangle", hz)) : Optional.empty();
    }

    /**
     * Whether the lines fall with this power of the order, with these signs.
     *
     * @param half half the phase from one sample to the next; edges that fall between two samples make the n-th line larger by
     *     x/sin x, x = n·half
     */
    private static boolean isShape(Complex[] lines, int power, int sign, double half) {
        double phase = Math.atan2(lines[0].im(), lines[0].re()) + Math.PI / 2;
        double size = lines[0].abs();
        int signOfOrder = 1;
        for (int k = 0; k < lines.length; k++) {
            int order = 2 * k + 1;
            double edges = Math.pow(order * half / Math.sin(order * half), power);
            Complex unit = lines[k].times(Complex.I)
                    .times(Complex.polar(1, -order * phase))
                    .times(signOfOrder * Math.pow(order, power) / size);
            boolean inPlace = unit.re() > 1 - OFF_SHAPE
                    && unit.re() < (1 + OFF_SHAPE) * edges
                    && Math.abs(unit.im()) < OFF_SHAPE * edges;
            if (!inPlace) {
                return false;
            }
            signOfOrder *= sign;
        }
        return true;
    }
}
