package nightlag.pipeline.tables;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import nightlag.pipeline.RandomPoints;
import nightlag.stages.LotResult;
import nightlag.stages.acceptance.Judgement;
import nightlag.stages.acceptance.LimitPlan;
import nightlag.stages.acceptance.ShownUnit;
import nightlag.stages.acceptance.Trend;
import nightlag.stages.acceptance.Verdict;
import nightlag.stages.moduli.FigureRow;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;
import nightlag.stages.response.ResponsePlan;
import nightlag.stages.response.ResponseRow;
import nightlag.stages.response.ResponseRow.Band;
import nightlag.stages.response.ResponseRow.StrainParts;
import nightlag.stages.spectrum.RelativeMode;
import nightlag.stages.spectrum.SpectrumRow;
import nightlag.stages.superposition.MasterPoint;
import nightlag.stages.superposition.ShiftFactor;
import nightlag.stages.sweep.Sweep;
import nightlag.stages.sweep.SweepName;
import nightlag.stages.sweep.SweepPlan;

/** A lot of no material, with rows in every table; every row differs from every other in its key. */
public final class RandomLot {
    private final Random random;
    private final RandomPoints points;

    public RandomLot(long seed) {
        random = new Random(seed);
        points = new RandomPoints(seed);
    }

    public LotResult result(String grade, String lot) {
        List<ModulusPoint> made = points(grade, lot);
        return LotResult.builder()
                .points(made)
                .markers(markers())
                .shiftFactors(shiftFactors())
                .masterCurve(masterCurve())
                .spectrum(spectrum())
                .derived(derived(made))
                .sweeps(sweeps(made))
                .responses(responses())
                .prony(prony())
                .acceptance(acceptance())
                .trend(trend())
                .build();
    }

    private static LimitPlan limit(String property, String unit) {
        return new LimitPlan(
                Optional.of("a limit on " + property),
                property,
                OptionalDouble.of(463.15),
                OptionalDouble.of(1),
                "190 °C 1 Hz",
                OptionalDouble.of(1),
                OptionalDouble.empty(),
                unit,
                ShownUnit.plain(unit),
                2);
    }

    private List<Judgement> acceptance() {
        List<Judgement> made = new ArrayList<>();
        for (Verdict verdict : Verdict.values()) {
            boolean there = verdict != Verdict.MISSING;
            made.add(new Judgement(
                    limit(verdict.word(), "Pa"),
                    only(there, points.number()),
                    only(there && random.nextBoolean(), Math.abs(points.number())),
                    verdict,
                    "=how it \"came\""));
        }
        return made;
    }

    private List<Trend> trend() {
        List<Trend.LotValue> earlier = IntStream.rangeClosed(1, 12)
                .mapToObj(i -> new Trend.LotValue("L" + i, random.nextDouble(1, 2)))
                .toList();
        return List.of(new Trend(limit(Verdict.CONFORMING.word(), "Pa"), 3, 1.5, 1, 2, 20, earlier));
    }

    /** Sweeps of every kind, whatever varies in them. */
    private static List<Sweep> sweeps(List<ModulusPoint> of) {
        List<ModulusPoint> usable = of.stream()
                .filter(point -> point.quality() != Quality.UNUSABLE
                        && point.moduli().isPresent()
                        && point.temperatureK().isPresent())
                .toList();
        return usable.isEmpty()
                ? List.of()
                : Stream.of(SweepPlan.Kind.AMPLITUDE, SweepPlan.Kind.TEMPERATURE, SweepPlan.Kind.TIME)
                        .map(kind -> new Sweep(
                                SweepName.of(usable.get(0)),
                                kind,
                                OptionalDouble.empty(),
                                OptionalDouble.of(1),
                                usable))
                        .toList();
    }

