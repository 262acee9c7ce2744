package nightlag.stages.waveform;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.numeric.Complex;
import nightlag.stages.waveform.ScreeningFigures.Figure;

/** Whether a record stayed the same from its first cycle to its last: its means, its modulus, its temperature. */
final class Steadiness {
    private static final int MOST_STRETCHES = 32;
    private static final int FEWEST_FREEDOM = 8;
    /** From so many stretches their scatter tells an uncertainty. */
    private static final int FEWEST_STRETCHES = 4;

    private static final double LEAST_SCATTER_FREEDOM = 4;
    /** A drift not asked for whose overlap with the residuals is within the noise (squared, in its variances) is none. */
    private static final double WORTH_A_LOOK = 4;
    /** A stretch that lacks more of its samples does not take part in the scatter. */
    private static final double NEARLY_FULL = 0.8;

    private final Samples samples;
    private final Basis basis;
    private final JointFit.Result fit;
    private final Noise noise;
    private final double perSecond;
    private final Optional<Stretches> stretches;
    private final Unfitted[] unfitted;

    Steadiness(Samples samples, Basis basis, JointFit.Result fit, Noise noise) {
        this.samples = samples;
        this.basis = basis;
        this.fit = fit;
        this.noise = noise;
        this.perSecond = 1 / samples.halfSpanS();
        this.unfitted = new Unfitted[] {unfitted(Samples.DEFORMATION), unfitted(Samples.LOAD)};
        this.stretches = cut();
    }

    private double amplitude(int channel) {
        int column = basis.cosineColumn(1);
        return Math.hypot(fit.coefficients()[channel][column], fit.coefficients()[channel][column + 1]);
    }

    /**
     * Movement of the mean over the record as part of the amplitude, of the channel where it is larger: of the drift fitted,
     * or of the next power that was not.
     */
    Figure baseline() {
        Figure worst = new Figure(0, 0);
        for (int c = 0; c < Samples.CHANNELS; c++) {
            for (Figure figure : List.of(fittedDrift(c), unfitted[c].movement())) {
                Figure relative = new Figure(figure.value() / amplitude(c), figure.u() / amplitude(c));
                if (relative.value() > worst.value()) {
                    worst = relative;
                }
            }
        }
        return worst;
    }

    /** Highest less lowest value of the fitted polynomial. */
    private Figure fittedDrift(int channel) {
        if (basis.driftTerms() == 1) {
            return new Figure(0, 0);
        }
        double slope = fit.coefficients()[channel][1];
        double curve = basis.driftTerms() > 2 ? fit.coefficients()[channel][2] : 0;
        double[] places = {-1, 1, Math.abs(slope) < 2 * Math.abs(curve) ? -slope / (2 * curve) : 1};
        double low = places[0];
        double high = places[0];
        for (double u : places) {
            double value = u * (slope + u * curve);
            low = value < low * (slope + low * curve) ? u : low;
            high = value > high * (slope + high * curve) ? u : high;
        }
        double[] difference = new double[basis.columns()];
        difference[1] = high - low;
        if (basis.driftTerms() > 2) {
            difference[2] = high * high - low * low;
        }
        double move = slope * difference[1] + (basis.driftTerms() > 2 ? curve * difference[2] : 0);
        double variance = noise.beside(channel, 1).variance() * fit.normal().inverseForm(difference);
        return new Figure(move, Math.sqrt(variance));
    }

    /**
     * The next power of a channel's drift, which was not asked for, from what the fit left of it.
     *
     * @param movement what it moves the mean by over the record
     * @param squares what it adds to the squares of the residuals
     * @param residuals the channel's residuals without it
     */
    private record Unfitted(Figure movement, double squares, double[] residuals) {
        static Unfitted none(double[] residuals) {
            return new Unfitted(new Figure(0, 0), 0, residuals);
        }
    }

