package nightlag.pipeline.report;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.DoubleSummaryStatistics;
import java.util.List;
import java.util.OptionalDouble;
import java.util.function.ToDoubleFunction;
import java.util.stream.Collectors;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.LoopPair;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;

/** The loops and harmonics of the points of a lot that most need a look. */
final class WorstPointCharts {
    /** More loops than this in one picture cannot be told apart. */
    private static final int MOST = 4;

    private static final Comparator<ModulusPoint> WORST_FIRST = Comparator.comparing(ModulusPoint::quality)
            .thenComparing((ModulusPoint point) -> point.flags().size())
            .reversed();

    private WorstPointCharts() {}

    /** Both charts; they are empty where every point is sound. */
    static List<Chart> of(List<ModulusPoint> points) {
        List<ModulusPoint> worst = points.stream()
                .filter(point -> point.quality() != Quality.SOUND)
                .sorted(WORST_FIRST)
                .toList();
        return List.of(loops(worst), harmonics(worst));
    }

    private static Chart loops(List<ModulusPoint> worst) {
        List<ModulusPoint> shown = worst.stream()
                .filter(point -> !point.loop().isEmpty())
                .limit(MOST)
                .toList();
        List<Series> series = new ArrayList<>();
        for (int i = 0; i < shown.size(); i++) {
            List<LoopPair> loop = shown.get(i).loop();
            ToDoubleFunction<LoopPair> strain = centred(loop, LoopPair::strain);
            ToDoubleFunction<LoopPair> stress = centred(loop, LoopPair::stressPa);
            series.add(Series.of(name(shown.get(i)), i, false, true, loop, strain, stress));
        }
        return new Chart(
                "Loops of the worst points",
                "Measured stress over strain of the last cycles, each about its middle and over its amplitude. A linear material draws an ellipse; flat ends"
                        + " are a channel at its limit, corners a material or a grip that is not linear, a loop that does not"
                        + " close a specimen that changes.",
                Axis.linear("strain over its amplitude", ""),
                Axis.linear("stress over its amplitude", ""),
                series);
    }

    /** From -1 to 1, so that loops of any size and offset lie on one another. */
    private static ToDoubleFunction<LoopPair> centred(List<LoopPair> loop, ToDoubleFunction<LoopPair> figure) {
        DoubleSummaryStatistics range = loop.stream().mapToDouble(figure).summaryStatistics();
        double middle = (range.getMin() + range.getMax()) / 2;
        double half = (range.getMax() - range.getMin()) / 2;
        return pair -> half > 0 ? (figure.applyAsDouble(pair) - middle) / half : 0;
    }

    private static Chart harmonics(List<ModulusPoint> worst) {
        List<ModulusPoint> shown = worst.stream()
                .filter(point -> point.harmonics().size() > 1)
                .limit(MOST)
                .toList();
        List<Series> series = new ArrayList<>();
        for (int i = 0; i < shown.size(); i++) {
            series.add(Series.of(
                    name(shown.get(i)),
                    i,
                    true,
                    false,
                    shown.get(i).harmonics().stream()
                            .filter(harmonic -> harmonic.order() > 1)
                            .toList(),
                    Harmonic::order,
                    Harmonic::relativeIntensity));
        }
        return new Chart(
                "Harmonics of the worst points",
                "Each order of the stress over the first. Odd orders come from the material, even ones from a specimen that slips, an"
                        + " offset or a drift.",
                Axis.linear("order", ""),
                Axis.log("relative intensity", ""),
                series);
    }

    private static String name(ModulusPoint point) {
        String flags = point.flags().stream().map(Flag::word).collect(Collectors.joining(", "));
        OptionalDouble hertz = point.frequencyHz();
        return "point " + point.key().point()
                + (hertz.isPresent() ? ", " + Written.fourDigits(hertz.getAsDouble()) + " Hz" : "")
                + (flags.isEmpty() ? "" : ": " + flags);
    }
}
