package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.function.Function;
import java.util.stream.IntStream;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.numeric.SmoothCurve;

/**
 * Logarithms of the moduli over the logarithm of frequency or strain, ready for smooth curves through them. Moduli within a
 * thousandth of each other in frequency or strain are one, at their weighted mean; where such repeats scatter by more than
 * their uncertainties say, all of these are widened. Where one of the moduli has no covariance, the scatter of
 * neighbours stands in for all of them.
 */
final class LogModuli {
    /** No logarithm is taken to be known better. */
    private static final double LEAST_VARIANCE = 1e-10;

    private static final double STANDS_OUT = 3;
    private static final double SAME = 1e-3;
    /** Curves through more points than these are cut into stretches, each overlapping half of the next. */
    private static final int STRETCH = 50;

    /**
     * The strength of the process that waves a logarithm by about 0.06, up and down in a decade of frequency, as modes a
     * decade apart do.
     */
    private static final double WAVES_OF_MODES = 1;

    /**
     * The strength where frequencies stand so far apart that such waves pass between them unseen, about 0.1. It makes the u of
     * crossovers of published mode sets, two frequencies a decade and no noise, as large as their errors.
     */
    private static final double UNSEEN_WAVES = 3;
    /** A wave of a decade takes more than three frequencies to be seen; ln ω. */
    private static final double SPARSE = 0.3 * Math.log(10);

    private final double[] x;
    private final Entry[] entries;
    private final double leastStrength;

    private LogModuli(double[] x, Entry[] entries, double leastStrength) {
        this.x = x;
        this.entries = entries;
        this.leastStrength = leastStrength;
    }

    /** One observation: ln ω or ln γ, ln G', ln G'' and the covariance of the latter two. */
    private record Entry(
            double x, double storage, double loss, double storageVariance, double lossVariance, double both) {
        double weight() {
            return 1 / (storageVariance + lossVariance);
        }

        Entry widened(double factor) {
            return new Entry(x, storage, loss, factor * storageVariance, factor * lossVariance, factor * both);
        }

        /** (G'/|G*|)². */
        double storageShare() {
            return 1 / (1 + Math.exp(2 * (loss - storage)));
        }
    }

    /** What is drawn over x: a function of ln G' and ln G'' with its derivatives by both. */
    enum Figure {
        /** ln tan δ. */
        LOSS_FACTOR {
            @Override
            double of(Entry entry) {
                return entry.loss() - entry.storage();
            }

            @Override
            double[] gradient(Entry entry) {
                return new double[] {-1, 1};
            }
        },
        /** ln |G*|. */
        MAGNITUDE {
            @Override
            double of(Entry entry) {
                double larger = Math.max(entry.storage(), entry.loss());
                return larger
                        + Math.log(Math.hypot(Math.exp(entry.storage() - larger), Math.exp(entry.loss() - larger)));
            }

            @Override
            double[] gradient(Entry entry) {
                return new double[] {entry.storageShare(), 1 - entry.storageShare()};
            }
        },
        /** ln G'. */
        STORAGE {
            @Override
            double of(Entry entry) {
                return entry.storage();
            }

            @Override
            double[] gradient(Entry entry) {
                return new double[] {1, 0};
            }
        };

        abstract double of(Entry entry);

        abstract double[] gradient(Entry entry);
    }

    /**
     * Moduli over frequency. Their curves may wave as those of single modes do, even where noise or sparse frequencies hide it.
     *
     * @param angularFrequencies above zero
     * @param moduli as many, standing out from zero
     */
    static LogModuli overFrequency(double[] angularFrequencies, List<Moduli> moduli) {
        double[] logs =
                Arrays.stream(angularFrequencies).map(Math::log).sorted().toArray();
        return of(angularFrequencies, moduli, leastStrength(logs));
    }

    /** How strong a process logarithms of moduli follow at the least, over these logarithms of frequencies, rising. */
    static double leastStrength(double[] logs) {
        return medianInterval(logs) > SPARSE ? UNSEEN_WAVES : WAVES_OF_MODES;
    }

    private static double medianInterval(double[] logs) {
        double[] intervals = IntStream.range(1, logs.length)
                .mapToDouble(i -> logs[i] - logs[i - 1])
                .filter(interval -> interval > SAME)
                .sorted()
                .toArray();
        return intervals.length == 0 ? 0 : intervals[intervals.length / 2];
    }

    /**
     * Moduli over strain.
     *
     * @param strains above zero
     * @param moduli as many, standing out from zero
     */
    static LogModuli overStrain(double[] strains, List<Moduli> moduli) {
        return of(strains, moduli, 0);
    }

