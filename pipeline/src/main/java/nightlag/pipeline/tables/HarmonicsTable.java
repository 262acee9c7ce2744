package nightlag.pipeline.tables;

import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.LocalMeasures;
import nightlag.stages.moduli.LocalMeasures.Chebyshev;
import nightlag.stages.moduli.LocalMeasures.WithinCycle;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.sweep.NaturalOrder;

/** The declaration of {@code harmonics}. */
final class HarmonicsTable {
    static final Table<Row> TABLE = Table.of(
            "harmonics",
            "One order of the stress of one point, its phase referred to the strain γ₀ sin ωt",
            LotColumns.before(
                    row -> row.key().grade(),
                    row -> row.key().lot(),
                    row -> row.key().specimen(),
                    List.of(
                            Column.<Row>text(
                                            "sweep",
                                            "sweep of the specimen",
                                            row -> row.key().sweep())
                                    .asKey(),
                            Column.<Row>text(
                                            "point",
                                            "point of the sweep, as in points",
                                            row -> row.key().point())
                                    .asKey(),
                            Column.<Row>count(
                                            "order",
                                            "order n, a multiple of the frequency",
                                            row -> row.harmonic().order())
                                    .atLeast(1)
                                    .asKey(),
                            Column.<Row>number(
                                    "stress_in_phase_Pa",
                                    "Pa",
                                    "amplitude σ'ₙ of sin nωt",
                                    row -> row.harmonic().stressInPhasePa()),
                            Column.<Row>number(
                                    "stress_out_of_phase_Pa",
                                    "Pa",
                                    "amplitude σ''ₙ of cos nωt",
                                    row -> row.harmonic().stressOutOfPhasePa()),
                            Column.<Row>number(
                                            "relative_intensity",
                                            "1",
                                            "magnitude of this order over that of the fundamental",
                                            row -> row.harmonic().relativeIntensity())
                                    .atLeast(0),
                            Column.<Row>optional(
                                            "relative_intensity_u",
                                            "1",
                                            "standard uncertainty of the relative intensity from the record's own noise",
                                            row -> row.harmonic().relativeIntensityU())
                                    .atLeast(0),
                            Column.<Row>optional(
                                    "elastic_chebyshev_Pa",
                                    "Pa",
                                    "Chebyshev coefficient eₙ of the elastic stress over the strain amplitude; odd orders",
                                    row -> Columns.from(row.chebyshev(), Chebyshev::elasticPa)),
                            Column.<Row>optional(
                                    "viscous_chebyshev_Pa_s",
                                    "Pa·s",
                                    "Chebyshev coefficient vₙ of the viscous stress over the rate amplitude; odd orders",
                                    row -> Columns.from(row.chebyshev(), Chebyshev::viscousPaS)),
                            Column.<Row>optional(
                                    "minimum_strain_modulus_Pa",
                                    "Pa",
                                    "slope of the elastic stress over strain where the strain passes zero; on the row of order 1",
                                    row -> Columns.from(row.withinCycle(), WithinCycle::minimumStrainModulusPa)),
                            Column.<Row>optional(
                                    "largest_strain_modulus_Pa",
                                    "Pa",
                                    "elastic stress over strain at the largest strain; on the row of order 1",
                                    row -> Columns.from(row.withinCycle(), WithinCycle::largestStrainModulusPa)),
                            Column.<Row>optional(
                                    "minimum_rate_viscosity_Pa_s",
                                    "Pa·s",
                                    "slope of the viscous stress over the rate where the rate passes zero; on the row of order 1",
                                    row -> Columns.from(row.withinCycle(), WithinCycle::minimumRateViscosityPaS)),
                            Column.<Row>optional(
                                    "largest_rate_viscosity_Pa_s",
                                    "Pa·s",
                                    "viscous stress over the rate at the largest rate; on the row of order 1",
                                    row -> Columns.from(row.withinCycle(), WithinCycle::largestRateViscosityPaS)))),
            Comparator.comparing(row -> row.key().sourceFile(), NaturalOrder::compare));

    private HarmonicsTable() {}

    /** Every order of every point. */
    static List<Row> rows(List<ModulusPoint> points) {
        return points.stream().flatMap(HarmonicsTable::rows).toList();
    }

    private static Stream<Row> rows(ModulusPoint point) {
        Optional<WithinCycle> withinCycle = LocalMeasures.withinCycle(point);
        return point.harmonics().stream()
                .map(harmonic -> new Row(
                        point.key(),
                        harmonic,
                        LocalMeasures.chebyshev(point, harmonic),
                        harmonic.order() == 1 ? withinCycle : Optional.empty()));
    }

    /** One order of a point. */
    record Row(PointKey key, Harmonic harmonic, Optional<Chebyshev> chebyshev, Optional<WithinCycle> withinCycle) {}
}
