package nightlag.stages.waveform;

import java.util.Optional;
import nightlag.stages.numeric.Cholesky;

/**
 * Drift and several tones of both channels by separable least squares (Golub &amp; Pereyra, SIAM J. Numer. Anal. 10 (1973)
 * 413). Both channels have the same columns A, so one factored AᵀA serves both; the frequencies, shared by both, are moved
 * by Gauss–Newton on what A leaves of the model's derivatives by them. The unknowns are phases at the record's end,
 * δ = Pθ: one θ a tone where each tone is free, one for all where only the clock is in doubt.
 */
final class ToneFit {
    /** What is free besides the amplitudes. */
    enum Freedom {
        /** Nothing: the frequencies are exact. */
        NONE,
        /** One factor common to all frequencies: the recorder's clock against the drive's. */
        CLOCK,
        /** Each frequency. */
        EACH
    }

    private static final int BLOCK = 256;
    private static final int MOST_STEPS = 40;
    private static final double LARGEST_PHASE_STEP = 0.7;
    /** The frequencies are settled when their steps are this part of their uncertainty. */
    private static final double FINE = 1e-3;

    private final Samples samples;
    private final ToneBasis basis;
    private final Freedom freedom;
    private final double[][] residuals;
    private final double[] totalSquares = new double[Samples.CHANNELS];