    private static LogModuli of(double[] abscissae, List<Moduli> moduli, double leastStrength) {
        boolean known = moduli.stream().allMatch(one -> one.covariance().isPresent());
        List<Entry> entries = new ArrayList<>();
        for (int i = 0; i < abscissae.length; i++) {
            entries.add(entry(Math.log(abscissae[i]), moduli.get(i), known));
        }
        entries.sort(Comparator.comparingDouble(Entry::x));
        List<List<Entry>> groups = new ArrayList<>();
        for (Entry entry : entries) {
            if (groups.isEmpty()
                    || entry.x() - groups.get(groups.size() - 1).get(0).x() > SAME) {
                groups.add(new ArrayList<>());
            }
            groups.get(groups.size() - 1).add(entry);
        }
        double widening = known ? widening(groups) : 1;
        Entry[] merged =
                groups.stream().map(group -> together(group).widened(widening)).toArray(Entry[]::new);
        double[] places = Arrays.stream(merged).mapToDouble(Entry::x).toArray();
        return new LogModuli(places, known ? merged : scattering(places, merged), leastStrength);
    }

    /**
     * With the scatter of neighbours for the covariance that nobody gave; that of the curve alone would be a guess, as it follows
     * values that are said to be exact. Errors grow with each modulus or with |G*|, whichever makes the scatter likelier. Too few
     * places tell no scatter, and stay as they are.
     */
    private static Entry[] scattering(double[] places, Entry[] entries) {
        if (places.length < NeighbourScatter.FEWEST) {
            return entries;
        }
        Scatter each = Scatter.of(places, entries, entry -> new double[] {1, 1});
        Scatter ofSize = Scatter.of(places, entries, entry ->
                new double[] {1 / entry.storageShare(), 1 / (1 - entry.storageShare())});
        Scatter likelier = each.likelihood() > ofSize.likelihood() ? each : ofSize;
        double variance = NeighbourScatter.doubt(places.length) * likelier.variance();
        return Arrays.stream(entries)
                .map(entry -> {
                    double[] shares = likelier.shares().apply(entry);
                    return new Entry(
                            entry.x(),
                            entry.storage(),
                            entry.loss(),
                            variance * shares[0] + LEAST_VARIANCE,
                            variance * shares[1] + LEAST_VARIANCE,
                            0);
                })
                .toArray(Entry[]::new);
    }

    /**
     * How the logarithms scatter about their neighbours.
     *
     * @param shares how the variances of ln G' and ln G'' grow from point to point
     * @param variance what these are multiplied by
     * @param likelihood logarithm of the likelihood, but for a constant
     */
    private record Scatter(Function<Entry, double[]> shares, double variance, double likelihood) {
        static Scatter of(double[] places, Entry[] entries, Function<Entry, double[]> shares) {
            double squares = 0;
            double logarithms = 0;
            int count = 0;
            for (int from = 0; from + NeighbourScatter.TOGETHER <= entries.length; from++) {
                double[] factors = NeighbourScatter.blindToParabolas(places, from);
                double[] differences = new double[2];
                double[] variances = new double[2];
                for (int i = 0; i < factors.length; i++) {
                    Entry entry = entries[from + i];
                    double[] share = shares.apply(entry);
                    differences[0] += factors[i] * entry.storage();
                    differences[1] += factors[i] * entry.loss();
                    variances[0] += square(factors[i]) * share[0];
                    variances[1] += square(factors[i]) * share[1];
                }
                for (int part = 0; part < 2; part++) {
                    squares += square(differences[part]) / variances[part];
                    logarithms += Math.log(variances[part]);
                    count++;
                }
            }
            double variance = squares / count;
            return new Scatter(shares, variance, -0.5 * (count * Math.log(variance) + logarithms));
        }
    }

    private static Entry entry(double x, Moduli moduli, boolean known) {
        double storage = moduli.storagePa();
        double loss = moduli.lossPa();
        // of an error in phase and size alike
        double alike = LEAST_VARIANCE * (storage * storage + loss * loss);
        ModuliCovariance own = known ? moduli.covariance().orElseThrow() : new ModuliCovariance(alike, alike, 0);
        return new Entry(
                x,
                Math.log(storage),
                Math.log(loss),
                own.storageVariance() / (storage * storage) + LEAST_VARIANCE,
                own.lossVariance() / (loss * loss) + LEAST_VARIANCE,
                own.covariance() / (storage * loss));
    }

