package nightlag.pipeline.decode;

import java.nio.file.Path;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.ConcurrentHashMap;
import nightlag.pipeline.config.FileFormat;
import nightlag.pipeline.intake.RawFile;

/** The run sheets of a night, each read once; safe for use by several threads. */
public final class RunSheets {
    private final Map<Place, Optional<RunSheet>> sheets = new ConcurrentHashMap<>();

    /**
     * The row that speaks of a raw file, sought in the file's folder and then upwards to the intake folder; empty if the
     * instrument has no run sheet, none is found, or none of its rows names the file.
     *
     * @throws DecodeException if a sheet on the way cannot be read, or has two rows for the file or a row that is too short
     */
    public Optional<RunSheetRow> rowOf(RawFile file) throws DecodeException {
        FileFormat format = file.intake().instrument().files();
        if (format.runSheet().isEmpty()) {
            return Optional.empty();
        }
        String path = file.relativePath();
        int folderEnd = path.lastIndexOf('/');
        while (true) {
            String folder = path.substring(0, folderEnd + 1);
            Optional<RunSheet> sheet = sheet(file, folder + format.runSheet().get());
            if (sheet.isPresent()) {
                Optional<RunSheetRow> row = sheet.get().rowOf(path.substring(folder.length()));
                if (row.isPresent()) {
                    return row;
                }
            }
            if (folderEnd < 0) {
                return Optional.empty();
            }
            folderEnd = path.lastIndexOf('/', folderEnd - 1);
        }
    }

    private Optional<RunSheet> sheet(RawFile file, String relativePath) {
        Path path = file.intake().folder().resolve(relativePath);
        String name = file.intake().name() + "/" + relativePath;
        return sheets.computeIfAbsent(
                new Place(path, file.intake().instrument().id()),
                place -> RunSheet.read(path, name, file.intake().instrument().files()));
    }

    /** Two instruments may read one folder, each in its dialect. */
    private record Place(Path path, String instrument) {}
}
