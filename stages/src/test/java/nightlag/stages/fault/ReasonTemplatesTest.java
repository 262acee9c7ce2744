package nightlag.stages.fault;

import static org.assertj.core.api.Assertions.assertThat;

import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Every sentence of every reason: an apostrophe that is not doubled would swallow itself, or the parts behind it. */
class ReasonTemplatesTest {
    static List<ReasonCode> everyReason() {
        return new ClassFileImporter()
                .importPackages("nightlag.stages").stream()
                        .filter(type -> type.isAssignableTo(ReasonCode.class) && type.isEnum())
                        .map(JavaClass::reflect)
                        .flatMap(type -> Stream.of(type.getEnumConstants()))
                        .map(ReasonCode.class::cast)
                        .toList();
    }

    @ParameterizedTest(name = "{0}")
    @MethodSource("everyReason")
    void everyApostropheIsDoubledAndEveryPartShows(ReasonCode code) {
        assertThat(code.template().replace("''", "")).doesNotContain("'");
        assertThat(code.with(1, 2, 3, 4, 5, 6, 7, 8, 9).sentence()).doesNotContain("{");
    }
}
