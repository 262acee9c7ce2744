package nightlag.stages.sweep;

import static org.assertj.core.api.Assertions.assertThat;

import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;

class NaturalOrderTest {
    @Test
    void digitsCountAsNumbers() {
        assertThat(sorted("p10", "p2", "p1", "p", "p2a", "q1", "p2 b"))
                .containsExactly("p", "p1", "p2", "p2 b", "p2a", "p10", "q1");
    }

    @Test
    void numbersMayBeLongerThanAnyInteger() {
        assertThat(sorted("100000000000000000000000000", "99999999999999999999999999"))
                .containsExactly("99999999999999999999999999", "100000000000000000000000000");
    }

    @Test
    void leadingZerosDecideLast() {
        assertThat(sorted("01", "1", "2", "001", "0")).containsExactly("0", "001", "01", "1", "2");
        assertThat(NaturalOrder.compare("1", "01")).isNotZero();
    }

    @Test
    void emptyTextComesFirst() {
        assertThat(sorted("1", "", "a")).containsExactly("", "1", "a");
    }

    private static List<String> sorted(String... texts) {
        return Stream.of(texts).sorted(NaturalOrder::compare).toList();
    }
}
