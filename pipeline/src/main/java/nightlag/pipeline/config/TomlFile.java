package nightlag.pipeline.config;

import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.charset.CharacterCodingException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.tomlj.Toml;
import org.tomlj.TomlArray;
import org.tomlj.TomlParseError;
import org.tomlj.TomlParseResult;
import org.tomlj.TomlPosition;
import org.tomlj.TomlTable;
import org.tomlj.TomlVersion;

/**
 * One TOML file as far as it could be read.
 *
 * @param root what stands in it; where a heading is broken, only what stands above it
 * @param problems what is wrong with its writing
 */
record TomlFile(Node.Table root, List<Problem> problems) {
    private static final String BYTE_ORDER_MARK = "\uFEFF";

    TomlFile {
        problems = List.copyOf(problems);
    }

    /** Whether all of it could be read. */
    boolean whole() {
        return problems.isEmpty();
    }

    /** Reads a file; one that cannot be had, or is no UTF-8, is a problem like any other. */
    static TomlFile read(Path file, String name) {
        String text;
        try {
            text = StandardCharsets.UTF_8
                    .newDecoder()
                    .decode(ByteBuffer.wrap(Files.readAllBytes(file)))
                    .toString();
        } catch (CharacterCodingException e) {
            return unread(name, "the file is not UTF-8", "a file saved as UTF-8");
        } catch (NoSuchFileException e) {
            return unread(name, "there is no such file", "a file that exists");
        } catch (IOException e) {
            return unread(name, "the file cannot be read (" + e.getClass().getSimpleName() + ")", "a readable file");
        }
        return parse(text.startsWith(BYTE_ORDER_MARK) ? text.substring(1) : text, name);
    }

    private static TomlFile unread(String name, String found, String allowed) {
        At whole = new At(name, 0);
        return new TomlFile(new Node.Table(whole, Map.of()), List.of(new Problem(name, 0, "", found, allowed)));
    }

    static TomlFile parse(String text, String name) {
        TomlParseResult result = Toml.parse(text, TomlVersion.V1_0_0);
        String[] lines = text.split("\r?\n", -1);
        List<Problem> problems = new ArrayList<>();
        int end = Integer.MAX_VALUE;
        for (TomlParseError error : result.errors()) {
            int line = error.position().line();
            String written = line <= lines.length ? lines[line - 1].strip() : "";
            problems.add(new Problem(name, line, keyOn(written), clause(error), hint(error, written)));
            if (written.startsWith("[")) {
                end = Math.min(end, line);
            }
        }
        return new TomlFile(table(result, new At(name, 0), end), problems);
    }

    /** A default value of a key, read as it would stand in a file. */
    static Node literal(String toml, At at) {
        TomlParseResult result = Toml.parse("key = " + toml);
        return node(result.get("key"), at, Integer.MAX_VALUE);
    }

    private static String keyOn(String line) {
        int equals = line.indexOf('=');
        return equals > 0 && !line.startsWith("[") && !line.startsWith("#")
                ? line.substring(0, equals).strip()
                : "";
    }

    private static String clause(TomlParseError error) {
        String message = String.valueOf(error.getMessage()).strip();
        if (message.contains("previously defined")) {
            return "it stands a second time: " + message;
        }
        int expected = message.indexOf(", expected ");
        String found = expected > 0 ? message.substring(0, expected) : message;
        return "not TOML at column " + error.position().column() + ": " + found;
    }

    private static String hint(TomlParseError error, String line) {
        String message = String.valueOf(error.getMessage());
        if (message.contains("previously defined")) {
            return "each key and each section once";
        }
        if (message.contains("escape")) {
            return "'single quotes' round a text with backslashes, or / in paths";
        }
        if (message.contains("','") && line.matches(".*\\d,\\d.*")) {
            return "a decimal point";
        }
        int expected = message.indexOf(", expected ");
        return expected > 0
                ? message.substring(expected + ", expected ".length()).strip()
                : "";
    }

    private static Node.Table table(TomlTable table, At at, int end) {
        Map<String, Node> entries = new LinkedHashMap<>();
        for (String key : table.keySet()) {
            List<String> path = List.of(key);
            At place = place(at, table.inputPositionOf(path));
            if (place.line() < end) {
                entries.put(key, node(table.get(path), place, end));
            }
        }
        return new Node.Table(at, entries);
    }

    private static Node node(Object value, At at, int end) {
        if (value instanceof TomlTable table) {
            return table(table, at, end);
        }
        if (value instanceof TomlArray array) {
            List<Node> items = new ArrayList<>();
            for (int i = 0; i < array.size(); i++) {
                At place = place(at, array.inputPositionOf(i));
                if (place.line() < end) {
                    items.add(node(array.get(i), place, end));
                }
            }
            return new Node.Sequence(at, items);
        }
        return new Node.Scalar(at, value);
    }

    private static At place(At around, TomlPosition position) {
        return position == null ? around : new At(around.file(), position.line());
    }
}
