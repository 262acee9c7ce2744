package nightlag.pipeline.report;

import java.util.ArrayList;
import java.util.List;
import nightlag.stages.LotResult;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.superposition.MasterPoint;
import nightlag.stages.sweep.Isotherm;
import nightlag.stages.sweep.LocalRelation;
import nightlag.stages.sweep.Sweep;
import nightlag.stages.sweep.SweepPlan;

/** The loss modulus beside what the slope of the storage modulus says it should be about. */
final class LocalRelationChart {
    private final List<Series> series = new ArrayList<>();
    private final String symbol;
    private int look;

    private LocalRelationChart(String symbol) {
        this.symbol = symbol;
    }

    /** Of the master curve where there is one, else of each frequency sweep; empty where neither has five frequencies. */
    static Chart of(LotResult result) {
        String symbol = result.points().isEmpty()
                ? "G"
                : SweepCharts.symbol(result.points().get(0));
        LocalRelationChart chart = new LocalRelationChart(symbol);
        boolean reduced = !result.masterCurve().isEmpty();
        if (reduced) {
            chart.add(
                    "master curve",
                    result.masterCurve().stream().map(MasterPoint::reduced).toList());
        } else {
            for (Sweep sweep : result.sweeps()) {
                if (sweep.kind() == SweepPlan.Kind.FREQUENCY) {
                    double kelvin = sweep.temperatureK().orElse(Double.NaN);
                    chart.add(SweepCharts.name(sweep), new Isotherm(kelvin, sweep.points()).readings());
                }
            }
        }
        return new Chart(
                "Loss modulus and slope of the storage modulus",
                "Points: the loss modulus as measured. Line: (π/2) d" + symbol
                        + "'/d ln ω from a smooth curve of the storage"
                        + " modulus, which comes near the loss modulus where the spectrum is broad (Booij and Thoone 1982)."
                        + " It falls below the points where a liquid flows or a single time prevails, whatever the instrument did;"
                        + " apart from that, points that leave the line by a step or a slope of their own are worth a second look.",
                Axis.log(reduced ? "reduced angular frequency" : "angular frequency", "rad/s"),
                Axis.log(reduced ? "reduced modulus" : "modulus", "Pa"),
                chart.series);
    }

    private void add(String name, List<ModulusReading> readings) {
        List<LocalRelation.Place> line = LocalRelation.of(readings);
        if (line.isEmpty()) {
            return;
        }
        series.add(Series.of(
                symbol + "'' " + name,
                look,
                false,
                false,
                readings,
                ModulusReading::angularFrequency,
                reading -> reading.moduli().lossPa()));
        series.add(Series.of(
                "(π/2) d" + symbol + "'/d ln ω " + name,
                look,
                false,
                true,
                line,
                LocalRelation.Place::angularFrequency,
                LocalRelation.Place::lossPa));
        look++;
    }
}
