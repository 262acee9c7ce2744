package nightlag.stages.moduli;

/**
 * One instant of a loop.
 *
 * @param strain strain (1)
 * @param stressPa stress in Pa
 */
public record LoopPair(double strain, double stressPa) {}
