package nightlag.pipeline.tables;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import org.junit.jupiter.api.Test;

class TableDocsTest {
    /** {@code mvn test -pl pipeline -am -Dtest=TableDocsTest -Dwrite.docs=true} writes the page anew. */
    @Test
    void thePageShowsTheTablesAsTheyAreDeclared() throws IOException {
        if (Boolean.getBoolean("write.docs")) {
            TableDocs.write();
        }
        String page = Files.readString(TableDocs.README);

        assertThat(page).isEqualTo(TableDocs.withTables(page));
    }
}
