package nightlag.pipeline.config;

import java.util.List;

/**
 * How records stand in a file: the section {@code [records]}.
 *
 * @param layout the layout
 * @param windowCycles rolling: cycles per window
 * @param advanceCycles rolling: cycles from one window to the next
 * @param frequenciesHz multisine: the frequencies, or empty to have them found
 */
public record RecordFormat(Layout layout, int windowCycles, int advanceCycles, List<Double> frequenciesHz) {
    /** Copies the list. */
    public RecordFormat {
        frequenciesHz = List.copyOf(frequenciesHz);
    }
}
