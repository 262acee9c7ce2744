package nightlag.stages.geometry;

import nightlag.stages.numeric.Complex;

/**
 * The corrections at one angular frequency, as the linear map they are: strain and stress each from both amplitudes as
 * recorded. Covariances follow from it.
 *
 * @param strainFromDeformation strain per unit of the deformation channel
 * @param strainFromLoad strain per unit of the load channel
 * @param stressFromDeformation stress in Pa per unit of the deformation channel
 * @param stressFromLoad stress in Pa per unit of the load channel
 */
public record CorrectionMap(
        Complex strainFromDeformation, Complex strainFromLoad, Complex stressFromDeformation, Complex stressFromLoad) {
    /** The strain of a pair of amplitudes as recorded. */
    public Complex strain(Complex deformation, Complex load) {
        return strainFromDeformation.times(deformation).plus(strainFromLoad.times(load));
    }

    /** The stress in Pa of a pair of amplitudes as recorded. */
    public Complex stressPa(Complex deformation, Complex load) {
        return stressFromDeformation.times(deformation).plus(stressFromLoad.times(load));
    }
}
