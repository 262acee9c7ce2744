package nightlag.stages;

import java.util.ArrayList;
import java.util.Collections;
import java.util.IdentityHashMap;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.stream.Collectors;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Figure;
import nightlag.stages.moduli.FigureRow;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointQuantity;
import nightlag.stages.sweep.FigureMarkers;
import nightlag.stages.sweep.FigureReason;
import nightlag.stages.sweep.OwnFigures;

/**
 * The figures a grade defines for itself, of one lot.
 *
 * @param rows each derived figure at each usable point that has it: points in table order, the figures of one in the order
 *     of the grade file
 * @param findings where figures reach values
 */
record LotFigures(List<FigureRow> rows, Findings findings) {
    static LotFigures of(List<ModulusPoint> usable, List<List<ModulusPoint>> amplitudeSweeps, OwnFigures plan) {
        List<Reason> notes = new ArrayList<>();
        List<FigureRow> rows = new ArrayList<>();
        int[] missing = new int[plan.derived().size()];
        for (ModulusPoint point : usable) {
            for (int i = 0; i < missing.length; i++) {
                Figure figure = plan.derived().get(i);
                Optional<Figure.Value> value = figure.at(point);
                if (value.isEmpty()) {
                    missing[i]++;
                } else {
                    rows.add(row(point, figure, value.get()));
                }
            }
        }
        for (int i = 0; i < missing.length; i++) {
            if (missing[i] > 0) {
                Figure figure = plan.derived().get(i);
                notes.add(FigureReason.FIGURE_WITHOUT_VALUE.with(
                        figure.name(),
                        missing[i],
                        usable.size(),
                        figure.uses().stream().map(PointQuantity::word).collect(Collectors.joining(", "))));
            }
        }
        Set<ModulusPoint> strained = Collections.newSetFromMap(new IdentityHashMap<>());
        amplitudeSweeps.forEach(strained::addAll);
        List<ModulusPoint> linear =
                usable.stream().filter(point -> !strained.contains(point)).toList();
        List<Findings> found = new ArrayList<>(List.of(new Findings(List.of(), notes)));
        plan.markers().forEach(marker -> found.add(FigureMarkers.find(linear, marker)));
        return new LotFigures(List.copyOf(rows), Findings.together(found));
    }

    private static FigureRow row(ModulusPoint point, Figure figure, Figure.Value value) {
        OptionalDouble variance = value.variance(point);
        return new FigureRow(
                point.key(),
                point.temperatureK(),
                point.frequencyHz(),
                figure.name(),
                value.value(),
                variance.isPresent() ? OptionalDouble.of(Math.sqrt(variance.getAsDouble())) : OptionalDouble.empty(),
                figure.unit());
    }
}
