package nightlag.pipeline.report;

import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;

/** The files of the program that go into a page as they are. */
final class PageParts {
    private PageParts() {}

    static String style() {
        return resource("/nightlag/report/page.css");
    }

    static String script() {
        return resource("/nightlag/report/page.js");
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
