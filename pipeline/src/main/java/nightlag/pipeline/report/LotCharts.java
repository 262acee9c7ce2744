package nightlag.pipeline.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeMap;
import java.util.function.Predicate;
import java.util.function.ToDoubleFunction;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import nightlag.stages.LotResult;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.Quality;
import nightlag.stages.spectrum.SpectrumRow;
import nightlag.stages.superposition.MasterPoint;
import nightlag.stages.superposition.ShiftFactor;
import nightlag.stages.sweep.FrequencySweeps;
import nightlag.stages.sweep.Isotherm;
import nightlag.stages.sweep.Isotherms;
import nightlag.stages.sweep.Sweep;
import nightlag.stages.sweep.SweepName;
import nightlag.stages.sweep.SweepPlan;

/** The charts of one lot. */
final class LotCharts {
    /** More temperatures than this are a ramp, and are drawn as one. */
    private static final int MOST_ISOTHERMS = 16;

    /** A continuous spectrum is drawn down to this part of its peak. */
    private static final double LEAST_OF_PEAK = 1e-6;

    private static final String RAD_PER_S = "rad/s";
    private static final String PASCAL = "Pa";

    private final LotResult result;
    private final List<Family> families;

    /** Points of one temperature, or all of a ramp. */
    private record Family(String name, List<ModulusPoint> points) {}

    private LotCharts(LotResult result) {
        this.result = result;
        this.families = families(result.points().stream()
                .filter(point ->
                        point.quality() != Quality.UNUSABLE && point.moduli().isPresent())
                .filter(whichGoOverFrequency(result))
                .toList());
    }

    /** What was followed over temperature, time or strain has charts of its own; it stands here as well where it is superposed. */
    private static Predicate<ModulusPoint> whichGoOverFrequency(LotResult result) {
        Set<SweepName> others = result.sweeps().stream()
                .filter(sweep -> sweep.kind() != SweepPlan.Kind.FREQUENCY)
                .map(Sweep::name)
                .collect(Collectors.toSet());
        result.sweeps().stream()
                .filter(sweep -> sweep.kind() == SweepPlan.Kind.FREQUENCY)
                .map(Sweep::name)
                .forEach(others::remove);
        return point -> !result.masterCurve().isEmpty() || !others.contains(SweepName.of(point));
    }

    /** Those that have something to show. */
    static List<Chart> of(LotResult result) {
        LotCharts charts = new LotCharts(result);
        return Stream.of(
                        SweepCharts.of(result.sweeps()).stream(),
                        CreepCharts.of(result).stream(),
                        Stream.of(
                                charts.moduliOverFrequency(),
                                charts.masterCurve(),
                                charts.shiftFactors(),
                                charts.phaseOverModulus(),
                                charts.lossOverStorage(),
                                LocalRelationChart.of(result),
                                charts.spectrum(SpectrumRow.Kind.RELAXATION, "Relaxation modes", "modulus"),
                                charts.spectrum(SpectrumRow.Kind.RETARDATION, "Retardation modes", "compliance"),
                                charts.density(SpectrumRow.Kind.RELAXATION, "Relaxation spectrum", "H"),
                                charts.density(SpectrumRow.Kind.RETARDATION, "Retardation spectrum", "L")),
                        ResponseCharts.of(result.responses()).stream(),
                        TrendCharts.of(result.trend()).stream(),
                        WorstPointCharts.of(result.points()).stream())
                .flatMap(charted -> charted)
                .filter(Chart::hasPoints)
                .toList();
    }

    private static List<Family> families(List<ModulusPoint> points) {
        List<Isotherm> isotherms = Isotherms.group(points);
        if (isotherms.size() > MOST_ISOTHERMS) {
            return List.of(new Family("all temperatures", points));
        }
        List<Family> families = new ArrayList<>();
        isotherms.forEach(
                isotherm -> families.add(new Family(Written.celsius(isotherm.temperatureK()), isotherm.points())));
        List<ModulusPoint> without =
                points.stream().filter(point -> point.temperatureK().isEmpty()).toList();
        if (!without.isEmpty()) {
            families.add(new Family("no temperature", without));
        }
        return families;
    }

    private Chart moduliOverFrequency() {
        List<Series> series = new ArrayList<>();
        for (int i = 0; i < families.size(); i++) {
            Family family = families.get(i);
            if (!variesInFrequency(family)) {
                continue;
            }
            String symbol = SweepCharts.symbol(family.points().get(0));
            series.add(Series.of(
                    symbol + "' " + family.name(),
                    i,
                    true,
                    false,
                    family.points(),
                    LotCharts::angularFrequency,
                    point -> moduli(point).storagePa()));
            series.add(Series.of(
                    symbol + "'' " + family.name(),
                    i,
                    false,
                    false,
                    family.points(),
                    LotCharts::angularFrequency,
                    point -> moduli(point).lossPa()));
        }
        return new Chart(
                "Moduli over frequency",
                "Storage modulus filled, loss modulus open; every usable point of the lot, as measured.",
                Axis.log("angular frequency", RAD_PER_S),
                Axis.log("modulus", PASCAL),
                series);
    }

    private static boolean variesInFrequency(Family family) {
        return FrequencySweeps.distinctFrequencies(family.points()) > 1;
    }

