package nightlag.stages.superposition;

import java.util.List;
import nightlag.stages.moduli.Marker;

/**
 * log10 a_T = −C1 (T − T0)/(C2 + T − T0) (Williams, Landel &amp; Ferry, J. Am. Chem. Soc. 77 (1955) 3701).
 *
 * @param referenceTemperatureK T0, K
 * @param c1 C1
 * @param c2K C2, K
 * @param covariance of C1 and C2
 * @param quality how well it meets the shifts
 */
public record WlfLaw(double referenceTemperatureK, double c1, double c2K, WlfCovariance covariance, LawQuality quality)
        implements FittedLaw {
    private static final String METHOD = "WLF law";

    /**
     * The covariance of the two constants.
     *
     * @param c1Variance u²(C1)
     * @param c2VarianceK2 u²(C2), K²
     * @param covarianceK u(C1, C2), K
     */
    public record WlfCovariance(double c1Variance, double c2VarianceK2, double covarianceK) {
        /** Standard uncertainty of a figure with these derivatives by C1 and C2. */
        double u(double byC1, double byC2) {
            return Math.sqrt(Math.max(of(byC1, byC2, byC1, byC2), 0));
        }

        /** Covariance of two figures with these derivatives by C1 and C2. */
        double of(double firstByC1, double firstByC2, double secondByC1, double secondByC2) {
            return firstByC1 * secondByC1 * c1Variance
                    + (firstByC1 * secondByC2 + firstByC2 * secondByC1) * covarianceK
                    + firstByC2 * secondByC2 * c2VarianceK2;
        }
    }

    /** u(C1). */
    public double c1U() {
        return Math.sqrt(covariance.c1Variance());
    }

    /** u(C2), K. */
    public double c2UK() {
        return Math.sqrt(covariance.c2VarianceK2());
    }

    /** {@inheritDoc} Above the pole T0 − C2 only. */
    @Override
    public double log10A(double temperatureK) {
        double above = temperatureK - referenceTemperatureK;
        return -c1 * above / (c2K + above);
    }

    @Override
    public boolean reaches(double temperatureK) {
        return (c2K + temperatureK - referenceTemperatureK) * c2K > 0;
    }

    @Override
    public double log10ACovariance(double firstK, double secondK) {
        return covariance.of(byC1(firstK), byC2(firstK), byC1(secondK), byC2(secondK));
    }

    private double byC1(double temperatureK) {
        double above = temperatureK - referenceTemperatureK;
        return -above / (c2K + above);
    }

    private double byC2(double temperatureK) {
        return -byC1(temperatureK) * c1 / (c2K + temperatureK - referenceTemperatureK);
    }

    /**
     * The same law about another temperature: C1·C2 and T0 − C2 stay as they are (Ferry 1980, chapter 11).
     *
     * @param newReferenceK the new T0, above the pole, K
     */
    @Override
    public WlfLaw at(double newReferenceK) {
        double c2New = c2K + newReferenceK - referenceTemperatureK;
        if (!(c2New * c2K > 0)) {
            throw new IllegalArgumentException("the pole of the WLF law lies between its reference temperature "
                    + referenceTemperatureK + " K and " + newReferenceK + " K");
        }
        double c1New = c1 * c2K / c2New;
        // C1' = C1·C2/C2', C2' = C2 + a constant
        double byC1 = c2K / c2New;
        double byC2 = c1 * (c2New - c2K) / (c2New * c2New);
        WlfCovariance moved = new WlfCovariance(
                byC1 * byC1 * covariance.c1Variance()
                        + 2 * byC1 * byC2 * covariance.covarianceK()
                        + byC2 * byC2 * covariance.c2VarianceK2(),
                covariance.c2VarianceK2(),
                byC1 * covariance.covarianceK() + byC2 * covariance.c2VarianceK2());
        return new WlfLaw(newReferenceK, c1New, c2New, moved, quality);
    }

    /** Ea = ln 10 · R · C1 · T0²/C2, the slope of ln a_T over 1/T at T0 times R. */
    @Override
    public double activationEnergy() {
        return energyPerC1() * c1;
    }

    @Override
    public double activationEnergyU() {
        return covariance.u(energyPerC1(), -energyPerC1() * c1 / c2K);
    }

    private double energyPerC1() {
        return Math.log(10) * GAS_CONSTANT * referenceTemperatureK * referenceTemperatureK / c2K;
    }

    @Override
    public List<Marker> markers() {
        return List.of(
                marker("wlf_c1", c1, c1U(), "1", METHOD),
                marker("wlf_c2", c2K, c2UK(), "K", METHOD),
                energyMarker("apparent, from the slope of the WLF law at the reference temperature"));
    }
}
