package nightlag.pipeline.night;

import java.io.IOException;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.BiFunction;
import java.util.stream.Collectors;
import nightlag.pipeline.config.Configuration;
import nightlag.pipeline.config.Intake;
import nightlag.pipeline.decode.DecodeCounts;
import nightlag.pipeline.decode.DecodeException;
import nightlag.pipeline.decode.FileDescription;
import nightlag.pipeline.decode.RawFileDecoder;
import nightlag.pipeline.decode.RunSheetRow;
import nightlag.pipeline.decode.RunSheets;
import nightlag.pipeline.intake.IntakeScan;
import nightlag.pipeline.intake.RawFile;
import nightlag.stages.MeasuredRecord;
import nightlag.stages.Reduce;
import nightlag.stages.Reduction;
import nightlag.stages.ReductionPlan;
import nightlag.stages.ReductionTrace;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.ModulusPoint;

/**
 * One raw file's way through the stages, found without writing anything.
 *
 * @param file the file
 * @param description how it decodes; empty where its head cannot be read as said
 * @param counts where its rows went; empty where the file would be set aside
 * @param record the record followed
 * @param followed its way; empty where no record came to the stages
 * @param point the point picked among those of the record
 * @param creep the creep curve of the record
 * @param others all other points of the file, in order
 * @param problem why the file would be set aside; empty text where it would not
 */
