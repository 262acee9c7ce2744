package nightlag.pipeline.teamsheet;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Stream;
import nightlag.pipeline.teamsheet.SheetOutcome.Refused;
import nightlag.pipeline.teamsheet.SheetOutcome.Waiting;
import nightlag.pipeline.teamsheet.SheetOutcome.Written;

/** The team's spreadsheet as a file: it is replaced whole, in one step, or left as it is. */
public final class TeamSheetFile {
    /** So often somebody may save the file while it is being worked on. */
    private static final int MOST_TRIES = 3;

    private final Path file;
    private final String sheet;
    private final Runnable beforeSwap;

    /**
     * A sheet in a file, which need not be there.
     *
     * @param file a .csv or .xlsx
     * @param sheet the sheet of an .xlsx
     */
    public TeamSheetFile(Path file, String sheet) {
        this(file, sheet, () -> {});
    }

    /** With something that happens while the new file is written and the old one is still in its place. */
    TeamSheetFile(Path file, String sheet, Runnable beforeSwap) {
        this.file = file;
        this.sheet = sheet;
        this.beforeSwap = beforeSwap;
    }

    /** Whether the file is there. */
    public boolean exists() {
        return Files.exists(file);
    }

    /** Puts rows in. The file is made where it is not there, and not touched where it says everything already. */
    public SheetOutcome update(SheetUpdate update) {
        try {
            Path target = exists() ? file.toRealPath() : file;
            for (int tries = 0; tries < MOST_TRIES; tries++) {
                Optional<SheetOutcome> outcome = Files.exists(target) ? replace(target, update) : make(target, update);
                if (outcome.isPresent()) {
                    return outcome.get();
                }
            }
            return new Waiting("somebody else keeps saving it");
        } catch (SheetFault e) {
            return new Refused(e.getMessage());
        } catch (IOException e) {
            return new Waiting("it cannot be written or replaced; is it open in another program? (" + e + ")");
        }
    }

    /** Replaces the file; empty where it was saved by somebody else meanwhile. */
    private Optional<SheetOutcome> replace(Path target, SheetUpdate update) throws IOException, SheetFault {
        Optional<String> open = OpenElsewhere.reason(target);
        if (open.isPresent()) {
            return Optional.of(new Waiting(open.get()));
        }
        byte[] before = Files.readAllBytes(target);
        Grid grid = isBook() ? BookGrid.of(before, sheet) : CsvGrid.of(before);
        Written written = Merge.into(grid, update);
        if (!written.touched()) {
            return Optional.of(written);
        }
        try (Replacement replacement = Replacement.of(target)) {
            replacement.write(grid::writeTo);
            beforeSwap.run();
            open = OpenElsewhere.reason(target);
            if (open.isPresent()) {
                return Optional.of(new Waiting(open.get()));
            }
            if (!Arrays.equals(before, Files.readAllBytes(target))) {
                return Optional.empty();
            }
            replacement.swap();
        }
        return Optional.of(written);
    }

    private Optional<SheetOutcome> make(Path target, SheetUpdate update) throws IOException, SheetFault {
        Path folder = target.toAbsolutePath().getParent();
        if (folder != null) {
            Files.createDirectories(folder);
        }
        Grid grid = isBook() ? BookGrid.of(NewBook.bytes(sheet, headings(update)), sheet) : CsvGrid.empty();
        Written written = Merge.into(grid, update);
        try (Replacement replacement = Replacement.of(target)) {
            replacement.write(grid::writeTo);
            beforeSwap.run();
            if (Files.exists(target)) {
                return Optional.empty();
            }
            replacement.swap();
        }
        return Optional.of(written);
    }

    private boolean isBook() {
        return file.toString().toLowerCase(Locale.ROOT).endsWith(".xlsx");
    }

    private static List<String> headings(SheetUpdate update) {
        Set<String> headings = new LinkedHashSet<>(List.of(Merge.GRADE, Merge.LOT, Merge.UPDATED));
        Stream.concat(update.due().stream(), update.others().stream())
                .flatMap(row -> row.values().stream())
                .forEach(value -> {
                    headings.add(value.valueHeading());
                    headings.add(value.verdictHeading());
                });
        return new ArrayList<>(headings);
    }
}
