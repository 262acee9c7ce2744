package nightlag.pipeline.config;

import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Optional;

/** Lays one grade file over the one it extends. */
final class Merge {
    private Merge() {}

    /**
     * Key by key, the child's word against the parent's; lists and repeated sections are replaced whole. The parent's
     * {@code grade} and {@code extends} are its own and not handed on.
     */
    static Node.Table over(Node.Table parent, Node.Table child) {
        Map<String, Node> inherited = new LinkedHashMap<>(parent.entries());
        inherited.remove(GradeKeys.GRADE.name());
        inherited.remove(GradeKeys.EXTENDS.name());
        String geometry = GeometryKeys.GEOMETRY.name();
        if (inherited.get(geometry) instanceof Node.Table old
                && child.entries().get(geometry) instanceof Node.Table fresh) {
            inherited.put(geometry, withoutOldDimensions(old, fresh));
        }
        return merged(new Node.Table(parent.at(), inherited), child);
    }

    private static Node.Table merged(Node.Table parent, Node.Table child) {
        Map<String, Node> entries = new LinkedHashMap<>(parent.entries());
        child.entries().forEach((key, value) -> {
            Node below = entries.get(key);
            entries.put(
                    key,
                    below instanceof Node.Table old && value instanceof Node.Table fresh ? merged(old, fresh) : value);
        });
        return new Node.Table(child.at(), entries);
    }

    /** Under a new kind only what describes the material stays, and that only where the new kind has a use for it. */
    private static Node.Table withoutOldDimensions(Node.Table old, Node.Table fresh) {
        Optional<Object> kind = value(fresh);
        if (kind.isEmpty() || value(old).isEmpty() || kind.equals(value(old))) {
            return old;
        }
        Map<String, Node> kept = new LinkedHashMap<>(old.entries());
        kept.keySet().removeIf(key -> !GeometryRules.staysUnder(key, kind.get()));
        return new Node.Table(old.at(), kept);
    }

    private static Optional<Object> value(Node.Table geometry) {
        return geometry.entries().get(GeometryKeys.KIND.name()) instanceof Node.Scalar scalar
                ? Optional.of(scalar.value())
                : Optional.empty();
    }
}
