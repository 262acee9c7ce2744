package nightlag.stages.sweep;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.function.DoubleFunction;
import nightlag.stages.TestPoints;
import nightlag.stages.moduli.Figure;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointQuantity;
import nightlag.stages.numeric.Complex;
import nightlag.stages.sweep.FigureMarkerPlan.Along;
import nightlag.stages.sweep.FigureMarkerPlan.Scale;
import org.junit.jupiter.api.Tag;

/**
 * How often the 95 % intervals of a grade's own crossings hold the truth where G' and G'' have 1 % noise each. The places measured
 * are elsewhere in every draw, so that the value is reached anywhere between two of them.
 * {@code mvn test -pl stages -Dtest=FigureMarkersStudyTest -Dnightlag.study=long} prints the table.
 */
@Tag("study")
class FigureMarkersStudyTest {
    private static final double NOISE = 0.01;
    private static final double ZERO_C = 273.15;

    /** G* over Hz. */
    private enum Liquid {
        /** One relaxation time. */
        ONE_MODE(MarkerModel.maxwell(2e5, 0.25), 0.01, 60),
        /** Modes a decade apart; Laun, Rheol. Acta 17 (1978) 1. */
        LAUN_1978(
                MarkerModel.maxwell(
                        1.29e5, 1e-4, 9.48e4, 1e-3, 5.86e4, 1e-2, 2.67e4, 1e-1, 9.80e3, 1, 1.89e3, 10, 1.80e2, 100,
                        1.00, 1000),
                0.003,
                30),
        /** Five invented modes. */
        FIVE_MODES(MarkerModel.maxwell(9e4, 1e-3, 6e4, 1e-2, 3.5e4, 8e-2, 1.2e4, 0.5, 2e3, 2.5), 0.02, 20),
        /** Two springpots in series. */
        SPRINGPOTS(MarkerModel.springpots(0.8, 0.2), 0.01, 6);

        private final DoubleFunction<Complex> modulus;
        private final double lowHz;
        private final double highHz;

        Liquid(DoubleFunction<Complex> modulus, double lowHz, double highHz) {
            this.modulus = modulus;
            this.lowHz = lowHz;
            this.highHz = highHz;
        }

        Complex at(double hertz) {
            return modulus.apply(2 * Math.PI * hertz);
        }
    }

    /** Places and moduli there. */
    private interface Material {
        double[] places(double shift);

        Complex at(double place);

        TestPoints point(double place);
    }

    private record OverFrequency(Liquid liquid, double perDecade) implements Material {
        @Override
        public double[] places(double shift) {
            int count = (int) Math.floor(Math.log10(liquid.highHz / liquid.lowHz) * perDecade);
            double[] places = new double[count];
            for (int i = 0; i < count; i++) {
                places[i] = liquid.lowHz * Math.pow(10, (i + shift) / perDecade);
            }
            return places;
        }

        @Override
        public Complex at(double place) {
            return liquid.at(place);
        }

        @Override
        public TestPoints point(double place) {
            return TestPoints.point().hz(place);
        }
    }

    /** Five invented modes shifted by a WLF law, at 0.02 Hz, or a fall through the glass transition at 1 Hz. */
    private record OverTemperature(boolean glass, double stepK) implements Material {
        /** 1 MPa of rubber, and 1 GPa of glass by way of a relaxation that is broad. */
        private static Complex glass(double reduced) {
            Complex power = Complex.polar(Math.sqrt(reduced), Math.PI / 4);
            return new Complex(1e6, 0).plus(power.over(Complex.ONE.plus(power)).times(1e9));
        }

        @Override
        public double[] places(double shift) {
            double low = (glass ? 60 : 160) + ZERO_C;
            int count = (int) Math.floor(60 / stepK);
            double[] places = new double[count];
            for (int i = 0; i < count; i++) {
                places[i] = low + (i + shift) * stepK;
            }
            return places;
        }

        @Override
        public Complex at(double kelvin) {
            double c1 = glass ? 13 : 5.2;
            double c2 = glass ? 50 : 180;
            double above = kelvin - ZERO_C - (glass ? 80 : 200);
            double shift = Math.pow(10, -c1 * above / (c2 + above));
            return glass ? glass(2 * Math.PI * shift) : Liquid.FIVE_MODES.modulus.apply(0.04 * Math.PI * shift);
        }

        @Override
        public TestPoints point(double place) {
            return TestPoints.point().at(place);
        }
    }

