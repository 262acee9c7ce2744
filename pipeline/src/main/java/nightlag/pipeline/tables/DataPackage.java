package nightlag.pipeline.tables;

import com.fasterxml.jackson.core.util.DefaultIndenter;
import com.fasterxml.jackson.core.util.DefaultPrettyPrinter;
import com.fasterxml.jackson.core.util.Separators;
import com.fasterxml.jackson.databind.ObjectWriter;
import com.fasterxml.jackson.databind.json.JsonMapper;
import com.fasterxml.jackson.databind.node.ArrayNode;
import com.fasterxml.jackson.databind.node.ObjectNode;
import java.io.IOException;
import java.io.OutputStream;
import java.math.BigDecimal;
import java.util.Locale;

/**
 * The {@code datapackage.json} of a lot: what each column is, and what the tables were made from. Frictionless Data
 * Package, version 1 (https://specs.frictionlessdata.io/tabular-data-package/), with {@code provenance} and the
 * {@code unit} of a field as own properties, which the standard allows.
 */
final class DataPackage {
    static final String FILE_NAME = "datapackage.json";

    private static final JsonMapper MAPPER = JsonMapper.builder().build();
    private static final ObjectWriter WRITER = MAPPER.writer(printer());

    private final ObjectNode descriptor = MAPPER.createObjectNode();
    private final ArrayNode resources;

    /** A package without tables yet. */
    DataPackage(Provenance provenance) {
        descriptor.put("profile", "tabular-data-package");
        descriptor.put("name", identifier(SafeName.of(provenance.grade()) + "." + SafeName.of(provenance.lot())));
        descriptor.put("title", provenance.grade() + ", lot " + provenance.lot());
        descriptor.put(
                "description",
                "Reduced oscillation measurements of one lot. _u marks a standard uncertainty; an empty cell means not"
                        + " available.");
        resources = descriptor.putArray("resources");
        addProvenance(provenance);
    }

    /** Adds a table that was written. */
    <R> void add(Table<R> table, FolderSwap.Written written) {
        ObjectNode resource = resources.addObject();
        resource.put("profile", "tabular-data-resource");
        resource.put("name", table.name());
        resource.put("path", table.fileName());
        resource.put("description", table.meaning() + ".");
        resource.put("format", "csv");
        resource.put("mediatype", "text/csv");
        resource.put("encoding", "utf-8");
        resource.put("bytes", written.bytes());
        resource.put("hash", "sha256:" + written.sha256());
        ObjectNode dialect = resource.putObject("dialect");
        dialect.put("delimiter", ",");
        dialect.put("lineTerminator", "\r\n");
        dialect.put("quoteChar", "\"");
        dialect.put("doubleQuote", true);
        dialect.put("skipInitialSpace", false);
        dialect.put("header", true);
        ObjectNode schema = resource.putObject("schema");
        ArrayNode fields = schema.putArray("fields");
        table.columns().forEach(column -> addField(fields.addObject(), column));
        schema.putArray("missingValues").add("");
    }

    private static <R> void addField(ObjectNode field, Column<R> column) {
        field.put("name", column.name());
        field.put("type", column.type().word());
        column.unit().ifPresent(unit -> field.put("unit", unit));
        field.put("description", column.meaning());
        ObjectNode constraints = MAPPER.createObjectNode();
        Column.Rule rule = column.rule();
        if (rule.required()) {
            constraints.put("required", true);
        }
        rule.minimum().ifPresent(minimum -> constraints.put("minimum", decimal(minimum)));
        rule.maximum().ifPresent(maximum -> constraints.put("maximum", decimal(maximum)));
        rule.pattern().ifPresent(pattern -> constraints.put("pattern", pattern));
        if (!rule.words().isEmpty()) {
            rule.words().forEach(constraints.putArray("enum")::add);
        }
        if (!constraints.isEmpty()) {
            field.set("constraints", constraints);
        }
    }

    private static BigDecimal decimal(double number) {
        return new BigDecimal(Cells.number(number));
    }

    private void addProvenance(Provenance provenance) {
        ObjectNode node = descriptor.putObject("provenance");
        node.put("program", "nightlag");
        node.put("programVersion", provenance.programVersion());
        node.put("grade", provenance.grade());
        node.put("lot", provenance.lot());
        ArrayNode plans = node.putArray("plans");
        provenance
                .plans()
                .forEach(plan -> plans.addObject().put("name", plan.name()).put("fingerprint", plan.fingerprint()));
        ArrayNode inputs = node.putArray("inputs");
        provenance
                .inputs()
                .forEach(input -> inputs.addObject().put("file", input.file()).put("sha256", input.sha256()));
    }

    /** Writes it, the same bytes on every machine. */
    void write(OutputStream out) throws IOException {
        out.write(WRITER.writeValueAsBytes(descriptor));
        out.write('\n');
    }

    /** The standard takes small Latin letters, digits, dots, hyphens and underscores only. */
    private static String identifier(String text) {
        return text.toLowerCase(Locale.ROOT).replaceAll("[^-a-z0-9._]", "-");
    }

    private static DefaultPrettyPrinter printer() {
        DefaultIndenter lines = new DefaultIndenter("  ", "\n");
        return new DefaultPrettyPrinter()
                .withObjectIndenter(lines)
                .withArrayIndenter(lines)
                .withSeparators(
                        Separators.createDefaultInstance().withObjectFieldValueSpacing(Separators.Spacing.AFTER));
    }
}
