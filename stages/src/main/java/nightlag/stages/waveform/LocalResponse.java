package nightlag.stages.waveform;

import java.util.Optional;
import nightlag.stages.numeric.Cholesky;
import nightlag.stages.numeric.Complex;

/**
 * The response load/deformation at one frequency ω₀, from the lines of both transforms around it. Over a narrow band the
 * response is smooth, and what a record cut out of time adds (the load of a deformation before its start, what has not
 * relaxed at its end, drifts) is smooth too and falls as 1/ω, a curved drift's part as 1/ω². With w = ω/ω₀,
 * σ_k = γ_k Σ c_j w^j + s₁/w + s₂/w² + noise, j = 0, 1, −1, 2 and −2, is fitted by linear least squares (the local polynomial
 * method: Pintelon, Schoukens, Vandersteen &amp; Barbé, Mech. Syst. Signal Process. 24 (2010) 573; powers of ω to either side
 * because a liquid's slow response and a solid's fast one are made of them). Σ c_j is the response; what the fit leaves is
 * its noise, the deformation's part included.
 *
 * <p>At the slow end few lines lie in a narrow band; there the band is wider and j = −2 left out. Half of what the last power
 * changes is added to the uncertainty everywhere, because the response may bend more than the powers left.
 *
 * @param response load over deformation
 * @param variance of its real part, and of its imaginary part; they are not correlated
 * @param freedom degrees of freedom behind it
 * @param lineVariance mean |noise|² of a line of the load
 */
record LocalResponse(Complex response, double variance, double freedom, double lineVariance) {
    private static final int[] POWERS = {0, 1, -1, 2, -2};
    /** The band reaches this far in ln ω where that holds enough lines. */
    private static final double NARROW = 0.4;

    private static final int LINES_FOR_ALL_POWERS = 16;
    private static final double WIDEST = 1.2;
    private static final int WANTED_LINES = 14;
    private static final int FEWEST_LINES = 9;
    private static final double SHARE_OF_THE_LAST_POWER = 0.5;

    /**
     * Fits around a frequency.
     *
     * @param frequencyHz the frequency, Hz
     * @param cutTerms how many terms s_j: one for a straight drift, two for a parabola
     * @return empty where too few lines lie there or they do not tell the terms apart
     */
    static Optional<LocalResponse> at(double frequencyHz, FourierLines lines, int cutTerms) {
        double centre = frequencyHz * lines.durationS();
        double width = NARROW;
        int powers = count(centre, width, lines) >= LINES_FOR_ALL_POWERS ? POWERS.length : POWERS.length - 1;
        while (powers < POWERS.length && width < WIDEST && count(centre, width, lines) < WANTED_LINES) {
            width *= 1.1;
        }
        if (count(centre, width, lines) < FEWEST_LINES) {
            return Optional.empty();
        }
        Optional<LocalResponse> found = fit(centre, width, lines, powers, cutTerms);
        Optional<LocalResponse> simpler = fit(centre, width, lines, powers - 1, cutTerms);
        return found.isEmpty() || simpler.isEmpty()
                ? found
                : Optional.of(found.get().allowingFor(simpler.get().response()));
    }

    /** The same, as uncertain as half of what another model would change. */
    LocalResponse allowingFor(Complex other) {
        double bend = SHARE_OF_THE_LAST_POWER * response.minus(other).abs();
        return new LocalResponse(response, variance + bend * bend / 2, freedom, lineVariance);
    }

