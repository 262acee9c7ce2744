package nightlag.stages.spectrum;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.OptionalDouble;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Projection;
import nightlag.stages.numeric.VarianceRatio;
import nightlag.stages.sweep.FrequencySweeps;
import nightlag.stages.sweep.Sweep;
import nightlag.stages.sweep.SweepPlan;

/**
 * Whether the storage and the loss modulus of a frequency sweep can belong to one linear material that does not change while
 * it is measured: G' and G'' then follow from one another (Kramers 1927, Kronig 1926; for moduli Booij &amp; Thoone, Rheol.
 * Acta 21 (1982) 15), and one non-negative relaxation spectrum with an equilibrium modulus and a viscosity carries both.
 *
 * <p>The best such fit, by non-negative least squares on a grid so fine that it does not show, is held against
 * smooth curves that leave it for each modulus by itself ({@link BestMaxwell#aboutOwnCurves}). Where the two moduli share one
 * spectrum, (S − S₀)/(k₀ − k) is no larger than the variance of the readings, S and S₀ the weighted sums of squares left by
 * the fit and by the curves, k and k₀ the numbers fitted (k: the modes that have a strength). That variance is 1 where the
 * readings' own uncertainties are known and they do not scatter beyond them, else S₀/(m − k₀) of m values; the test is
 * Fisher's, at one in a hundred.
 */
public final class KramersKronig {
    /** Fewer different frequencies than this cannot tell a misfit from what is fitted. */
    public static final int LEAST_FREQUENCIES = 8;
    /** Where the scatter has to be had from the readings themselves, it takes more. */
    public static final int LEAST_WITHOUT_UNCERTAINTIES = 12;
    /** What is fitted to the scatter when the readings come without uncertainties: how it grows. */
    private static final int NUMBERS_OF_SCATTER = 2;

    /** How often consistent readings may be called inconsistent. */
    private static final double CHANCE = 0.01;
    /**
     * rms misfit as a share of |G*|, scatter included, that is not worth calling inconsistent, however exact the readings: the
     * phase of a good instrument is hardly known to better than a third of a degree.
     */
    private static final double TOLERANCE = 5e-3;
    /** A fit that leaves as much of |G*| fits nothing, and readings that scatter as much can tell nothing of it. */
    private static final double MOST_OF_MODULUS = 0.5;

    /** Smaller chances are not told apart. */
    private static final double LEAST_CHANCE = 1e-4;
    /** Degrees of freedom of a variance that is known. */
    private static final double KNOWN = 1e9;

    private KramersKronig() {}

    /**
     * What the check found.
     *
     * @param misfit rms of the residuals of the fit in standard uncertainties of the readings
     * @param misfitU its standard uncertainty
     * @param share rms of the residuals as a share of |G*|
     * @param chance how often consistent readings misfit like this or worse
     * @param source where the uncertainties come from
     */
    record Check(double misfit, double misfitU, double share, double chance, Source source) {
        /** Whether G' and G'' can belong together. */
        boolean isConsistent() {
            return chance >= CHANCE || share <= TOLERANCE;
        }

        /** The share in per cent, two digits of it. */
        private String percent() {
            return new BigDecimal(100 * share)
                    .round(new MathContext(2))
                    .stripTrailingZeros()
                    .toPlainString();
        }

        private String words() {
            return String.format(
                    Locale.ROOT,
                    "%s: the best generalised Maxwell fit leaves %s %% of |G*| (rms), %s; chance of a worse fit %s%s",
                    isConsistent() ? "consistent" : "inconsistent",
                    percent(),
                    source.words,
                    chance < LEAST_CHANCE ? "below 1e-4" : String.format(Locale.ROOT, "%.2g", chance),
                    chance < CHANCE && share <= TOLERANCE ? ", but the misfit is too small to matter" : "");
        }
    }

    /** Where the uncertainties come from that a misfit is measured in. */
    enum Source {
        RECORDS("in units of the points' own u"),
        SCATTER("the points scatter by more than their u, so in units of the scatter about smooth curves"),
        SCATTER_ALONE("the moduli came without u, so in units of the scatter about smooth curves");

        private final String words;

        Source(String words) {
            this.words = words;
        }
    }

