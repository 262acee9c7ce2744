package nightlag.pipeline.config;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeMap;
import java.util.stream.Collectors;
import java.util.stream.Stream;

/**
 * Every grade file of a folder. A wrong file makes its grade wrong, and the grades of all files that extend it; the
 * others are none the worse.
 *
 * @param right right grades by name
 * @param wrong problems by the name of the wrong grade
 * @param problems every problem once, by file and line
 */
record GradeFolder(Map<String, Grade> right, Map<String, List<Problem>> wrong, List<Problem> problems) {
    private static final String SUFFIX = ".toml";

    static GradeFolder empty() {
        return new GradeFolder(Map.of(), Map.of(), List.of());
    }

    static GradeFolder read(Path folder, FileNames names) {
        Map<String, TomlFile> files = new TreeMap<>();
        Map<String, String> fileNames = new TreeMap<>();
        try (Stream<Path> listed = Files.list(folder)) {
            for (Path path : listed.sorted().toList()) {
                String name = FileNames.last(path);
                if (name.toLowerCase(Locale.ROOT).endsWith(SUFFIX)
                        && !name.startsWith(".")
                        && !Files.isDirectory(path)) {
                    String stem = name.substring(0, name.length() - SUFFIX.length());
                    String id = files.containsKey(stem) ? name : stem; // where only the suffix's capitals differ
                    files.put(id, TomlFile.read(path, names.name(path)));
                    fileNames.put(id, names.name(path));
                }
            }
        } catch (IOException | UncheckedIOException e) {
            String name = names.name(folder);
            return new GradeFolder(
                    Map.of(),
                    Map.of(),
                    List.of(new Problem(name, 0, "", "the folder cannot be listed", "a folder that can be read")));
        }
        return new Reading(files, fileNames).result();
    }

    /** One pass over the folder's files. */
    private static final class Reading {
        private final Map<String, TomlFile> files;
        private final Map<String, String> fileNames;
        private final Set<String> extended;

        Reading(Map<String, TomlFile> files, Map<String, String> fileNames) {
            this.files = files;
            this.fileNames = fileNames;
            this.extended = files.values().stream()
                    .flatMap(file -> parentOf(file).stream())
                    .collect(Collectors.toSet());
        }

        GradeFolder result() {
            Map<String, Optional<Grade>> grades = new LinkedHashMap<>();
            Map<String, List<Problem>> own = new LinkedHashMap<>();
            files.keySet().forEach(id -> {
                Problems problems = new Problems(partial(id));
                grades.put(id, grade(id, problems));
                own.put(id, problems.inOrder());
            });
            refuseSecondNames(own);
            Map<String, Grade> right = new TreeMap<>();
            Map<String, List<Problem>> wrong = new TreeMap<>();
            Set<Problem> every = new LinkedHashSet<>();
            files.forEach((id, file) -> {
                Set<Problem> all = new LinkedHashSet<>(own.get(id));
                chain(id).forEach(ancestor -> all.addAll(own.get(ancestor)));
                every.addAll(all);
                nameOf(file).ifPresent(name -> {
                    if (all.isEmpty()) {
                        right.put(name, grades.get(id).orElseThrow());
                    } else {
                        wrong.merge(name, List.copyOf(all), Reading::joined);
                    }
                });
            });
            Problems sorted = new Problems(false);
            sorted.addAll(every.stream()
                    .sorted(java.util.Comparator.comparing(Problem::file))
                    .toList());
            return new GradeFolder(right, wrong, sorted.inOrder());
        }

        private static List<Problem> joined(List<Problem> some, List<Problem> others) {
            return Stream.concat(some.stream(), others.stream()).distinct().toList();
        }

        /** A file that cannot be read to its end, or serves {@code extends} only, may lack things. */
        private boolean partial(String id) {
            return chain(id).stream().anyMatch(file -> !files.get(file).whole())
                    || !chainEndsWell(id)
                    || nameOf(files.get(id)).isEmpty();
        }

