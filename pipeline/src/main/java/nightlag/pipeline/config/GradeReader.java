package nightlag.pipeline.config;

import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.OptionalInt;
import nightlag.stages.ConclusionPlan;
import nightlag.stages.acceptance.LimitPlan;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.moduli.ScreeningPlan;
import nightlag.stages.response.ResponsePlan;
import nightlag.stages.spectrum.SpectrumPlan;
import nightlag.stages.superposition.SuperpositionPlan;
import nightlag.stages.sweep.SweepPlan;
import nightlag.stages.waveform.Drift;
import nightlag.stages.waveform.ExtractionPlan;
import nightlag.stages.waveform.FrequencySource;

/** Reads what stands in a grade file, everything it extends merged in. */
final class GradeReader {
    private final FileSections file;

    private GradeReader(FileSections file) {
        this.file = file;
    }

    /**
     * Reads one grade.
     *
     * @param name the grade's name; empty text for a file that only serves {@code extends}
     * @param fileName the file, as the person would name it
     * @param merged what stands in it and in all it extends
     * @param problems where everything wrong goes
     * @return empty where something is wrong
     */
    static Optional<Grade> read(String name, String fileName, Node.Table merged, Problems problems) {
        return new GradeReader(new FileSections(GradeKeys.KIND, merged, problems)).grade(name, fileName);
    }

    private Optional<Grade> grade(String name, String fileName) {
        file.top().text(GradeKeys.GRADE);
        file.top().text(GradeKeys.EXTENDS);
        Optional<GeometrySpec> geometry = file.optional(GeometryKeys.GEOMETRY).flatMap(GeometryReader::read);
        Optional<ExtractionPlan> extraction = extraction(file.section(GradeKeys.EXTRACTION));
        Optional<ScreeningPlan> screening = ScreeningReader.read(file.section(GradeKeys.SCREENING));
        Optional<SweepPlan> sweeps = sweeps(file.section(GradeKeys.SWEEPS));
        Optional<SuperpositionPlan> superposition =
                file.optional(GradeKeys.SUPERPOSITION).flatMap(GradeReader::superposition);
        Optional<SpectrumPlan> spectrum = file.optional(GradeKeys.SPECTRUM).flatMap(GradeReader::spectrum);
        List<ResponsePlan> responses = ResponsesReader.read(file.repeated(GradeKeys.RESPONSE));
        OwnFiguresReader figures =
                OwnFiguresReader.read(file.repeated(GradeKeys.DERIVED), file.repeated(GradeKeys.MARKER));
        List<LimitPlan> limits = LimitsReader.read(file.repeated(GradeKeys.LIMIT), figures.limitSubjects());
        Map<Dimension, Double> uncertainty = uncertainty();
        if (extraction.isEmpty() || screening.isEmpty() || sweeps.isEmpty()) {
            return Optional.empty();
        }
        ConclusionPlan conclusion = new ConclusionPlan(
                sweeps.get(), superposition, spectrum, responses, limits, uncertainty, figures.plan());
        return Optional.of(new Grade(
                name,
                fileName,
                geometry,
                extraction.get(),
                screening.get(),
                conclusion,
                Fingerprints.of(geometry, extraction.get(), screening.get()),
                Fingerprints.of(conclusion)));
    }

    private static Optional<ExtractionPlan> extraction(SectionReader section) {
        OptionalDouble startUp = section.real(GradeKeys.START_UP_CYCLES);
        OptionalInt harmonics = section.whole(GradeKeys.HARMONICS);
        Optional<Drift> drift = section.word(GradeKeys.DRIFT, Drift.class);
        Optional<FrequencySource> source = section.word(GradeKeys.FREQUENCY_FROM, FrequencySource.class);
        if (startUp.isEmpty() || harmonics.isEmpty() || drift.isEmpty() || source.isEmpty()) {
            return Optional.empty();
        }
        return Optional.of(new ExtractionPlan(startUp.getAsDouble(), harmonics.getAsInt(), drift.get(), source.get()));
    }

