package nightlag.stages.spectrum;

import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import java.util.stream.IntStream;
import nightlag.stages.fault.Reason;
import nightlag.stages.moduli.Marker;

/**
 * Two discrete sets of modes that are each other's exact inverse, whatever they were fitted to: what is published of a lot, and
 * what predictions are drawn from.
 */
public sealed interface FittedSpectrum permits DiscreteSpectrum, CreepSpectrum {
    /** The relaxation modes. */
    RelaxationModes relaxation();

    /** The retardation modes. */
    RetardationModes retardation();

    /** From the shortest to the longest time that the data support. */
    SupportedWindow window();

    /** Whether the data support J at a time in s; between creep and oscillation that do not meet there is a gap. */
    boolean supportsCreep(double timeS);

    /** Whether they support G there; soon after the first reading of a creep curve it still hangs on the creep before. */
    boolean supportsRelaxation(double timeS);

    /**
     * Standard uncertainty of each of several figures drawn from the modes, by the fit's covariance and by modes that the data do
     * not show; empty where there is none to be had.
     */
    Optional<double[]> uncertainties(Function<RelaxationModes, double[]> figures);

    /**
     * The figures that complete the two sets, and those that follow.
     *
     * @param temperatureK temperature they hold at, K
     */
    List<Marker> markers(double temperatureK);

    /** Which of these figures the data do not carry, and what else is unusual. */
    List<Reason> notes();

    /** The relaxation modes as parts of the instantaneous modulus Ge + Σ g, times rising. */
    default List<RelativeMode> relativeModes(double temperatureK) {
        double whole = relaxation().instantaneousModulusPa();
        double[] strengths = relaxation().strengthsPa();
        double[] times = relaxation().timesS();
        return IntStream.range(0, times.length)
                .mapToObj(i -> new RelativeMode(temperatureK, i + 1, strengths[i] / whole, times[i]))
                .toList();
    }

    /** Both sets as rows, relaxation first, times rising. */
    default List<SpectrumRow> rows(double temperatureK) {
        return SpectrumRow.discrete(temperatureK, relaxation(), retardation());
    }
}
