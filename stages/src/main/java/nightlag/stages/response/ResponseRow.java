package nightlag.stages.response;

import java.util.Optional;
import nightlag.stages.response.ResponsePlan.Controlled;

/**
 * Stress and strain at one instant of a prediction.
 *
 * @param response its name
 * @param controlled which of the two is prescribed
 * @param temperatureK temperature, K
 * @param timeS time since the programme began, s
 * @param stressPa stress, Pa
 * @param strain strain
 * @param insideData whether data stand behind it: every reduced time since a step is one the spectrum is supported at, and every
 *     temperature up to now is among the isotherms
 * @param band 95 % band of what is predicted; empty where the moduli came without u and left no scatter to take one from
 * @param parts what the strain is made of; empty where the strain is prescribed
 */
public record ResponseRow(
        String response,
        Controlled controlled,
        double temperatureK,
        double timeS,
        double stressPa,
        double strain,
        boolean insideData,
        Optional<Band> band,
        Optional<StrainParts> parts) {
    /**
     * Two ends, Pa or strain.
     *
     * @param low the lower
     * @param high the upper
     */
    public record Band(double low, double high) {}

    /**
     * A strain by what becomes of it when the stress is taken off.
     *
     * @param atOnce J0 σ: gone at once
     * @param later the strain of the retardation modes: comes back with time
     * @param never what has flowed: stays
     */
    public record StrainParts(double atOnce, double later, double never) {
        /** All three, the strain. */
        double sum() {
            return atOnce + later + never;
        }
    }
}
