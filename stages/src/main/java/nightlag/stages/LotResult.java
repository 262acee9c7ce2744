package nightlag.stages;

import java.util.List;
import nightlag.stages.acceptance.Judgement;
import nightlag.stages.acceptance.Trend;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.FigureRow;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.response.ResponseRow;
import nightlag.stages.spectrum.RelativeMode;
import nightlag.stages.spectrum.SpectrumRow;
import nightlag.stages.superposition.MasterPoint;
import nightlag.stages.superposition.ShiftFactor;
import nightlag.stages.sweep.Sweep;

/**
 * What the points of one lot became. Lists are in the order of the tables.
 *
 * @param points points as published
 * @param markers characteristic figures
 * @param shiftFactors how far each isotherm is moved onto the master curve
 * @param masterCurve the points moved to the reference temperature
 * @param spectrum spectra
 * @param notes what was asked for and could not be had, what is unusual, and what puts figures in doubt, and why
 * @param absent characteristic figures that the data do not support, and why; most materials lack some
 * @param derived the grade's own figures of each point
 * @param sweeps the sweeps its points were assembled to
 * @param responses predictions, in the order of the configuration
 * @param prony the relaxation modes as parts of the instantaneous modulus
 * @param creep creep curves
 * @param acceptance the lot against each limit of its grade, in the order of the configuration
 * @param trend the lot among the grade's earlier ones, likewise; it takes more than this lot to know
 */
public record LotResult(
        List<ModulusPoint> points,
        List<Marker> markers,
        List<ShiftFactor> shiftFactors,
        List<MasterPoint> masterCurve,
        List<SpectrumRow> spectrum,
        List<Reason> notes,
        List<Reason> absent,
        List<FigureRow> derived,
        List<Sweep> sweeps,
        List<ResponseRow> responses,
        List<RelativeMode> prony,
        List<CreepCurve> creep,
        List<Judgement> acceptance,
        List<Trend> trend) {
    /** Nothing is known of the lot, not even a point. */
    public static final LotResult EMPTY = builder().build();

    /** Copies the lists. */
    public LotResult {
        points = List.copyOf(points);
        markers = List.copyOf(markers);
        shiftFactors = List.copyOf(shiftFactors);
        masterCurve = List.copyOf(masterCurve);
        spectrum = List.copyOf(spectrum);
        notes = List.copyOf(notes);
        absent = List.copyOf(absent);
        derived = List.copyOf(derived);
        sweeps = List.copyOf(sweeps);
        responses = List.copyOf(responses);
        prony = List.copyOf(prony);
        creep = List.copyOf(creep);
        acceptance = List.copyOf(acceptance);
        trend = List.copyOf(trend);
    }

    /** Those of the notes that put published figures in doubt. */
    public List<Reason> doubts() {
        return LotNotes.of(notes).doubts();
    }

    /** Those of the notes that say what was asked for and could not be had. */
    public List<Reason> unattained() {
        return LotNotes.of(notes).unattained();
    }

    /** Those of the notes that say how something was had, where that may not be what was expected. */
    public List<Reason> remarks() {
        return LotNotes.of(notes).remarks();
    }

    /** The same lot among these earlier ones. */
    public LotResult withTrend(List<Trend> found) {
        return new LotResult(
                points,
                markers,
                shiftFactors,
                masterCurve,
                spectrum,
                notes,
                absent,
                derived,
                sweeps,
                responses,
                prony,
                creep,
                acceptance,
                found);
    }

    /** A result that has what is set on it, and empty lists for all else. */
    public static Builder builder() {
        return new Builder();
    }

    /** Sets one list after the other; the meaning of each is that of the component of its name. */
    public static final class Builder {
        private List<ModulusPoint> points = List.of();
        private List<Marker> markers = List.of();
        private List<ShiftFactor> shiftFactors = List.of();
        private List<MasterPoint> masterCurve = List.of();
        private List<SpectrumRow> spectrum = List.of();
        private List<Reason> notes = List.of();
        private List<Reason> absent = List.of();
        private List<FigureRow> derived = List.of();
        private List<Sweep> sweeps = List.of();
        private List<ResponseRow> responses = List.of();
        private List<RelativeMode> prony = List.of();
        private List<CreepCurve> creep = List.of();
        private List<Judgement> acceptance = List.of();
        private List<Trend> trend = List.of();

        private Builder() {}

        public Builder points(List<ModulusPoint> given) {
            this.points = given;
            return this;
        }

        public Builder markers(List<Marker> given) {
            this.markers = given;
            return this;
        }

        public Builder shiftFactors(List<ShiftFactor> given) {
            this.shiftFactors = given;
            return this;
        }

        public Builder masterCurve(List<MasterPoint> given) {
            this.masterCurve = given;
            return this;
        }

        public Builder spectrum(List<SpectrumRow> given) {
            this.spectrum = given;
            return this;
        }

        public Builder notes(List<Reason> given) {
            this.notes = given;
            return this;
        }

        public Builder absent(List<Reason> given) {
            this.absent = given;
            return this;
        }

        public Builder derived(List<FigureRow> given) {
            this.derived = given;
            return this;
        }

        public Builder sweeps(List<Sweep> given) {
            this.sweeps = given;
            return this;
        }

        public Builder responses(List<ResponseRow> given) {
            this.responses = given;
            return this;
        }

        public Builder prony(List<RelativeMode> given) {
            this.prony = given;
            return this;
        }

        public Builder creep(List<CreepCurve> given) {
            this.creep = given;
            return this;
        }

        public Builder acceptance(List<Judgement> given) {
            this.acceptance = given;
            return this;
        }

        public Builder trend(List<Trend> given) {
            this.trend = given;
            return this;
        }

        public LotResult build() {
            return new LotResult(
                    points,
                    markers,
                    shiftFactors,
                    masterCurve,
                    spectrum,
                    notes,
                    absent,
                    derived,
                    sweeps,
                    responses,
                    prony,
                    creep,
                    acceptance,
                    trend);
        }
    }
}