    private Chart masterCurve() {
        List<MasterPoint> points = result.masterCurve();
        List<Series> series = new ArrayList<>();
        List<Double> temperatures = points.stream()
                .map(MasterPoint::temperatureK)
                .distinct()
                .sorted()
                .toList();
        for (int i = 0; i < temperatures.size(); i++) {
            double temperature = temperatures.get(i);
            List<MasterPoint> isotherm = points.stream()
                    .filter(point -> point.temperatureK() == temperature)
                    .toList();
            String name = Written.celsius(temperature);
            series.add(Series.of(
                    symbol() + "' " + name,
                    i,
                    true,
                    false,
                    isotherm,
                    point -> point.reduced().angularFrequency(),
                    point -> point.reduced().moduli().storagePa()));
            series.add(Series.of(
                    symbol() + "'' " + name,
                    i,
                    false,
                    false,
                    isotherm,
                    point -> point.reduced().angularFrequency(),
                    point -> point.reduced().moduli().lossPa()));
        }
        return new Chart(
                points.isEmpty()
                        ? "Master curve"
                        : "Master curve at " + Written.celsius(points.get(0).referenceTemperatureK()),
                "All isotherms moved to the reference temperature; where the material superposes, the colours lie on one"
                        + " another.",
                Axis.log("reduced angular frequency", RAD_PER_S),
                Axis.log("reduced modulus", PASCAL),
                series);
    }

    private Chart shiftFactors() {
        List<ShiftFactor> used =
                result.shiftFactors().stream().filter(ShiftFactor::used).toList();
        return new Chart(
                "Shift factors",
                "How far each isotherm was moved along the frequency axis, and the fitted law.",
                Axis.linear("temperature", "°C"),
                Axis.linear("log a", ""),
                List.of(
                        Series.of(
                                "measured",
                                0,
                                true,
                                false,
                                used,
                                shift -> Written.toCelsius(shift.temperatureK()),
                                shift -> shift.log10A().orElse(Double.NaN)),
                        Series.of(
                                "law",
                                1,
                                false,
                                true,
                                used,
                                shift -> Written.toCelsius(shift.temperatureK()),
                                shift -> shift.lawLog10A().orElse(Double.NaN))));
    }

    private Chart phaseOverModulus() {
        return new Chart(
                "Phase angle over modulus",
                "No shift along frequency enters: where a material superposes without a vertical shift, all temperatures"
                        + " lie on one curve.",
                Axis.log("complex modulus |" + symbol() + "*|", PASCAL),
                Axis.linear("phase angle", "°"),
                byFamily(
                        point -> moduli(point).magnitudePa(),
                        point -> Math.toDegrees(moduli(point).phaseRad())));
    }

    private Chart lossOverStorage() {
        return new Chart(
                "Loss over storage modulus",
                "As a second look: a curve that fans out with temperature is a material whose mechanisms do not shift alike.",
                Axis.log("storage modulus", PASCAL),
                Axis.log("loss modulus", PASCAL),
                byFamily(
                        point -> moduli(point).storagePa(),
                        point -> moduli(point).lossPa()));
    }

    private List<Series> byFamily(ToDoubleFunction<ModulusPoint> x, ToDoubleFunction<ModulusPoint> y) {
        return IntStream.range(0, families.size())
                .filter(i -> variesInFrequency(families.get(i)))
                .mapToObj(i -> Series.of(
                        families.get(i).name(), i, true, false, families.get(i).points(), x, y))
                .toList();
    }

    private Chart spectrum(SpectrumRow.Kind kind, String title, String what) {
        return new Chart(
                title,
                "Each mode of the discrete set; the set as a whole says what the material does, a single mode little.",
                Axis.log("time", "s"),
                Axis.log(what, kind.unit()),
                byTemperature(
                        kind,
                        SpectrumRow.Form.DISCRETE,
                        (name, look, rows) -> Series.of(
                                "modes" + name, look, true, false, rows, SpectrumRow::timeS, SpectrumRow::value)));
    }

    /** A series of the rows of one temperature. */
    private interface SpectrumSeries {
        Series of(String name, int look, List<SpectrumRow> rows);
    }

    private List<Series> byTemperature(SpectrumRow.Kind kind, SpectrumRow.Form form, SpectrumSeries series) {
        Map<Double, List<SpectrumRow>> rows = result.spectrum().stream()
                .filter(row -> row.kind() == kind && row.form() == form)
                .collect(Collectors.groupingBy(SpectrumRow::referenceTemperatureK, TreeMap::new, Collectors.toList()));
        List<Series> found = new ArrayList<>();
        rows.forEach((kelvin, of) -> found.add(series.of(" at " + Written.celsius(kelvin), found.size(), of)));
        return found;
    }

    /** A master curve is of one deformation. */
    private String symbol() {
        return result.points().isEmpty()
                ? "G"
                : SweepCharts.symbol(result.points().get(0));
    }

    private Chart density(SpectrumRow.Kind kind, String title, String symbol) {
        return new Chart(
                title,
                "The continuous spectrum per unit of ln time and the band it lies in with 95 % probability. The band opens where"
                        + " the data no longer fix it, and reaches down to the axis where they do not tell it from none.",
                Axis.log("time", "s"),
                Axis.log(symbol, kind.unit()),
                byTemperature(
                        kind,
                        SpectrumRow.Form.CONTINUOUS,
                        (name, look, rows) -> Series.withBand(
                                symbol + name,
                                look,
                                worthAnAxis(rows),
                                SpectrumRow::timeS,
                                SpectrumRow::value,
                                row -> row.low().orElse(row.value()),
                                row -> row.high().orElse(row.value()))));
    }

    private static List<SpectrumRow> worthAnAxis(List<SpectrumRow> rows) {
        double peak = rows.stream().mapToDouble(SpectrumRow::value).max().orElse(0);
        return rows.stream().filter(row -> row.value() >= LEAST_OF_PEAK * peak).toList();
    }

    private static double angularFrequency(ModulusPoint point) {
        return 2 * Math.PI * point.frequencyHz().orElse(Double.NaN);
    }

    private static Moduli moduli(ModulusPoint point) {
        return point.moduli().orElseThrow();
    }
}