    /** A straight line under a record taken for level, a parabola under one taken for straight. */
    private Unfitted unfitted(int channel) {
        int power = basis.driftTerms();
        if (power > 2) {
            return Unfitted.none(fit.residuals()[channel]);
        }
        double squares = 0;
        double overlap = 0;
        for (int i = 0; i < samples.size(); i++) {
            double term = term(power, i);
            squares += term * term;
            overlap += term * fit.residuals()[channel][i];
        }
        double variance = noise.beside(channel, 1).variance();
        if (overlap * overlap < WORTH_A_LOOK * variance * squares) {
            return Unfitted.none(fit.residuals()[channel]);
        }
        double[] products = new double[basis.columns()];
        double[][] column = new double[basis.columns()][1];
        for (int i = 0; i < samples.size(); i++) {
            basis.fill(i, 1, column);
            for (int j = 0; j < products.length; j++) {
                products[j] += term(power, i) * column[j][0];
            }
        }
        double free = squares - fit.normal().inverseForm(products);
        if (free <= 0) {
            return Unfitted.none(fit.residuals()[channel]);
        }
        // u moves by 2 from end to end, u² by 1 from the middle to either
        double range = power == 1 ? 2 : 1;
        Figure movement = new Figure(range * Math.abs(overlap) / free, range * Math.sqrt(variance / free));
        return movement.significant()
                ? new Unfitted(movement, overlap * overlap / free, without(channel, power, products, overlap / free))
                : new Unfitted(movement, 0, fit.residuals()[channel]);
    }

    /** The residuals without so much of the term, as far as the fit did not take it already. */
    private double[] without(int channel, int power, double[] products, double coefficient) {
        double[] taken = fit.normal().solve(products);
        double[][] column = new double[basis.columns()][1];
        double[] rest = fit.residuals()[channel].clone();
        for (int i = 0; i < rest.length; i++) {
            basis.fill(i, 1, column);
            double left = term(power, i);
            for (int j = 0; j < taken.length; j++) {
                left -= taken[j] * column[j][0];
            }
            rest[i] -= coefficient * left;
        }
        return rest;
    }

    private double term(int power, int sample) {
        double u = samples.seconds()[sample] * perSecond;
        return power == 1 ? u : u * u - 1.0 / 3;
    }

    /**
     * The record cut into stretches of whole cycles.
     *
     * @param count how many
     * @param cyclesEach whole cycles in each
     * @param samplesIn samples in each
     * @param middles the mean of their times, u = t/half span
     * @param excess what the residuals add there to the amplitude of the fundamental: stretch, channel, cos and sin
     */
    private record Stretches(int count, int cyclesEach, int[] samplesIn, double[] middles, double[][][] excess) {}

    private Optional<Stretches> cut() {
        double cyclesPerSecond = fit.angularFrequency() / (2 * Math.PI);
        // a record of whole cycles must not lose its last one to rounding
        int cycles =
                (int) Math.floor(samples.durationS() * cyclesPerSecond + 0.5 * samples.intervalS() * cyclesPerSecond);
        if (cycles < 2) {
            return Optional.empty();
        }
        int cyclesEach = (cycles + MOST_STRETCHES - 1) / MOST_STRETCHES;
        int count = cycles / cyclesEach;
        double[][][] excess = new double[count][Samples.CHANNELS][2];
        int[] samplesIn = new int[count];
        double[] middles = new double[count];
        double begin = samples.seconds()[0] - samples.intervalS() / 2;
        double perSecond = cyclesPerSecond / cyclesEach;
        for (int i = 0; i < samples.size(); i++) {
            int stretch = (int) ((samples.seconds()[i] - begin) * perSecond);
            if (stretch < count) {
                samplesIn[stretch]++;
                middles[stretch] += samples.seconds()[i] / samples.halfSpanS();
                for (int c = 0; c < Samples.CHANNELS; c++) {
                    excess[stretch][c][0] += unfitted[c].residuals()[i] * basis.cosine()[i];
                    excess[stretch][c][1] += unfitted[c].residuals()[i] * basis.sine()[i];
                }
            }
        }
        for (int k = 0; k < count; k++) {
            middles[k] /= Math.max(1, samplesIn[k]);
            for (double[] ofChannel : excess[k]) {
                ofChannel[0] *= 2.0 / Math.max(1, samplesIn[k]);
                ofChannel[1] *= 2.0 / Math.max(1, samplesIn[k]);
            }
        }
        return Optional.of(new Stretches(count, cyclesEach, samplesIn, middles, excess));
    }