    private List<ResponseRow> responses() {
        List<ResponseRow> made = new ArrayList<>();
        for (ResponsePlan.Controlled controlled : ResponsePlan.Controlled.values()) {
            for (int i = 0; i < 10; i++) {
                made.add(new ResponseRow(
                        "=a \"day\", " + controlled,
                        controlled,
                        random.nextDouble(200, 500),
                        Math.pow(10, i - 4),
                        points.number(),
                        points.number(),
                        random.nextBoolean(),
                        random.nextBoolean()
                                ? Optional.of(new Band(points.number(), points.number()))
                                : Optional.empty(),
                        controlled == ResponsePlan.Controlled.STRESS
                                ? Optional.of(new StrainParts(points.number(), points.number(), points.number()))
                                : Optional.empty()));
            }
        }
        return made;
    }

    private List<RelativeMode> prony() {
        return IntStream.rangeClosed(1, 12)
                .mapToObj(mode -> new RelativeMode(463.15, mode, random.nextDouble(), Math.pow(10, mode - 6)))
                .toList();
    }

    private List<FigureRow> derived(List<ModulusPoint> of) {
        return of.stream()
                .map(point -> new FigureRow(
                        point.key(),
                        maybe(random.nextDouble(200, 500)),
                        maybe(random.nextDouble(0.01, 100)),
                        "figure_" + random.nextInt(3),
                        points.number(),
                        maybe(Math.abs(points.number())),
                        random.nextBoolean() ? "°C" : "Pa·s"))
                .toList();
    }

    private List<ModulusPoint> points(String grade, String lot) {
        List<ModulusPoint> made = new ArrayList<>();
        for (int i = 0; i < 60; i++) {
            String specimen = Integer.toString(random.nextInt(12));
            String sweep = random.nextBoolean() ? "up" : "down";
            String point = Integer.toString(random.nextInt(12));
            made.add(points.point(new PointKey(grade, lot, specimen, sweep, point, "bench; \"2\"/ä" + i + ".csv")));
        }
        return made;
    }

    private List<Marker> markers() {
        List<Marker> made = new ArrayList<>();
        for (int i = 0; i < 20; i++) {
            made.add(new Marker(
                    random.nextBoolean() ? "" : "1",
                    random.nextBoolean() ? "" : "up",
                    "figure_" + i,
                    maybe(random.nextDouble(200, 500)),
                    maybe(random.nextDouble(0.01, 100)),
                    points.number(),
                    maybe(Math.abs(points.number())),
                    random.nextBoolean() ? "°C" : "Pa·s",
                    "by trial, \"for a test\""));
        }
        return made;
    }

    private List<ShiftFactor> shiftFactors() {
        List<ShiftFactor> made = new ArrayList<>();
        for (int i = 0; i < 6; i++) {
            boolean used = random.nextBoolean();
            made.add(new ShiftFactor(
                    463.15,
                    random.nextDouble(400, 500),
                    only(used, points.number()),
                    only(used, Math.abs(points.number())),
                    only(used, points.number()),
                    maybe(Math.abs(points.number())),
                    maybe(points.number()),
                    only(used, Math.abs(points.number())),
                    used));
        }
        return made;
    }

    private static OptionalDouble only(boolean there, double value) {
        return there ? OptionalDouble.of(value) : OptionalDouble.empty();
    }

    private List<MasterPoint> masterCurve() {
        List<MasterPoint> made = new ArrayList<>();
        for (int i = 0; i < 12; i++) {
            made.add(new MasterPoint(
                    463.15,
                    random.nextDouble(400, 500),
                    new ModulusReading(
                            Math.exp(random.nextDouble(-9, 9)),
                            new Moduli(points.number(), points.number(), Optional.empty()))));
        }
        return made;
    }

    private List<SpectrumRow> spectrum() {
        List<SpectrumRow> made = new ArrayList<>();
        for (SpectrumRow.Kind kind : SpectrumRow.Kind.values()) {
            for (SpectrumRow.Form form : SpectrumRow.Form.values()) {
                for (int i = 0; i < 8; i++) {
                    made.add(new SpectrumRow(
                            463.15,
                            kind,
                            form,
                            Math.pow(10, i - 4),
                            Math.pow(10, random.nextDouble(-9, 9)),
                            maybe(0),
                            maybe(1e9)));
                }
            }
        }
        return made;
    }

    private OptionalDouble maybe(double value) {
        return random.nextInt(3) == 0 ? OptionalDouble.empty() : OptionalDouble.of(value);
    }
}
