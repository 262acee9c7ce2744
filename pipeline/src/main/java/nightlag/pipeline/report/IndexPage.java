package nightlag.pipeline.report;

import java.util.List;
import java.util.Optional;

/**
 * The results folder in the words of its index.
 *
 * @param grades grades with their lots, by name
 * @param nights nights, the latest first
 */
public record IndexPage(List<GradePart> grades, List<NightRow> nights) {
    /** Copies the lists. */
    public IndexPage {
        grades = List.copyOf(grades);
        nights = List.copyOf(nights);
    }

    /** How many lots there are. */
    public int lots() {
        return grades.stream().mapToInt(grade -> grade.lots().size()).sum();
    }

    /**
     * A grade.
     *
     * @param name its name
     * @param lots its lots, by name
     */
    public record GradePart(String name, List<LotRow> lots) {
        /** Copies the list. */
        public GradePart {
            lots = List.copyOf(lots);
        }
    }

    /**
     * A lot.
     *
     * @param name its name
     * @param points how many points it has
     * @param verdicts its verdicts, counted in words
     * @param page the part of the latest night's page that has it; empty where no page has
     * @param tables its tables
     */
    public record LotRow(String name, int points, String verdicts, Optional<Link> page, List<Link> tables) {
        /** Copies the list. */
        public LotRow {
            tables = List.copyOf(tables);
        }
    }

    /**
     * A night.
     *
     * @param name its folder's name
     * @param files its page, its table of files and its log, those that are there
     * @param counts what was done, a line each
     * @param concerns what there was to look at, a line each
     */
    public record NightRow(String name, List<Link> files, List<String> counts, List<String> concerns) {
        /** Copies the lists. */
        public NightRow {
            files = List.copyOf(files);
            counts = List.copyOf(counts);
            concerns = List.copyOf(concerns);
        }
    }

    /**
     * A way from the index to something.
     *
     * @param words what it is called
     * @param href where it is, from the results folder; percent-encoded
     */
    public record Link(String words, String href) {}
}
