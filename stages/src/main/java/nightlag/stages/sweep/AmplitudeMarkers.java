package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.OptionalDouble;
import java.util.stream.IntStream;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReasonCode;
import nightlag.stages.moduli.Findings;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.numeric.SmoothCurve;
import nightlag.stages.numeric.SmoothCurve.Estimate;
import nightlag.stages.sweep.LogModuli.Figure;
import nightlag.stages.sweep.Zeros.Zero;

/**
 * The characteristic figures of an amplitude sweep: where |G*| has left the mean of its first decade of strain by 5 %, and
 * where storage and loss modulus are equal. Read off smooth curves of logarithms over ln γ. Over strain and not over stress,
 * which may stand still or fall once a specimen yields.
 */
final class AmplitudeMarkers {
    private static final int FEWEST = 4;
    private static final double LEAVES = 0.05;
    private static final double DECADE = Math.log(10);
    /** Moduli known better count alike in the mean, relative u². */
    private static final double ALIKE = 1e-4;

    private final MarkerPlace place;
    private final OptionalDouble frequencyHz;
    private final LogModuli data;
    private final List<Marker> markers = new ArrayList<>();
    private final List<Reason> notes = new ArrayList<>();

    private AmplitudeMarkers(Sweep sweep, LogModuli data) {
        this.place = MarkerPlace.of(sweep);
        this.frequencyHz = sweep.frequencyHz();
        this.data = data;
    }

    /**
     * Looks for {@code linear_strain_limit} (1), and {@code crossover_stress} (Pa) and {@code crossover_strain} (1), a row each
     * for every crossing.
     *
     * @param sweep an amplitude sweep
     */
    static Findings of(Sweep sweep) {
        List<ModulusPoint> positive = sweep.points().stream()
                .filter(point -> LogModuli.standOut(point.moduli().orElseThrow()))
                .toList();
        LogModuli data = LogModuli.overStrain(
                positive.stream().mapToDouble(AmplitudeSweeps::strain).toArray(),
                positive.stream().map(point -> point.moduli().orElseThrow()).toList());
        AmplitudeMarkers markers = new AmplitudeMarkers(sweep, data);
        int lost = sweep.points().size() - positive.size();
        if (lost > 0) {
            markers.note(MarkerReason.MARKER_MODULI_HIDDEN, lost);
        }
        if (data.size() < FEWEST) {
            markers.note(MarkerReason.MARKER_TOO_FEW_STRAINS, data.size(), FEWEST);
        } else {
            markers.linearLimit();
            markers.crossings();
        }
        return new Findings(markers.markers, markers.notes);
    }

    private void note(ReasonCode reason, Object... parts) {
        Object[] all = new Object[parts.length + 1];
        all[0] = place.words();
        System.arraycopy(parts, 0, all, 1, parts.length);
        notes.add(reason.with(all));
    }

    private double smallest() {
        return Math.exp(data.places()[0]);
    }

    private double largest() {
        return Math.exp(data.places()[data.size() - 1]);
    }

    private void linearLimit() {
        double[] logs = data.places();
        // rounding of decimal strains must not lose a decade's last point
        double end = logs[0] + DECADE + 1e-9;
        if (logs[logs.length - 1] < logs[0] + DECADE - 1e-9) {
            note(MarkerReason.MARKER_LESS_THAN_A_DECADE, smallest(), largest());
            return;
        }
        int first = (int) Arrays.stream(logs).filter(log -> log <= end).count();
        SmoothCurve curve = data.curve(Figure.MAGNITUDE);
        FirstDecade mean = new FirstDecade(data, curve, first);
        Zeros below = Zeros.of(mean.less(Math.log(1 - LEAVES)), logs);
        Zeros above = Zeros.of(mean.less(Math.log(1 + LEAVES)), logs);
        List<Zero> leaving = new ArrayList<>();
        below.zeros().stream().filter(zero -> !zero.rising()).findFirst().ifPresent(leaving::add);
        above.zeros().stream().filter(Zero::rising).findFirst().ifPresent(leaving::add);
        if (Math.abs(mean.less(0).at(logs[0]).value()) > LEAVES) {
            note(MarkerReason.MARKER_LIMIT_BELOW, smallest());
        } else if (!below.startsClear() || !above.startsClear()) {
            note(MarkerReason.MARKER_LIMIT_UNCLEAR);
        } else if (leaving.isEmpty()) {
            if (below.endsClear() && above.endsClear()) {
                note(MarkerReason.MARKER_LIMIT_NOT_REACHED, largest());
            } else {
                note(MarkerReason.MARKER_LIMIT_UNCLEAR);
            }
        } else {
            Zero zero = leaving.stream()
                    .reduce((one, other) -> one.place() < other.place() ? one : other)
                    .orElseThrow();
            double strain = Math.exp(zero.place());
            markers.add(place.marker(
                    "linear_strain_limit",
                    frequencyHz,
                    strain,
                    OptionalDouble.of(strain * zero.u()),
                    "1",
                    "|G*| 5 % " + (zero.rising() ? "above" : "below")
                            + " the mean of its first decade of strain, by a smooth curve of ln |G*| over ln γ"));
        }
    }