    /**
     * Noise of a channel without what a change of its amplitude from stretch to stretch, or a drift that was not asked for,
     * leaves in the residuals: that is unsteadiness, not noise.
     */
    double steadyVariance(int channel) {
        Noise.Level whole = noise.whole(channel);
        if (stretches.isEmpty()) {
            return whole.variance();
        }
        Stretches cut = stretches.get();
        double freedom = whole.freedom() - 2 * Math.max(0, cut.count() - 1 - basis.trendDegree());
        double squares = whole.variance() * whole.freedom();
        for (int k = 0; k < cut.count(); k++) {
            double[] excess = cut.excess()[k][channel];
            squares -= cut.samplesIn()[k] * (excess[0] * excess[0] + excess[1] * excess[1]) / 2;
        }
        squares -= unfitted[channel].squares();
        return freedom >= FEWEST_FREEDOM && squares > 0 ? squares / freedom : whole.variance();
    }

    /**
     * Change of |load / deformation| over the record: by a straight line through its stretches of whole cycles, or of the
     * first stretch against the others (a start-up that lasted longer than said), whichever is larger and stands out of the
     * noise.
     */
    Optional<Figure> cycleTrend() {
        return stretches.map(this::cycleTrend);
    }

    private Figure cycleTrend(Stretches cut) {
        int count = cut.count();
        double[] ratios = ratios(cut);
        double mean = 0;
        for (double ratio : ratios) {
            mean += ratio / count;
        }
        double middle = (count - 1) / 2.0;
        double slope = 0;
        double spread = 0;
        for (int k = 0; k < count; k++) {
            slope += (k - middle) * ratios[k];
            spread += (k - middle) * (k - middle);
        }
        double variance = 0;
        for (int c = 0; c < Samples.CHANNELS; c++) {
            variance += 2 * steadyVariance(c) * count / (samples.size() * amplitude(c) * amplitude(c));
        }
        double inRecord = samples.durationS() * fit.angularFrequency() / (2 * Math.PI) / cut.cyclesEach();
        Figure trend = new Figure(Math.abs(slope / spread / mean) * inRecord, Math.sqrt(variance / spread) * inRecord);
        double others = (mean * count - ratios[0]) / (count - 1);
        Figure start = new Figure(Math.abs(ratios[0] / others - 1), Math.sqrt(variance * (1 + 1.0 / (count - 1))));
        return start.significant() && start.value() > trend.value() ? start : trend;
    }

    /**
     * The uncertainty of load / deformation from the noise beside the fundamental and from the scatter of the stretches; empty
     * with fewer than four of them.
     *
     * @param noiseFreedom degrees of freedom behind the noise
     */
    Optional<CycleScatter> cycleScatter(double noiseFreedom) {
        return stretches.flatMap(cut -> cycleScatter(cut, noiseFreedom));
    }

    private Optional<CycleScatter> cycleScatter(Stretches cut, double noiseFreedom) {
        int expected = samples.size() / cut.count();
        int[] full = IntStream.range(0, cut.count())
                .filter(k -> cut.samplesIn()[k] >= NEARLY_FULL * expected)
                .toArray();
        if (full.length < FEWEST_STRETCHES) {
            return Optional.empty();
        }
        Complex[] deviations = new Complex[full.length];
        double[] places = new double[full.length];
        double[] weights = new double[full.length];
        for (int i = 0; i < full.length; i++) {
            int k = full[i];
            deviations[i] = relativeExcess(cut, k, Samples.LOAD).minus(relativeExcess(cut, k, Samples.DEFORMATION));
            places[i] = cut.middles()[k];
            weights[i] = cut.samplesIn()[k];
        }
        // a fit that lets the amplitude follow a parabola has taken that from the scatter as well
        double freedom = 2.0 * (full.length - Math.max(2, basis.trendDegree() + 1));
        if (freedom < LEAST_SCATTER_FREEDOM) {
            return Optional.empty();
        }
        double squares = CycleScatter.squaresAboutALine(
                        places,
                        weights,
                        Arrays.stream(deviations).mapToDouble(Complex::re).toArray())
                + CycleScatter.squaresAboutALine(
                        places,
                        weights,
                        Arrays.stream(deviations).mapToDouble(Complex::im).toArray());
        double variance = 0;
        for (int c = 0; c < Samples.CHANNELS; c++) {
            variance += 2 * noise.beside(c, 1).variance() / (amplitude(c) * amplitude(c) * samples.size());
        }
        double scatter = squares / (freedom * samples.size());
        return Optional.of(new CycleScatter(Math.sqrt(variance), noiseFreedom, Math.sqrt(scatter), freedom));
    }

