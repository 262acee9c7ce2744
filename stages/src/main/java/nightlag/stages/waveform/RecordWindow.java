package nightlag.stages.waveform;

/**
 * What a window cut out of a longer record was planned to hold, whatever rows there are.
 *
 * @param recordFromS when the longer record began, s
 * @param fromS when the window begins, s
 * @param toS when it ends, s
 */
public record RecordWindow(double recordFromS, double fromS, double toS) {
    /** How long it was planned, s. */
    public double lengthS() {
        return toS - fromS;
    }

    /** When the middle of the plan is, s. */
    public double middleS() {
        return fromS + lengthS() / 2;
    }
}
