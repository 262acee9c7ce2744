package nightlag.pipeline.config;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import java.nio.charset.Charset;
import java.nio.file.Path;
import java.time.Duration;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import nightlag.stages.ReductionPlan;
import nightlag.stages.geometry.Corrections;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.geometry.MeasuringWall;
import nightlag.stages.moduli.PointQuantity;
import nightlag.stages.moduli.ScreeningPlan;
import nightlag.stages.moduli.SignalRange;
import nightlag.stages.moduli.Threshold;
import nightlag.stages.response.ResponsePlan;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.superposition.SuperpositionPlan;
import nightlag.stages.sweep.FigureMarkerPlan;
import nightlag.stages.sweep.SweepPlan;
import nightlag.stages.waveform.Drift;
import nightlag.stages.waveform.ExtractionPlan;
import nightlag.stages.waveform.FrequencySource;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;

/** Reads the folder {@code config-accepted} and looks at every value that came of it. */
class AcceptedConfigurationTest {
    private static final Path FOLDER =
            Path.of("src/test/resources/config-accepted").toAbsolutePath();
    private static Configuration configuration;

    @BeforeAll
    static void read() throws ConfigurationException {
        configuration = ConfigurationReader.read(FOLDER.resolve("night.toml"));
    }

    private static Instrument instrument(int intake) {
        return configuration.intakes().get(intake).instrument();
    }

    @Test
    void nightFile() {
        assertThat(configuration.results()).isEqualTo(FOLDER.getParent().resolve("results"));
        assertThat(configuration.workers()).isEqualTo(3);
        assertThat(configuration.settle()).isEqualTo(Duration.ofMinutes(2));
        assertThat(configuration.teamSheet())
                .contains(new TeamSheet(FOLDER.getParent().resolve("results/team.xlsx"), "melts"));
        assertThat(configuration.intakes())
                .extracting(
                        intake -> intake.name() + " by " + intake.instrument().id())
                .containsExactly("bench by bench", "bench by bench-moduli", "frame by frame");
        assertThat(configuration.gradeProblems()).isEmpty();
    }

    @Test
    void howRawFilesRead() {
        FileFormat files = instrument(0).files();
        assertThat(files.match()).isEqualTo("**/*.txt");
        assertThat(files.charset()).isEqualTo(Charset.forName("windows-1252"));
        assertThat(files.delimiter()).isEqualTo(';');
        assertThat(files.decimal()).isEqualTo(',');
        assertThat(files.header()).isEqualTo(new FileFormat.Header.StartsWith("t;"));
        assertThat(files.unitRow()).isTrue();
        assertThat(files.runSheet()).contains("runs.csv");
        assertThat(files.pathPattern().orElseThrow().matcher("L7/a/x.txt").matches())
                .isTrue();
        assertThat(instrument(0).name()).isEqualTo("Melt bench");
        assertThat(instrument(0).records()).isEqualTo(new RecordFormat(Layout.COLUMN, 6, 3, List.of(), 10));
    }

    @Test
    void whatIsNotSaidHasItsDefault() {
        FileFormat files = instrument(1).files();
        assertThat(files.match()).isEqualTo("**/*.csv");
        assertThat(files.charset()).isEqualTo(java.nio.charset.StandardCharsets.UTF_8);
        assertThat(files.delimiter()).isEqualTo(',');
        assertThat(files.decimal()).isEqualTo('.');
        assertThat(files.header()).isEqualTo(new FileFormat.Header.Line(1));
        assertThat(files.unitRow()).isFalse();
        assertThat(instrument(1).name()).isEqualTo("bench-moduli");
        assertThat(instrument(1).corrections()).isEqualTo(Corrections.none());
        Grade plover = configuration.grades().get("Plover 60");
        assertThat(plover.extraction()).isEqualTo(ExtractionPlan.withDefaults());
        assertThat(plover.screening()).isEqualTo(ScreeningPlan.withDefaults());
        assertThat(plover.conclusion().sweeps()).isEqualTo(SweepPlan.withDefaults());
        assertThat(plover.conclusion().spectrum()).isEmpty();
        assertThat(plover.conclusion().superposition()).isEmpty();
    }

    @Test
    void channels() {
        Map<ChannelName, Channel> channels = instrument(0).channels();
        assertThat(channels.get(ChannelName.TIME).unit().toSi(1)).isEqualTo(1e-3);
        assertThat(channels.get(ChannelName.ANGLE).invert()).isTrue();
        Channel torque = channels.get(ChannelName.TORQUE);
        assertThat(torque.column()).isEqualTo(ColumnRef.numbered(4));
        assertThat(torque.sensitivity()).hasValue(0.02);
        assertThat(torque.zero()).isEqualTo(0.013);
        assertThat(torque.delayS()).isEqualTo(12e-6, within(1e-20));
        assertThat(channels.get(ChannelName.TEMPERATURE).unit().toSi(25)).isEqualTo(298.15);
        assertThat(channels.get(ChannelName.TEMPERATURE).zero()).isEqualTo(0.2);
    }