    private static Optional<SweepPlan> sweeps(SectionReader section) {
        Optional<SweepPlan.Kind> kind = section.word(GradeKeys.SWEEP_KIND, SweepPlan.Kind.class);
        Optional<SweepPlan.Repeats> repeats = section.word(GradeKeys.REPEATS, SweepPlan.Repeats.class);
        Optional<SweepPlan.OnsetAxis> axis = section.word(GradeKeys.ONSET_AXIS, SweepPlan.OnsetAxis.class);
        return kind.isPresent() && repeats.isPresent() && axis.isPresent()
                ? Optional.of(new SweepPlan(kind.get(), repeats.get(), axis.get()))
                : Optional.empty();
    }

    private static Optional<SuperpositionPlan> superposition(SectionReader section) {
        OptionalDouble reference = section.si(GradeKeys.REFERENCE_TEMPERATURE);
        Optional<SuperpositionPlan.VerticalShift> shift =
                section.word(GradeKeys.VERTICAL_SHIFT, SuperpositionPlan.VerticalShift.class);
        OptionalDouble expansion = section.si(GradeKeys.EXPANSION);
        Optional<SuperpositionPlan.ShiftLaw> law = section.word(GradeKeys.LAW, SuperpositionPlan.ShiftLaw.class);
        OptionalDouble tolerance = section.real(GradeKeys.TOLERANCE);
        if (shift.isPresent()
                && shift.get() == SuperpositionPlan.VerticalShift.DENSITY
                && !section.has(GradeKeys.EXPANSION)) {
            section.missing(GradeKeys.EXPANSION, "the volumetric expansion, as vertical_shift is \"density\"");
        }
        if (reference.isEmpty() || shift.isEmpty() || law.isEmpty() || tolerance.isEmpty()) {
            return Optional.empty();
        }
        return Optional.of(new SuperpositionPlan(
                reference.getAsDouble(), shift.get(), expansion, law.get(), tolerance.getAsDouble()));
    }

    private static Optional<SpectrumPlan> spectrum(SectionReader section) {
        Optional<Equilibrium> equilibrium = section.word(GradeKeys.EQUILIBRIUM, Equilibrium.class);
        Optional<Boolean> continuous = section.flag(GradeKeys.CONTINUOUS);
        OptionalInt modes = modes(section);
        if (equilibrium.isEmpty() || continuous.isEmpty()) {
            return Optional.empty();
        }
        return Optional.of(new SpectrumPlan(equilibrium.get() == Equilibrium.FITTED, modes, continuous.get()));
    }

    private static OptionalInt modes(SectionReader section) {
        Node node = section.node(GradeKeys.MODES).orElseThrow();
        if (node instanceof Node.Scalar scalar && scalar.value() instanceof Long) {
            return section.whole(GradeKeys.MODES, node, new KeyType.Whole(1, GradeKeys.MOST_MODES));
        }
        if (!(node instanceof Node.Scalar scalar) || !"auto".equals(scalar.value())) {
            section.wrong(
                    GradeKeys.MODES,
                    "found " + node.found(),
                    GradeKeys.MODES.type().words());
        }
        return OptionalInt.empty();
    }

    private Map<Dimension, Double> uncertainty() {
        Map<Dimension, Double> uncertainty = new EnumMap<>(Dimension.class);
        file.optional(GradeKeys.UNCERTAINTY).ifPresent(section -> {
            for (Dimension dimension : Dimension.values()) {
                Key key = GradeKeys.UNCERTAINTY.key(dimension.word()).orElseThrow();
                section.si(key).ifPresent(value -> uncertainty.put(dimension, value));
            }
        });
        return uncertainty;
    }

    /** The words of the key {@code equilibrium}. */
    private enum Equilibrium {
        NONE,
        FITTED
    }
}