    private static Optional<LocalResponse> fit(
            double centre, double width, FourierLines lines, int powers, int cutTerms) {
        int first = first(centre, width);
        int count = count(centre, width, lines);
        int terms = powers + cutTerms;
        double[][] gram = new double[2 * terms][2 * terms];
        double[] moments = new double[2 * terms];
        Complex[][] rows = new Complex[count][];
        for (int i = 0; i < count; i++) {
            rows[i] = row(first + i, centre, lines, powers, cutTerms);
            add(rows[i], lines.at(Samples.LOAD, first + i), gram, moments);
        }
        return withoutNoise(gram, first, count, centre, lines, powers).map(normal -> {
            double[] solution = normal.solve(moments);
            double squares = 0;
            for (int i = 0; i < count; i++) {
                Complex rest = lines.at(Samples.LOAD, first + i);
                for (int j = 0; j < terms; j++) {
                    rest = rest.minus(rows[i][j].times(coefficient(solution, j)));
                }
                squares += rest.re() * rest.re() + rest.im() * rest.im();
            }
            double freedom = 2.0 * (count - terms);
            double perPart = squares / freedom;
            // at ω₀ all powers of w are 1
            Complex response = Complex.ZERO;
            double[] realPart = new double[2 * terms];
            for (int j = 0; j < powers; j++) {
                response = response.plus(coefficient(solution, j));
                realPart[2 * j] = 1;
            }
            return new LocalResponse(response, perPart * normal.inverseForm(realPart), freedom, 2 * perPart);
        });
    }

    /**
     * The normal equations less what the deformation's own noise adds to its power, which would draw the response towards
     * zero where the sweep is weak (bias-compensated least squares: Söderström, Automatica 43 (2007) 939).
     */
    private static Optional<Cholesky> withoutNoise(
            double[][] gram, int first, int count, double centre, FourierLines lines, int powers) {
        double perLine = lines.noise()[Samples.DEFORMATION] * lines.noise()[Samples.DEFORMATION] * lines.samples();
        double[][] less = new double[gram.length][];
        for (int i = 0; i < gram.length; i++) {
            less[i] = gram[i].clone();
        }
        for (int j = 0; j < powers; j++) {
            for (int l = 0; l <= j; l++) {
                double sum = 0;
                for (int k = first; k < first + count; k++) {
                    sum += Math.pow(k / centre, POWERS[j] + POWERS[l]);
                }
                less[2 * j][2 * l] -= perLine * sum;
                less[2 * j + 1][2 * l + 1] -= perLine * sum;
            }
        }
        Optional<Cholesky> normal = Cholesky.of(less);
        return normal.isPresent() ? normal : Cholesky.of(gram);
    }

    private static int first(double centre, double width) {
        return (int) Math.max(1, Math.ceil(centre * Math.exp(-width)));
    }

    private static int count(double centre, double width, FourierLines lines) {
        return (int) Math.min(lines.size() - 1.0, Math.floor(centre * Math.exp(width))) - first(centre, width) + 1;
    }

    private static Complex[] row(int k, double centre, FourierLines lines, int powers, int cutTerms) {
        Complex[] row = new Complex[powers + cutTerms];
        Complex deformation = lines.at(Samples.DEFORMATION, k);
        double w = k / centre;
        for (int j = 0; j < powers; j++) {
            row[j] = deformation.times(Math.pow(w, POWERS[j]));
        }
        for (int j = 0; j < cutTerms; j++) {
            row[powers + j] = new Complex(Math.pow(w, -1 - j), 0);
        }
        return row;
    }

    private static Complex coefficient(double[] solution, int j) {
        return new Complex(solution[2 * j], solution[2 * j + 1]);
    }

    /** Adds one complex equation as two real ones: unknowns are Re, Im of each coefficient in turn. */
    private static void add(Complex[] row, Complex value, double[][] gram, double[] moments) {
        int size = moments.length;
        double[] real = new double[size];
        double[] imaginary = new double[size];
        for (int j = 0; j < row.length; j++) {
            real[2 * j] = row[j].re();
            real[2 * j + 1] = -row[j].im();
            imaginary[2 * j] = row[j].im();
            imaginary[2 * j + 1] = row[j].re();
        }
        for (int i = 0; i < size; i++) {
            moments[i] += real[i] * value.re() + imaginary[i] * value.im();
            for (int j = 0; j <= i; j++) {
                gram[i][j] += real[i] * real[j] + imaginary[i] * imaginary[j];
            }
        }
    }
}
