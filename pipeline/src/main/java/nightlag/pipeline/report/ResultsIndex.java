package nightlag.pipeline.report;

import java.io.IOException;
import java.io.Writer;
import java.net.URI;
import java.net.URISyntaxException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.util.ArrayList;
import java.util.Collection;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import nightlag.pipeline.report.IndexPage.GradePart;
import nightlag.pipeline.report.IndexPage.Link;
import nightlag.pipeline.report.IndexPage.LotRow;
import nightlag.pipeline.report.IndexPage.NightRow;
import nightlag.stages.sweep.NaturalOrder;

/** Writes {@code index.html} of the results folder: the way to every night and every lot. */
public final class ResultsIndex {
    /** The page's file name in the results folder. */
    public static final String FILE_NAME = "index.html";

    private static final List<Named> NIGHT_FILES = List.of(
            new Named(NightReport.FILE_NAME, "report"), new Named("files.csv", "files"), new Named("night.log", "log"));

    private final Path results;
    private final Map<Place, Link> latestPages = new HashMap<>();

    private ResultsIndex(Path results) {
        this.results = results;
    }

    /**
     * A lot as the night knows it.
     *
     * @param grade grade
     * @param lot lot
     * @param points how many points it has
     * @param verdicts its verdicts, counted in words; empty where it has no limits
     * @param folder where its tables are, below the results folder
     * @param tables their file names
     */
    public record Entry(String grade, String lot, int points, String verdicts, Path folder, List<String> tables) {
        /** Copies the list. */
        public Entry {
            tables = List.copyOf(tables);
        }
    }

    private record Named(String fileName, String words) {}

    private record Place(String grade, String lot) {}

    /**
     * Writes the page beside and swaps it in.
     *
     * @param results the results folder
     * @param nights the folder that has a folder for each night
     * @param lots lots with tables, in any order
     */
    public static void write(Path results, Path nights, Collection<Entry> lots) throws IOException {
        ResultsIndex index = new ResultsIndex(results);
        List<NightRow> rows = index.nights(nights);
        IndexPage page = new IndexPage(index.grades(lots), rows);
        Path beside = results.resolve(FILE_NAME + ".new");
        try (Writer out = Files.newBufferedWriter(beside, StandardCharsets.UTF_8)) {
            PageParts.render(
                    "index.jte",
                    Map.of("index", page, "style", PageParts.style(), "script", PageParts.indexScript()),
                    out);
        }
        Files.move(beside, results.resolve(FILE_NAME), StandardCopyOption.ATOMIC_MOVE);
    }

    private List<NightRow> nights(Path nights) throws IOException {
        List<Path> folders;
        try (Stream<Path> found = Files.list(nights)) {
            folders = found.filter(Files::isDirectory)
                    .sorted(Comparator.comparing(
                                    (Path folder) -> String.valueOf(folder.getFileName()), NaturalOrder::compare)
                            .reversed())
                    .toList();
        }
        List<NightRow> rows = new ArrayList<>();
        for (Path folder : folders) {
            rows.add(night(folder));
        }
        return rows;
    }

    private NightRow night(Path folder) {
        Optional<NightSummary> summary = NightSummary.read(folder);
        Path page = folder.resolve(NightReport.FILE_NAME);
        if (Files.exists(page)) {
            summary.ifPresent(night -> night.lots()
                    .forEach(lot -> latestPages.putIfAbsent(
                            new Place(lot.grade(), lot.lot()),
                            new Link(night.night(), href(page) + "#" + lot.anchor()))));
        }
        return new NightRow(
                String.valueOf(folder.getFileName()),
                NIGHT_FILES.stream()
                        .filter(file -> Files.exists(folder.resolve(file.fileName())))
                        .map(file -> new Link(file.words(), href(folder.resolve(file.fileName()))))
                        .toList(),
                summary.map(NightSummary::counts).orElse(List.of()),
                summary.map(night -> night.concerns().stream()
                                .map(count -> count.heading() + " (" + count.number() + ")")
                                .toList())
                        .orElse(List.of()));
    }

    private List<GradePart> grades(Collection<Entry> lots) {
        Map<String, List<Entry>> byGrade = lots.stream()
                .collect(Collectors.groupingBy(
                        Entry::grade, () -> new TreeMap<>(NaturalOrder::compare), Collectors.toList()));
        return byGrade.entrySet().stream()
                .map(grade -> new GradePart(
                        grade.getKey(),
                        grade.getValue().stream()
                                .sorted(Comparator.comparing(Entry::lot, NaturalOrder::compare))
                                .map(this::row)
                                .toList()))
                .toList();
    }

    private LotRow row(Entry lot) {
        return new LotRow(
                lot.lot(),
                lot.points(),
                lot.verdicts(),
                Optional.ofNullable(latestPages.get(new Place(lot.grade(), lot.lot()))),
                lot.tables().stream()
                        .map(table -> new Link(
                                table.replaceFirst("\\.csv$", "").replace('_', ' '),
                                href(lot.folder().resolve(table))))
                        .toList());
    }

    /** The way from the results folder, whatever the system puts between names. */
    private String href(Path file) {
        String path = Stream.of(results.relativize(file))
                .flatMap(relative -> Stream.iterate(0, i -> i < relative.getNameCount(), i -> i + 1)
                        .map(relative::getName))
                .map(Path::toString)
                .collect(Collectors.joining("/"));
        try {
            return new URI(null, null, path, null).toASCIIString();
        } catch (URISyntaxException e) {
            throw new InvalidPathException(path, e.getReason());
        }
    }
}
