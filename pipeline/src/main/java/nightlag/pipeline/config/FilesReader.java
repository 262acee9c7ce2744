package nightlag.pipeline.config;

import java.nio.charset.Charset;
import java.nio.charset.IllegalCharsetNameException;
import java.nio.charset.UnsupportedCharsetException;
import java.nio.file.FileSystems;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.regex.PatternSyntaxException;

/** Reads {@code [files]}. */
final class FilesReader {
    private static final Pattern GROUP = Pattern.compile("\\(\\?<([a-zA-Z][a-zA-Z0-9]*)>");

    private final SectionReader section;
    private final Optional<FileFormat> format;
    private final Optional<FileFormat.Header> header;
    private final Optional<List<String>> groups;

    FilesReader(SectionReader section) {
        this.section = section;
        Optional<String> match = match();
        Optional<Charset> charset = charset();
        Optional<Character> delimiter = delimiter();
        Optional<Character> decimal = decimal();
        this.header = header();
        Optional<Boolean> unitRow = section.flag(InstrumentKeys.UNIT_ROW);
        Optional<String> runSheet = runSheet();
        Optional<Pattern> pathPattern = pathPattern();
        this.groups = pathPattern.map(FilesReader::groupsOf);
        if (delimiter.isPresent() && delimiter.equals(decimal)) {
            Key culprit = section.has(InstrumentKeys.DECIMAL) ? InstrumentKeys.DECIMAL : InstrumentKeys.DELIMITER;
            section.wrong(
                    culprit,
                    "delimiter and decimal are both '" + decimal.get() + "'",
                    "two different characters, such as delimiter = \";\" with decimal = \",\"");
        }
        if (unitRow.orElse(false) && headless()) {
            section.wrong(
                    InstrumentKeys.UNIT_ROW, "there is no header row for it to follow", "a header other than none");
        }
        boolean complete = match.isPresent()
                && charset.isPresent()
                && delimiter.isPresent()
                && decimal.isPresent()
                && header.isPresent()
                && unitRow.isPresent();
        this.format = complete
                ? Optional.of(new FileFormat(
                        match.get(),
                        charset.get(),
                        delimiter.get(),
                        decimal.get(),
                        header.get(),
                        unitRow.get(),
                        runSheet,
                        pathPattern))
                : Optional.empty();
    }

    /** The section; empty where something in it is wrong. */
    Optional<FileFormat> format() {
        return format;
    }

    boolean headless() {
        return header.isPresent() && header.get() instanceof FileFormat.Header.None;
    }

    boolean nothingAboveHeader() {
        return header.isPresent() && header.get() instanceof FileFormat.Header.Line line && line.number() == 1;
    }

    boolean hasRunSheet() {
        return section.has(InstrumentKeys.RUN_SHEET);
    }

    boolean hasPathPattern() {
        return section.has(InstrumentKeys.PATH_PATTERN);
    }

    /** The named groups of a path pattern that can be read. */
    Optional<List<String>> groups() {
        return groups;
    }

    private Optional<String> match() {
        Key key = InstrumentKeys.MATCH;
        Optional<String> glob = section.text(key);
        if (glob.isPresent() && glob.get().indexOf('\\') >= 0) {
            section.wrong(key, "the glob holds a backslash", "folders parted by '/'");
            return Optional.empty();
        }
        try {
            glob.ifPresent(text -> FileSystems.getDefault().getPathMatcher("glob:" + text));
            return glob;
        } catch (PatternSyntaxException e) {
            section.wrong(key, "not a glob: " + e.getDescription(), "a glob such as \"**/*.csv\"");
            return Optional.empty();
        }
    }

    private Optional<Charset> charset() {
        Key key = InstrumentKeys.CHARSET;
        Optional<String> name = section.text(key);
        try {
            return name.map(text -> Charset.forName(text.strip()));
        } catch (IllegalCharsetNameException | UnsupportedCharsetException e) {
            section.wrong(
                    key,
                    "\"" + name.get() + "\" is no charset known to Java"
                            + Suggestion.clause(
                                    name.get(), Charset.availableCharsets().keySet()),
                    "a charset such as \"UTF-8\", \"UTF-16LE\" or \"windows-1252\"");
            return Optional.empty();
        }
    }