public record FileTrace(
        RawFile file,
        Optional<FileDescription> description,
        Optional<DecodeCounts> counts,
        Optional<MeasuredRecord> record,
        Optional<ReductionTrace> followed,
        Optional<ModulusPoint> point,
        Optional<CreepCurve> creep,
        List<ModulusPoint> others,
        String problem) {
    private static final int MOST_NAMED = 20;

    /** Copies the list. */
    public FileTrace {
        others = List.copyOf(others);
    }

    /**
     * Follows one file. The archive is not asked: whether the file's lot differs only in case from a known one stays open.
     *
     * @param name the file's name in tables, or a path to it
     * @param wanted the point to pick; empty: the first
     * @throws NightFault if the file is in no intake, or has no such point
     */
    public static FileTrace of(Configuration configuration, String name, Optional<String> wanted) throws NightFault {
        return of(configuration, name, wanted, Reduce::reduce);
    }

    /** The same with the stages given. */
    static FileTrace of(
            Configuration configuration,
            String name,
            Optional<String> wanted,
            BiFunction<MeasuredRecord, ReductionPlan, Reduction> stages)
            throws NightFault {
        RawFile file = find(configuration, name);
        Optional<FileDescription> description = Optional.empty();
        Following following = new Following(configuration, file, wanted, stages);
        try {
            Optional<RunSheetRow> row = new RunSheets().rowOf(file);
            description = Optional.of(RawFileDecoder.describe(file, row));
            DecodeCounts counts = RawFileDecoder.decode(file, row, following::take);
            return following.end(description, Optional.of(counts), "");
        } catch (GradePlans.GradeStopped e) {
            return following.end(description, Optional.empty(), file.tableName() + ": " + e.getMessage());
        } catch (DecodeException e) {
            return following.end(description, Optional.empty(), e.problem().sentence());
        } catch (IOException e) {
            return following.end(
                    description, Optional.empty(), file.tableName() + ": cannot be read: " + IoSentences.of(e));
        } catch (InvalidPathException e) {
            return following.end(description, Optional.empty(), file.tableName() + ": " + IoSentences.of(e));
        } catch (RuntimeException | StackOverflowError e) {
            // as in a run, a bug sets the file aside
            return following.end(description, Optional.empty(), file.tableName() + ": internal fault: " + e);
        }
    }

    /** Follows one record of those that come by, and reduces the others. */
    private static final class Following {
        private final RawFile file;
        private final GradePlans plans;
        private final Optional<String> wanted;
        private final BiFunction<MeasuredRecord, ReductionPlan, Reduction> stages;
        private final List<ModulusPoint> others = new ArrayList<>();
        private Optional<MeasuredRecord> record = Optional.empty();
        private Optional<ReductionTrace> followed = Optional.empty();
        private Optional<ModulusPoint> point = Optional.empty();
        private Optional<CreepCurve> creep = Optional.empty();

        Following(
                Configuration configuration,
                RawFile file,
                Optional<String> wanted,
                BiFunction<MeasuredRecord, ReductionPlan, Reduction> stages) {
            this.file = file;
            this.plans = new GradePlans(configuration, file.intake().instrument());
            this.wanted = wanted;
            this.stages = stages;
        }

        void take(MeasuredRecord next) {
            ReductionPlan plan = plans.of(next.tags().key().grade());
            Reduction reduction = stages.apply(next, plan);
            reduction
                    .creep()
                    .filter(curve -> wanted.orElse(curve.key().point())
                            .equals(curve.key().point()))
                    .ifPresent(curve -> {
                        creep = Optional.of(curve);
                        record = Optional.of(next);
                        followed = Optional.of(ReductionTrace.of(next, plan));
                    });
            for (ModulusPoint found : reduction.points()) {
                if (point.isEmpty()
                        && wanted.orElse(found.key().point()).equals(found.key().point())) {
                    point = Optional.of(found);
                    record = Optional.of(next);
                    followed = Optional.of(ReductionTrace.of(next, plan));
                } else {
                    others.add(found);
                }
            }
        }

        FileTrace end(Optional<FileDescription> description, Optional<DecodeCounts> counts, String problem)
                throws NightFault {
            if (wanted.isPresent() && point.isEmpty() && creep.isEmpty() && problem.isEmpty()) {
                throw new NightFault(
                        NightFault.Kind.CANNOT_BEGIN,
                        file.tableName() + " has no point '" + wanted.get() + "'; its points are "
                                + named(others.stream()
                                        .map(other -> other.key().point())
                                        .toList()));
            }
            return new FileTrace(file, description, counts, record, followed, point, creep, others, problem);
        }

        private static String named(List<String> points) {
            String first = points.stream().limit(MOST_NAMED).collect(Collectors.joining("', '", "'", "'"));
            int more = points.size() - MOST_NAMED;
            return more > 0
                    ? first + " and " + more + " more, the last '" + points.get(points.size() - 1) + "'"
                    : first;
        }
    }

    private static RawFile find(Configuration configuration, String name) throws NightFault {
        for (Intake intake : configuration.intakes()) {
            Optional<String> below = belowIntake(intake, name);
            if (below.isPresent()) {
                Optional<RawFile> file = scan(intake).stream()
                        .filter(found -> found.relativePath().equals(below.get()))
                        .findFirst();
                if (file.isPresent()) {
                    return file.get();
                }
            }
        }
        throw notFound(configuration, name);
    }

    private static NightFault notFound(Configuration configuration, String name) {
        List<Intake> around = configuration.intakes().stream()
                .filter(intake -> belowIntake(intake, name).isPresent())
                .toList();
        if (around.isEmpty()) {
            return new NightFault(
                    NightFault.Kind.CANNOT_BEGIN,
                    name + " is in none of the intakes "
                            + configuration.intakes().stream()
                                    .map(intake -> intake.folder().toString())
                                    .collect(Collectors.joining(", ")));
        }
        return new NightFault(
                NightFault.Kind.CANNOT_BEGIN,
                name + " is no raw file of the intake " + around.get(0).folder()
                        + ": it is not there, or match = '"
                        + around.get(0).instrument().files().match() + "' of instrument "
                        + around.get(0).instrument().id() + " does not take it");
    }

    private static List<RawFile> scan(Intake intake) throws NightFault {
        try {
            return IntakeScan.scan(intake).files();
        } catch (IOException e) {
            throw new NightFault(
                    NightFault.Kind.CANNOT_BEGIN,
                    "the intake " + intake.folder() + " cannot be read: " + IoSentences.of(e),
                    e);
        }
    }

    /** The path below an intake's folder, with '/', of a file called by its name in tables or by a path. */
    private static Optional<String> belowIntake(Intake intake, String name) {
        String prefix = intake.name() + "/";
        if (name.startsWith(prefix)) {
            return Optional.of(name.substring(prefix.length()));
        }
        try {
            Path folder = real(intake.folder());
            Path file = real(Path.of(name));
            if (!file.startsWith(folder) || file.equals(folder)) {
                return Optional.empty();
            }
            List<String> parts = new ArrayList<>();
            folder.relativize(file).forEach(part -> parts.add(part.toString()));
            return Optional.of(String.join("/", parts));
        } catch (InvalidPathException e) {
            return Optional.empty();
        }
    }

    private static Path real(Path path) {
        try {
            return path.toRealPath();
        } catch (IOException e) {
            return path.toAbsolutePath().normalize();
        }
    }
}
