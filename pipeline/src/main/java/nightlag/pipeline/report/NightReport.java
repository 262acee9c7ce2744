package nightlag.pipeline.report;

import gg.jte.Content;
import gg.jte.TemplateOutput;
import java.io.IOException;
import java.io.Reader;
import java.io.UncheckedIOException;
import java.io.Writer;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import nightlag.stages.LotResult;

/**
 * Writes {@code report.html} of one night, and {@code night.json} for the index. Lots are written as they are rebuilt, into a file beside, so that no more than one
 * is held; the page is put together and swapped in at the end.
 */
public final class NightReport implements AutoCloseable {
    /** The page's file name in the night's folder. */
    public static final String FILE_NAME = "report.html";

    /** A longer list is opened by who wants it, so that the way to the lots is not a screen away. */
    public static final int MOST_OPEN = 50;

    private final Path folder;
    private final Path lotsFile;
    private final Writer lots;
    private final List<LotLink> links = new ArrayList<>();

    private NightReport(Path folder, Path lotsFile) throws IOException {
        this.folder = folder;
        this.lotsFile = lotsFile;
        this.lots = Files.newBufferedWriter(lotsFile, StandardCharsets.UTF_8);
    }

    /** Begins the page of a night. */
    public static NightReport begin(Path folder) throws IOException {
        return new NightReport(folder, folder.resolve(FILE_NAME + ".lots"));
    }

    /** Adds a lot as it was rebuilt. */
    public void lot(String grade, String lot, LotResult result) throws IOException {
        String anchor = "lot-" + (links.size() + 1);
        links.add(new LotLink(anchor, grade, lot));
        PageParts.render("lot.jte", Map.of("lot", LotPages.of(anchor, grade, lot, result)), lots);
    }

    /** Puts the page together, and notes beside it what the index says of the night; nothing is added after. */
    public void finish(NightHeading heading) throws IOException {
        lots.close();
        Path beside = folder.resolve(FILE_NAME + ".new");
        try (Writer out = Files.newBufferedWriter(beside, StandardCharsets.UTF_8)) {
            Content sections = this::copyLots;
            PageParts.render(
                    "report.jte",
                    Map.of(
                            "heading",
                            heading,
                            "lots",
                            links,
                            "sections",
                            sections,
                            "style",
                            PageParts.style(),
                            "library",
                            PageParts.library(),
                            "script",
                            PageParts.script()),
                    out);
        }
        Files.move(beside, folder.resolve(FILE_NAME), StandardCopyOption.ATOMIC_MOVE);
        NightSummary.of(heading, links).write(folder);
    }

    private void copyLots(TemplateOutput page) {
        try (Reader written = Files.newBufferedReader(lotsFile, StandardCharsets.UTF_8)) {
            char[] some = new char[1 << 14];
            for (int read = written.read(some); read >= 0; read = written.read(some)) {
                page.writeContent(new String(some, 0, read));
            }
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** Takes away what was written beside. */
    @Override
    public void close() throws IOException {
        lots.close();
        Files.deleteIfExists(lotsFile);
    }
}
