package nightlag.stages;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.Random;
import java.util.stream.Stream;
import nightlag.stages.fault.ReductionFault;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.SharedErrors;
import nightlag.stages.numeric.Complex;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.superposition.MasterCurve;
import nightlag.stages.superposition.ModelMaterial;
import nightlag.stages.superposition.Superposition;
import nightlag.stages.superposition.SuperpositionPlan;
import nightlag.stages.superposition.SuperpositionPlan.ShiftLaw;
import nightlag.stages.superposition.SuperpositionPlan.VerticalShift;
import nightlag.stages.sweep.SweepPlan;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * How often the 95 % intervals of figures drawn from a master curve hold the truth: nine isotherms of three decades, ten points
 * a decade, 1 % noise on either modulus, the reference at the coldest, so that what is not known of the shifts is in all that
 * the hotter ones show.
 */
@Tag("study")
class MasterCurveStudyTest {
    private static final int DRAWS = Study.draws(8, 400);
    /** The hottest shows the terminal zone, and all bend enough to fix both shifts. */
    private static final double[] TEMPERATURES_K = {
        423.15, 433.15, 443.15, 453.15, 463.15, 473.15, 483.15, 493.15, 503.15
    };

    private static final double STANDARD_ERRORS = 3;

    /** Two groups of modes with a plateau between them, invented. */
    private static final ModelMaterial PLATEAU = new ModelMaterial(
            "melt with a plateau",
            (w, second) ->
                    ModelMaterial.maxwell(w, new double[] {1e-5, 1e-4, 10, 30}, new double[] {1e7, 3e6, 2e5, 1e5}));

    /** |η*| = η0/(1 + (λω)^m), to which the law of Carreau and Yasuda is equal with a = m and n = 1 − m; invented. */
    private static final double VISCOSITY = 1e5;

    private static final double TIME = 2;
    private static final double EXPONENT = 0.7;
    private static final ModelMaterial CROSS = new ModelMaterial("liquid after Cross", (w, second) -> cross(w));

    /** The phase angle goes with the slope of ln |G*|, as it does nearly in any material (Booij &amp; Thoone 1982). */
    private static Complex cross(double frequency) {
        double power = Math.pow(TIME * frequency, EXPONENT);
        double slope = 1 - EXPONENT * power / (1 + power);
        return Complex.polar(VISCOSITY * frequency / (1 + power), slope * Math.PI / 2);
    }

    private record Condition(ModelMaterial material, VerticalShift vertical, double lnBPerK) {
        @Override
        public String toString() {
            return material.name() + ", " + vertical;
        }

        private double lnB(double temperatureK) {
            return lnBPerK * (temperatureK - ModelMaterial.REFERENCE_K);
        }

        /** Figures at the reference temperature. */
        private Map<String, Double> truth(double referenceK) {
            double a = Math.pow(10, ModelMaterial.log10A(referenceK));
            double b = Math.exp(lnB(referenceK));
            Map<String, Double> truth = new LinkedHashMap<>();
            if (material.equals(CROSS)) {
                truth.put("cross_zero_rate_viscosity", VISCOSITY * a / b);
                truth.put("cross_time", TIME * a);
                truth.put("cross_exponent", EXPONENT);
                truth.put("carreau_yasuda_zero_rate_viscosity", VISCOSITY * a / b);
                truth.put("carreau_yasuda_time", TIME * a);
                truth.put("carreau_yasuda_width", EXPONENT);
                truth.put("carreau_yasuda_exponent", 1 - EXPONENT);
                return truth;
            }
            if (material.equals(PLATEAU)) {
                truth.put("plateau_modulus", at(lowestLossFactor()).re() / b);
                return truth;
            }
            double viscosity = at(1e-9).im() / 1e-9;
            double elasticity = at(1e-9).re() / 1e-18;
            double crossing = crossing();
            truth.put("zero_shear_viscosity", viscosity * a / b);
            truth.put("steady_state_compliance", elasticity / (viscosity * viscosity) * b);
            truth.put("mean_relaxation_time", elasticity / viscosity * a);
            truth.put("crossover_angular_frequency", crossing / a);
            truth.put("crossover_modulus", at(crossing).abs() / Math.sqrt(2) / b);
            return truth;
        }

        private Complex at(double frequency) {
            return material.modulus().at(frequency, frequency);
        }

