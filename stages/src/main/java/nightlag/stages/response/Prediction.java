package nightlag.stages.response;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import java.util.stream.DoubleStream;
import java.util.stream.IntStream;
import nightlag.stages.fault.Reason;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.response.Programme.Instant;
import nightlag.stages.response.Programme.Segment;
import nightlag.stages.response.ResponsePlan.Controlled;
import nightlag.stages.response.ResponsePlan.Step;
import nightlag.stages.response.ResponseRow.StrainParts;
import nightlag.stages.spectrum.FittedSpectrum;
import nightlag.stages.spectrum.RelaxationModes;

/** What a material with a fitted spectrum does under one programme. */
public final class Prediction {
    /** Half width of a 95 % band in standard uncertainties. */
    private static final double COVERAGE = 1.959963984540054;

    /** Step in log10 a for a derivative. */
    private static final double STEP = 1e-4;

    /** Instants begin at this part of the fastest time. */
    private static final double FIRST_PART = 0.1;

    private final ResponsePlan plan;
    private final FittedSpectrum spectrum;
    private final TemperatureShift shift;
    private final Programme programme;

    private Prediction(ResponsePlan plan, FittedSpectrum spectrum, TemperatureShift shift) {
        this.plan = plan;
        this.spectrum = spectrum;
        this.shift = shift;
        double fastest = Arrays.stream(spectrum.relaxation().timesS())
                .limit(1)
                .reduce(spectrum.window().shortestS(), Math::min);
        double smallestShift = temperatures(plan, shift)
                .map(temperature -> Math.pow(10, shift.log10A(temperature)))
                .min()
                .orElse(1);
        programme = Programme.of(plan, shift.referenceK(), FIRST_PART * fastest * smallestShift);
    }

    /**
     * Predicts, with a 95 % band from the covariance of the fitted modes, from modes the data do not show, and from the
     * uncertainty of the shift factors. Thermal strain and the vertical shift b_T are not in it.
     *
     * @param shift how times move with temperature; its reference is the temperature of the spectrum
     * @return in the order of time
     * @throws ReductionFault if a temperature has no shift
     */
    public static List<ResponseRow> of(ResponsePlan plan, FittedSpectrum spectrum, TemperatureShift shift)
            throws ReductionFault {
        Optional<Reason> refusal = refusal(plan, shift);
        if (refusal.isPresent()) {
            throw new ReductionFault(refusal.get());
        }
        return new Prediction(plan, spectrum, shift).rows();
    }

    /** Why a shift does not lead to all temperatures of a programme; empty where it does. */
    public static Optional<Reason> refusal(ResponsePlan plan, TemperatureShift shift) {
        return temperatures(plan, shift)
                .boxed()
                .map(temperature -> shift.refusal(plan.name(), temperature))
                .flatMap(Optional::stream)
                .findFirst();
    }

    /** Whether all temperatures of a programme are among those a shift was measured at. */
    public static boolean isWithin(ResponsePlan plan, TemperatureShift shift) {
        return temperatures(plan, shift).allMatch(shift::isWithin);
    }

    private static DoubleStream temperatures(ResponsePlan plan, TemperatureShift shift) {
        return plan.temperaturesK().isEmpty()
                ? DoubleStream.of(shift.referenceK())
                : plan.temperaturesK().stream().mapToDouble(Step::value);
    }

    private List<ResponseRow> rows() {
        BoltzmannSum sum = sum(0, 0);
        boolean strainPredicted = plan.controlled() == Controlled.STRESS;
        Optional<List<StrainParts>> parts =
                strainPredicted ? Optional.of(sum.strains(spectrum.retardation())) : Optional.empty();
        double[] predicted = parts.map(
                        all -> all.stream().mapToDouble(StrainParts::sum).toArray())
                .orElseGet(() -> sum.stresses(spectrum.relaxation()));
        BandScale scale = BandScale.of(programme, plan.controlled(), predicted);
        Optional<double[]> u = uncertainty(scale);
        List<ResponseRow> rows = new ArrayList<>();
        for (int i = 0; i < predicted.length; i++) {
            Instant instant = programme.instants().get(i);
            Segment segment = programme.segments().get(Math.max(0, instant.segment()));
            double held = instant.segment() < 0 ? 0 : segment.value();
            int row = i;
            rows.add(new ResponseRow(
                    plan.name(),
                    plan.controlled(),
                    segment.temperatureK(),
                    instant.timeS(),
                    strainPredicted ? held : predicted[i],
                    strainPredicted ? predicted[i] : held,
                    isInside(instant, sum),
                    u.map(all -> scale.band(predicted[row], COVERAGE * all[row])),
                    parts.map(all -> all.get(row))));
        }
        return rows;
    }

    private boolean isInside(Instant instant, BoltzmannSum sum) {
        return Arrays.stream(sum.sinceSteps(instant))
                        .allMatch(since -> plan.controlled() == Controlled.STRESS
                                ? spectrum.supportsCreep(since)
                                : spectrum.supportsRelaxation(since))
                && IntStream.rangeClosed(0, Math.max(0, instant.segment()))
                        .allMatch(
                                s -> shift.isWithin(programme.segments().get(s).temperatureK()));
    }

    /** Standard uncertainty of what is predicted at each instant, on the scale of its band. */
    private Optional<double[]> uncertainty(BandScale scale) {
        BoltzmannSum sum = sum(0, 0);
        Function<RelaxationModes, double[]> figures = modes -> scale.of(predicted(sum, modes));
        return spectrum.uncertainties(figures).map(ofSpectrum -> {
            double[] temperatures = programme.segments().stream()
                    .mapToDouble(Segment::temperatureK)
                    .distinct()
                    .toArray();
            double[][] slopes = Arrays.stream(temperatures)
                    .mapToObj(temperature -> byLogShift(temperature, scale))
                    .toArray(double[][]::new);
            double[] u = new double[ofSpectrum.length];
            for (int i = 0; i < u.length; i++) {
                double variance = ofSpectrum[i] * ofSpectrum[i];
                for (int k = 0; k < temperatures.length; k++) {
                    for (int m = 0; m < temperatures.length; m++) {
                        variance += slopes[k][i] * slopes[m][i] * shift.covariance(temperatures[k], temperatures[m]);
                    }
                }
                u[i] = Math.sqrt(Math.max(0, variance));
            }
            return u;
        });
    }

    private double[] predicted(BoltzmannSum sum, RelaxationModes modes) {
        return plan.controlled() == Controlled.STRESS
                ? sum.strains(modes.retardation()).stream()
                        .mapToDouble(StrainParts::sum)
                        .toArray()
                : sum.stresses(modes);
    }

    /** Derivative of what is predicted, on the scale of its band, by log10 a at one temperature in K. */
    private double[] byLogShift(double temperatureK, BandScale scale) {
        double[] above = scale.of(predicted(sum(temperatureK, STEP), spectrum.relaxation()));
        double[] below = scale.of(predicted(sum(temperatureK, -STEP), spectrum.relaxation()));
        return IntStream.range(0, above.length)
                .mapToDouble(i -> (above[i] - below[i]) / (2 * STEP))
                .toArray();
    }

    /** The programme in reduced time, log10 a at one temperature moved. */
    private BoltzmannSum sum(double movedK, double move) {
        return new BoltzmannSum(
                programme,
                programme.segments().stream()
                        .mapToDouble(Segment::temperatureK)
                        .map(temperature ->
                                Math.pow(10, -shift.log10A(temperature) - (temperature == movedK ? move : 0)))
                        .toArray());
    }
}
