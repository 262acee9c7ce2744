package nightlag.pipeline.samples;

import java.nio.file.Path;
import java.util.Collections;
import java.util.SortedMap;
import java.util.TreeMap;

/** All raw files of the samples, made from their models. */
final class SampleFiles {
    /** The samples as they lie beside the modules. */
    static final Path INTAKE = Path.of("..", "samples", "intake");

    private SampleFiles() {}

    /** The bytes of every file, by its path below the intake folder, with '/'. */
    static SortedMap<String, byte[]> all() {
        SortedMap<String, byte[]> files = new TreeMap<>();
        Heron.addTo(files);
        Bracken.addTo(files);
        Alder.addTo(files);
        AlderRamp.addTo(files);
        Sedge.addTo(files);
        return Collections.unmodifiableSortedMap(files);
    }
}
