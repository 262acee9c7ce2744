package nightlag.stages.response;

import static nightlag.stages.response.Programmes.programme;
import static nightlag.stages.response.Programmes.step;
import static nightlag.stages.response.Programmes.strain;
import static nightlag.stages.response.Programmes.strains;
import static nightlag.stages.response.Programmes.stress;
import static nightlag.stages.response.Programmes.stresses;
import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.Optional;
import java.util.OptionalInt;
import nightlag.stages.TestCreep;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.response.Programme.Instant;
import nightlag.stages.response.ResponseRow.StrainParts;
import nightlag.stages.spectrum.CreepFit;
import nightlag.stages.spectrum.CreepSpectrum;
import nightlag.stages.spectrum.DiscreteFit;
import nightlag.stages.spectrum.DiscreteSpectrum;
import nightlag.stages.spectrum.SpectrumPlan;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** Fractional solids, whose creep and relaxation are closed. */
class PredictionValidationTest {
    private static final SpectrumPlan SOLID = new SpectrumPlan(true, OptionalInt.empty(), false);
    private static final TemperatureShift ONE_TEMPERATURE = TemperatureShift.of(300, Optional.empty());

    /** E_α(−x^α); exact, that of ½ as e^x erfc √x. */
    @ParameterizedTest(name = "α = {0}, x = {1}")
    @CsvSource({
        "0.25, 0.01, 0.737352593",
        "0.25, 1, 0.4638527608",
        "0.25, 100, 0.2099368415",
        "0.5, 0.01, 0.896456979969",
        "0.5, 0.1, 0.723578438478",
        "0.5, 1, 0.427583576156",
        "0.5, 10, 0.170577718326",
        "0.5, 100, 0.0561409927438",
        "0.75, 0.01, 0.9663323685",
        "0.75, 10, 0.05909736208",
        "0.75, 100, 0.009012180742"
    })
    void theMittagLefflerFunctionOfTheseTestsIsRight(double alpha, double x, double expected) {
        assertThat(FractionalSolid.mittagLeffler(alpha, x)).isCloseTo(expected, within(2e-10));
    }

    @ParameterizedTest(name = "α = {0}")
    @ValueSource(doubles = {0.25, 0.5, 0.75})
    void manyModesCreepAndRelaxAsTheFractionalSolid(double alpha) {
        FractionalSolid solid = new FractionalSolid(1e6, 1e9, 0.1, alpha);
        ResponsePlan creep = stress(1e4, step(0, 1e5), step(1e3, 0));
        ResponsePlan relaxation = strain(1e4, step(0, 0.01), step(1e3, 0.02));
        List<StrainParts> strains = strains(creep, solid.retardationModes());
        double[] stresses = stresses(relaxation, solid.relaxationModes());
        List<Instant> instants = programme(creep).instants();

        for (int i = 1; i < instants.size(); i++) {
            Instant at = instants.get(i);
            boolean second = at.segment() == 1;
            double first = second ? 1e3 + at.sinceS() : at.sinceS();
            double strain = 1e5 * (solid.creepPerPa(first) - (second ? solid.creepPerPa(at.sinceS()) : 0));
            double stress = 0.01 * (solid.relaxationPa(first) + (second ? solid.relaxationPa(at.sinceS()) : 0));
            assertThat(strains.get(i).sum()).isCloseTo(strain, within(1e-9 * 1e5 * solid.creepPerPa(first)));
            assertThat(stresses[i]).isCloseTo(stress, within(1e-9 * stress));
        }
    }

    @ParameterizedTest(name = "α = {0}")
    @ValueSource(doubles = {0.3, 0.5, 0.7})
    void aFitPredictsCreepAndRelaxationToAPerCentInsideTheData(double alpha) throws ReductionFault {
        FractionalSolid solid = new FractionalSolid(1e8, 1e9, 1, alpha);
        DiscreteSpectrum spectrum = DiscreteFit.fit(solid.readings(1e-5, 1e5, 0, 1e-3, 1), SOLID);

        List<ResponseRow> creep = Prediction.of(stress(1e5, step(0, 1e6)), spectrum, ONE_TEMPERATURE);
        List<ResponseRow> relaxation = Prediction.of(strain(1e5, step(0, 0.01)), spectrum, ONE_TEMPERATURE);

        assertThat(creep.stream().filter(ResponseRow::insideData)).hasSizeGreaterThan(150);
        assertThat(creep).filteredOn(PredictionValidationTest::isToBeMet).allSatisfy(row -> {
            double expected = 1e6 * solid.creepPerPa(row.timeS());
            assertThat(row.strain()).isCloseTo(expected, within(0.01 * expected));
        });
        assertThat(relaxation).filteredOn(PredictionValidationTest::isToBeMet).allSatisfy(row -> {
            double expected = 0.01 * solid.relaxationPa(row.timeS());
            assertThat(row.stressPa()).isCloseTo(expected, within(0.01 * expected));
        });
    }

    @ParameterizedTest(name = "α = {0}")
    @ValueSource(doubles = {0.3, 0.5, 0.7})
    void aFitToACreepRecordPredictsCreepAndRelaxationToAPerCentWithinIt(double alpha) throws ReductionFault {
        FractionalSolid solid = new FractionalSolid(1e8, 1e9, 1, alpha);
        CreepCurve record = TestCreep.creep(solid::creepPerPa, 1e-3, 1e3, 1.5e3).build();
        CreepSpectrum spectrum = CreepFit.fit(List.of(record), SOLID);

        List<ResponseRow> creep = Prediction.of(stress(1e5, step(0, 1e6)), spectrum, ONE_TEMPERATURE);
        List<ResponseRow> relaxation = Prediction.of(strain(1e5, step(0, 0.01)), spectrum, ONE_TEMPERATURE);

        assertThat(creep.stream().filter(ResponseRow::insideData)).hasSizeGreaterThan(110);
        assertThat(creep).filteredOn(PredictionValidationTest::isToBeMet).allSatisfy(row -> {
            double expected = 1e6 * solid.creepPerPa(row.timeS());
            assertThat(row.strain()).isCloseTo(expected, within(0.01 * expected));
        });
        assertThat(relaxation).filteredOn(PredictionValidationTest::isToBeMet).allSatisfy(row -> {
            double expected = 0.01 * solid.relaxationPa(row.timeS());
            assertThat(row.stressPa()).isCloseTo(expected, within(0.01 * expected));
        });
        assertThat(creep).allMatch(row -> row.band().isPresent());
    }

    /** Before the first step there is nothing to predict. */
    private static boolean isToBeMet(ResponseRow row) {
        return row.insideData() && row.timeS() > 0;
    }
}
