package nightlag.pipeline.cli;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Function;
import java.util.stream.Collectors;
import nightlag.pipeline.decode.DecodeCounts;
import nightlag.pipeline.decode.FileDescription;
import nightlag.pipeline.night.FileTrace;
import nightlag.stages.RecordKind;
import nightlag.stages.ReductionTrace;
import nightlag.stages.WaveformRecord;
import nightlag.stages.fault.Reason;
import nightlag.stages.geometry.CorrectionSize;
import nightlag.stages.geometry.GeometrySpec;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.waveform.SignalFit;

/** A file's way through the stages as a page for a terminal: one screen for a file of one point. */
final class TracePage {
    private static final int WIDTH = 100;
    private static final int LABEL = 13;
    /** A space at which no line ends; it is printed as a plain one. */
    private static final char NO_BREAK = '\u00a0';

    private static final String SHORT = "%.3g";
    private static final String LONG = "%.6g";
    private static final double KELVIN_AT_ZERO_CELSIUS = 273.15;

    private final FileTrace trace;
    private final List<String> lines = new ArrayList<>();

    TracePage(FileTrace trace) {
        this.trace = trace;
    }

    /** The page, a line each, none longer than a terminal is wide. */
    List<String> lines() {
        lines.clear();
        trace.description().ifPresent(this::decoding);
        trace.counts().ifPresent(this::rows);
        trace.followed()
                .ifPresent(followed -> trace.point().ifPresent(point -> {
                    record(point.key());
                    geometry(followed);
                    corrections(followed, point);
                    signal(followed, point);
                    moduli(point);
                    harmonics(point.harmonics());
                    flags(point);
                }));
        trace.followed()
                .ifPresent(followed -> trace.creep().ifPresent(curve -> {
                    record(curve.key());
                    geometry(followed);
                    new CreepTrace(curve, followed).lines(this::line);
                }));
        if (trace.problem().isEmpty()) {
            trace.point()
                    .map(ModulusPoint::key)
                    .or(() -> trace.creep().map(CreepCurve::key))
                    .ifPresent(this::lot);
        } else {
            line("set aside", trace.problem());
        }
        others();
        return List.copyOf(lines);
    }

    private void decoding(FileDescription file) {
        line(
                "file",
                file.file() + ", instrument "
                        + trace.file().intake().instrument().id());
        line("decoding", DecodingWords.head(file));
        for (FileDescription.DescribedChannel channel : file.channels()) {
            line("  " + channel.name().word(), DecodingWords.channel(channel));
        }
        for (FileDescription.DescribedTag tag : file.tags()) {
            line(
                    "  " + tag.name().word(),
                    tag.text() + tag.value().map(value -> " = " + value).orElse("") + ", from " + tag.from());
        }
    }

    private void rows(DecodeCounts counts) {
        line(
                "rows",
                counts.rows() + " read, " + counts.used() + " used, " + (counts.leftOut() - counts.outsideWindows())
                        + " left out for an empty cell"
                        + (counts.outsideWindows() > 0 ? ", " + counts.outsideWindows() + " outside the windows" : "")
                        + "; " + counts.records()
                        + (counts.records() == 1 ? " record" : " records"));
    }

    private void record(PointKey key) {
        trace.record().ifPresent(record -> {
            if (record instanceof WaveformRecord waveforms) {
                double[] time = waveforms.waveform().timeS();
                line(
                        "record",
                        "point " + key.point() + ": " + time.length + " samples of "
                                + waveforms.deformationSignal().name().toLowerCase(Locale.ROOT) + " and "
                                + waveforms.loadSignal().name().toLowerCase(Locale.ROOT)
                                + (time.length > 0
                                        ? " over " + digits(LONG, time[time.length - 1] - time[0]) + " s"
                                        : ""));
            } else {
                line("record", "point " + key.point() + ": moduli reduced elsewhere");
            }
        });
    }

    private void geometry(ReductionTrace followed) {
        followed.correction().ifPresent(correction -> {
            GeometrySpec spec = followed.spec().orElseGet(GeometrySpec::none);
            String dimensions = spec.dimensions().entrySet().stream()
                    .sorted(Comparator.comparing(entry -> entry.getKey()))
                    .map(entry -> ", " + entry.getKey().word() + " " + digits(LONG, entry.getValue()))
                    .collect(Collectors.joining());
            line("geometry", spec.kind().word() + dimensions + (dimensions.isEmpty() ? "" : " (SI)"));
            line(
                    "",
                    "strain = " + digits(LONG, correction.geometry().strainPerDeformation())
                            + " × deformation, stress = "
                            + digits(LONG, correction.geometry().stressPerLoad()) + " × load, "
                            + correction.deformationMode().word());
        });
    }

