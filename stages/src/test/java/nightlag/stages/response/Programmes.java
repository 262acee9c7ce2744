package nightlag.stages.response;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import nightlag.stages.response.Programme.Instant;
import nightlag.stages.response.ResponsePlan.Controlled;
import nightlag.stages.response.ResponsePlan.Step;
import nightlag.stages.response.ResponseRow.StrainParts;
import nightlag.stages.spectrum.RelaxationModes;
import nightlag.stages.spectrum.RetardationModes;

/** Short ways to ask a set of modes for what it does. */
final class Programmes {
    /** Instants are wanted from here on after a step, s. */
    static final double FIRST = 1e-3;

    private Programmes() {}

    static Step step(double timeS, double value) {
        return new Step(timeS, value);
    }

    static ResponsePlan stress(double untilS, Step... steps) {
        return new ResponsePlan("a day", List.of(), Controlled.STRESS, List.of(steps), untilS);
    }

    static ResponsePlan strain(double untilS, Step... steps) {
        return new ResponsePlan("a day", List.of(), Controlled.STRAIN, List.of(steps), untilS);
    }

    static ResponsePlan heated(List<Step> temperatures, ResponsePlan plan) {
        return new ResponsePlan(plan.name(), temperatures, plan.controlled(), plan.steps(), plan.untilS());
    }

    static Programme programme(ResponsePlan plan) {
        return Programme.of(plan, 300, FIRST);
    }

    /** The whole programme at the temperature of the spectrum. */
    static BoltzmannSum sum(Programme programme) {
        double[] rates = new double[programme.segments().size()];
        Arrays.fill(rates, 1);
        return new BoltzmannSum(programme, rates);
    }

    static List<StrainParts> strains(ResponsePlan plan, RetardationModes modes) {
        return sum(programme(plan)).strains(modes);
    }

    static double[] totals(List<StrainParts> strains) {
        return strains.stream().mapToDouble(StrainParts::sum).toArray();
    }

    static double[] stresses(ResponsePlan plan, RelaxationModes modes) {
        return sum(programme(plan)).stresses(modes);
    }

    /** Instants of the last segment, after its step. */
    static List<Integer> afterLastStep(Programme programme) {
        List<Integer> found = new ArrayList<>();
        List<Instant> instants = programme.instants();
        for (int i = 0; i < instants.size(); i++) {
            if (instants.get(i).segment() == programme.segments().size() - 1) {
                found.add(i);
            }
        }
        return found;
    }
}
