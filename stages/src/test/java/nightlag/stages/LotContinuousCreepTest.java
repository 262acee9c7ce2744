package nightlag.stages;

import static nightlag.stages.TestCreep.creep;
import static nightlag.stages.TestPoints.point;
import static org.assertj.core.api.Assertions.assertThat;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalInt;
import java.util.stream.IntStream;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.spectrum.RelaxationModes;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.spectrum.SpectrumRow;
import nightlag.stages.sweep.SweepPlan;
import org.junit.jupiter.api.Test;

/** The continuous spectra a lot is published with when it has creep: of creep alone, and in the place of those of its moduli. */
class LotContinuousCreepTest {
    private static final double REFERENCE = 298.15;
    private static final RelaxationModes MELT =
            RelaxationModes.of(0, new double[] {0.01, 0.3, 10, 300}, new double[] {1e5, 2e4, 3e3, 400});

    @Test
    void creepAloneHasBoth() {
        LotResult result = conclude(List.of(), melt(1, 1000), true);

        assertThat(result.notes()).isEmpty();
        assertThat(times(result, SpectrumRow.Kind.RETARDATION))
                .isEqualTo(times(result, SpectrumRow.Kind.RELAXATION))
                .hasSize(10 * 3 + 1)
                .startsWith(1.0);
        assertThat(result.spectrum())
                .filteredOn(row -> row.form() == SpectrumRow.Form.CONTINUOUS)
                .allSatisfy(row -> assertThat(row.value())
                        .isBetween(row.low().orElseThrow(), row.high().orElseThrow()));
    }

    @Test
    void withModuliTheyReachFromTheFirstOfThemToTheEndOfTheCreep() {
        List<Double> ofModuli = times(conclude(sweep(), List.of(), true), SpectrumRow.Kind.RETARDATION);
        List<Double> ofBoth = times(conclude(sweep(), melt(1, 1000), true), SpectrumRow.Kind.RETARDATION);

        assertThat(ofModuli.get(ofModuli.size() - 1)).isLessThan(2);
        assertThat(ofBoth.get(0)).isEqualTo(ofModuli.get(0));
        assertThat(ofBoth.get(ofBoth.size() - 1)).isGreaterThan(990);
        assertThat(ofBoth).doesNotHaveDuplicates();
    }

    @Test
    void whatWasNotAskedForIsNotThere() {
        assertThat(conclude(List.of(), melt(1, 1000), false).spectrum())
                .isNotEmpty()
                .allMatch(row -> row.form() == SpectrumRow.Form.DISCRETE);
    }

    @Test
    void readingsTooCloseInTimeGiveModesAndAReason() {
        LotResult result = conclude(List.of(), melt(1, 4.6), true);

        assertThat(result.notes()).extracting(Reason::code).contains("CONTINUOUS_CREEP_TOO_SHORT");
        assertThat(result.spectrum()).isNotEmpty().allMatch(row -> row.form() == SpectrumRow.Form.DISCRETE);
    }

    private static List<CreepCurve> melt(double firstS, double loadedS) {
        return List.of(creep(MELT.retardation()::creepPerPa, firstS, loadedS, loadedS)
                .noisy(0.01, 1)
                .build());
    }

    private static List<Reduction> sweep() {
        return IntStream.range(0, 25)
                .mapToObj(i -> {
                    double hz = Math.pow(10, -1 + i / 8.0);
                    return new Reduction(List.of(point().named("1", "1", "" + (i + 1), "f" + i + ".csv")
                            .at(REFERENCE)
                            .hz(hz)
                            .modulus(MELT.modulusPa(2 * Math.PI * hz))
                            .relativeU(0.01)
                            .build()));
                })
                .toList();
    }

    private static LotResult conclude(List<Reduction> points, List<CreepCurve> curves, boolean continuous) {
        List<Reduction> reductions = new ArrayList<>(points);
        curves.forEach(curve -> reductions.add(new Reduction(List.of(), Optional.of(curve))));
        return Conclude.conclude(
                reductions,
                new ConclusionPlan(
                        SweepPlan.withDefaults(),
                        Optional.empty(),
                        Optional.of(new SpectrumPlan(false, OptionalInt.empty(), continuous)),
                        List.of(),
                        List.of(),
                        Map.of()));
    }

    private static List<Double> times(LotResult result, SpectrumRow.Kind kind) {
        return result.spectrum().stream()
                .filter(row -> row.form() == SpectrumRow.Form.CONTINUOUS && row.kind() == kind)
                .map(SpectrumRow::timeS)
                .toList();
    }
}
