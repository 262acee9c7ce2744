package nightlag.pipeline.config;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import java.util.function.Function;

/**
 * Reads the keys of one section as they are declared. Whatever is wrong goes to the problems, and the answer is empty;
 * a key that is left out gives its default, or is empty.
 */
final class SectionReader {
    private final Section section;
    private final Node.Table table;
    private final String prefix;
    private final Problems problems;

    /**
     * @param section the declaration
     * @param table what stands in the file; empty where the section is left out
     * @param prefix what goes before a key in a message, such as {@code "[files] "}
     * @param problems where what is wrong goes
     */
    SectionReader(Section section, Node.Table table, String prefix, Problems problems) {
        this.section = section;
        this.table = table;
        this.prefix = prefix;
        this.problems = problems;
    }

    /** Refuses keys that are not declared. */
    SectionReader refuseUnknown() {
        return refuseUnknown(section.names());
    }

    SectionReader refuseUnknown(List<String> known) {
        table.entries().forEach((key, value) -> {
            if (!known.contains(key)) {
                problems.wrong(
                        value.at(),
                        prefix + Node.shown(key),
                        "unknown key" + Suggestion.clause(key, known),
                        "one of " + String.join(", ", known));
            }
        });
        return this;
    }

    At at() {
        return table.at();
    }

    boolean has(Key key) {
        return table.entries().containsKey(key.name());
    }

    /** Where a key stands; the section's place where it is left out. */
    At at(Key key) {
        Node node = table.entries().get(key.name());
        return node == null ? table.at() : node.at();
    }

    void wrong(Key key, String found, String allowed) {
        problems.wrong(at(key), prefix + key.name(), found, allowed);
    }

    void wrong(Key key, Node node, String found, String allowed) {
        problems.wrong(node.at(), prefix + key.name(), found, allowed);
    }

    void missing(Key key, String allowed) {
        problems.missing(table.at(), prefix + key.name(), "missing", allowed);
    }

    /** What stands there, or the default. */
    Optional<Node> node(Key key) {
        Node node = table.entries().get(key.name());
        if (node != null) {
            return Optional.of(node);
        }
        if (key.required()) {
            missing(
                    key,
                    (key.type() instanceof KeyType.Word ? "one of " : "")
                            + key.type().words());
        }
        return key.fallback().isEmpty() ? Optional.empty() : Optional.of(TomlFile.literal(key.fallback(), table.at()));
    }

    Optional<String> text(Key key) {
        return node(key).flatMap(node -> text(key, node));
    }

    private Optional<String> text(Key key, Node node) {
        if (!(node instanceof Node.Scalar scalar) || !(scalar.value() instanceof String text)) {
            wrong(
                    key,
                    node,
                    "found " + node.found() + " instead of a text",
                    key.type().words() + ", in quotes");
            return Optional.empty();
        }
        if (text.isBlank()) {
            wrong(key, node, "the text is empty", key.type().words());
            return Optional.empty();
        }
        return Optional.of(text);
    }

    Optional<Boolean> flag(Key key) {
        Optional<Node> node = node(key);
        if (node.isPresent() && node.get() instanceof Node.Scalar scalar && scalar.value() instanceof Boolean flag) {
            return Optional.of(flag);
        }
        node.ifPresent(
                found -> wrong(key, found, "found " + found.found(), key.type().words() + ", without quotes"));
        return Optional.empty();
    }

    OptionalInt whole(Key key) {
        Optional<Node> node = node(key);
        return node.isPresent() ? whole(key, node.get(), (KeyType.Whole) key.type()) : OptionalInt.empty();
    }

    OptionalInt whole(Key key, Node node, KeyType.Whole type) {
        if (node instanceof Node.Scalar scalar
                && scalar.value() instanceof Long number
                && number >= type.least()
                && number <= type.most()) {
            return OptionalInt.of(Math.toIntExact(number));
        }
        wrong(key, node, "found " + node.found(), "a " + type.words());
        return OptionalInt.empty();
    }

    OptionalDouble real(Key key) {
        Optional<Node> node = node(key);
        return node.isPresent() ? real(key, node.get(), ((KeyType.Real) key.type()).sign()) : OptionalDouble.empty();
    }

    OptionalDouble real(Key key, Node node, KeyType.Sign sign) {
        if (node instanceof Node.Scalar scalar
                && scalar.value() instanceof Number number
                && Double.isFinite(number.doubleValue())
                && sign.allows(number.doubleValue())) {
            return OptionalDouble.of(number.doubleValue());
        }
        wrong(key, node, "found " + node.found(), "a number" + sign.words() + ", without quotes");
        return OptionalDouble.empty();
    }

    Optional<Quantity> quantity(Key key) {
        KeyType.Measured type = (KeyType.Measured) key.type();
        return node(key).flatMap(node -> quantity(key, node, type));
    }

