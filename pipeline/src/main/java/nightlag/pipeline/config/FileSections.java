package nightlag.pipeline.config;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/** The sections of one file as declared; what is not declared is refused. */
final class FileSections {
    private final FileKind kind;
    private final Node.Table root;
    private final Problems problems;

    FileSections(FileKind kind, Node.Table root, Problems problems) {
        this.kind = kind;
        this.root = root;
        this.problems = problems;
        root.entries().forEach(this::refuseUnknown);
    }

    private void refuseUnknown(String key, Node value) {
        List<String> known = kind.topNames();
        if (known.contains(key)) {
            return;
        }
        List<String> headings = kind.headingsWith(key);
        if (headings.isEmpty() || value instanceof Node.Table) {
            problems.wrong(
                    value.at(),
                    value instanceof Node.Table ? "[" + Node.shown(key) + "]" : Node.shown(key),
                    (value instanceof Node.Table ? "unknown section" : "unknown key") + Suggestion.clause(key, known),
                    "one of " + String.join(", ", known));
        } else {
            problems.wrong(
                    value.at(), key, "this key has no meaning above the sections", "it below " + headings.get(0));
        }
    }

    /** The keys above the sections. */
    SectionReader top() {
        return new SectionReader(kind.top(), root, "", problems);
    }

    boolean has(Section section) {
        return root.entries().containsKey(section.name());
    }

    /** A section; without any keys where it is left out. */
    SectionReader section(Section section) {
        return optional(section)
                .orElseGet(() -> new SectionReader(
                        section, new Node.Table(root.at(), Map.of()), section.heading() + " ", problems));
    }

    /** A section, if it is there. */
    Optional<SectionReader> optional(Section section) {
        Node node = root.entries().get(section.name());
        if (node instanceof Node.Table table) {
            return Optional.of(new SectionReader(section, table, section.heading() + " ", problems).refuseUnknown());
        }
        if (node != null) {
            problems.wrong(node.at(), section.name(), "found " + node.found(), "a section " + section.heading());
        }
        return Optional.empty();
    }

    /** Every section of a repeated kind, in the order of the file. */
    List<SectionReader> repeated(Section section) {
        Node node = root.entries().get(section.name());
        List<SectionReader> all = new ArrayList<>();
        if (node instanceof Node.Sequence sequence) {
            for (Node item : sequence.items()) {
                if (item instanceof Node.Table table) {
                    all.add(new SectionReader(section, table, section.heading() + " ", problems).refuseUnknown());
                } else {
                    problems.wrong(item.at(), section.name(), "found " + item.found(), "sections " + section.heading());
                }
            }
        } else if (node != null) {
            problems.wrong(
                    node.at(),
                    "[" + section.name() + "]",
                    "found " + node.found(),
                    "a section headed " + section.heading() + ", with two brackets");
        }
        return all;
    }

    At at() {
        return root.at();
    }
}
