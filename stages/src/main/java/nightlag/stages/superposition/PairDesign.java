package nightlag.stages.superposition;

import nightlag.stages.numeric.EvenSplines;

/** The splines at the places of points. Coefficients of both curves stand side by side: those of ln G' even, of ln G'' odd. */
final class PairDesign {
    private final EvenSplines splines;
    private final int[] first;
    private final double[][] values;
    private final double[] places;

    PairDesign(EvenSplines splines, double[] places) {
        this.splines = splines;
        this.places = places.clone();
        this.first = new int[places.length];
        this.values = new double[places.length][];
        for (int p = 0; p < places.length; p++) {
            first[p] = splines.first(places[p]);
            values[p] = splines.values(places[p]);
        }
    }

    int points() {
        return first.length;
    }

    int coefficients() {
        return 2 * splines.size();
    }

    EvenSplines splines() {
        return splines;
    }

    /** The curve of a modulus at a point. */
    double value(int point, int modulus, double[] coefficients) {
        return sum(first[point], values[point], modulus, coefficients);
    }

    /** Its slope there. */
    double slope(int point, int modulus, double[] coefficients) {
        return sum(first[point], splines.slopes(places[point]), modulus, coefficients);
    }

    private static double sum(int first, double[] values, int modulus, double[] coefficients) {
        double sum = 0;
        for (int i = 0; i < values.length; i++) {
            sum += values[i] * coefficients[2 * (first + i) + modulus];
        }
        return sum;
    }

    /** Adds the transposed splines of a point times its whitened values to a vector of coefficients. */
    void addTransposed(int point, Weights weights, double whitenedFirst, double whitenedSecond, double[] into) {
        double storage = weights.storage()[point] * whitenedFirst;
        double loss = weights.mixed()[point] * whitenedFirst + weights.loss()[point] * whitenedSecond;
        double[] row = values[point];
        for (int i = 0; i < row.length; i++) {
            into[2 * (first[point] + i)] += row[i] * storage;
            into[2 * (first[point] + i) + 1] += row[i] * loss;
        }
    }

    /** The normal equations of both curves: splines weighted, and the penalty on roughness. */
    double[][] normalBand(Weights weights, Smoothness smoothness) {
        double[][] band = new double[coefficients()][2 * EvenSplines.SUPPORT];
        for (int p = 0; p < points(); p++) {
            double l00 = weights.storage()[p];
            double l10 = weights.mixed()[p];
            double l11 = weights.loss()[p];
            double w00 = l00 * l00;
            double w01 = l00 * l10;
            double w11 = l10 * l10 + l11 * l11;
            double[] row = values[p];
            for (int i = 0; i < row.length; i++) {
                double[] storage = band[2 * (first[p] + i)];
                double[] loss = band[2 * (first[p] + i) + 1];
                for (int j = 0; j <= i; j++) {
                    double product = row[i] * row[j];
                    int back = 2 * (i - j);
                    storage[back] += product * w00;
                    loss[back] += product * w11;
                    loss[back + 1] += product * w01;
                    if (j < i) {
                        storage[back - 1] += product * w01;
                    }
                }
            }
        }
        double[][] roughness = EvenSplines.roughness(splines.size());
        for (int i = 0; i < roughness.length; i++) {
            for (int k = 0; k < roughness[i].length; k++) {
                band[2 * i][2 * k] += smoothness.penalty(0) * roughness[i][k];
                band[2 * i + 1][2 * k] += smoothness.penalty(1) * roughness[i][k];
            }
        }
        return band;
    }
}