    private enum What {
        STORAGE(Figure.column(PointQuantity.STORAGE_MODULUS), Scale.LOG),
        STORAGE_LINEAR(Figure.column(PointQuantity.STORAGE_MODULUS), Scale.LINEAR),
        MAGNITUDE(Figure.column(PointQuantity.COMPLEX_MODULUS), Scale.LOG),
        TAN_DELTA(Figure.column(PointQuantity.TAN_DELTA), Scale.LOG),
        PHASE(Figure.column(PointQuantity.PHASE_ANGLE), Scale.LINEAR),
        MAGNITUDE_AT_PHASE(Figure.column(PointQuantity.PHASE_ANGLE), Scale.LINEAR);

        private final Figure figure;
        private final Scale scale;

        What(Figure figure, Scale scale) {
            this.figure = figure;
            this.scale = scale;
        }

        double of(Complex modulus) {
            return figure.at(TestPoints.point().modulus(modulus).build())
                    .orElseThrow()
                    .value();
        }

        double reported(double place, Complex modulus) {
            return this == MAGNITUDE_AT_PHASE ? modulus.abs() : place;
        }

        FigureMarkerPlan plan(Along along, double reaches) {
            return new FigureMarkerPlan(
                    "found",
                    figure,
                    reaches,
                    along,
                    scale,
                    OptionalDouble.empty(),
                    OptionalDouble.empty(),
                    this == MAGNITUDE_AT_PHASE
                            ? Optional.of(Figure.column(PointQuantity.COMPLEX_MODULUS))
                            : Optional.empty());
        }
    }

    private static List<ModulusPoint> measured(
            Material material, double noise, boolean known, double shift, Random random) {
        List<ModulusPoint> points = new ArrayList<>();
        for (double place : material.places(shift)) {
            Complex exact = material.at(place);
            points.add(material.point(place)
                    .modulus(new Complex(
                            exact.re() * (1 + noise * random.nextGaussian()),
                            exact.im() * (1 + noise * random.nextGaussian())))
                    .relativeU(known ? Math.max(noise, 1e-9) : 0)
                    .build());
        }
        return points;
    }

    static void run(String name, Material material, Along along, What what, double truth, boolean known, double noise) {
        FigureMarkerPlan plan = what.plan(along, what.of(material.at(truth)));
        double expected = what.reported(truth, material.at(truth));
        int draws = Integer.getInteger("draws", 200);
        int one = 0;
        int many = 0;
        int within = 0;
        double squares = 0;
        double worst = 0;
        double z = 0;
        double us = 0;
        int line = 0;
        double size = along == Along.TEMPERATURE && what != What.MAGNITUDE_AT_PHASE ? 1 : expected;
        for (int seed = 1; seed <= draws; seed++) {
            List<Marker> markers = FigureMarkers.find(
                            measured(material, noise, known, seed * 0.618034 % 1, new Random(seed)), plan)
                    .markers();
            if (markers.size() == 1) {
                Marker marker = markers.get(0);
                double error = (marker.value() - expected) / size;
                double u = marker.u().orElse(Double.NaN) / size;
                one++;
                within += Math.abs(error) <= 1.96 * u ? 1 : 0;
                squares += error * error;
                us += u * u;
                z += error * error / u / u;
                worst = Math.max(worst, Math.abs(error));
                line += marker.method().contains("straight") ? 1 : 0;
            } else {
                many += markers.size() > 1 ? 1 : 0;
            }
        }
        System.out.printf(
                "%-34s %-18s %s one %d many %d line %d  within %.1f  rms err %.3g  rms u %.3g  rms z %.2f worst %.3g%n",
                name,
                what,
                known ? "" : "no u",
                one,
                many,
                line,
                100.0 * within / one,
                Math.sqrt(squares / one),
                Math.sqrt(us / one),
                Math.sqrt(z / one),
                worst);
    }

    public static void main(String[] args) {
        boolean known = !Boolean.getBoolean("unknown");
        double noise = Double.parseDouble(System.getProperty("noise", "0.01"));
        double[] at = {1.1, 0.27, 0.38, 0.25};
        for (What what : Boolean.getBoolean("t") ? new What[0] : What.values()) {
            for (Liquid liquid : Liquid.values()) {
                for (double per : new double[] {3, 3.7, 4, 5, 10, 20}) {
                    run(
                            liquid + " " + per,
                            new OverFrequency(liquid, per),
                            Along.FREQUENCY,
                            what,
                            at[liquid.ordinal()],
                            known,
                            noise);
                }
            }
        }
        for (What what :
                new What[] {What.STORAGE, What.PHASE, What.MAGNITUDE, What.TAN_DELTA, What.MAGNITUDE_AT_PHASE}) {
            for (boolean glass : new boolean[] {false, true}) {
                for (double step : new double[] {2, 5, 7, 10}) {
                    run(
                            (glass ? "glass " : "melt ") + step,
                            new OverTemperature(glass, step),
                            Along.TEMPERATURE,
                            what,
                            (glass ? 88 : 195) + ZERO_C,
                            known,
                            noise);
                }
            }
        }
    }
}
