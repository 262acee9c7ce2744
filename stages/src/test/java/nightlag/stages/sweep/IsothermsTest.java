package nightlag.stages.sweep;

import static nightlag.stages.TestPoints.point;
import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.util.List;
import java.util.stream.Stream;
import nightlag.stages.TestPoints;
import nightlag.stages.moduli.ModulusPoint;
import org.junit.jupiter.api.Test;

class IsothermsTest {
    @Test
    void theTagGroupsPointsThatHaveATemperatureChannelToo() {
        List<Isotherm> isotherms = Isotherms.group(points(
                point().at(463.4).tagged(463.15),
                point().at(464.1).tagged(463.15),
                point().at(464.2).tagged(464.15)));

        assertThat(isotherms).hasSize(2);
        assertThat(isotherms.get(0).points()).hasSize(2);
        assertThat(isotherms.get(0).temperatureK()).isCloseTo(463.75, within(1e-9));
        assertThat(isotherms.get(1).temperatureK()).isEqualTo(464.2);
    }

    @Test
    void withoutATagPointsWithinHalfAKelvinAreOneIsotherm() {
        List<Isotherm> isotherms =
                Isotherms.group(points(point().at(300.9), point().at(300.0), point().at(300.3), point().at(300.5)));

        assertThat(isotherms).extracting(isotherm -> isotherm.points().size()).containsExactly(3, 1);
        assertThat(isotherms.get(0).temperatureK()).isCloseTo(300.8 / 3 + 200, within(1e-9));
    }

    @Test
    void aTagAloneIsTheTemperature() {
        List<Isotherm> isotherms = Isotherms.group(
                points(point().at(463.15).tagged(463.15), point().at(463.15).tagged(463.15)));

        assertThat(isotherms).hasSize(1);
        assertThat(isotherms.get(0).temperatureK()).isEqualTo(463.15);
    }

    @Test
    void aReadingThatHitsItsTagExactlyStaysWithTheOthersOfThatTag() {
        List<Isotherm> isotherms = Isotherms.group(
                points(point().at(463.95).tagged(463.15), point().at(463.15).tagged(463.15)));

        assertThat(isotherms).hasSize(1);
    }

    @Test
    void nearFindsTheNearestWithinHalfAKelvin() {
        List<Isotherm> isotherms = Isotherms.group(points(point().at(463.0), point().at(463.6)));

        assertThat(Isotherms.near(isotherms, 463.4))
                .hasValueSatisfying(
                        isotherm -> assertThat(isotherm.temperatureK()).isEqualTo(463.6));
        assertThat(Isotherms.near(isotherms, 464.2)).isEmpty();
    }

    @Test
    void anAmplitudeSweepAtOneFrequencyIsNoFrequencySweep() {
        List<ModulusPoint> mixed = points(
                point().named("1", "amplitude", "1", "a").hz(1),
                point().named("1", "amplitude", "2", "b").hz(1.000001),
                point().named("1", "frequency", "1", "c").hz(1),
                point().named("1", "frequency", "2", "d").hz(10));

        assertThat(FrequencySweeps.among(mixed))
                .extracting(p -> p.key().sourceFile())
                .containsExactly("c", "d");
        assertThat(FrequencySweeps.distinctFrequencies(mixed)).isEqualTo(2);
    }

    @Test
    void recordsThatAreEachTheirOwnSweepAreASweepTogether() {
        List<ModulusPoint> single = points(
                point().named("1", "1", "1", "a").hz(1),
                point().named("1", "2", "1", "b").hz(10));

        assertThat(FrequencySweeps.among(single)).hasSize(2);
    }

    private static List<ModulusPoint> points(TestPoints... builders) {
        return Stream.of(builders).map(TestPoints::build).toList();
    }
}
