package nightlag.pipeline.decode;

import java.io.IOException;
import java.util.Optional;
import nightlag.pipeline.intake.RawFile;

/** Reads a raw file as its instrument file says. */
public final class RawFileDecoder {
    private RawFileDecoder() {}

    /**
     * Decodes one file and hands over its records one at a time; never holds more than one.
     *
     * @throws DecodeException if the file cannot be read as said; records handed over before that are to be dropped
     * @throws IOException if its bytes cannot be had
     */
    public static DecodeCounts decode(RawFile file, Optional<RunSheetRow> runSheetRow, RecordSink sink)
            throws DecodeException, IOException {
        throw new UnsupportedOperationException();
    }
}
