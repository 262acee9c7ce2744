package nightlag.pipeline.samples;

import java.nio.charset.StandardCharsets;
import java.util.Map;
import nightlag.stages.numeric.Complex;

/**
 * Alder 12, an invented coating resin: a table of moduli that a neighbouring lab has already reduced, two lots in one file,
 * everything about a row in its own columns, UTF-8 with a byte-order mark.
 */
final class Alder {
    static final double GLASSY_PA = 8e8;
    static final double EQUILIBRIUM_PA = 2e5;
    static final double TIME_S = 0.01;
    static final double EXPONENT = 0.6;
    static final double ACTIVATION_J_PER_MOL = 95e3;
    static final double REFERENCE_C = 25;
    static final double SECOND_LOT_TIME = 1.08;

    private static final double GAS_CONSTANT = 8.31446261815324;
    private static final double[] TEMPERATURES_C = {5, 15, 25, 35, 45};
    private static final double[] FREQUENCIES_HZ = {0.1, 0.2, 0.4, 0.8, 1.6, 3.2, 6.4, 12.8, 25.6, 51.2};
    private static final double RELATIVE_U = 0.01;

    private Alder() {}

    static void addTo(Map<String, byte[]> files) {
        StringBuilder text = new StringBuilder(
                        "\uFEFFGrade,Lot,Specimen,Temperature,Frequency,Storage modulus,Loss modulus,")
                .append("u storage,u loss\r\n");
        Noise noise = new Noise("partner-table/alder-2026-02.csv".hashCode());
        lot(text, "A12-77", 1, noise);
        lot(text, "A12-78", SECOND_LOT_TIME, noise);
        files.put("partner-table/alder-2026-02.csv", text.toString().getBytes(StandardCharsets.UTF_8));
    }

    /** G* = Ge + (Gg − Ge) x/(1 + x), x = (iωτ a_T)^α, with τ scaled for the lot (Cole &amp; Cole 1941). */
    static Complex modulus(double frequencyHz, double celsius, double timeFactor) {
        double inverse = 1 / (celsius + 273.15) - 1 / (REFERENCE_C + 273.15);
        double shift = StrictMath.exp(ACTIVATION_J_PER_MOL / GAS_CONSTANT * inverse);
        double size = StrictMath.pow(2 * StrictMath.PI * frequencyHz * TIME_S * timeFactor * shift, EXPONENT);
        double angle = EXPONENT * StrictMath.PI / 2;
        Complex x = new Complex(size * StrictMath.cos(angle), size * StrictMath.sin(angle));
        return new Complex(EQUILIBRIUM_PA, 0).plus(x.over(Complex.ONE.plus(x)).times(GLASSY_PA - EQUILIBRIUM_PA));
    }

    private static void lot(StringBuilder text, String lot, double timeFactor, Noise noise) {
        for (double celsius : TEMPERATURES_C) {
            for (double frequency : FREQUENCIES_HZ) {
                Complex modulus = modulus(frequency, celsius, timeFactor);
                double storage = modulus.re() * (1 + noise.next(RELATIVE_U));
                double loss = modulus.im() * (1 + noise.next(RELATIVE_U));
                text.append("Alder 12,").append(lot).append(",1,");
                text.append(Text.fixed(celsius, 1)).append(',');
                text.append(Text.fixed(frequency, 1)).append(',');
                text.append(Text.significant(1e-6 * storage, 6)).append(',');
                text.append(Text.significant(1e-6 * loss, 6)).append(',');
                text.append(Text.significant(1e-6 * RELATIVE_U * modulus.re(), 3))
                        .append(',');
                text.append(Text.significant(1e-6 * RELATIVE_U * modulus.im(), 3))
                        .append("\r\n");
            }
        }
    }
}
