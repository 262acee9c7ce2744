package nightlag.pipeline.archive;

import com.fasterxml.jackson.annotation.JsonFormat;
import com.fasterxml.jackson.annotation.JsonInclude;
import com.fasterxml.jackson.core.JsonProcessingException;
import com.fasterxml.jackson.databind.DeserializationFeature;
import com.fasterxml.jackson.databind.ObjectReader;
import com.fasterxml.jackson.databind.ObjectWriter;
import com.fasterxml.jackson.databind.json.JsonMapper;
import com.fasterxml.jackson.datatype.jdk8.Jdk8Module;
import nightlag.stages.Reduction;
import nightlag.stages.moduli.CreepReading;
import nightlag.stages.moduli.CreepStep;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.LoopPair;
import nightlag.stages.moduli.SharedEffect;

/**
 * A reduction as one line of JSON and back, equal to the last bit: doubles are written so that they read back the same,
 * what is not there is left out, harmonics, loops and creep readings are plain arrays in the order of their components.
 */
final class ReductionJson {
    private static final JsonMapper MAPPER = JsonMapper.builder()
            .addModule(new Jdk8Module())
            .defaultPropertyInclusion(
                    JsonInclude.Value.construct(JsonInclude.Include.NON_ABSENT, JsonInclude.Include.ALWAYS))
            .enable(DeserializationFeature.FAIL_ON_NULL_FOR_PRIMITIVES)
            .addMixIn(Harmonic.class, AsArray.class)
            .addMixIn(LoopPair.class, AsArray.class)
            .addMixIn(CreepReading.class, AsArray.class)
            .addMixIn(CreepStep.class, AsArray.class)
            .addMixIn(SharedEffect.class, AsArray.class)
            .build();
    private static final ObjectWriter WRITER = MAPPER.writerFor(Reduction.class);
    private static final ObjectReader READER = MAPPER.readerFor(Reduction.class);

    private ReductionJson() {}

    static String write(Reduction reduction) {
        try {
            return WRITER.writeValueAsString(reduction);
        } catch (JsonProcessingException cause) {
            throw new IllegalStateException("a reduction has a part that cannot be written as JSON", cause);
        }
    }

    static Reduction read(String text) throws JsonProcessingException {
        return READER.readValue(text);
    }

    @JsonFormat(shape = JsonFormat.Shape.ARRAY)
    private interface AsArray {}
}
