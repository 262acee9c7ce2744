package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;

/**
 * Figures of the retardation modes: the mean time Σ jλ²/Σ jλ, and of a solid J(∞) = J0 + Σ j. They are left out where they rest on
 * modes slower than the data support by more than their own uncertainty. What is faster than these is in J0 for all they know, and
 * the sum is the same.
 */
final class RetardationMarkers {
    /** A figure, and how it is told. */
    private enum Figure {
        MEAN_RETARDATION_TIME("s", "sum of j λ² over the sum of j λ"),
        EQUILIBRIUM_COMPLIANCE("1/Pa", "instantaneous compliance and sum of j");

        private final String unit;
        private final String method;

        Figure(String unit, String method) {
            this.unit = unit;
            this.method = method;
        }

        double of(RetardationModes modes) {
            return this == MEAN_RETARDATION_TIME ? modes.meanTimeS() : modes.recoverablePerPa();
        }

        String property() {
            return name().toLowerCase(Locale.ROOT);
        }
    }

    private RetardationMarkers() {}

    /**
     * Those that a spectrum has.
     *
     * @param temperatureK temperature they hold at, K
     * @param source how the modes were found, for the method
     */
    static Findings of(FittedSpectrum spectrum, double temperatureK, String source) {
        RetardationModes modes = spectrum.retardation();
        List<Marker> markers = new ArrayList<>();
        List<Reason> notes = new ArrayList<>();
        for (Figure figure : Figure.values()) {
            boolean exists = figure == Figure.MEAN_RETARDATION_TIME ? modes.count() > 0 : !modes.isLiquid();
            if (!exists) {
                continue;
            }
            double value = figure.of(modes);
            double beyond =
                    value - figure.of(withoutSlow(modes, spectrum.window().longestS()));
            Optional<double[]> u =
                    spectrum.uncertainties(relaxation -> new double[] {figure.of(relaxation.retardation())});
            double known = u.map(one -> one[0]).orElse(0.0);
            if (beyond > known) {
                notes.add(SpectrumReason.MARKER_BEYOND_DATA.with(
                        figure.property(), beyond / value, spectrum.window().longestS()));
            } else {
                markers.add(new Marker(
                        "",
                        "",
                        figure.property(),
                        OptionalDouble.of(temperatureK),
                        OptionalDouble.empty(),
                        value,
                        u.isPresent() ? OptionalDouble.of(known) : OptionalDouble.empty(),
                        figure.unit,
                        figure.method + source));
            }
        }
        return new Findings(markers, notes);
    }

    private static RetardationModes withoutSlow(RetardationModes modes, double longestS) {
        double[] times = modes.timesS();
        double[] strengths = modes.strengthsPerPa();
        return RetardationModes.of(
                modes.instantaneousPerPa(),
                modes.fluidityPerPaS(),
                times,
                IntStream.range(0, times.length)
                        .mapToDouble(k -> times[k] <= longestS ? strengths[k] : 0)
                        .toArray());
    }
}
