package nightlag.pipeline.archive;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import com.fasterxml.jackson.core.JsonProcessingException;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.pipeline.RandomPoints;
import nightlag.stages.Reduction;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.CreepPart;
import nightlag.stages.moduli.CreepReading;
import nightlag.stages.moduli.CreepStep;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class ReductionJsonTest {
    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 5, 8, 13, 21, 34, 55, 89})
    void whatIsReadIsWhatWasWrittenToTheLastBit(long seed) throws JsonProcessingException {
        for (Reduction reduction : new RandomPoints(seed).reductions("Heron 3", "L-17", "bench/a.csv", 100)) {
            assertThat(ReductionJson.read(ReductionJson.write(reduction))).isEqualTo(reduction);
        }
    }

    @Test
    void infinityAndNotANumberSurvive() throws JsonProcessingException {
        Reduction reduction = new Reduction(List.of(plainPoint(
                OptionalDouble.of(Double.POSITIVE_INFINITY),
                List.of(new Harmonic(1, Double.NaN, Double.NEGATIVE_INFINITY, 1, OptionalDouble.of(Double.NaN))))));

        assertThat(ReductionJson.read(ReductionJson.write(reduction))).isEqualTo(reduction);
    }

    @Test
    void whatIsNotThereTakesNoRoomAndHarmonicsAreArrays() {
        Reduction reduction = new Reduction(List.of(
                plainPoint(OptionalDouble.empty(), List.of(new Harmonic(1, 2.5, 0.25, 1, OptionalDouble.empty())))));

        assertThat(ReductionJson.write(reduction))
                .isEqualTo("{\"points\":[{\"key\":{\"grade\":\"Heron 3\",\"lot\":\"L-17\",\"specimen\":\"1\","
                        + "\"sweep\":\"1\",\"point\":\"a\",\"sourceFile\":\"bench/a.csv\"},\"deformation\":\"SHEAR\","
                        + "\"moduli\":{\"storagePa\":2.0,\"lossPa\":3.0},\"harmonics\":[[1,2.5,0.25,1.0,null]],"
                        + "\"quality\":\"SOUND\",\"flags\":[],\"samplesUsed\":512,\"reasons\":[],\"loop\":[]}]}");
    }

    @Test
    void aCreepCurveIsReadAsItWasWritten() throws JsonProcessingException {
        Reduction reduction = new Reduction(
                List.of(),
                Optional.of(curve(List.of(
                        new CreepStep(CreepPart.LOAD, 0, 0.01, 0.1, 1e4, 3, 1e-5, 1e-7, OptionalDouble.of(2))))));

        String text = ReductionJson.write(reduction);

        assertThat(ReductionJson.read(text)).isEqualTo(reduction);
        assertThat(text).contains("\"readings\":[[1,0.3333333333333333,0.3,10000.0,0.002,1.0E-7,2.0E-7,\"NaN\"]]");
    }

    @Test
    void aStepWrittenBeforeItsLevelsWereToldApartReadsWithoutThem() throws JsonProcessingException {
        String text = ReductionJson.write(new Reduction(
                List.of(),
                Optional.of(curve(List.of(
                        new CreepStep(CreepPart.LOAD, 0, 0.01, 0.1, 1e4, 3, 1e-5, 1e-7, OptionalDouble.of(2)))))));

        assertThat(text).contains(",1.0E-7,2.0]]");
        assertThat(ReductionJson.read(text.replace(",1.0E-7,2.0]]", ",1.0E-7]]"))
                        .creep()
                        .orElseThrow()
                        .steps())
                .containsExactly(new CreepStep(CreepPart.LOAD, 0, 0.01, 0.1, 1e4, 3, 1e-5, 1e-7));
    }

    @Test
    void aReductionWithoutACreepCurveReadsAsBefore() throws JsonProcessingException {
        assertThat(ReductionJson.read("{\"points\":[]}")).isEqualTo(new Reduction(List.of()));
    }

    @ParameterizedTest
    @ValueSource(strings = {"", "{", "{\"points\":[{}]}", "{\"points\":[],\"curve\":1}", "not JSON"})
    void damagedTextIsRefused(String damaged) {
        assertThatThrownBy(() -> ReductionJson.read(damaged)).isInstanceOf(JsonProcessingException.class);
    }

    private static CreepCurve curve(List<CreepStep> steps) {
        return new CreepCurve(
                new PointKey("Heron 3", "L-17", "1", "1", "run", "bench/run.csv"),
                Optional.of("2026-02-17"),
                DeformationMode.EXTENSION,
                OptionalDouble.of(298.15),
                OptionalDouble.empty(),
                true,
                steps,
                List.of(new CreepReading(1, 1.0 / 3, 0.3, 1e4, 2e-3, 1e-7, 2e-7, Double.NaN)),
                Quality.DOUBTFUL,
                List.of(Flag.UNSETTLED),
                77,
                List.of());
    }

    private static ModulusPoint plainPoint(OptionalDouble strainSnrDb, List<Harmonic> harmonics) {
        return new ModulusPoint(
                new PointKey("Heron 3", "L-17", "1", "1", "a", "bench/a.csv"),
                Optional.empty(),
                DeformationMode.SHEAR,
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                Optional.of(new Moduli(2, 3, Optional.empty())),
                harmonics,
                Quality.SOUND,
                List.of(),
                OptionalDouble.empty(),
                512,
                strainSnrDb,
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                List.of(),
                List.of(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                OptionalDouble.empty());
    }
}
