package nightlag.stages.response;

import static nightlag.stages.response.Programmes.heated;
import static nightlag.stages.response.Programmes.step;
import static nightlag.stages.response.Programmes.strain;
import static nightlag.stages.response.Programmes.stress;
import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.SharedErrors;
import nightlag.stages.response.ResponseRow.Band;
import nightlag.stages.spectrum.DiscreteFit;
import nightlag.stages.spectrum.DiscreteSpectrum;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.superposition.ArrheniusLaw;
import nightlag.stages.superposition.FittedLaw;
import nightlag.stages.superposition.LawQuality;
import nightlag.stages.superposition.MasterCurve;
import nightlag.stages.superposition.ShiftFactor;
import nightlag.stages.superposition.WlfLaw;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;

/** A fractional solid at 300 K with isotherms at 290, 300 and 320 K. */
class PredictionTest {
    private static final double REFERENCE = 300;
    private static final LawQuality GOOD = new LawQuality(3, 1, 1, "");
    private static final FractionalSolid SOLID = new FractionalSolid(1e8, 1e9, 1, 0.5);
    private static final ResponsePlan HELD = stress(1e4, step(0, 1e6));

    private static DiscreteSpectrum spectrum;

    @BeforeAll
    static void fit() throws ReductionFault {
        spectrum = DiscreteFit.fit(
                SOLID.readings(1e-4, 1e4, 0.01, 0.01, 7), new SpectrumPlan(true, OptionalInt.empty(), false));
    }

    @Test
    void aStepHasTwoRowsAndTheFirstOfAllIsZero() throws ReductionFault {
        List<ResponseRow> rows = predict(stress(100, step(0, 1e6), step(10, 0)), shift(Optional.empty()));

        assertThat(rows.get(0).strain()).isZero();
        assertThat(rows.get(0).stressPa()).isZero();
        assertThat(rows.get(0).band()).contains(new Band(0, 0));
        assertThat(rows.get(1).timeS()).isZero();
        assertThat(rows.get(1).stressPa()).isEqualTo(1e6);
        List<ResponseRow> unloading =
                rows.stream().filter(row -> row.timeS() == 10).toList();
        assertThat(unloading).extracting(ResponseRow::stressPa).containsExactly(1e6, 0.0);
        // what is left is what does not come back at once
        assertThat(unloading.get(1).strain())
                .isCloseTo(
                        unloading.get(0).strain()
                                - unloading.get(0).parts().orElseThrow().atOnce(),
                        within(1e-12 * unloading.get(0).strain()));
        assertThat(rows.get(rows.size() - 1).timeS()).isEqualTo(100);
    }

    @Test
    void dataStandBehindTheTimesTheSpectrumIsSupportedAt() throws ReductionFault {
        List<ResponseRow> rows = predict(stress(1e6, step(0, 1e6)), shift(Optional.empty()));

        assertThat(rows)
                .filteredOn(row -> row.timeS() > 0)
                .allSatisfy(row -> assertThat(row.insideData())
                        .isEqualTo(row.timeS() >= spectrum.window().shortestS()
                                && row.timeS() <= spectrum.window().longestS()));
        assertThat(rows.get(1).insideData()).as("the instant of the step").isFalse();
    }

    @Test
    void dataStandBehindTimesSinceEveryStep() throws ReductionFault {
        double longest = spectrum.window().longestS();
        List<ResponseRow> rows =
                predict(stress(2 * longest, step(0, 1e6), step(longest / 2, 0)), shift(Optional.empty()));

        assertThat(rows).filteredOn(ResponseRow::insideData).allMatch(row -> row.timeS() <= longest);
        assertThat(rows)
                .filteredOn(row -> row.timeS() > longest / 2 * 1.2 && row.timeS() < longest)
                .isNotEmpty()
                .allMatch(ResponseRow::insideData);
    }

    @Test
    void atAnotherTemperatureAllGoesAsMuchFasterAsTheLawSays() throws ReductionFault {
        ArrheniusLaw law = new ArrheniusLaw(REFERENCE, 1e5, 0, GOOD);
        double a = Math.pow(10, law.log10A(315));
        List<ResponseRow> warm = predict(heated(List.of(step(0, 315)), HELD), shift(Optional.of(law)));
        ResponseRow last = warm.get(warm.size() - 1);

        double expected = 1e6 * spectrum.retardation().creepPerPa(HELD.untilS() / a);
        assertThat(a).isLessThan(0.2);
        assertThat(last.strain()).isCloseTo(expected, within(1e-12 * expected));
        assertThat(last.temperatureK()).isEqualTo(315);
    }

    @Test
    void withoutALawShiftsAreReadBetweenTheIsotherms() throws ReductionFault {
        // half way between 300 K (0) and 320 K (−2)
        List<ResponseRow> warm = predict(heated(List.of(step(0, 310)), HELD), shift(Optional.empty()));

        double expected = 1e6 * spectrum.retardation().creepPerPa(10 * HELD.untilS());
        assertThat(warm.get(warm.size() - 1).strain()).isCloseTo(expected, within(1e-12 * expected));
    }

    @Test
    void beyondTheIsothermsALawLeadsOnButNoDataStandBehindIt() throws ReductionFault {
        List<ResponseRow> hot = predict(
                heated(List.of(step(0, 300), step(100, 340)), HELD),
                shift(Optional.of(new ArrheniusLaw(REFERENCE, 1e5, 0, GOOD))));

        assertThat(hot).filteredOn(row -> row.timeS() > 100).noneMatch(ResponseRow::insideData);
        assertThat(hot)
                .filteredOn(row -> row.timeS() > 1 && row.timeS() < 100)
                .isNotEmpty()
                .allMatch(ResponseRow::insideData);
        assertThat(hot.stream().filter(row -> row.timeS() == 100).map(ResponseRow::temperatureK))
                .containsExactly(300.0, 340.0);
    }

