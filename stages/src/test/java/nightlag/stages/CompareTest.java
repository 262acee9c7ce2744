package nightlag.stages;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalLong;
import java.util.Random;
import java.util.stream.IntStream;
import nightlag.stages.acceptance.LimitPlan;
import nightlag.stages.acceptance.Limits;
import nightlag.stages.acceptance.LotRecord;
import nightlag.stages.acceptance.Trend;
import nightlag.stages.sweep.SweepPlan;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class CompareTest {
    private static final LimitPlan STIFFNESS =
            Limits.on("storage_modulus").from(1).guarded(2);
    private static final LimitPlan DAMPING =
            Limits.on("tan_delta").in("1").to(2).guarded(2);

    private static ConclusionPlan plan(LimitPlan... limits) {
        return new ConclusionPlan(
                SweepPlan.withDefaults(), Optional.empty(), Optional.empty(), List.of(), List.of(limits), Map.of());
    }

    private static LotRecord lot(String name, double stiffness) {
        return lot(name, OptionalLong.empty(), stiffness);
    }

    private static LotRecord lot(String name, OptionalLong day, double stiffness) {
        return new LotRecord(name, day, List.of(new LotRecord.Value(STIFFNESS.quantity(), stiffness)));
    }

    private static List<LotRecord> lots(int count) {
        return IntStream.rangeClosed(1, count).mapToObj(i -> lot("L" + i, i)).toList();
    }

    @Test
    void lotsStandInTheOrderOfTheirNamesDigitsReadAsNumbers() {
        Map<String, List<Trend>> trends = Compare.compare(lots(10), plan(STIFFNESS));
        assertThat(trends.keySet()).containsExactly("L1", "L2", "L3", "L4", "L5", "L6", "L7", "L8", "L9", "L10");
        assertThat(trends.get("L8")).isEmpty();
        // of 1 … 8 the mean is 4.5 and every moving range 1; of 1 … 9 the mean is 5
        Trend ninth = trends.get("L9").get(0);
        assertThat(ninth.mean()).isCloseTo(4.5, within(1e-12));
        assertThat(ninth.upper()).isCloseTo(4.5 + 2.66, within(1e-12));
        assertThat(trends.get("L10").get(0).mean()).isCloseTo(5, within(1e-12));
    }

    @Test
    void datesGoBeforeNamesWhereEveryLotHasOne() {
        List<LotRecord> dated = List.of(
                lot("C", OptionalLong.of(5), 1), lot("B", OptionalLong.of(3), 2), lot("A", OptionalLong.of(3), 3));
        assertThat(Compare.inOrder(dated)).extracting(LotRecord::lot).containsExactly("A", "B", "C");
        List<LotRecord> oneWithout = new ArrayList<>(dated);
        oneWithout.add(lot("A2", 4));
        assertThat(Compare.inOrder(oneWithout)).extracting(LotRecord::lot).containsExactly("A", "A2", "B", "C");
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3})
    void theOrderInWhichLotsAreGivenDoesNotMatterAndOneLotIsComparedAsAll(long seed) {
        Random random = new Random(seed);
        List<LotRecord> lots = new ArrayList<>(IntStream.range(0, 25)
                .mapToObj(i -> lot("L" + i, random.nextGaussian()))
                .toList());
        Map<String, List<Trend>> all = Compare.compare(lots, plan(STIFFNESS));
        Collections.shuffle(lots, random);
        assertThat(Compare.compare(lots, plan(STIFFNESS))).isEqualTo(all);
        List<LotRecord> inOrder = Compare.inOrder(lots);
        for (int i = 0; i < inOrder.size(); i++) {
            assertThat(Compare.compare(inOrder.get(i), inOrder.subList(0, i), plan(STIFFNESS)))
                    .isEqualTo(all.get(inOrder.get(i).lot()));
        }
    }

    @Test
    void aLotWithoutTheValueIsNeitherComparedNorCounted() {
        List<LotRecord> lots = new ArrayList<>(lots(9));
        lots.set(3, new LotRecord("L4", OptionalLong.empty(), List.of()));
        assertThat(Compare.compare(lots, plan(STIFFNESS)).get("L9")).isEmpty();
        lots.add(lot("L10", 10));
        assertThat(Compare.compare(lots, plan(STIFFNESS)).get("L10").get(0).lots())
                .isEqualTo(8);
    }

    @Test
    void everyLimitHasAChartOfItsOwnAndTwoOnOneQuantityShareOne() {
        List<LotRecord> lots = lots(9);
        LimitPlan alsoStiffness = Limits.on("storage_modulus").to(1e9).guarded(0);
        assertThat(Compare.compare(lots, plan(DAMPING, STIFFNESS, alsoStiffness))
                        .get("L9"))
                .extracting(Trend::limit)
                .containsExactly(STIFFNESS);
    }
}
