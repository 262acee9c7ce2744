package nightlag.pipeline.config;

import java.util.List;
import java.util.stream.Stream;

/**
 * One kind of configuration file: the keys at its top and its sections.
 *
 * @param title what it is called in the documentation
 * @param top the keys before the first section
 * @param sections its sections in the order of the documentation
 */
record FileKind(String title, Section top, List<Section> sections) {
    FileKind {
        sections = List.copyOf(sections);
    }

    /** Everything that may stand at the top: keys and sections. */
    List<String> topNames() {
        return Stream.concat(top.names().stream(), sections.stream().map(Section::name))
                .toList();
    }

    /** Headings of the sections that have a key of this name. */
    List<String> headingsWith(String key) {
        return sections.stream()
                .filter(section -> section.key(key).isPresent())
                .map(Section::heading)
                .toList();
    }
}