    private static Entry together(List<Entry> group) {
        double weights = group.stream().mapToDouble(Entry::weight).sum();
        double[] sums = new double[6];
        for (Entry entry : group) {
            double part = entry.weight() / weights;
            sums[0] += part * entry.x();
            sums[1] += part * entry.storage();
            sums[2] += part * entry.loss();
            sums[3] += part * part * entry.storageVariance();
            sums[4] += part * part * entry.lossVariance();
            sums[5] += part * part * entry.both();
        }
        return new Entry(sums[0], sums[1], sums[2], sums[3], sums[4], sums[5]);
    }

    private static double widening(List<List<Entry>> groups) {
        double sum = 0;
        int freedom = 0;
        for (List<Entry> group : groups) {
            Entry mean = together(group);
            for (Entry entry : group) {
                sum += square(entry.storage() - mean.storage()) / entry.storageVariance()
                        + square(entry.loss() - mean.loss()) / entry.lossVariance();
            }
            freedom += 2 * (group.size() - 1);
        }
        return freedom == 0 ? 1 : Math.max(1, sum / freedom);
    }

    private static double square(double value) {
        return value * value;
    }

    /** Whether a logarithm can be had of both moduli: where they are above zero by three standard uncertainties. */
    static boolean standOut(Moduli moduli) {
        double storageU = moduli.covariance().map(ModuliCovariance::storageU).orElse(0.0);
        double lossU = moduli.covariance().map(ModuliCovariance::lossU).orElse(0.0);
        return moduli.complex().isFinite()
                && moduli.storagePa() > STANDS_OUT * storageU
                && moduli.lossPa() > STANDS_OUT * lossU;
    }

    /** How many different frequencies or strains there are. */
    int size() {
        return x.length;
    }

    /** Logarithms of the frequencies or strains, rising. */
    double[] places() {
        return x.clone();
    }

    /** Stretches short enough for a curve each; all of it where it is short. */
    List<Stretch> stretches() {
        List<Stretch> stretches = new ArrayList<>();
        int half = STRETCH / 2;
        for (int from = 0; stretches.isEmpty() || from + half < x.length; from += half) {
            int to = from + STRETCH + half > x.length ? x.length : from + STRETCH;
            double begin = from == 0 ? Double.NEGATIVE_INFINITY : x[from + half / 2];
            double end = to == x.length ? Double.POSITIVE_INFINITY : x[from + half + half / 2];
            stretches.add(new Stretch(
                    new LogModuli(
                            Arrays.copyOfRange(x, from, to), Arrays.copyOfRange(entries, from, to), leastStrength),
                    begin,
                    end));
            if (to == x.length) {
                break;
            }
        }
        return stretches;
    }

    /**
     * A part of the data with what its curves answer for.
     *
     * @param data the part
     * @param begin from here on
     * @param end up to here
     */
    record Stretch(LogModuli data, double begin, double end) {
        /** Whether a place is its own and not a neighbour's. */
        boolean owns(double place) {
            return begin <= place && place < end;
        }
    }

    /** The values of a figure. */
    double[] values(Figure figure) {
        return Arrays.stream(entries).mapToDouble(figure::of).toArray();
    }

    /** The variances of a figure. */
    double[] variances(Figure figure) {
        return covariances(figure, figure);
    }

    /** The smooth curve of a figure. */
    SmoothCurve curve(Figure figure) {
        return SmoothCurve.throughBelieved(x, values(figure), variances(figure), leastStrength);
    }

    /** The covariance of what noise does to the curves of two figures at a place. */
    double covariance(Figure one, SmoothCurve oneCurve, Figure other, SmoothCurve otherCurve, double place) {
        double[] noise = covariances(one, other);
        double[] first = oneCurve.weights(place, 0);
        double[] second = otherCurve.weights(place, 0);
        double sum = 0;
        for (int i = 0; i < noise.length; i++) {
            sum += first[i] * second[i] * noise[i];
        }
        return sum * Math.sqrt(oneCurve.widening() * otherCurve.widening());
    }

    private double[] covariances(Figure one, Figure other) {
        double[] covariances = new double[entries.length];
        for (int i = 0; i < covariances.length; i++) {
            Entry entry = entries[i];
            double[] first = one.gradient(entry);
            double[] second = other.gradient(entry);
            covariances[i] = first[0] * second[0] * entry.storageVariance()
                    + first[1] * second[1] * entry.lossVariance()
                    + (first[0] * second[1] + first[1] * second[0]) * entry.both();
        }
        return covariances;
    }
}
