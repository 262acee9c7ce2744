package nightlag.pipeline.report;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.within;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.json.JsonMapper;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import nightlag.pipeline.tables.RandomLot;
import nightlag.stages.LotResult;
import nightlag.stages.acceptance.Judgement;
import nightlag.stages.acceptance.LimitPlan;
import nightlag.stages.acceptance.ShownUnit;
import nightlag.stages.acceptance.Verdict;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.CreepPart;
import nightlag.stages.moduli.CreepReading;
import nightlag.stages.moduli.CreepStep;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;
import nightlag.stages.spectrum.RetardationModes;
import nightlag.stages.spectrum.SpectrumRow;
import nightlag.stages.superposition.MasterPoint;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class NightReportTest {
    private static final String HOSTILE = "</script><img src=x onerror=alert(1)>&\"'";

    @TempDir
    Path folder;

    @Test
    void aNightWithNothingNewSaysSo() throws IOException {
        String page = page(List.of());

        assertThat(page)
                .startsWith("<!DOCTYPE html>")
                .contains("<title>Night 2026-03-01T020000</title>")
                .contains(
                        "Nothing in what was new this night. What earlier nights found stands in their pages, and in the lots’ tables.")
                .contains("None: nothing was new.");
        try (var left = Files.list(folder)) {
            assertThat(left).containsExactlyInAnyOrder(folder.resolve("report.html"), folder.resolve("night.json"));
        }
    }

    @Test
    void whatIsToBeLookedAtComesBeforeTheLots() throws IOException {
        String page = page(
                List.of(new Concern("set aside", List.of("bench/a.csv, line 7")), new Concern("none", List.of())),
                "L-17");

        assertThat(page.indexOf("bench/a.csv, line 7")).isPositive().isLessThan(page.indexOf("<h2>Heron 3"));
        assertThat(page).doesNotContain("none <span");
    }

    @Test
    void noTextCanEndTheElementItStandsIn() throws IOException {
        String page = page(List.of(new Concern(HOSTILE, List.of(HOSTILE))), HOSTILE);

        assertThat(page).doesNotContain("<img").contains("&lt;img");
        assertThat(page.split("<script", -1)).hasSize(1 + 1 + 2); // the lot's charts, the library and the page's own
    }

    @Test
    void thePageNeedsNoNetwork() throws IOException {
        String page = page(List.of(), "L-17");

        assertThat(page).contains("Content-Security-Policy\" content=\"default-src 'none'");
        assertThat(page).doesNotContain("<link").doesNotContainPattern("<(img|script|iframe)[^>]* src=");
    }

    @Test
    void theChartsOfALotAreDataInThePage() throws IOException {
        LotResult result = new RandomLot(1).result("Heron 3", "L-17");

        JsonNode charts = JsonMapper.builder().build().readTree(ChartJson.of(LotCharts.of(result)));

        assertThat(charts.findValuesAsText("title"))
                .contains(
                        "Moduli over frequency",
                        "Phase angle over modulus",
                        "Loss over storage modulus",
                        "Shift factors");
        JsonNode master = find(charts, "Master curve at 190.0 °C");
        int points = 0;
        for (JsonNode series : master.get("series")) {
            assertThat(series.get("x").size()).isEqualTo(series.get("y").size());
            points += series.get("x").size();
        }
        assertThat(points).isEqualTo(2 * result.masterCurve().size());
    }

    @Test
    void theWorstPointsAreShownWithTheirLoopsAndHarmonics() throws IOException {
        LotResult result = new RandomLot(1).result("Heron 3", "L-17");

        JsonNode charts = JsonMapper.builder().build().readTree(ChartJson.of(LotCharts.of(result)));

        JsonNode loops = find(charts, "Loops of the worst points").get("series");
        assertThat(loops).hasSizeBetween(1, 4);
        for (JsonNode loop : loops) {
            assertThat(loop.get("joined").asBoolean()).isTrue();
            assertThat(loop.get("y"))
                    .isNotEmpty()
                    .allSatisfy(
                            stress -> assertThat(Math.abs(stress.asDouble())).isLessThanOrEqualTo(1 + 1e-9));
        }
        for (JsonNode point : find(charts, "Harmonics of the worst points").get("series")) {
            assertThat(point.get("x"))
                    .isNotEmpty()
                    .allSatisfy(order -> assertThat(order.asInt()).isGreaterThan(1));
        }
    }

    @Test
    void aContinuousSpectrumIsALineInItsBand() throws IOException {
        List<SpectrumRow> rows = IntStream.range(0, 4)
                .mapToObj(i -> new SpectrumRow(
                        463.15,
                        SpectrumRow.Kind.RETARDATION,
                        SpectrumRow.Form.CONTINUOUS,
                        Math.pow(10, i),
                        i == 3 ? 1e-30 : 2,
                        OptionalDouble.of(i == 0 ? 0 : 1),
                        OptionalDouble.of(3 + i)))
                .toList();
        LotResult result = LotResult.builder().spectrum(rows).build();

        JsonNode charts = JsonMapper.builder().build().readTree(ChartJson.of(LotCharts.of(result)));

        JsonNode line = find(charts, "Retardation spectrum").get("series").get(0);
        assertThat(line.get("joined").asBoolean()).isTrue();
        // the node that is nothing beside the peak would draw out the axis by thirty decades
        assertThat(line.get("x")).hasSize(3);
        assertThat(line.get("low").get(0).asDouble()).isZero();
        assertThat(line.get("high").get(2).asDouble()).isEqualTo(5);
        assertThat(charts.findValuesAsText("title")).doesNotContain("Relaxation spectrum");
    }

    /** Exact: of √(iω) kPa, G' = G'' = √(ω/2) and the line is π/4 of it. */
    @Test
    void theLossModulusStandsBesideTheSlopeOfTheStorageModulus() throws IOException {
        List<MasterPoint> points = IntStream.range(0, 21)
                .mapToObj(i -> {
                    double part = 1000 * Math.sqrt(Math.pow(10, i / 5.0) / 2);
                    return new MasterPoint(
                            463.15,
                            463.15,
                            new ModulusReading(Math.pow(10, i / 5.0), new Moduli(part, part, Optional.empty())));
                })
                .toList();
        LotResult result = LotResult.builder().masterCurve(points).build();

        JsonNode charts = JsonMapper.builder().build().readTree(ChartJson.of(LotCharts.of(result)));

        JsonNode series =
                find(charts, "Loss modulus and slope of the storage modulus").get("series");
        assertThat(series).hasSize(2);
        assertThat(series.get(0).get("joined").asBoolean()).isFalse();
        assertThat(series.get(0).get("y")).hasSize(21);
        JsonNode line = series.get(1);
        assertThat(line.get("joined").asBoolean()).isTrue();
        assertThat(line.get("y")).hasSize(41);
        for (int i = 0; i < 41; i++) {
            double loss = 1000 * Math.sqrt(line.get("x").get(i).asDouble() / 2);
            assertThat(line.get("y").get(i).asDouble() / loss).isCloseTo(Math.PI / 4, within(1e-3));
        }
    }

    /** Exact: a Burgers body, creep and recovery; the line of the fit goes through the readings. */
    @Test
    void creepIsDrawnWithWhatTheFittedModesSayOfIt() throws IOException {
        RetardationModes burgers = RetardationModes.of(1e-6, 1e-7, new double[] {2}, new double[] {0.5e-6});
        LotResult result = LotResult.builder()
                .creep(List.of(creep(burgers)))
                .spectrum(Stream.concat(
                                discrete(
                                        SpectrumRow.Kind.RELAXATION,
                                        burgers.relaxation().timesS(),
                                        burgers.relaxation().strengthsPa()),
                                discrete(SpectrumRow.Kind.RETARDATION, burgers.timesS(), burgers.strengthsPerPa()))
                        .toList())
                .build();

        JsonNode charts = JsonMapper.builder().build().readTree(ChartJson.of(LotCharts.of(result)));

        JsonNode compliance = find(charts, "Creep and recovery").get("series");
        assertThat(compliance.findValuesAsText("name"))
                .containsExactly(
                        "specimen 1, 25.0 °C, load", "fitted modes", "specimen 1, 25.0 °C, recovery", "fitted modes");
        assertLineThroughPoints(compliance.get(0), compliance.get(1));
        assertLineThroughPoints(compliance.get(2), compliance.get(3));
        // what has flowed does not come back
        assertThat(compliance.get(2).get("y").get(3).asDouble()).isLessThan(1.5e-6);
        JsonNode strain = find(charts, "Strain of creep records").get("series");
        assertLineThroughPoints(strain.get(0), strain.get(1));
        assertThat(strain.get(0).get("x")).hasSize(8);
    }

    @Test
    void creepWithoutModesAtItsTemperatureIsDrawnAlone() throws IOException {
        RetardationModes burgers = RetardationModes.of(1e-6, 1e-7, new double[] {2}, new double[] {0.5e-6});
        LotResult result = LotResult.builder().creep(List.of(creep(burgers))).build();

        JsonNode charts = JsonMapper.builder().build().readTree(ChartJson.of(LotCharts.of(result)));

        assertThat(find(charts, "Creep and recovery").get("series")).hasSize(2);
        assertThat(charts.findValuesAsText("name")).doesNotContain("fitted modes");
    }

    private static void assertLineThroughPoints(JsonNode points, JsonNode line) {
        assertThat(line.get("joined").asBoolean()).isTrue();
        assertThat(line.get("y")).hasSize(points.get("y").size());
        for (int i = 0; i < points.get("y").size(); i++) {
            double measured = points.get("y").get(i).asDouble();
            assertThat(line.get("y").get(i).asDouble()).isCloseTo(measured, within(1e-9 * measured));
        }
    }

    private static Stream<SpectrumRow> discrete(SpectrumRow.Kind kind, double[] times, double[] strengths) {
        return IntStream.range(0, times.length)
                .mapToObj(i -> new SpectrumRow(
                        298.15,
                        kind,
                        SpectrumRow.Form.DISCRETE,
                        times[i],
                        strengths[i],
                        OptionalDouble.empty(),
                        OptionalDouble.empty()));
    }

    /** 1 kPa for 10 s, a strain of 0.01 before it. */
    private static CreepCurve creep(RetardationModes material) {
        double zero = 0.01;
        double before = zero + 1000 * material.creepPerPa(10);
        List<CreepReading> readings = new ArrayList<>();
        for (double since : new double[] {0.1, 1, 5, 9}) {
            double strain = zero + 1000 * material.creepPerPa(since);
            readings.add(new CreepReading(1, since, since, 1000, strain, 1e-6, (strain - zero) / 1000, 1e-9));
        }
        for (double since : new double[] {0.1, 1, 5, 50}) {
            double strain = zero + 1000 * (material.creepPerPa(10 + since) - material.creepPerPa(since));
            readings.add(new CreepReading(2, 10 + since, since, 0, strain, 1e-6, (before - strain) / 1000, 1e-9));
        }
        return new CreepCurve(
                new PointKey("Sedge 7", "S7-05", "1", "1", "run", "bench/run.dat"),
                Optional.empty(),
                DeformationMode.SHEAR,
                OptionalDouble.of(298.15),
                OptionalDouble.empty(),
                true,
                List.of(
                        new CreepStep(CreepPart.LOAD, 0, 0, 0, 1000, 0, zero, 0, OptionalDouble.empty()),
                        new CreepStep(CreepPart.RECOVERY, 10, 0, 0, -1000, 0, before, 0, OptionalDouble.empty())),
                readings,
                Quality.SOUND,
                List.of(),
                1000,
                List.of());
    }

    @Test
    void figuresAreWrittenToTheSecondDigitOfTheirUncertainty() {
        assertThat(value(46975.857, 70.6, "Pa")).isEqualTo("46976 ± 71 Pa");
        assertThat(value(1533.4, 124.68, "Pa·s")).isEqualTo("1530 ± 120 Pa·s");
        assertThat(value(3.9389798e-6, 2.7568e-7, "1/Pa")).isEqualTo("(3.94 ± 0.28)·10⁻⁶ 1/Pa");
        assertThat(value(253872.84, 19104.7, "Pa")).isEqualTo("254000 ± 19000 Pa");
        assertThat(value(2538728400.0, 19104700, "Pa")).isEqualTo("(2.539 ± 0.019)·10⁹ Pa");
        assertThat(value(0.0022985, Double.NaN, "1")).isEqualTo("0.002299");
        assertThat(value(373.15, 0.0123, "°C")).isEqualTo("100.000 ± 0.012 °C");
    }

    private static String value(double value, double u, String unit) {
        Marker marker = new Marker(
                "",
                "",
                "figure",
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                value,
                Double.isNaN(u) ? OptionalDouble.empty() : OptionalDouble.of(u),
                unit,
                "in words");
        LotResult result = LotResult.builder().markers(List.of(marker)).build();
        return LotPages.of("lot-1", "Heron 3", "L-17", result).figures().get(0).value();
    }

    private static LimitPlan limit(OptionalDouble min, OptionalDouble max, String unit, ShownUnit shown) {
        return new LimitPlan(
                Optional.of("softening"),
                "glass_transition_loss_peak",
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                "",
                min,
                max,
                unit,
                shown,
                2);
    }

    @Test
    void verdictsAreToldInTheUnitsOfTheGradeFile() {
        LimitPlan stiffness =
                limit(OptionalDouble.of(12_000), OptionalDouble.of(15_000), "Pa", new ShownUnit("kPa", 1000, 0));
        assertThat(VerdictWords.of(new Judgement(
                        stiffness,
                        OptionalDouble.of(12_100),
                        OptionalDouble.of(110),
                        Verdict.UNDECIDED,
                        "mean of 3 points")))
                .isEqualTo("softening undecided: 12.10 ± 0.11 kPa, limits 12 to 15 kPa (mean of 3 points)");
        LimitPlan peak = limit(OptionalDouble.empty(), OptionalDouble.of(293.15), "°C", new ShownUnit("°C", 1, 273.15));
        assertThat(VerdictWords.of(new Judgement(
                        peak, OptionalDouble.of(303.15), OptionalDouble.of(0.51), Verdict.NONCONFORMING, "")))
                .isEqualTo("softening nonconforming: 30.00 ± 0.51 °C, at most 20 °C");
        assertThat(VerdictWords.of(new Judgement(
                        peak,
                        OptionalDouble.empty(),
                        OptionalDouble.empty(),
                        Verdict.MISSING,
                        "the lot has no glass_transition_loss_peak")))
                .isEqualTo("softening missing: at most 20 °C (the lot has no glass_transition_loss_peak)");
    }

    @Test
    void aLotStandsAmongThoseBeforeIt() throws IOException {
        LotResult result = new RandomLot(1).result("Heron 3", "L-17");

        JsonNode chart = find(
                JsonMapper.builder().build().readTree(ChartJson.of(LotCharts.of(result))),
                "The lot among its predecessors: a limit on conforming");

        // 20 earlier lots, of which the last twelve are shown; this one is the 21st
        assertThat(chart.get("series").get(0).get("x").get(0).asInt()).isEqualTo(9);
        assertThat(chart.get("series").get(1).get("x").get(0).asInt()).isEqualTo(21);
        assertThat(chart.get("series").get(1).get("y").get(0).asDouble()).isEqualTo(3);
        assertThat(chart.findValuesAsText("name")).containsOnlyOnce("mean of the earlier lots");
        assertThat(LotPages.of("lot-1", "Heron 3", "L-17", result).limits())
                .extracting(LotPage.Limit::verdict)
                .containsExactly("conforming", "unusual", "nonconforming", "undecided", "missing");
    }

    private static JsonNode find(JsonNode charts, String title) {
        for (JsonNode chart : charts) {
            if (chart.get("title").asText().equals(title)) {
                return chart;
            }
        }
        throw new AssertionError("no chart " + title);
    }

    private String page(List<Concern> concerns, String... lots) throws IOException {
        try (NightReport report = NightReport.begin(folder)) {
            for (String lot : lots) {
                report.lot("Heron 3", lot, new RandomLot(1).result("Heron 3", lot));
            }
            report.finish(new NightHeading("2026-03-01T020000", "1.2.3", List.of("lots 1"), concerns));
        }
        return Files.readString(folder.resolve(NightReport.FILE_NAME));
    }
}