    /** The mean |G*| of the first decade of strain, and what its noise shares with the curve's. */
    private static final class FirstDecade {
        private final SmoothCurve curve;
        private final double logMean;
        private final double variance;
        /** Of ln mean with each value of ln |G*|. */
        private final double[] covariance;

        FirstDecade(LogModuli data, SmoothCurve curve, int points) {
            this.curve = curve;
            double[] logs = data.values(Figure.MAGNITUDE);
            double[] noise = data.variances(Figure.MAGNITUDE);
            double[] weights = IntStream.range(0, points)
                    .mapToDouble(i -> 1 / (ALIKE + noise[i] * curve.widening()))
                    .toArray();
            double sum = Arrays.stream(weights).sum();
            double relative = 0;
            for (int i = 0; i < points; i++) {
                relative += weights[i] / sum * Math.exp(logs[i] - logs[0]);
            }
            logMean = logs[0] + Math.log(relative);
            covariance = new double[logs.length];
            double own = 0;
            for (int i = 0; i < points; i++) {
                double share = weights[i] / sum * Math.exp(logs[i] - logMean);
                covariance[i] = share * noise[i] * curve.widening();
                own += share * covariance[i];
            }
            variance = own;
        }

        /** ln |G*| less ln mean less an offset. */
        Zeros.Figure less(double offset) {
            return strain -> {
                Estimate own = curve.estimate(strain, 0);
                double[] weights = curve.weights(strain, 0);
                double shared = 0;
                for (int i = 0; i < weights.length; i++) {
                    shared += weights[i] * covariance[i];
                }
                return new Estimate(
                        own.value() - logMean - offset,
                        Math.sqrt(Math.max(own.u() * own.u() + variance - 2 * shared, 0)));
            };
        }
    }

    private void crossings() {
        SmoothCurve lossFactor = data.curve(Figure.LOSS_FACTOR);
        Zeros zeros = Zeros.of(at -> lossFactor.estimate(at, 0), data.places());
        SmoothCurve magnitude = data.curve(Figure.MAGNITUDE);
        for (Zero zero : zeros.zeros()) {
            double strain = Math.exp(zero.place());
            double stress = strain * Math.exp(magnitude.derivative(zero.place(), 0));
            double u = Crossing.u(data, lossFactor, Figure.MAGNITUDE, magnitude, zero, 1);
            markers.add(place.marker(
                    "crossover_strain",
                    frequencyHz,
                    strain,
                    OptionalDouble.of(strain * zero.u()),
                    "1",
                    "tan δ = 1, by a smooth curve of ln tan δ over ln γ"));
            markers.add(place.marker(
                    "crossover_stress",
                    frequencyHz,
                    stress,
                    OptionalDouble.of(stress * u),
                    "Pa",
                    "stress amplitude at tan δ = 1, by smooth curves of ln |G*| and ln tan δ over ln γ"));
        }
        if (zeros.zeros().isEmpty()) {
            boolean apart = zeros.startsClear() && zeros.endsClear();
            if (zeros.positive() == zeros.negative() || !apart) {
                note(MarkerReason.MARKER_STRAIN_CROSSOVER_UNCLEAR, smallest(), largest());
            } else {
                note(
                        MarkerReason.MARKER_NO_STRAIN_CROSSOVER,
                        FrequencyMarkers.larger(zeros.positive()),
                        smallest(),
                        largest());
            }
        }
    }
}