    /** The check of a sweep: nothing but for one in which the frequency varies. */
    public static Findings of(Sweep sweep) {
        if (sweep.kind() != SweepPlan.Kind.FREQUENCY) {
            return Findings.NONE;
        }
        List<ModulusReading> readings = sweep.points().stream()
                .map(point -> new ModulusReading(
                        2 * Math.PI * point.frequencyHz().orElseThrow(),
                        point.moduli().orElseThrow()))
                .toList();
        return of(sweep.name().specimen(), sweep.name().sweep(), sweep.temperatureK(), readings);
    }

    /**
     * The marker {@code kramers_kronig_misfit} of one frequency sweep at one temperature, or why it cannot be had.
     *
     * @param specimen specimen of the sweep
     * @param sweep its name
     * @param temperatureK its temperature, K
     * @param readings finite moduli at positive frequencies, in any order, repeats allowed
     */
    public static Findings of(
            String specimen, String sweep, OptionalDouble temperatureK, List<ModulusReading> readings) {
        int frequencies = FrequencySweeps.distinct(
                readings.stream().mapToDouble(ModulusReading::angularFrequency).toArray());
        int least = WeightedReadings.haveCovariances(readings) ? LEAST_FREQUENCIES : LEAST_WITHOUT_UNCERTAINTIES;
        if (frequencies < least) {
            return Findings.absent(
                    SpectrumReason.KRAMERS_KRONIG_TOO_FEW_FREQUENCIES.with(specimen, sweep, frequencies, least));
        }
        if (readings.stream().noneMatch(reading -> reading.moduli().magnitudePa() > 0)) {
            return Findings.absent(SpectrumReason.KRAMERS_KRONIG_NO_MODULUS.with(specimen, sweep));
        }
        Check check = check(readings);
        if (check.isConsistent() && check.share() > MOST_OF_MODULUS) {
            return Findings.absent(SpectrumReason.KRAMERS_KRONIG_LEFT_MOST.with(specimen, sweep, check.percent()));
        }
        return new Findings(
                List.of(new Marker(
                        specimen,
                        sweep,
                        "kramers_kronig_misfit",
                        temperatureK,
                        OptionalDouble.empty(),
                        check.misfit(),
                        OptionalDouble.of(check.misfitU()),
                        "1",
                        check.words())),
                check.isConsistent()
                        ? List.of()
                        : List.of(SpectrumReason.KRAMERS_KRONIG_INCONSISTENT.with(specimen, sweep, check.percent())));
    }

    /** The check itself, for readings at enough frequencies. */
    static Check check(List<ModulusReading> readings) {
        BestMaxwell fit = BestMaxwell.of(readings);
        WeightedReadings weighted = fit.readings();
        Projection own = fit.aboutOwnCurves();
        double squares = Arrays.stream(fit.left()).map(r -> r * r).sum();
        int freedom = Math.max(1, weighted.rows() - fit.used().size());
        int numbersOfScatter = weighted.scatterKnown() ? 0 : NUMBERS_OF_SCATTER;
        int ownFreedom = Math.max(1, weighted.rows() - own.dimensions() - numbersOfScatter);
        double ownVariance = Math.max(own.squares() / ownFreedom, WeightedReadings.LEAST_UNKNOWN_VARIANCE);
        boolean scatterDecides =
                !weighted.scatterKnown() || VarianceRatio.chanceOfMore(ownVariance, ownFreedom, KNOWN) < CHANCE;
        double variance = scatterDecides ? ownVariance : 1;
        double varianceFreedom = scatterDecides ? ownFreedom : KNOWN;
        int tied = Math.max(1, own.dimensions() - fit.used().size());
        double excess = Math.max(0, squares - own.squares()) / tied;
        double chance = VarianceRatio.chanceOfMore(excess / variance, tied, varianceFreedom);
        double misfit = Math.sqrt(squares / freedom / variance);
        return new Check(
                misfit,
                misfit * Math.sqrt((1.0 / freedom + 1 / varianceFreedom) / 2),
                share(fit),
                chance,
                !weighted.scatterKnown() ? Source.SCATTER_ALONE : scatterDecides ? Source.SCATTER : Source.RECORDS);
    }

    private static double share(BestMaxwell fit) {
        return Math.sqrt(fit.residuals().stream()
                .mapToDouble(residual -> square(residual.difference().abs()
                        / Math.max(
                                residual.fitted().abs(), residual.difference().abs())))
                .average()
                .orElseThrow());
    }

    private static double square(double value) {
        return value * value;
    }
}