    ToneFit(Samples samples, int tones, int driftDegree, Freedom freedom) {
        this.samples = samples;
        this.basis = new ToneBasis(samples, tones, driftDegree);
        this.freedom = freedom;
        this.residuals = new double[Samples.CHANNELS][samples.size()];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            for (double value : samples.channels()[c]) {
                totalSquares[c] += value * value;
            }
        }
    }

    ToneBasis basis() {
        return basis;
    }

    /**
     * A fit.
     *
     * @param angularFrequencies of the tones, rad/s
     * @param coefficients of each channel, in the order of {@link ToneBasis}
     * @param residuals of each channel
     * @param residualSquares their sums of squares
     * @param normal AᵀA, factored
     * @param slopes what a unit of each θ adds to the model of a channel, as coefficients of the derivatives' columns
     * @param pull (AᵀA)⁻¹AᵀG_c: what a unit of each θ takes from the coefficients, {@code [channel][θ][column]}
     * @param freeProducts G_c⊥ᵀG_c⊥, what A leaves of the derivatives, for each pair of tones {@code [channel][k][l]}
     * @param spread P, {@code [θ][tone]}
     * @param information Σ w_c Pᵀ G_c⊥ᵀG_c⊥ P, factored; empty where no frequency is free
     * @param phases θ's steps still open where the frequencies are exact: how far the signal would move their common factor
     */
    record Result(
            double[] angularFrequencies,
            double[][] coefficients,
            double[][] residuals,
            double[] residualSquares,
            Cholesky normal,
            double[][][] slopes,
            double[][][] pull,
            double[][][] freeProducts,
            double[][] spread,
            Optional<Cholesky> information,
            double[] phases) {
        /** Weight of each channel: the inverse of its residual variance. */
        static double weight(double residualSquares, double samples) {
            return samples / Math.max(residualSquares, Double.MIN_NORMAL);
        }
    }

    /** Sums over the samples: EᵀE (lower triangle), Eᵀr_c, |r_c|², E all columns. */
    private record Sums(double[][] gram, double[][] gradient, double[] squares) {
        double product(int i, int j) {
            return i >= j ? gram[i][j] : gram[j][i];
        }
    }

    /** A Gauss–Newton step; θ and what goes with it is empty where nothing is free. */
    private record Step(
            double[] theta,
            double largestPhase,
            double largestShare,
            double[][] linear,
            double[][][] slopes,
            double[][][] pull,
            double[][][] freeProducts,
            Optional<Cholesky> information) {}

    /**
     * Fits.
     *
     * @param start where the frequencies start, rad/s; each within about a third of a bin of the truth
     * @return empty where the tones cannot be told apart
     */
    Optional<Result> fit(double[] start) {
        double[] omega = start.clone();
        double[][] spread = spread(start);
        double[][] x = new double[Samples.CHANNELS][basis.columns()];
        double lastSize = Double.POSITIVE_INFINITY;
        for (int count = 0; count < MOST_STEPS; count++) {
            Sums sums = sums(omega, x);
            Optional<Cholesky> normal = Cholesky.of(model(sums.gram()));
            if (normal.isEmpty()) {
                return Optional.empty();
            }
            Optional<Step> found = step(sums, normal.get(), x, spread, count > 0 && freedom != Freedom.NONE);
            if (found.isEmpty()) {
                return Optional.empty();
            }
            Step step = found.get();
            double rounding = 1e-15 * Math.max(1, largest(omega) * samples.halfSpanS());
            double size = step.largestPhase();
            boolean settled = count > 0
                    && (freedom == Freedom.NONE
                            || size <= rounding
                            || step.largestShare() <= FINE
                            || (size < 1e-9 && size > lastSize / 2));
            double limit = count == 0 ? 0 : Math.min(1, LARGEST_PHASE_STEP / Math.max(size, Double.MIN_NORMAL));
            double[] theta = step.theta();
            for (int k = 0; k < omega.length; k++) {
                for (int p = 0; p < theta.length; p++) {
                    omega[k] += limit * spread[p][k] * theta[p] / samples.halfSpanS();
                }
            }
            x = moved(x, step, limit);
            if (settled) {
                return Optional.of(result(omega, x, sums, normal.get(), step, spread));
            }
            lastSize = count > 0 ? size : lastSize;
        }
        return Optional.empty();
    }

    private Result result(double[] omega, double[][] x, Sums sums, Cholesky normal, Step step, double[][] spread) {
        double[] phases = step.theta();
        Step whole = step;
        if (freedom == Freedom.NONE) {
            whole = step(sums, normal, x, clockSpread(omega), true).orElse(step);
            phases = whole.theta();
        }
        double[][] copies = new double[Samples.CHANNELS][];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            copies[c] = residuals[c].clone();
        }
        return new Result(
                omega.clone(),
                x,
                copies,
                sums.squares(),
                normal,
                whole.slopes(),
                whole.pull(),
                whole.freeProducts(),
                freedom == Freedom.NONE ? clockSpread(omega) : spread,
                whole.information(),
                phases);
    }

    private static double largest(double[] values) {
        double largest = 0;
        for (double value : values) {
            largest = Math.max(largest, value);
        }
        return largest;
    }

    private double[][] spread(double[] omega) {
        return switch (freedom) {
            case NONE -> new double[0][];
            case CLOCK -> clockSpread(omega);
            case EACH -> {
                double[][] each = new double[omega.length][omega.length];
                for (int k = 0; k < omega.length; k++) {
                    each[k][k] = 1;
                }
                yield each;
            }
        };
    }

    /** One θ, the phase of the fastest tone at the record's end. */
    private static double[][] clockSpread(double[] omega) {
        double[][] common = new double[1][omega.length];
        double fastest = largest(omega);
        for (int k = 0; k < omega.length; k++) {
            common[0][k] = omega[k] / fastest;
        }
        return common;
    }

    private double[][] model(double[][] gram) {
        double[][] model = new double[basis.columns()][];
        System.arraycopy(gram, 0, model, 0, model.length);
        return model;
    }

    private Optional<Step> step(Sums sums, Cholesky normal, double[][] x, double[][] spread, boolean withPhases) {
        int tones = basis.tones();
        int columns = basis.columns();
        double[][] linear = new double[Samples.CHANNELS][];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            linear[c] = normal.solve(java.util.Arrays.copyOf(sums.gradient()[c], columns));
        }
        if (!withPhases) {
            return Optional.of(new Step(
                    new double[0],
                    0,
                    0,
                    linear,
                    new double[Samples.CHANNELS][0][],
                    new double[Samples.CHANNELS][0][],
                    new double[Samples.CHANNELS][tones][tones],
                    Optional.empty()));
        }
        int unknowns = spread.length;
        double[][][] slopes = new double[Samples.CHANNELS][tones][2];
        double[][][] pull = new double[Samples.CHANNELS][unknowns][columns];
        double[][][] free = new double[Samples.CHANNELS][tones][tones];
        double[][] information = new double[unknowns][unknowns];
        double[] right = new double[unknowns];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            double[][] products = new double[tones][columns];
            double[][] tonePull = new double[tones][];
            double[] gradient = new double[tones];
            for (int k = 0; k < tones; k++) {
                // d/dδ (a cos ωt + b sin ωt) = u (b cos ωt − a sin ωt)
                slopes[c][k][0] = x[c][basis.cosineColumn(k) + 1];
                slopes[c][k][1] = -x[c][basis.cosineColumn(k)];
                int column = basis.slopeColumn(k);
                for (int j = 0; j < columns; j++) {
                    products[k][j] =
                            slopes[c][k][0] * sums.product(column, j) + slopes[c][k][1] * sums.product(column + 1, j);
                }
                tonePull[k] = normal.solve(products[k]);
                gradient[k] =
                        slopes[c][k][0] * sums.gradient()[c][column] + slopes[c][k][1] * sums.gradient()[c][column + 1];
                for (int j = 0; j < columns; j++) {
                    gradient[k] -= products[k][j] * linear[c][j];
                }
            }
            double weight = Result.weight(Math.max(sums.squares()[c], 1e-32 * totalSquares[c]), samples.size());
            for (int k = 0; k < tones; k++) {
                for (int l = 0; l < tones; l++) {
                    double value = slopeProduct(sums, slopes[c], k, l);
                    for (int j = 0; j < columns; j++) {
                        value -= products[k][j] * tonePull[l][j];
                    }
                    free[c][k][l] = value;
                }
            }
            for (int p = 0; p < unknowns; p++) {
                for (int k = 0; k < tones; k++) {
                    right[p] += weight * spread[p][k] * gradient[k];
                    for (int j = 0; j < columns; j++) {
                        pull[c][p][j] += spread[p][k] * tonePull[k][j];
                    }
                    for (int q = 0; q < unknowns; q++) {
                        for (int l = 0; l < tones; l++) {
                            information[p][q] += weight * spread[p][k] * free[c][k][l] * spread[q][l];
                        }
                    }
                }
            }
        }
        Optional<Cholesky> factored = Cholesky.of(information);
        if (factored.isEmpty()) {
            return Optional.empty();
        }
        double[] theta = factored.get().solve(right);
        double largestPhase = 0;
        double largestShare = 0;
        for (int p = 0; p < unknowns; p++) {
            double[] unit = new double[unknowns];
            unit[p] = 1;
            largestPhase = Math.max(largestPhase, Math.abs(theta[p]));
            largestShare = Math.max(
                    largestShare, Math.abs(theta[p]) / Math.sqrt(factored.get().inverseForm(unit)));
        }
        return Optional.of(new Step(theta, largestPhase, largestShare, linear, slopes, pull, free, factored));
    }

    private double slopeProduct(Sums sums, double[][] slopes, int k, int l) {
        double value = 0;
        for (int a = 0; a < 2; a++) {
            for (int b = 0; b < 2; b++) {
                value += slopes[k][a] * slopes[l][b] * sums.product(basis.slopeColumn(k) + a, basis.slopeColumn(l) + b);
            }
        }
        return value;
    }

    private double[][] moved(double[][] x, Step step, double share) {
        double[][] moved = new double[Samples.CHANNELS][basis.columns()];
        for (int c = 0; c < Samples.CHANNELS; c++) {
            for (int j = 0; j < moved[c].length; j++) {
                moved[c][j] = x[c][j] + step.linear()[c][j];
                for (int p = 0; p < step.theta().length; p++) {
                    moved[c][j] -= share * step.pull()[c][p][j] * step.theta()[p];
                }
            }
        }
        return moved;
    }

    private Sums sums(double[] omega, double[][] x) {
        int all = basis.allColumns();
        Sums sums = new Sums(new double[all][all], new double[Samples.CHANNELS][all], new double[Samples.CHANNELS]);
        double[][] block = new double[all][BLOCK];
        for (int first = 0; first < samples.size(); first += BLOCK) {
            int count = Math.min(BLOCK, samples.size() - first);
            basis.fill(omega, first, count, block);
            for (int i = 0; i < all; i++) {
                for (int j = 0; j <= i; j++) {
                    sums.gram()[i][j] += dot(block[i], block[j], 0, count);
                }
            }
            for (int c = 0; c < Samples.CHANNELS; c++) {
                double[] residual = residuals[c];
                System.arraycopy(samples.channels()[c], first, residual, first, count);
                for (int j = 0; j < basis.columns(); j++) {
                    double coefficient = x[c][j];
                    for (int i = 0; i < count; i++) {
                        residual[first + i] -= coefficient * block[j][i];
                    }
                }
                for (int j = 0; j < all; j++) {
                    sums.gradient()[c][j] += dot(block[j], residual, first, count);
                }
                for (int i = first; i < first + count; i++) {
                    sums.squares()[c] += residual[i] * residual[i];
                }
            }
        }
        return sums;
    }

    private static double dot(double[] a, double[] b, int bFirst, int count) {
        double even = 0;
        double odd = 0;
        int i = 0;
        for (; i + 1 < count; i += 2) {
            even += a[i] * b[bFirst + i];
            odd += a[i + 1] * b[bFirst + i + 1];
        }
        return i < count ? even + odd + a[i] * b[bFirst + i] : even + odd;
    }
}
