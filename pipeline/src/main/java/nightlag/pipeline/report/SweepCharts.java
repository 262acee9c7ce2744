package nightlag.pipeline.report;

import java.util.ArrayList;
import java.util.List;
import java.util.function.ToDoubleFunction;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.sweep.Sweep;
import nightlag.stages.sweep.SweepPlan;

/** Charts of the sweeps in which temperature, strain or time varies; those over frequency are drawn by isotherm. */
final class SweepCharts {
    private static final String PASCAL = "Pa";

    private final List<Sweep> sweeps;

    private SweepCharts(List<Sweep> sweeps) {
        this.sweeps = sweeps;
    }

    /** All of them; those of kinds that the lot does not have are empty. */
    static List<Chart> of(List<Sweep> sweeps) {
        SweepCharts charts = new SweepCharts(sweeps);
        Axis temperature = Axis.linear("temperature", "°C");
        return List.of(
                charts.moduli(
                        SweepPlan.Kind.TEMPERATURE,
                        "Moduli over temperature",
                        "The steep fall of the storage modulus and the peak of the loss modulus are the glass transition, as seen"
                                + " at that frequency.",
                        temperature,
                        SweepCharts::celsius),
                charts.lossFactor(temperature),
                charts.moduli(
                        SweepPlan.Kind.AMPLITUDE,
                        "Moduli over strain",
                        "Level on the left while the material is linear; where the complex modulus leaves that level by 5 % its"
                                + " linear range ends.",
                        Axis.log("strain amplitude", ""),
                        point -> point.strainAmplitude().orElse(Double.NaN)),
                charts.moduli(
                        SweepPlan.Kind.TIME,
                        "Moduli over time",
                        "A specimen followed at one frequency: curing, ageing, drying or degradation.",
                        Axis.linear("elapsed time", "s"),
                        point -> point.elapsedS().orElse(Double.NaN)));
    }

    private Chart moduli(
            SweepPlan.Kind kind, String title, String caption, Axis x, ToDoubleFunction<ModulusPoint> across) {
        List<Series> series = new ArrayList<>();
        int look = 0;
        for (Sweep sweep : ofKind(kind)) {
            String symbol = symbol(sweep);
            String name = name(sweep);
            series.add(Series.of(
                    symbol + "' " + name,
                    look,
                    true,
                    false,
                    sweep.points(),
                    across,
                    point -> moduli(point).storagePa()));
            series.add(Series.of(
                    symbol + "'' " + name,
                    look,
                    false,
                    false,
                    sweep.points(),
                    across,
                    point -> moduli(point).lossPa()));
            look++;
        }
        return new Chart(
                title, "Storage modulus filled, loss modulus open. " + caption, x, Axis.log("modulus", PASCAL), series);
    }

    private Chart lossFactor(Axis temperature) {
        List<Series> series = new ArrayList<>();
        for (Sweep sweep : ofKind(SweepPlan.Kind.TEMPERATURE)) {
            series.add(Series.of(
                    name(sweep),
                    series.size(),
                    true,
                    false,
                    sweep.points(),
                    SweepCharts::celsius,
                    point -> moduli(point).tanDelta()));
        }
        return new Chart(
                "Loss factor over temperature",
                "The peak of tan δ lies some kelvin above that of the loss modulus.",
                temperature,
                Axis.log("tan δ", ""),
                series);
    }

    private List<Sweep> ofKind(SweepPlan.Kind kind) {
        return sweeps.stream().filter(sweep -> sweep.kind() == kind).toList();
    }

    /** The symbol of a modulus in shear or in extension. */
    static String symbol(Sweep sweep) {
        return symbol(sweep.points().get(0));
    }

    /** Likewise, of a point. */
    static String symbol(ModulusPoint point) {
        return point.deformation() == DeformationMode.SHEAR ? "G" : "E";
    }

    /** Specimen, sweep and what does not vary in it. */
    static String name(Sweep sweep) {
        StringBuilder name = new StringBuilder("specimen " + sweep.name().specimen());
        if (!sweep.name().sweep().equals("1")) {
            name.append(" sweep ").append(sweep.name().sweep());
        }
        sweep.frequencyHz()
                .ifPresent(
                        hz -> name.append(", ").append(Written.fourDigits(hz)).append(" Hz"));
        if (sweep.kind() != SweepPlan.Kind.TEMPERATURE) {
            sweep.temperatureK().ifPresent(kelvin -> name.append(", ").append(Written.celsius(kelvin)));
        }
        return name.toString();
    }

    private static double celsius(ModulusPoint point) {
        return Written.toCelsius(point.temperatureK().orElse(Double.NaN));
    }

    private static Moduli moduli(ModulusPoint point) {
        return point.moduli().orElseThrow();
    }
}
