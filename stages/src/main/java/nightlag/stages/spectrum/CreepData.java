package nightlag.stages.spectrum;

import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.PivotedCholesky;

/**
 * What a spectrum of creep is fitted to: creep curves brought to one temperature, and moduli at that temperature.
 *
 * <p>All readings of one temperature err together by the error of its shift. These errors are numbers of the fit: each of a few
 * independent directions of their covariance has a move, in standard uncertainties, that is known to be 0 within 1.
 */
public final class CreepData {
    /** Variance of ln a or ln b that is nothing against that of a reading. */
    private static final double LEAST_VARIANCE = 1e-12;

    private static final double LN_10 = Math.log(10);

    private final List<ShiftedCreep> creep;
    private final List<double[]> directions;
    private final List<ModulusReading> moduli;
    private final boolean moduliWithoutU;

    private CreepData(
            List<ShiftedCreep> creep, List<double[]> directions, List<ModulusReading> moduli, boolean moduliWithoutU) {
        this.creep = List.copyOf(creep);
        this.directions = List.copyOf(directions);
        this.moduli = List.copyOf(moduli);
        this.moduliWithoutU = moduliWithoutU;
    }

    /**
     * Creep alone.
     *
     * @param creep curves, those of one temperature together; at least one
     * @param shiftCovariance covariance of ln a of each temperature, then ln b of each; n temperatures make it 2n × 2n
     */
    public static CreepData of(List<ShiftedCreep> creep, double[][] shiftCovariance) {
        if (shiftCovariance.length != 2 * creep.size()) {
            throw new IllegalArgumentException(
                    "a covariance of " + shiftCovariance.length + " numbers for " + creep.size() + " temperatures");
        }
        return new CreepData(creep, PivotedCholesky.directions(shiftCovariance, LEAST_VARIANCE), List.of(), false);
    }

    /** Creep measured at the temperature of the spectrum. */
    public static CreepData of(ShiftedCreep creep) {
        return of(List.of(creep), new double[2][2]);
    }

    /**
     * The same creep beside moduli at the temperature of the spectrum.
     *
     * @param readings moduli; where any comes without u, all take their scatter about {@code fitted} as u
     * @param fitted what was fitted to these moduli, as many modes as they carry; empty where nothing could be
     * @throws ReductionFault if there is no u to be had
     */
    public CreepData with(List<ModulusReading> readings, Optional<DiscreteSpectrum> fitted) throws ReductionFault {
        List<ModulusReading> there = readings.stream()
                .filter(reading -> reading.moduli().magnitudePa() > 0)
                .toList();
        if (WeightedReadings.haveCovariances(there)) {
            return new CreepData(creep, directions, there, false);
        }
        if (fitted.isEmpty() || fitted.get().scatter().isEmpty()) {
            throw new ReductionFault(SpectrumReason.CREEP_MODULI_WITHOUT_U.with());
        }
        return new CreepData(creep, directions, WeighedModuli.of(there, fitted.get()), true);
    }

    /** How many moves there are. */
    int moves() {
        return directions.size();
    }

    /** The curves of each temperature after these moves. */
    List<ShiftedCreep> creepAt(double[] moves) {
        return IntStream.range(0, creep.size())
                .mapToObj(k -> creep.get(k).moved(change(k, moves), change(creep.size() + k, moves)))
                .toList();
    }

    private double change(int place, double[] moves) {
        double sum = 0;
        for (int m = 0; m < moves.length; m++) {
            sum += directions.get(m)[place] * moves[m];
        }
        return sum;
    }

    /** Change of ln a of a temperature by one move. */
    double lnAByMove(int temperature, int move) {
        return directions.get(move)[temperature];
    }

    /** Change of ln b of a temperature by one move. */
    double lnBByMove(int temperature, int move) {
        return directions.get(move)[creep.size() + temperature];
    }

    /**
     * How far a fit found the horizontal shift of a temperature off.
     *
     * @param decades by how many decades
     * @param u what that was known to before
     */
    record Off(double decades, double u) {}

    /** The shift that these moves take furthest in terms of its own uncertainty. */
    Optional<Off> furthestOff(double[] moves) {
        return IntStream.range(0, creep.size())
                .mapToObj(k -> new Off(change(k, moves) / LN_10, u(k) / LN_10))
                .filter(off -> off.u() > 0)
                .max(Comparator.comparingDouble(off -> Math.abs(off.decades()) / off.u()));
    }

    private double u(int place) {
        return Math.sqrt(directions.stream()
                .mapToDouble(direction -> direction[place] * direction[place])
                .sum());
    }

    /** All readings after these moves. */
    ComplianceReadings at(double[] moves) {
        return ComplianceReadings.of(creepAt(moves), moduli);
    }

    /** Where a spectrum comes from, in words. */
    String words() {
        String ofCreep = creep.size() > 1 ? "creep at " + creep.size() + " temperatures" : "creep";
        if (moduli.isEmpty()) {
            return ofCreep;
        }
        return ofCreep + " and oscillation together" + (moduliWithoutU ? ", the moduli's u from their scatter" : "");
    }
}
