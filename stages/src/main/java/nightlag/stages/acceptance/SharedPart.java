package nightlag.stages.acceptance;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;

/**
 * What many records share of an estimate's uncertainty: each influence moves the estimate by its own standard uncertainty's
 * effect, whatever number of points it rests on; the effects add as squares (JCGM 100:2008, 5.1.2).
 */
final class SharedPart {
    /** A smaller part of u² is not worth a word. */
    private static final double WORTH_A_WORD = 0.01;

    private record Effect(String influence, double size) {}

    private final List<Effect> effects = new ArrayList<>();
    private final List<String> unknown = new ArrayList<>();

    void add(String influence, OptionalDouble effect) {
        if (effect.isPresent() && Double.isFinite(effect.getAsDouble())) {
            effects.add(new Effect(influence, effect.getAsDouble()));
        } else {
            unknown.add(influence);
        }
    }

    /** The estimate with it; one without a u of its own stays without. */
    Estimate with(double value, OptionalDouble own, List<String> notes) {
        List<String> said = new ArrayList<>(notes);
        if (own.isEmpty()) {
            return new Estimate(value, own, said);
        }
        double variance = Node.square(own.getAsDouble())
                + effects.stream()
                        .mapToDouble(effect -> Node.square(effect.size()))
                        .sum();
        List<String> words = effects.stream()
                .filter(effect -> Node.square(effect.size()) > WORTH_A_WORD * variance)
                .map(Effect::influence)
                .toList();
        if (!words.isEmpty()) {
            said.add("u holds that of " + String.join(", ", words));
        }
        if (!unknown.isEmpty()) {
            said.add("what " + String.join(", ", unknown) + " leaves open of it is not known and not in u");
        }
        return new Estimate(value, OptionalDouble.of(Math.sqrt(variance)), said);
    }
}