    /** What a stretch adds to a channel's complex amplitude, as part of what the fit has there. */
    private Complex relativeExcess(Stretches cut, int stretch, int channel) {
        double[] excess = cut.excess()[stretch][channel];
        double middle = cut.middles()[stretch];
        return new Complex(excess[0], -excess[1])
                .over(new Complex(fitted(channel, 0, middle), -fitted(channel, 1, middle)));
    }

    private double[] ratios(Stretches cut) {
        double[] ratios = new double[cut.count()];
        for (int k = 0; k < ratios.length; k++) {
            double middle = cut.middles()[k];
            double[] sizes = new double[Samples.CHANNELS];
            for (int c = 0; c < Samples.CHANNELS; c++) {
                sizes[c] = Math.hypot(
                        fitted(c, 0, middle) + cut.excess()[k][c][0], fitted(c, 1, middle) + cut.excess()[k][c][1]);
            }
            ratios[k] = sizes[Samples.LOAD] / sizes[Samples.DEFORMATION];
        }
        return ratios;
    }

    /** The coefficient of cos ωt (part 0) or sin ωt (part 1) at u, with what the fit let it change. */
    private double fitted(int channel, int part, double u) {
        double[] coefficients = fit.coefficients()[channel];
        double value = coefficients[basis.cosineColumn(1) + part];
        double raised = 1;
        for (int power = 1; power <= basis.trendDegree(); power++) {
            raised *= u;
            value += raised * coefficients[basis.trendColumn(power) + part];
        }
        return value;
    }

    /** Mean of the temperature over the samples used, K; rows without one do not count. */
    static OptionalDouble meanTemperature(double[] temperatureK, int[] indices) {
        if (temperatureK.length == 0) {
            return OptionalDouble.empty();
        }
        double reference = Double.NaN;
        double sum = 0;
        int count = 0;
        for (int index : indices) {
            double value = temperatureK[index];
            if (Double.isFinite(value)) {
                reference = count == 0 ? value : reference;
                sum += value - reference;
                count++;
            }
        }
        return count == 0 ? OptionalDouble.empty() : OptionalDouble.of(reference + sum / count);
    }

    /** Highest less lowest temperature, each a mean over one cycle, K. */
    static OptionalDouble temperatureWander(double[] temperatureK, int[] indices, double samplesPerCycle) {
        OptionalDouble mean = meanTemperature(temperatureK, indices);
        if (mean.isEmpty()) {
            return OptionalDouble.empty();
        }
        double[] sums = new double[indices.length + 1];
        int count = 0;
        for (int index : indices) {
            if (Double.isFinite(temperatureK[index])) {
                sums[count + 1] = sums[count] + (temperatureK[index] - mean.getAsDouble());
                count++;
            }
        }
        int window = (int) Math.max(1, Math.min(count, Math.round(samplesPerCycle)));
        double low = Double.POSITIVE_INFINITY;
        double high = Double.NEGATIVE_INFINITY;
        for (int end = window; end <= count; end++) {
            double value = (sums[end] - sums[end - window]) / window;
            low = Math.min(low, value);
            high = Math.max(high, value);
        }
        return OptionalDouble.of(high - low);
    }
}
