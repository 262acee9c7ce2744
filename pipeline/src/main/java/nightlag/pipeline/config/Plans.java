package nightlag.pipeline.config;

import java.util.EnumMap;
import java.util.EnumSet;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import nightlag.stages.ReductionPlan;
import nightlag.stages.geometry.DeformationSignal;
import nightlag.stages.geometry.Dimension;
import nightlag.stages.geometry.GeometryKind;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.geometry.LoadSignal;
import nightlag.stages.geometry.Movement;
import nightlag.stages.moduli.SignalRange;
import nightlag.stages.moduli.SignalUncertainty;

/** What an instrument and a grade come to when they meet, which is known only once a file has named its grade. */
public final class Plans {
    private Plans() {}

    /** The plan by which a record of this instrument and this grade is reduced. */
    public static ReductionPlan reduction(Instrument instrument, Grade grade) {
        Map<DeformationSignal, SignalRange> deformation = new EnumMap<>(DeformationSignal.class);
        Map<LoadSignal, SignalRange> load = new EnumMap<>(LoadSignal.class);
        instrument.ranges().forEach((channel, range) -> {
            if (ChannelsReader.DEFORMATIONS.contains(channel)) {
                deformation.put(DeformationSignal.valueOf(channel.name()), range);
            } else {
                load.put(LoadSignal.valueOf(channel.name()), range);
            }
        });
        return new ReductionPlan(
                instrument.corrections(),
                deformation,
                load,
                geometry(instrument, grade),
                grade.extraction(),
                grade.screening(),
                uncertainty(instrument));
    }

    private static SignalUncertainty uncertainty(Instrument instrument) {
        Map<DeformationSignal, Double> deformation = new EnumMap<>(DeformationSignal.class);
        Map<LoadSignal, Double> load = new EnumMap<>(LoadSignal.class);
        OptionalDouble temperatureK = OptionalDouble.empty();
        for (Map.Entry<ChannelName, Double> own : instrument.uncertainty().entrySet()) {
            if (own.getKey() == ChannelName.TEMPERATURE) {
                temperatureK = OptionalDouble.of(own.getValue());
            } else if (ChannelsReader.DEFORMATIONS.contains(own.getKey())) {
                deformation.put(DeformationSignal.valueOf(own.getKey().name()), own.getValue());
            } else {
                load.put(LoadSignal.valueOf(own.getKey().name()), own.getValue());
            }
        }
        return new SignalUncertainty(deformation, load, temperatureK);
    }

    /** The instrument's own geometry if it has one, else the grade's. */
    public static Optional<GeometrySpec> geometry(Instrument instrument, Grade grade) {
        return instrument.geometry().or(grade::geometry);
    }

    /**
     * Why no record of this instrument can be reduced as this grade: a geometry that is needed and not there, does not
     * fit the channels or lacks a dimension that no tag brings, or a frequency that is to be exact and is not tagged.
     */
    public static Optional<Problem> mismatch(Instrument instrument, Grade grade) {
        if (instrument.records().layout() == Layout.MODULI) {
            return Optional.empty();
        }
        Set<ChannelName> channels = instrument.channels().keySet();
        Optional<GeometrySpec> geometry = geometry(instrument, grade);
        boolean turns = channels.contains(ChannelName.TORQUE) || channels.contains(ChannelName.ANGLE);
        boolean pulls = channels.contains(ChannelName.FORCE) || channels.contains(ChannelName.DISPLACEMENT);
        if (turns || pulls) {
            String records = turns ? "torque or angle" : "force or displacement";
            if (geometry.isEmpty() || geometry.get().kind() == GeometryKind.NONE) {
                return problem(
                        grade,
                        "[geometry]",
                        "the records of instrument " + instrument.id() + " are " + records
                                + ", and there is no geometry to make stress and strain of them",
                        "a section [geometry] here or in the instrument file");
            }
            GeometryKind kind = geometry.get().kind();
            if ((kind.movement() == Movement.TURN) != turns) {
                return problem(
                        grade,
                        "[geometry] kind",
                        kind.word() + " does not go with the " + records + " of instrument " + instrument.id(),
                        "a kind for " + (turns ? "torque and angle" : "force and displacement"));
            }
            String lacking = GeometryRules.lacking(kind, known(instrument, geometry.get()));
            if (!lacking.isEmpty()) {
                return problem(
                        grade,
                        "[geometry]",
                        kind.word() + " lacks " + lacking,
                        "the dimension in [geometry] or as a tag of instrument " + instrument.id());
            }
        }
        if (instrument.records().layout() == Layout.CREEP) {
            return Optional.empty();
        }
        boolean tagged = instrument.tags().containsKey(TagName.FREQUENCY) || channels.contains(ChannelName.FREQUENCY);
        if (grade.extraction().frequencyFrom() == nightlag.stages.waveform.FrequencySource.TAG && !tagged) {
            return problem(
                    grade,
                    "[extraction] frequency_from",
                    "the frequency is to come from the tag, and instrument " + instrument.id() + " tags none",
                    "the tag frequency in the instrument file, or frequency_from = \"signal\"");
        }
        return Optional.empty();
    }

    private static Set<Dimension> known(Instrument instrument, GeometrySpec geometry) {
        Set<Dimension> known = EnumSet.noneOf(Dimension.class);
        known.addAll(geometry.dimensions().keySet());
        instrument.tags().keySet().forEach(tag -> tag.dimension().ifPresent(known::add));
        return known;
    }

    private static Optional<Problem> problem(Grade grade, String place, String found, String allowed) {
        return Optional.of(new Problem(grade.file(), 0, place, found, allowed));
    }
}