    @Test
    void tagsFromEverySource() {
        Map<TagName, TagSource> tags = instrument(0).tags();
        assertThat(tags.get(TagName.GRADE)).isEqualTo(new TagSource.Preamble("Compound", Optional.empty()));
        assertThat(tags.get(TagName.LOT)).isEqualTo(new TagSource.PathGroup("lot", Optional.empty()));
        assertThat(tags.get(TagName.SWEEP)).isEqualTo(new TagSource.Fixed("2", Optional.empty()));
        assertThat(tags.get(TagName.POINT))
                .isEqualTo(new TagSource.DataColumn(ColumnRef.named("point"), Optional.empty()));
        assertThat(tags.get(TagName.GAP))
                .isEqualTo(new TagSource.RunSheet("gap_mm", Optional.of(new Unit("mm", 1e-3, 0))));
        assertThat(tags.get(TagName.DIAMETER))
                .isEqualTo(new TagSource.Fixed("25.0", Optional.of(new Unit("mm", 1e-3, 0))));
        assertThat(tags.get(TagName.DENSITY))
                .isEqualTo(new TagSource.Fixed("780.0", Optional.of(new Unit("kg/m³", 1, 0))));
    }

    @Test
    void correctionsTakeInTheChannelsOwnDelays() {
        Corrections corrections = instrument(0).corrections();
        assertThat(corrections.loadDelayS()).isEqualTo(97e-6, within(1e-19));
        assertThat(corrections.deformationDelayS()).isZero();
        assertThat(corrections.inertiaKgM2()).isEqualTo(1.2e-5);
        assertThat(corrections.frictionNMS()).isEqualTo(2e-6);
        assertThat(corrections.angularComplianceRadPerNM()).isEqualTo(0.003);
        assertThat(corrections.linearComplianceMPerN()).isZero();
        assertThat(corrections.wall()).isEqualTo(MeasuringWall.MOVING);
        assertThat(instrument(2).corrections().linearComplianceMPerN()).isEqualTo(0.4e-6, within(1e-22));
        assertThat(instrument(2).corrections().movingMassKg()).isEqualTo(0.02);
    }

    @Test
    void instrumentsGeometryTakesThePlaceOfTheGrades() {
        Grade heron = configuration.grades().get("Heron 3");
        ReductionPlan plan = Plans.reduction(instrument(0), heron);
        assertThat(plan.geometry().orElseThrow().kind()).isEqualTo(GeometryKind.CONE_PLATE);
        assertThat(plan.geometry().orElseThrow().dimensions().get(Dimension.CONE_ANGLE))
                .isEqualTo(Math.PI / 90);
        assertThat(plan.loadRange()).isEqualTo(Map.of(LoadSignal.TORQUE, new SignalRange(0.5e-6, 0.2)));
        assertThat(plan.extraction()).isEqualTo(heron.extraction());
        assertThat(Plans.reduction(instrument(1), heron).geometry()).isEqualTo(heron.geometry());
    }

    @Test
    void gradeOverItsParent() {
        Grade heron = configuration.grades().get("Heron 3");
        assertThat(heron.file()).isEqualTo("grades/heron-3.toml");
        GeometrySpec geometry = heron.geometry().orElseThrow();
        assertThat(geometry.kind()).isEqualTo(GeometryKind.PARALLEL_PLATE);
        assertThat(geometry.dimensions())
                .isEqualTo(Map.of(Dimension.DIAMETER, 0.025, Dimension.GAP, 0.8e-3, Dimension.DENSITY, 780.0));
        assertThat(heron.extraction()).isEqualTo(new ExtractionPlan(1.5, 9, Drift.QUADRATIC, FrequencySource.TAG));
        assertThat(heron.screening().minCycles()).isEqualTo(Threshold.of(4, 2));
        assertThat(heron.screening().clock()).isEqualTo(new Threshold(0.02, OptionalDouble.empty()));
        assertThat(heron.screening().thirdHarmonic()).isEqualTo(new Threshold(0.005, OptionalDouble.empty()));
        assertThat(heron.screening().temperatureWanderK()).isEqualTo(Threshold.of(0.2, 2));
        assertThat(heron.conclusion().superposition())
                .contains(new SuperpositionPlan(
                        463.15,
                        SuperpositionPlan.VerticalShift.DENSITY,
                        OptionalDouble.of(6.5e-4),
                        SuperpositionPlan.ShiftLaw.ARRHENIUS,
                        0.005));
        assertThat(heron.conclusion().spectrum()).contains(new SpectrumPlan(false, OptionalInt.of(12), false));
        assertThat(heron.conclusion().dimensionUncertainty())
                .isEqualTo(Map.of(Dimension.GAP, 10e-6, Dimension.DIAMETER, 0.02e-3));
        assertThat(configuration.grades()).containsOnlyKeys("Heron 3", "Plover 60");
    }

