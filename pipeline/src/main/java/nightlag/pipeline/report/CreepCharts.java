package nightlag.pipeline.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.LotResult;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.CreepPart;
import nightlag.stages.moduli.CreepReading;
import nightlag.stages.moduli.CreepStep;
import nightlag.stages.moduli.Quality;
import nightlag.stages.spectrum.RelaxationModes;
import nightlag.stages.spectrum.RetardationModes;
import nightlag.stages.spectrum.SpectrumRow;

/** Charts of creep and recovery, with what the modes fitted at the same temperature say of them. */
final class CreepCharts {
    private static final double SAME_TEMPERATURE_K = 0.5;

    private static final String FITTED = "fitted modes";

    /** The look of lines, which is grey. */
    private static final int LINE = 6;

    private final LotResult result;
    private final List<CreepCurve> curves;

    private CreepCharts(LotResult result) {
        this.result = result;
        this.curves = result.creep().stream()
                .filter(curve -> curve.quality() != Quality.UNUSABLE)
                .toList();
    }

    /** Compliance over the time since a step, and strain over the time of the record; empty where there is no creep. */
    static List<Chart> of(LotResult result) {
        CreepCharts charts = new CreepCharts(result);
        return List.of(charts.compliance(), charts.strain());
    }

    private Chart compliance() {
        List<Series> series = new ArrayList<>();
        for (int look = 0; look < curves.size(); look++) {
            CreepCurve curve = curves.get(look);
            Optional<RetardationModes> modes = fitted(curve);
            for (int k = 0; k < curve.steps().size(); k++) {
                int number = k + 1;
                CreepStep step = curve.steps().get(k);
                List<CreepReading> readings = curve.readings().stream()
                        .filter(reading -> reading.step() == number)
                        .toList();
                series.add(Series.of(
                        stepName(curve, k),
                        look,
                        step.part() == CreepPart.LOAD,
                        false,
                        readings,
                        CreepReading::sinceStepS,
                        CreepReading::compliancePerPa));
                modes.ifPresent(material -> {
                    double before = predicted(material, curve, step.atS(), number - 1);
                    series.add(Series.of(
                            FITTED,
                            LINE,
                            false,
                            true,
                            readings,
                            CreepReading::sinceStepS,
                            reading ->
                                    (predicted(material, curve, reading.timeS(), number) - before) / step.changePa()));
                });
            }
        }
        return new Chart(
                "Creep and recovery",
                "Creep compliance after a load filled, recovered compliance after an unload open, over the time since the step. A"
                        + " recovery that stays below the creep is flow, or not over. Lines are the fitted modes.",
                Axis.log("time since the step", "s"),
                Axis.log("compliance", "1/Pa"),
                series);
    }

    private Chart strain() {
        List<Series> series = new ArrayList<>();
        for (int look = 0; look < curves.size(); look++) {
            CreepCurve curve = curves.get(look);
            double zero = curve.steps().get(0).strainBefore();
            series.add(Series.of(
                    name(curve),
                    look,
                    true,
                    false,
                    curve.readings(),
                    CreepReading::timeS,
                    reading -> reading.strain() - zero));
            fitted(curve)
                    .ifPresent(material -> series.add(Series.of(
                            FITTED,
                            LINE,
                            false,
                            true,
                            curve.readings(),
                            CreepReading::timeS,
                            reading -> predicted(material, curve, reading.timeS(), reading.step()))));
        }
        return new Chart(
                "Strain of creep records",
                "Strain since before the first load over the time of the record; lines are the fitted modes under the same steps.",
                Axis.linear("time", "s"),
                Axis.linear("strain", ""),
                series);
    }

    /** Strain by the superposition of the first steps of a record (Boltzmann). */
    private static double predicted(RetardationModes material, CreepCurve curve, double timeS, int steps) {
        double strain = 0;
        for (CreepStep step : curve.steps().subList(0, steps)) {
            strain += step.changePa() * material.creepPerPa(timeS - step.atS());
        }
        return strain;
    }

    /** The modes published at the temperature of a curve, where all that belongs to them is published too. */
    private Optional<RetardationModes> fitted(CreepCurve curve) {
        if (!curve.fromRest() || curve.temperatureK().isEmpty()) {
            return Optional.empty();
        }
        OptionalDouble temperatureK = result.spectrum().stream()
                .filter(row -> row.form() == SpectrumRow.Form.DISCRETE)
                .mapToDouble(SpectrumRow::referenceTemperatureK)
                .filter(kelvin -> Math.abs(kelvin - curve.temperatureK().getAsDouble()) <= SAME_TEMPERATURE_K)
                .findFirst();
        if (temperatureK.isEmpty()) {
            return Optional.empty();
        }
        List<SpectrumRow> relaxation = modes(SpectrumRow.Kind.RELAXATION, temperatureK.getAsDouble());
        List<SpectrumRow> retardation = modes(SpectrumRow.Kind.RETARDATION, temperatureK.getAsDouble());
        if (relaxation.size() > retardation.size()) {
            // a liquid: its relaxation modes are all there is
            return Optional.of(
                    RelaxationModes.of(0, times(relaxation), values(relaxation)).retardation());
        }
        return result.markers().stream()
                .filter(marker -> marker.property().equals("instantaneous_compliance")
                        && marker.temperatureK().equals(temperatureK))
                .findFirst()
                .map(marker -> RetardationModes.of(marker.value(), 0, times(retardation), values(retardation)));
    }

    private List<SpectrumRow> modes(SpectrumRow.Kind kind, double temperatureK) {
        return result.spectrum().stream()
                .filter(row -> row.form() == SpectrumRow.Form.DISCRETE
                        && row.kind() == kind
                        && row.referenceTemperatureK() == temperatureK)
                .toList();
    }

    private static double[] times(List<SpectrumRow> rows) {
        return rows.stream().mapToDouble(SpectrumRow::timeS).toArray();
    }

    private static double[] values(List<SpectrumRow> rows) {
        return rows.stream().mapToDouble(SpectrumRow::value).toArray();
    }

    private String stepName(CreepCurve curve, int step) {
        long alike = curve.steps().stream()
                .filter(other -> other.part() == curve.steps().get(step).part())
                .count();
        return String.format(
                Locale.ROOT,
                "%s, %s%s",
                name(curve),
                curve.steps().get(step).part().word(),
                alike > 1 ? " of step " + (step + 1) : "");
    }

    /** Specimen and temperature; sweep and point where these are not enough to tell curves apart. */
    private String name(CreepCurve curve) {
        String name = shortName(curve);
        boolean alone =
                curves.stream().filter(other -> shortName(other).equals(name)).count() == 1;
        return alone ? name : name + " " + curve.key().point();
    }

    private static String shortName(CreepCurve curve) {
        StringBuilder name = new StringBuilder("specimen " + curve.key().specimen());
        if (!curve.key().sweep().equals("1")) {
            name.append(" sweep ").append(curve.key().sweep());
        }
        curve.temperatureK().ifPresent(kelvin -> name.append(", ").append(Written.celsius(kelvin)));
        return name.toString();
    }
}
