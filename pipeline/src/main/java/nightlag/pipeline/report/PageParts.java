package nightlag.pipeline.report;

import gg.jte.ContentType;
import gg.jte.TemplateEngine;
import gg.jte.output.WriterOutput;
import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.io.Writer;
import java.nio.charset.StandardCharsets;
import java.util.Map;

/** What pages are made of: their templates, and the files of the program that go into them as they are. */
final class PageParts {
    private static final TemplateEngine TEMPLATES =
            TemplateEngine.createPrecompiled(null, ContentType.Html, null, "nightlag.pipeline.report.generated");

    private PageParts() {}

    static String style() {
        return resource("/nightlag/report/page.css");
    }

    static String script() {
        return resource("/nightlag/report/page.js");
    }

    static String indexScript() {
        return resource("/nightlag/report/index.js");
    }

    /** Writes a page or a part of one; all text in the values is made harmless where it stands. */
    static void render(String template, Map<String, Object> values, Writer out) throws IOException {
        try {
            TEMPLATES.render(template, values, new WriterOutput(out));
        } catch (UncheckedIOException e) {
            throw e.getCause();
        }
    }

    /** The plotting library, D3 (ISC licence, named in its first line). */
    static String library() {
        return resource("/META-INF/resources/webjars/d3/7.9.0/dist/d3.min.js");
    }

    private static String resource(String path) {
        try (InputStream in = PageParts.class.getResourceAsStream(path)) {
            if (in == null) {
                throw new IllegalStateException("not in the program: " + path);
            }
            return new String(in.readAllBytes(), StandardCharsets.UTF_8);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}