    @Test
    void responses() {
        List<ResponsePlan> responses =
                configuration.grades().get("Heron 3").conclusion().responses();
        ResponsePlan shelf = responses.get(0);
        assertThat(shelf.controlled()).isEqualTo(ResponsePlan.Controlled.STRESS);
        assertThat(shelf.temperaturesK()).containsExactly(new ResponsePlan.Step(0, 313.15));
        assertThat(shelf.steps()).containsExactly(new ResponsePlan.Step(0, 200_000), new ResponsePlan.Step(86_400, 0));
        assertThat(shelf.untilS()).isEqualTo(172_800);
        ResponsePlan warm = responses.get(1);
        assertThat(warm.controlled()).isEqualTo(ResponsePlan.Controlled.STRAIN);
        assertThat(warm.temperaturesK())
                .containsExactly(new ResponsePlan.Step(0, 296.15), new ResponsePlan.Step(43_200, 313.15));
        assertThat(warm.steps()).containsExactly(new ResponsePlan.Step(0, 0.01), new ResponsePlan.Step(3600, 0.02));
        assertThat(warm.untilS()).as("a year of 365.25 days").isEqualTo(31_557_600);
    }

    @Test
    void limits() {
        var limits = configuration.grades().get("Heron 3").conclusion().limits();
        assertThat(limits.get(0).name()).contains("damping");
        assertThat(limits.get(0).conditions()).isEqualTo("190 °C 1 Hz");
        assertThat(limits.get(0).max()).hasValue(1.4);
        assertThat(limits.get(0).min()).isEmpty();
        assertThat(limits.get(0).coverage()).isEqualTo(2);
        assertThat(limits.get(1).frequencyHz()).hasValueCloseTo(10 / (2 * Math.PI), within(1e-15));
        assertThat(limits.get(1).min()).hasValue(12_000);
        assertThat(limits.get(1).unit()).isEqualTo("Pa");
        assertThat(limits.get(2).unit()).isEqualTo("rad/s");
        assertThat(limits.get(2).min()).hasValueCloseTo(2 * Math.PI, within(1e-15));
        assertThat(limits.get(3).unit()).isEqualTo("°C");
        assertThat(limits.get(3).max()).hasValueCloseTo(253.15, within(1e-12));
    }

    @Test
    void figuresOfTheGradesOwn() {
        var conclusion = configuration.grades().get("Heron 3").conclusion();
        var own = conclusion.ownFigures();
        assertThat(own.derived()).hasSize(1);
        var rutting = own.derived().get(0);
        assertThat(rutting.name()).isEqualTo("rutting_factor");
        assertThat(rutting.uses()).containsExactly(PointQuantity.COMPLEX_MODULUS, PointQuantity.PHASE_ANGLE);
        assertThat(rutting.function()
                        .valueOf(Map.of(PointQuantity.COMPLEX_MODULUS, 5000.0, PointQuantity.PHASE_ANGLE, 30.0)))
                .isCloseTo(10_000, within(1e-9));

        var falls = own.markers().get(0);
        assertThat(falls.figure()).isEqualTo(rutting);
        assertThat(falls.reaches()).isEqualTo(1000);
        assertThat(falls.along()).isEqualTo(FigureMarkerPlan.Along.TEMPERATURE);
        assertThat(falls.scale()).isEqualTo(FigureMarkerPlan.Scale.LOG);
        assertThat(falls.frequencyHz()).hasValueCloseTo(10 / (2 * Math.PI), within(1e-15));
        assertThat(falls.unit()).isEqualTo("°C");
        var crossing = own.markers().get(1);
        assertThat(crossing.reaches()).as("in degrees, as in points").isCloseTo(45, within(1e-12));
        assertThat(crossing.temperatureK()).hasValueCloseTo(463.15, within(1e-12));
        assertThat(crossing.unit()).isEqualTo("Pa");

        var limits = conclusion.limits();
        assertThat(limits.get(4).property()).isEqualTo("rutting_factor");
        assertThat(limits.get(4).min()).hasValue(1000);
        assertThat(limits.get(4).unit()).isEqualTo("Pa");
        assertThat(limits.get(5).min()).as("K, as every limit on a temperature").hasValueCloseTo(337.15, within(1e-12));
        assertThat(limits.get(5).unit()).isEqualTo("°C");
        assertThat(limits.get(6).max()).hasValue(200_000);
    }
}
