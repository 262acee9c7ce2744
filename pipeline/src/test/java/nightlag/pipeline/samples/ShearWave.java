package nightlag.pipeline.samples;

import nightlag.stages.numeric.Complex;

/** The shear wave in a layer (Schrag, Trans. Soc. Rheol. 21 (1977) 399), by its power series. */
final class ShearWave {
    private ShearWave() {}

    /**
     * G* z/sin z with z² = ρω²h²/G*, for layers thin against the wave: sin z/z = Σ (−z²)ⁿ/(2n + 1)!.
     *
     * @param modulusPa G*, Pa
     * @param inertialStressPa ρω²h², Pa
     */
    static Complex atFixedWall(Complex modulusPa, double inertialStressPa) {
        Complex square = new Complex(inertialStressPa, 0).over(modulusPa);
        Complex sum = Complex.ONE;
        Complex term = Complex.ONE;
        for (int n = 1; n <= 12; n++) {
            term = term.times(square).times(-1.0 / (2 * n * (2 * n + 1)));
            sum = sum.plus(term);
        }
        return modulusPa.over(sum);
    }
}