    private void corrections(ReductionTrace followed, ModulusPoint point) {
        List<CorrectionSize> sizes = followed.corrections(point);
        if (sizes.isEmpty() && followed.correction().isPresent()) {
            line("corrections", "none");
        }
        String label = "corrections";
        for (CorrectionSize size : sizes) {
            line(
                    label,
                    size.name() + " " + digits(SHORT, size.value()) + " " + size.unit() + ": "
                            + digits(SHORT, size.share()) + " of " + size.actsOn());
            label = "";
        }
    }

    private void signal(ReductionTrace followed, ModulusPoint point) {
        Optional<SignalFit> fit = followed.fit(point);
        point.frequencyHz()
                .ifPresent(frequency -> line("frequency", digits("%.9g", frequency) + " Hz" + said(frequency, fit)));
        if (point.cyclesUsed().isPresent()) {
            line(
                    "signal",
                    digits(LONG, point.cyclesUsed().getAsDouble()) + " cycles, " + point.samplesUsed() + " samples used"
                            + fit.map(SignalFit::samplesLeftOut)
                                    .map(left -> ", " + left + " left out")
                                    .orElse("")
                            + "; signal to noise " + decibel(point.strainSnrDb()) + " deformation, "
                            + decibel(point.stressSnrDb()) + " load");
        }
        fit.flatMap(found -> found.screening().cycleScatter())
                .ifPresent(scatter -> line(
                        "relative u",
                        digits(SHORT, scatter.noiseU()) + " from the noise, " + digits(SHORT, scatter.cyclesU())
                                + " from cycle to cycle"));
        point.temperatureK()
                .ifPresent(kelvin -> line("temperature", digits(LONG, kelvin - KELVIN_AT_ZERO_CELSIUS) + " °C"));
    }

    /** The frequency's u, and what the file or the instrument file says of it. */
    private String said(double frequencyHz, Optional<SignalFit> fit) {
        if (trace.record().isEmpty() || !(trace.record().get() instanceof WaveformRecord record)) {
            return "";
        }
        if (record.kind() instanceof RecordKind.Chirp chirp) {
            return ", one of " + digits(LONG, chirp.pointsPerDecade()) + " to the decade of the sweep";
        }
        String u = fit.map(found -> ", u " + digits(SHORT, found.frequencyUHz()) + " Hz")
                .orElse("");
        if (record.kind() instanceof RecordKind.Multisine multisine) {
            return u
                    + multisine.frequenciesHz().stream()
                            .min(Comparator.comparing(given -> Math.abs(Math.log(given / frequencyHz))))
                            .map(given -> "; [records] frequencies says " + off(frequencyHz, given))
                            .orElse("; found, [records] frequencies is not given");
        }
        OptionalDouble tag = record.waveform().nominalFrequencyHz();
        return u + (tag.isPresent() ? "; the tag says " + off(frequencyHz, tag.getAsDouble()) : "; no tag");
    }

    private static String off(double frequencyHz, double saidHz) {
        return digits(LONG, saidHz) + " Hz, off by " + digits("%.2g", frequencyHz / saidHz - 1) + " of it";
    }

    private void moduli(ModulusPoint point) {
        if (point.strainAmplitude().isPresent()) {
            line(
                    "amplitudes",
                    "strain " + digits(LONG, point.strainAmplitude().getAsDouble()) + ", stress "
                            + digits(LONG, point.stressAmplitudePa().orElse(Double.NaN)) + " Pa");
        }
        if (point.moduli().isEmpty()) {
            line("moduli", "none");
            return;
        }
        Moduli moduli = point.moduli().get();
        line(
                "moduli",
                "storage " + pascal(moduli.storagePa())
                        + u(moduli.covariance().map(ModuliCovariance::storageU).orElse(Double.NaN), " Pa"));
        line(
                "",
                "loss    " + pascal(moduli.lossPa())
                        + u(moduli.covariance().map(ModuliCovariance::lossU).orElse(Double.NaN), " Pa"));
        line(
                "",
                "tan δ   " + digits(LONG, moduli.tanDelta())
                        + u(moduli.tanDeltaU().orElse(Double.NaN), "")
                        + point.degreesOfFreedom().stream()
                                .mapToObj(freedom -> "; degrees of freedom " + digits(SHORT, freedom))
                                .collect(Collectors.joining()));
    }

