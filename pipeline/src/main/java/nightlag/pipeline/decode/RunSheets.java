package nightlag.pipeline.decode;

import java.util.Optional;
import nightlag.pipeline.intake.RawFile;

/** The run sheets of a night, each read once; safe for use by several threads. */
public final class RunSheets {
    /**
     * The row that speaks of a raw file, sought in the file's folder and then upwards to the intake folder; empty if the
     * instrument has no run sheet, none is found, or none of its rows names the file.
     */
    public Optional<RunSheetRow> rowOf(RawFile file) throws DecodeException {
        throw new UnsupportedOperationException();
    }
}