    /** The SI value of a quantity. */
    OptionalDouble si(Key key) {
        return quantity(key).map(quantity -> OptionalDouble.of(quantity.si())).orElseGet(OptionalDouble::empty);
    }

    /** A quantity that stands somewhere inside a key. */
    Optional<Quantity> quantity(Key key, Node node, KeyType.Measured type) {
        if (node instanceof Node.Scalar scalar && scalar.value() instanceof Number number && type.bare()) {
            Quantity bare = new Quantity(number.doubleValue(), new Unit("1", 1, 0));
            return checked(key, node, bare, type);
        }
        if (node instanceof Node.Scalar scalar && scalar.value() instanceof Number) {
            wrong(
                    key,
                    node,
                    "the bare number " + scalar.found() + " has no unit",
                    Quantity.example(type.kind()) + ", in quotes");
            return Optional.empty();
        }
        if (!(node instanceof Node.Scalar scalar) || !(scalar.value() instanceof String text)) {
            wrong(key, node, "found " + node.found(), "a quantity: " + type.words());
            return Optional.empty();
        }
        Optional<Unit> bareUnit = type.bare() ? Optional.of(new Unit("1", 1, 0)) : Optional.empty();
        Parsed<Quantity> parsed = Quantity.parse(text, type.kind(), '.', bareUnit);
        if (parsed instanceof Parsed.Refused<Quantity> refused) {
            wrong(key, node, refused.found(), refused.allowed());
            return Optional.empty();
        }
        return parsed.toOptional().flatMap(quantity -> checked(key, node, quantity, type));
    }

    private Optional<Quantity> checked(Key key, Node node, Quantity quantity, KeyType.Measured type) {
        // Absolute zero is the floor of a temperature, whatever its unit.
        KeyType.Sign sign = type.kind() == QuantityKind.TEMPERATURE ? KeyType.Sign.POSITIVE : type.sign();
        if (Double.isFinite(quantity.si()) && sign.allows(quantity.si())) {
            return Optional.of(quantity);
        }
        String allowed = type.kind() == QuantityKind.TEMPERATURE
                ? "a temperature above absolute zero"
                : type.kind().noun() + type.sign().words();
        wrong(key, node, "found " + node.found(), allowed);
        return Optional.empty();
    }

    /** One of the words of an enumeration. */
    <E extends Enum<E>> Optional<E> word(Key key, Class<E> choices) {
        return choice(key, List.of(choices.getEnumConstants()), KeyType::wordOf);
    }

    /** One of a few things that go by words; only words the key declares are taken. */
    <E> Optional<E> choice(Key key, List<E> choices, Function<? super E, String> wordOf) {
        List<String> allowed = ((KeyType.Word) key.type()).allowed();
        return oneOf(
                key,
                choices.stream()
                        .filter(choice -> allowed.contains(wordOf.apply(choice)))
                        .toList(),
                wordOf);
    }

    /** One of a few things that go by words, whatever the key declares. */
    <E> Optional<E> oneOf(Key key, List<E> choices, Function<? super E, String> wordOf) {
        Optional<Node> node = node(key);
        if (node.isEmpty()) {
            return Optional.empty();
        }
        String typed = node.get() instanceof Node.Scalar scalar ? String.valueOf(scalar.value()) : "";
        Optional<E> found = choices.stream()
                .filter(choice -> wordOf.apply(choice).equals(typed))
                .findFirst();
        if (found.isEmpty()) {
            List<String> words = choices.stream().<String>map(wordOf).toList();
            String clause = "found " + node.get().found() + Suggestion.clause(typed, words);
            wrong(key, node.get(), clause, "one of " + new KeyType.Word(words).words());
        }
        return found;
    }

    /** The items of a list; empty where it is left out or no list. */
    Optional<List<Node>> list(Key key) {
        Optional<Node> node = node(key);
        if (node.isPresent() && node.get() instanceof Node.Sequence sequence) {
            return Optional.of(sequence.items());
        }
        node.ifPresent(found -> wrong(
                key, found, "found " + found.found(), "a list: " + key.type().words()));
        return Optional.empty();
    }

    /** The inline table of a key, with its own declaration. */
    Optional<SectionReader> inner(Key key, Section declaration) {
        Optional<Node> node = node(key);
        if (node.isPresent() && node.get() instanceof Node.Table inside) {
            return Optional.of(
                    new SectionReader(declaration, inside, prefix + key.name() + ".", problems).refuseUnknown());
        }
        String keys = String.join(", ", declaration.names());
        node.ifPresent(
                found -> wrong(key, found, "found " + found.found(), "a table in braces, its keys out of " + keys));
        return Optional.empty();
    }

    Problems problems() {
        return problems;
    }

    Section section() {
        return section;
    }
}
