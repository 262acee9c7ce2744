package nightlag.pipeline.night;

import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.Grade;
import nightlag.pipeline.config.Instrument;
import nightlag.pipeline.config.Plans;
import nightlag.pipeline.config.Problem;
import nightlag.stages.ReductionPlan;

/** The plans by which the records of one instrument are reduced, grade by grade as they come. */
final class GradePlans {
    private final Configuration configuration;
    private final Instrument instrument;
    private final Map<String, ReductionPlan> plans = new HashMap<>();

    GradePlans(Configuration configuration, Instrument instrument) {
        this.configuration = configuration;
        this.instrument = instrument;
    }

    /**
     * The plan of a grade.
     *
     * @throws GradeStopped if the grade has no right grade file, or does not go with the instrument
     */
    ReductionPlan of(String grade) {
        return plans.computeIfAbsent(grade, this::plan);
    }

    private ReductionPlan plan(String gradeName) {
        stoppedBecause(gradeName, instrument, configuration).ifPresent(reason -> {
            throw new GradeStopped(reason);
        });
        return Plans.reduction(instrument, configuration.grades().get(gradeName));
    }

    /** Why no file of this instrument that names this grade can be reduced; empty if it can. */
    static Optional<String> stoppedBecause(String grade, Instrument instrument, Configuration configuration) {
        List<Problem> problems = configuration.wrongGrades().get(grade);
        if (problems != null) {
            int more = problems.size() - 1;
            return Optional.of("the grade file of '" + grade + "' is wrong: "
                    + problems.get(0).sentence()
                    + (more == 0 ? "" : "; and " + more + " more in it, all of them under wrong grade files"));
        }
        Grade right = configuration.grades().get(grade);
        if (right == null) {
            String known = configuration.grades().keySet().stream().sorted().collect(Collectors.joining("', '"));
            return Optional.of("no grade file says grade = '" + grade
                    + "' (capitals and spaces count); there are files for '" + known + "'");
        }
        return Plans.mismatch(instrument, right).map(Problem::sentence);
    }

    /** A record names a grade that has no right grade file. */
    static final class GradeStopped extends RuntimeException {
        private static final long serialVersionUID = 1L;

        GradeStopped(String message) {
            super(message);
        }
    }
}