    private Optional<Character> delimiter() {
        Key key = InstrumentKeys.DELIMITER;
        Optional<Node> node = section.node(key);
        if (node.isPresent() && node.get() instanceof Node.Scalar scalar && scalar.value() instanceof String text) {
            if (text.equals("tab")) {
                return Optional.of('\t');
            }
            if (text.length() == 1 && canPart(text.charAt(0))) {
                return Optional.of(text.charAt(0));
            }
        }
        node.ifPresent(
                found -> section.wrong(key, "found " + found.found(), key.type().words()));
        return Optional.empty();
    }

    /** Quotes, line ends and what numbers are made of cannot part cells. */
    private static boolean canPart(char character) {
        return !Character.isLetterOrDigit(character)
                && !Character.isSurrogate(character)
                && "\"\r\n+-".indexOf(character) < 0;
    }

    private Optional<Character> decimal() {
        Key key = InstrumentKeys.DECIMAL;
        Optional<Node> node = section.node(key);
        List<String> allowed = ((KeyType.Word) key.type()).allowed();
        if (node.isPresent()
                && node.get() instanceof Node.Scalar scalar
                && scalar.value() instanceof String text
                && allowed.contains(text)) {
            return Optional.of(text.charAt(0));
        }
        node.ifPresent(found -> section.wrong(key, "found " + found.found(), "\".\" or \",\""));
        return Optional.empty();
    }

    private Optional<FileFormat.Header> header() {
        Key key = InstrumentKeys.HEADER;
        Optional<Node> node = section.node(key);
        if (node.isPresent() && node.get() instanceof Node.Scalar scalar) {
            if (scalar.value() instanceof Long line && line >= 1 && line <= Integer.MAX_VALUE) {
                return Optional.of(new FileFormat.Header.Line(Math.toIntExact(line)));
            }
            if (scalar.value() instanceof String text && !text.isBlank()) {
                return Optional.of(
                        text.equals("none") ? new FileFormat.Header.None() : new FileFormat.Header.StartsWith(text));
            }
        }
        node.ifPresent(
                found -> section.wrong(key, "found " + found.found(), key.type().words()));
        return Optional.empty();
    }

    private Optional<String> runSheet() {
        Key key = InstrumentKeys.RUN_SHEET;
        if (!section.has(key)) {
            return Optional.empty();
        }
        Optional<String> name = section.text(key);
        if (name.isPresent() && (name.get().indexOf('/') >= 0 || name.get().indexOf('\\') >= 0)) {
            section.wrong(key, "found a path", "a file name without folders; it is sought upwards from the raw file");
        }
        return name;
    }

    private Optional<Pattern> pathPattern() {
        Key key = InstrumentKeys.PATH_PATTERN;
        if (!section.has(key)) {
            return Optional.empty();
        }
        try {
            return section.text(key).map(Pattern::compile);
        } catch (PatternSyntaxException e) {
            section.wrong(
                    key,
                    "not a regular expression at character " + (e.getIndex() + 1) + ": " + e.getDescription(),
                    "a Java regular expression; names of groups have letters and digits only");
            return Optional.empty();
        }
    }

    private static List<String> groupsOf(Pattern pattern) {
        List<String> names = new ArrayList<>();
        Matcher matcher = GROUP.matcher(pattern.pattern());
        while (matcher.find()) {
            if (isGroup(pattern, matcher.group(1))) {
                names.add(matcher.group(1));
            }
        }
        return names;
    }

    /** A reference back to a group compiles only if the group is there, and not merely quoted text that looks like one. */
    private static boolean isGroup(Pattern pattern, String name) {
        try {
            return !Pattern.compile(pattern.pattern() + "\\k<" + name + ">")
                    .pattern()
                    .isEmpty();
        } catch (PatternSyntaxException e) {
            return false;
        }
    }
}
