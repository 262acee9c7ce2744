package nightlag.pipeline.samples;

import nightlag.stages.numeric.Complex;

/**
 * A generalised Maxwell material: G*(ω) = Ge + Σ g iωτ/(1 + iωτ).
 *
 * @param equilibriumPa Ge, Pa
 * @param moduliPa g, Pa
 * @param timesS τ, s
 */
record Maxwell(double equilibriumPa, double[] moduliPa, double[] timesS) {
    /** The modulus in Pa at a reduced angular frequency in rad/s; plain arithmetic only, so the same on every machine. */
    Complex modulus(double reducedAngularFrequency) {
        Complex sum = new Complex(equilibriumPa, 0);
        for (int mode = 0; mode < moduliPa.length; mode++) {
            Complex x = new Complex(0, reducedAngularFrequency * timesS[mode]);
            sum = sum.plus(x.over(Complex.ONE.plus(x)).times(moduliPa[mode]));
        }
        return sum;
    }

    /** The same material with all moduli and all times in these proportions. */
    Maxwell scaled(double modulusFactor, double timeFactor) {
        double[] moduli = moduliPa.clone();
        double[] times = timesS.clone();
        for (int mode = 0; mode < moduli.length; mode++) {
            moduli[mode] *= modulusFactor;
            times[mode] *= timeFactor;
        }
        return new Maxwell(equilibriumPa * modulusFactor, moduli, times);
    }
}
