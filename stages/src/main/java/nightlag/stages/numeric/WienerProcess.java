package nightlag.stages.numeric;

/**
 * An integrated Wiener process that starts at a place, and the polynomial it is added to.
 *
 * @param order how often it is integrated
 * @param origin where it starts
 * @param span the unit of the polynomial
 */
record WienerProcess(int order, double origin, double span) {
    double varianceAfter(double distance) {
        return covariance(origin + distance, origin + distance, 0, 0);
    }

    /**
     * Covariance per strength, differentiated i times by s and j times by t, both counted from the origin:
     * ∫ (s − w)^(m−1−i) (t − w)^(m−1−j)/((m−1−i)! (m−1−j)!) dw from 0 to the smaller of s and t.
     */
    double covariance(double placeS, double placeT, int i, int j) {
        double s = placeS - origin;
        double t = placeT - origin;
        double end = Math.min(s, t);
        int p = order - 1 - (s <= t ? i : j);
        int r = order - 1 - (s <= t ? j : i);
        double distance = Math.abs(t - s);
        // ∫ w^p (w + d)^r dw from 0 to the end
        double sum = 0;
        double binomial = 1;
        double power = Math.pow(end, p + 1);
        for (int k = 0; k <= r; k++) {
            sum += binomial * power * Math.pow(distance, r - k) / (p + k + 1);
            binomial = binomial * (r - k) / (k + 1);
            power *= end;
        }
        return sum / (factorial(p) * factorial(r));
    }

    private static double factorial(int n) {
        double product = 1;
        for (int k = 2; k <= n; k++) {
            product *= k;
        }
        return product;
    }

    /** The powers of the polynomial at a place, in units of the span, or their derivatives by the place. */
    double[] powers(double place, int derivative) {
        double[] powers = new double[order];
        double part = (place - origin) / span;
        for (int p = derivative; p < order; p++) {
            powers[p] = factorial(p)
                    / factorial(p - derivative)
                    * Math.pow(part, p - derivative)
                    / Math.pow(span, derivative);
        }
        return powers;
    }
}