    @Test
    void whereNothingLeadsThereTheReasonSaysSo() {
        ResponsePlan hot = heated(List.of(step(0, 340)), HELD);
        WlfLaw wlf = new WlfLaw(REFERENCE, 8, 60, new WlfLaw.WlfCovariance(0, 0, 0), GOOD);

        assertThatThrownBy(() -> predict(hot, shift(Optional.empty())))
                .hasMessageContaining("66.85 °C is outside the isotherms, 16.85 to 46.85 °C");
        assertThatThrownBy(() -> predict(hot, TemperatureShift.of(REFERENCE, Optional.empty())))
                .hasMessageContaining("the spectrum is of 26.85 °C");
        assertThatThrownBy(() -> predict(heated(List.of(step(0, 235)), HELD), shift(Optional.of(wlf))))
                .hasMessageContaining("beyond the pole of the WLF law");
    }

    @Test
    void theUncertaintyOfTheShiftIsInTheBand() throws ReductionFault {
        double energyU = 1e4;
        ArrheniusLaw sure = new ArrheniusLaw(REFERENCE, 1e5, 0, GOOD);
        ArrheniusLaw unsure = new ArrheniusLaw(REFERENCE, 1e5, energyU, GOOD);
        ResponsePlan plan = heated(List.of(step(0, 310), step(50, 292)), strain(100, step(0, 0.01)));
        List<ResponseRow> known = predict(plan, shift(Optional.of(sure)));
        List<ResponseRow> guessed = predict(plan, shift(Optional.of(unsure)));
        List<ResponseRow> high =
                predict(plan, shift(Optional.of(new ArrheniusLaw(REFERENCE, 1e5 + energyU / 100, 0, GOOD))));

        for (int i = 2; i < known.size(); i++) {
            double byEnergy =
                    100 * Math.log(high.get(i).stressPa() / known.get(i).stressPa());
            double expected = Math.hypot(width(known.get(i)), 1.959963984540054 * byEnergy);
            assertThat(width(guessed.get(i))).isCloseTo(expected, within(0.01 * expected));
        }
    }

    @Test
    void aPredictedStressHasABandAndAPrescribedStrainNoParts() throws ReductionFault {
        assertThat(predict(strain(100, step(0, 0.01)), shift(Optional.empty())))
                .allMatch(row -> row.parts().isEmpty())
                .filteredOn(row -> row.timeS() > 0)
                .allMatch(row -> row.band().orElseThrow().low() < row.stressPa()
                        && row.stressPa() < row.band().orElseThrow().high());
    }

    /** Moduli of three decades only: later than they reach, the band is as wide as it has to be and stays above zero. */
    @Test
    void aStrainUnderLoadIsNeverBelowZeroHoweverLittleIsKnown() throws ReductionFault {
        DiscreteSpectrum narrow = DiscreteFit.fit(
                SOLID.readings(1, 1e3, 0.05, 0.05, 7), new SpectrumPlan(true, OptionalInt.empty(), false));
        TemperatureShift still = TemperatureShift.of(REFERENCE, Optional.empty());
        ResponsePlan loaded = stress(1e6, step(0, 1e6), step(1e5, 0));
        List<ResponseRow> pulled = Prediction.of(loaded, narrow, still);
        List<ResponseRow> pushed = Prediction.of(stress(1e6, step(0, -1e6), step(1e5, 0)), narrow, still);

        assertThat(pulled)
                .anyMatch(row -> row.strain() > 0 && row.band().orElseThrow().high() > 3 * row.strain());
        assertThat(pulled)
                .allMatch(row -> 0 <= row.band().orElseThrow().low()
                        && row.band().orElseThrow().low() <= row.strain()
                        && row.strain() <= row.band().orElseThrow().high());
        for (int i = 1; i < pulled.size(); i++) {
            Band above = pulled.get(i).band().orElseThrow();
            assertThat(pushed.get(i).band()).contains(new Band(-above.high(), -above.low()));
        }
    }

    /** Pulled and pushed: what is left of either may outweigh the other, and the band lies evenly about the value. */
    @Test
    void aStrainThatMayHaveEitherSignHasAnEvenBand() throws ReductionFault {
        List<ResponseRow> rows = predict(stress(100, step(0, 1e6), step(10, -1e6)), shift(Optional.empty()));

        assertThat(rows)
                .allSatisfy(row -> assertThat(row.band().orElseThrow().high() - row.strain())
                        .isCloseTo(row.strain() - row.band().orElseThrow().low(), within(1e-15)));
    }

    private static double width(ResponseRow row) {
        return Math.log(row.band().orElseThrow().high() / row.stressPa());
    }

    private static List<ResponseRow> predict(ResponsePlan plan, TemperatureShift shift) throws ReductionFault {
        return Prediction.of(plan, spectrum, shift);
    }

    /** log10 a of 1, 0 and −2 at 290, 300 and 320 K. */
    private static TemperatureShift shift(Optional<FittedLaw> law) {
        List<ShiftFactor> shifts = List.of(isotherm(290, 1), isotherm(300, 0), isotherm(320, -2));
        return TemperatureShift.of(
                REFERENCE,
                Optional.of(new MasterCurve(shifts, List.of(), SharedErrors.none(), List.of(), law, List.of())));
    }

    private static ShiftFactor isotherm(double temperatureK, double log10A) {
        return new ShiftFactor(
                REFERENCE,
                temperatureK,
                OptionalDouble.of(log10A),
                OptionalDouble.of(0.01 * Math.abs(log10A)),
                OptionalDouble.of(0),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.of(0),
                true);
    }
}
