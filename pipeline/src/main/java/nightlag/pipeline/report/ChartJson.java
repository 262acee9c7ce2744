package nightlag.pipeline.report;

import com.fasterxml.jackson.core.JsonProcessingException;
import com.fasterxml.jackson.core.SerializableString;
import com.fasterxml.jackson.core.io.CharacterEscapes;
import com.fasterxml.jackson.databind.json.JsonMapper;
import java.util.List;

/** Charts as data that can stand inside a page: no text in it can end the element it stands in. */
final class ChartJson {
    private static final JsonMapper MAPPER = mapper();

    private ChartJson() {}

    static String of(List<Chart> charts) {
        try {
            return MAPPER.writeValueAsString(charts);
        } catch (JsonProcessingException e) {
            throw new IllegalStateException("charts that cannot be written", e);
        }
    }

    private static JsonMapper mapper() {
        JsonMapper mapper = JsonMapper.builder().build();
        mapper.getFactory().setCharacterEscapes(new WithoutMarkup());
        return mapper;
    }

    private static final class WithoutMarkup extends CharacterEscapes {
        private static final long serialVersionUID = 1L;

        @Override
        public int[] getEscapeCodesForAscii() {
            int[] codes = standardAsciiEscapesForJSON();
            for (char each : new char[] {'<', '>', '&'}) {
                codes[each] = ESCAPE_STANDARD;
            }
            return codes;
        }

        @Override
        public SerializableString getEscapeSequence(int character) {
            return null;
        }
    }
}
