package nightlag.stages.superposition;

/**
 * How the curves of ln G' (index 0) and ln G'' (index 1) are smoothed.
 *
 * @param stiffness decadic logarithm of what roughness is multiplied by, per modulus
 * @param scatter decadic logarithm of the standard deviation of ln G beside the uncertainty given, per modulus
 */
record Smoothness(double[] stiffness, double[] scatter) {
    double penalty(int modulus) {
        return Math.pow(10, stiffness[modulus]);
    }

    double scatterVariance(int modulus) {
        return Math.pow(10, 2 * scatter[modulus]);
    }

    Smoothness withStiffness(int modulus, double value) {
        return new Smoothness(with(stiffness, modulus, value), scatter);
    }

    Smoothness withScatter(int modulus, double value) {
        return new Smoothness(stiffness, with(scatter, modulus, value));
    }

    private static double[] with(double[] values, int index, double value) {
        double[] copy = values.clone();
        copy[index] = value;
        return copy;
    }
}