        private Optional<Grade> grade(String id, Problems problems) {
            TomlFile file = files.get(id);
            problems.addAll(file.problems());
            checkParent(id, problems);
            if (file.root().entries().get(GradeKeys.GRADE.name()) == null && !extended.contains(id) && file.whole()) {
                problems.wrong(
                        file.root().at(),
                        GradeKeys.GRADE.name(),
                        "missing, and no other grade file extends this one",
                        "the name that records carry in their tag grade");
            }
            List<String> chain = chain(id);
            // from the oldest ancestor down, so that each file is laid over all that it inherits
            Node.Table merged = files.get(chain.get(chain.size() - 1)).root();
            for (int i = chain.size() - 2; i >= 0; i--) {
                merged = Merge.over(merged, files.get(chain.get(i)).root());
            }
            return GradeReader.read(nameOf(file).orElse(""), fileNames.get(id), merged, problems);
        }

        private void checkParent(String id, Problems problems) {
            Node parent = files.get(id).root().entries().get(GradeKeys.EXTENDS.name());
            Optional<String> name = parentOf(files.get(id));
            if (name.isEmpty()) {
                return;
            }
            if (!files.containsKey(name.get())) {
                List<String> others = files.keySet().stream()
                        .filter(other -> !other.equals(id))
                        .toList();
                problems.wrong(
                        parent.at(),
                        GradeKeys.EXTENDS.name(),
                        "there is no grade file \"" + name.get() + "\"" + Suggestion.clause(name.get(), others),
                        others.isEmpty() ? "another file of this folder" : "one of " + String.join(", ", others));
            } else if (!chainEndsWell(id)) {
                problems.wrong(
                        parent.at(),
                        GradeKeys.EXTENDS.name(),
                        "the files extend each other in a circle: " + String.join(" → ", chain(id)),
                        "a chain of files that ends");
            }
        }

        /** The file and all it extends, as far as they are there and no circle closes. */
        private List<String> chain(String id) {
            Set<String> chain = new LinkedHashSet<>();
            Optional<String> next = Optional.of(id);
            while (next.isPresent() && files.containsKey(next.get()) && chain.add(next.get())) {
                next = parentOf(files.get(next.get()));
            }
            return List.copyOf(chain);
        }

        private boolean chainEndsWell(String id) {
            List<String> chain = chain(id);
            return parentOf(files.get(chain.get(chain.size() - 1))).isEmpty();
        }

        private static Optional<String> parentOf(TomlFile file) {
            return text(file, GradeKeys.EXTENDS)
                    .map(name -> name.endsWith(SUFFIX) ? name.substring(0, name.length() - SUFFIX.length()) : name);
        }

        private static Optional<String> nameOf(TomlFile file) {
            return text(file, GradeKeys.GRADE);
        }

        private static Optional<String> text(TomlFile file, Key key) {
            return file.root().entries().get(key.name()) instanceof Node.Scalar scalar
                            && scalar.value() instanceof String text
                            && !text.isBlank()
                    ? Optional.of(text.strip())
                    : Optional.empty();
        }

        /** Two files for one grade, also where only capitals differ, leave open which is meant: both are wrong. */
        private void refuseSecondNames(Map<String, List<Problem>> own) {
            Map<String, List<String>> byName = new TreeMap<>();
            files.forEach((id, file) -> nameOf(file)
                    .ifPresent(name -> byName.computeIfAbsent(name.toLowerCase(Locale.ROOT), key -> new ArrayList<>())
                            .add(id)));
            byName.values().stream()
                    .filter(ids -> ids.size() > 1)
                    .forEach(ids -> ids.forEach(id -> {
                        Node node = files.get(id).root().entries().get(GradeKeys.GRADE.name());
                        String others = ids.stream()
                                .filter(other -> !other.equals(id))
                                .map(fileNames::get)
                                .collect(Collectors.joining(", "));
                        Problems problems = new Problems(false);
                        problems.addAll(own.get(id));
                        problems.wrong(
                                node.at(),
                                GradeKeys.GRADE.name(),
                                node.found() + " is also the grade of " + others,
                                "one file a grade; names must differ in more than capitals");
                        own.put(id, problems.inOrder());
                    }));
        }
    }
}
