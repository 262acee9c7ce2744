package nightlag.stages.sweep;

import java.util.List;

/**
 * How the viscosity of a liquid falls with the shear rate, η = η∞ + (η0 − η∞)·s(λγ̇). Parameters of a law: ln η0 in Pa·s, ln λ
 * in s, what shapes its bend, and ln η∞ where the data carry it.
 */
enum FlowLaw {
    /** s = 1/(1 + (λγ̇)^m) (Cross, J. Colloid Sci. 20 (1965) 417); shaped by m. */
    CROSS("Cross", "cross") {
        @Override
        List<Shape> shape() {
            return List.of(new Shape("exponent", 0.01, 5));
        }

        @Override
        double width(double[] p) {
            return p[FIRST_SHAPE];
        }

        @Override
        double power(double[] p) {
            return -p[FIRST_SHAPE];
        }

        @Override
        double[] gradient(double[] p, double logRate) {
            double reduced = p[TIME] + logRate;
            double share = logistic(p[FIRST_SHAPE] * reduced);
            return new double[] {-p[FIRST_SHAPE] * share, -reduced * share};
        }
    },
    /**
     * s = [1 + (λγ̇)^a]^((n−1)/a) (Carreau, Trans. Soc. Rheol. 16 (1972) 99, with a = 2; Yasuda, Armstrong &amp; Cohen, Rheol. Acta
     * 20 (1981) 163); shaped by a and n.
     */
    CARREAU_YASUDA("Carreau–Yasuda", "carreau_yasuda") {
        @Override
        List<Shape> shape() {
            return List.of(new Shape("width", 0.05, 20), new Shape("exponent", -1, 1));
        }

        @Override
        double width(double[] p) {
            return p[FIRST_SHAPE];
        }

        @Override
        double power(double[] p) {
            return p[FIRST_SHAPE + 1] - 1;
        }

        @Override
        double[] gradient(double[] p, double logRate) {
            double a = width(p);
            double reduced = p[TIME] + logRate;
            double share = logistic(a * reduced);
            return new double[] {
                power(p) * share,
                power(p) * (share * reduced - softened(a * reduced) / a) / a,
                softened(a * reduced) / a
            };
        }
    };

    static final int VISCOSITY = 0;
    static final int TIME = 1;
    static final int FIRST_SHAPE = 2;

    /**
     * A number that shapes the bend, and the range it is looked for in.
     *
     * @param word what it is called
     * @param least lower bound
     * @param most upper bound
     */
    record Shape(String word, double least, double most) {}

    private final String title;
    private final String prefix;

    FlowLaw(String title, String prefix) {
        this.title = title;
        this.prefix = prefix;
    }

    /** Its authors. */
    String title() {
        return title;
    }

    /** The property of a marker. */
    String property(String figure) {
        return prefix + "_" + figure;
    }

    /** The numbers that shape the bend, in the order of the parameters. */
    abstract List<Shape> shape();

    /** How many there are. */
    int shapes() {
        return shape().size();
    }

    /** The exponent within, a. */
    abstract double width(double[] p);

    /** The slope of ln η over ln γ̇ at high rates. */
    abstract double power(double[] p);

    /** Derivatives of ln s by ln λ and by the numbers that shape it. */
    abstract double[] gradient(double[] p, double logRate);

    /** ln s. */
    double logShape(double[] p, double logRate) {
        double a = width(p);
        return power(p) / a * softened(a * (p[TIME] + logRate));
    }

    /** ln(1 + eˣ). */
    private static double softened(double x) {
        return Math.max(x, 0) + Math.log1p(Math.exp(-Math.abs(x)));
    }

    private static double logistic(double x) {
        return 1 / (1 + Math.exp(-x));
    }
}