    private void harmonics(List<Harmonic> harmonics) {
        if (harmonics.size() > 1) {
            line(
                    "harmonics",
                    harmonics.stream()
                            .skip(1)
                            .map(harmonic -> "I" + harmonic.order() + "/I1 "
                                    + digits("%.2g", harmonic.relativeIntensity())
                                    + u(harmonic.relativeIntensityU().orElse(Double.NaN), ""))
                            .map(text -> text.replace(' ', NO_BREAK))
                            .collect(Collectors.joining("; ")));
        }
    }

    private void flags(ModulusPoint point) {
        line("flags", point.quality().word() + (point.flags().isEmpty() ? ", no flag" : ""));
        for (Reason reason : point.reasons()) {
            line("", reason.sentence());
        }
    }

    private void lot(PointKey key) {
        line(
                "lot",
                "its points would join " + key.grade() + ", lot " + key.lot() + ": specimen " + key.specimen()
                        + ", sweep " + key.sweep() + ", point " + key.point());
        line("", "the archive is not asked: a known lot that differs only in case would set it aside");
    }

    private void others() {
        String label = "other points";
        for (ModulusPoint point : trace.others()) {
            line(
                    label,
                    named(point.key())
                            + point.frequencyHz().stream()
                                    .mapToObj(hz -> digits(SHORT, hz) + " Hz, ")
                                    .collect(Collectors.joining())
                            + point.temperatureK().stream()
                                    .mapToObj(kelvin -> digits(LONG, kelvin - KELVIN_AT_ZERO_CELSIUS) + " °C, ")
                                    .collect(Collectors.joining())
                            + point.elapsedS().stream()
                                    .mapToObj(elapsed -> digits(LONG, elapsed) + " s, ")
                                    .collect(Collectors.joining())
                            + point.moduli()
                                    .map(moduli -> "storage " + digits(SHORT, moduli.storagePa()) + " Pa, loss "
                                            + digits(SHORT, moduli.lossPa()) + " Pa, ")
                                    .orElse("")
                            + point.quality().word()
                            + point.flags().stream()
                                    .map(flag -> " " + flag.word())
                                    .collect(Collectors.joining()));
            label = "";
        }
    }

    /** What a point is called where that differs from the point followed. */
    private String named(PointKey key) {
        Optional<PointKey> followed =
                trace.point().map(ModulusPoint::key).or(() -> trace.creep().map(CreepCurve::key));
        return differing("grade", PointKey::grade, key, followed)
                + differing("lot", PointKey::lot, key, followed)
                + differing("specimen", PointKey::specimen, key, followed)
                + differing("sweep", PointKey::sweep, key, followed)
                + key.point() + ": ";
    }

    private static String differing(
            String name, Function<PointKey, String> part, PointKey key, Optional<PointKey> followed) {
        boolean same = followed.map(part).filter(part.apply(key)::equals).isPresent();
        return same ? "" : name + " " + part.apply(key) + ", ";
    }

    private static String pascal(double value) {
        return digits(LONG, value) + " Pa";
    }

    private static String u(double u, String unit) {
        return Double.isNaN(u) ? "" : ", u " + digits("%.2g", u) + unit;
    }

    private static String decibel(OptionalDouble value) {
        return value.isPresent() ? digits(SHORT, value.getAsDouble()) + " dB" : "unknown";
    }

    private static String digits(String format, double value) {
        return Figures.digits(format, value);
    }

    /** A line with its label in front; what does not fit goes on below, indented. */
    private void line(String label, String text) {
        String indent = " ".repeat(LABEL);
        StringBuilder line = new StringBuilder(String.format(Locale.ROOT, "%-" + (LABEL - 1) + "s ", label));
        for (String word : text.split(" ", -1)) {
            boolean bare = line.toString().isBlank() || line.length() == LABEL;
            if (!bare && line.length() + 1 + word.length() > WIDTH) {
                lines.add(line.toString().stripTrailing());
                line = new StringBuilder(indent);
                bare = true;
            }
            line.append(bare ? "" : " ").append(word.replace(NO_BREAK, ' '));
        }
        lines.add(line.toString().stripTrailing());
    }
}
