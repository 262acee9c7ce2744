package nightlag.stages;

import java.util.Comparator;
import java.util.List;
import java.util.stream.Stream;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;
import nightlag.stages.spectrum.SpectrumRow;
import nightlag.stages.sweep.NaturalOrder;
import nightlag.stages.sweep.PointOrder;

/** All reductions of one lot to what is published about it. */
public final class Conclude {
    private static final Comparator<Marker> MARKER_ORDER = Comparator.comparing(Marker::specimen, NaturalOrder::compare)
            .thenComparing(Marker::sweep, NaturalOrder::compare)
            .thenComparing(Marker::property, NaturalOrder::compare)
            .thenComparingDouble(marker -> marker.temperatureK().orElse(Double.NEGATIVE_INFINITY))
            .thenComparingDouble(marker -> marker.frequencyHz().orElse(Double.NEGATIVE_INFINITY));

    private static final Comparator<SpectrumRow> ROW_ORDER = Comparator.comparingDouble(
                    SpectrumRow::referenceTemperatureK)
            .thenComparing(row -> row.kind().word())
            .thenComparing(row -> row.form().word())
            .thenComparingDouble(SpectrumRow::timeS);

    private Conclude() {}

    /**
     * Concludes one lot. The order of the reductions does not matter: points are put in table order before anything is
     * drawn from them. Unusable points are published with the others and kept out of all else.
     */
    public static LotResult conclude(List<Reduction> reductions, ConclusionPlan plan) {
        LotPoints lot = LotPoints.of(
                reductions.stream()
                        .flatMap(reduction -> reduction.points().stream())
                        .sorted(PointOrder.BY_KEY)
                        .toList(),
                plan.sweeps());
        List<ModulusPoint> points = lot.points();
        List<ModulusPoint> usable = points.stream()
                .filter(point -> point.quality() != Quality.UNUSABLE)
                .toList();
        LotSpectrum spectrum = plan.spectrum()
                .map(wanted -> LotSpectrum.of(usable, lot.amplitudeSweeps(), wanted, plan.superposition()))
                .orElse(LotSpectrum.NONE);
        return new LotResult(
                points,
                spectrum.markers().stream().sorted(MARKER_ORDER).toList(),
                List.of(),
                List.of(),
                spectrum.rows().stream().sorted(ROW_ORDER).toList(),
                Stream.concat(lot.notes().stream(), spectrum.notes().stream()).toList());
    }
}