        private double crossing() {
            double low = 1e-3;
            double high = 1e4;
            for (int i = 0; i < 100; i++) {
                double middle = Math.sqrt(low * high);
                if (at(middle).re() < at(middle).im()) {
                    low = middle;
                } else {
                    high = middle;
                }
            }
            return low;
        }

        private double lowestLossFactor() {
            double best = 1;
            for (double x = -1; x < 4; x += 1e-4) {
                double frequency = Math.pow(10, x);
                best = lossFactor(frequency) < lossFactor(best) ? frequency : best;
            }
            return best;
        }

        private double lossFactor(double frequency) {
            return at(frequency).im() / at(frequency).re();
        }
    }

    static List<Condition> conditions() {
        return Stream.of(ModelMaterial.LAUN, PLATEAU, CROSS)
                .flatMap(material -> Stream.of(
                        new Condition(material, VerticalShift.NONE, 0),
                        new Condition(material, VerticalShift.FITTED, 0.003)))
                .toList();
    }

    /** Bounds: 90 to 98 % of intervals hold the truth. */
    @ParameterizedTest(name = "{0}")
    @MethodSource("conditions")
    void intervalsHoldTheTruth(Condition condition) throws ReductionFault {
        double referenceK = TEMPERATURES_K[0];
        SuperpositionPlan plan =
                new SuperpositionPlan(referenceK, condition.vertical(), OptionalDouble.empty(), ShiftLaw.AUTO, 0.003);
        Map<String, Double> truth = condition.truth(referenceK);
        Map<String, Tally> tallies = new LinkedHashMap<>();
        truth.keySet().forEach(property -> tallies.put(property, new Tally()));
        for (long seed = 0; seed < DRAWS; seed++) {
            MasterCurve master = Superposition.of(
                    condition.material().isotherms(TEMPERATURES_K, 10, 0.01, 0.01, 1, condition::lnB, new Random(seed)),
                    plan);
            add(tallies, truth, figures(condition, curve(master, master.sharedErrors())));
        }
        // a figure of one draw is one trial
        double allowance = STANDARD_ERRORS * Math.sqrt(0.05 * 0.95 / DRAWS);
        tallies.forEach((property, tally) -> {
            Study.row(
                    "| %s (%d) | `%s` | %.2f | %.1f |",
                    condition, tally.count, property, 100 * tally.rms(), 100 * tally.share());
            assertThat(tally.count).as(property).isGreaterThan((int) (0.95 * DRAWS) - 1);
            assertThat(tally.share()).as(property).isBetween(0.90 - allowance, 0.98 + allowance);
        });
    }

    private static LotCurve curve(MasterCurve master, SharedErrors errors) {
        return new LotCurve(
                master.shifts().get(0).referenceTemperatureK(),
                DeformationMode.SHEAR,
                master.points().stream().map(point -> point.reduced()).toList(),
                errors,
                Optional.of(master),
                List.of());
    }

    private static List<Marker> figures(Condition condition, LotCurve curve) {
        List<Marker> onCurve = LotMarkers.of(List.of(), SweepPlan.withDefaults(), Optional.of(curve))
                .markers();
        return condition.material().equals(ModelMaterial.LAUN)
                ? Stream.concat(
                                onCurve.stream(),
                                LotSpectrum.of(
                                        Optional.of(curve),
                                        List.of(),
                                        new SpectrumPlan(false, OptionalInt.empty(), false),
                                        OptionalDouble.empty())
                                        .markers()
                                        .stream())
                        .toList()
                : onCurve;
    }

    /** Of several crossings the one nearest the truth counts. */
    private static void add(Map<String, Tally> tallies, Map<String, Double> truth, List<Marker> markers) {
        truth.forEach((property, exact) -> markers.stream()
                .filter(marker -> marker.property().equals(property))
                .min((left, right) -> Double.compare(Math.abs(left.value() - exact), Math.abs(right.value() - exact)))
                .ifPresent(marker -> tallies.get(property)
                        .add(marker.value() / exact - 1, marker.u().orElseThrow() / marker.value())));
    }

    private static final class Tally {
        private int count;
        private int held;
        private double squares;

        private void add(double error, double u) {
            count++;
            held += Math.abs(error) <= 1.96 * u ? 1 : 0;
            squares += error * error;
        }

        private double share() {
            return (double) held / count;
        }

        private double rms() {
            return Math.sqrt(squares / count);
        }
    }
}
