package nightlag.pipeline.config;

import java.util.List;
import nightlag.stages.RecordKind;

/**
 * How records stand in a file: the section {@code [records]}.
 *
 * @param layout the layout
 * @param windowCycles rolling: cycles per window
 * @param advanceCycles rolling: cycles from one window to the next
 * @param frequenciesHz multisine: the frequencies, or empty to have them found
 * @param pointsPerDecade chirp: points for each decade of frequency
 */
public record RecordFormat(
        Layout layout, int windowCycles, int advanceCycles, List<Double> frequenciesHz, int pointsPerDecade) {
    /** Copies the list. */
    public RecordFormat {
        frequenciesHz = List.copyOf(frequenciesHz);
    }

    /** What a record of samples holds. */
    public RecordKind kind() {
        return switch (layout) {
            case MULTISINE -> new RecordKind.Multisine(frequenciesHz);
            case CHIRP -> new RecordKind.Chirp(pointsPerDecade);
            case CREEP -> new RecordKind.Creep();
            default -> new RecordKind.OneFrequency();
        };
    }
}
