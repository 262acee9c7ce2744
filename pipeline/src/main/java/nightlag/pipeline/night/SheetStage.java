package nightlag.pipeline.night;

import java.math.BigDecimal;
import java.math.MathContext;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.pipeline.archive.ArchiveException;
import nightlag.pipeline.archive.KeptRow;
import nightlag.pipeline.archive.LotName;
import nightlag.pipeline.config.TeamSheet;
import nightlag.pipeline.teamsheet.SheetOutcome;
import nightlag.pipeline.teamsheet.SheetRow;
import nightlag.pipeline.teamsheet.SheetUpdate;
import nightlag.pipeline.teamsheet.SheetValue;
import nightlag.pipeline.teamsheet.TeamSheetFile;
import nightlag.stages.LotResult;
import nightlag.stages.acceptance.Judgement;
import nightlag.stages.acceptance.ShownUnit;
import org.apache.logging.log4j.LogManager;
import org.apache.logging.log4j.Logger;

/**
 * The end of a night: the rows of the team sheet that are not in it yet go in. They are kept in the archive, so that one that
 * cannot go in waits there for the next run.
 */
final class SheetStage {
    private static final Logger LOG = LogManager.getLogger(SheetStage.class);

    /** A value converted into the unit of its limit is as exact as this; what lies behind is of the conversion. */
    private static final MathContext CONVERTED = new MathContext(12);

    private final NightWork night;

    SheetStage(NightWork night) {
        this.night = night;
    }

    /** The row of a lot: value and verdict of each limit, in the unit the grade file writes it in. */
    static SheetRow row(LotName lot, LotResult result) {
        return new SheetRow(
                lot.grade(),
                lot.lot(),
                result.acceptance().stream().map(SheetStage::value).toList());
    }

    private static SheetValue value(Judgement judgement) {
        ShownUnit unit = judgement.limit().shown();
        return new SheetValue(
                judgement.limit().title(),
                unit.symbol(),
                judgement.value().isPresent()
                        ? OptionalDouble.of(shown(unit, judgement.value().getAsDouble()))
                        : OptionalDouble.empty(),
                Optional.of(judgement.verdict().word()));
    }

    private static double shown(ShownUnit unit, double value) {
        double shown = unit.of(value);
        boolean asItIs = unit.factor() == 1 && unit.offset() == 0;
        return asItIs || !Double.isFinite(shown)
                ? shown
                : new BigDecimal(shown).round(CONVERTED).doubleValue();
    }

    /** Puts in what is due. */
    void work(LocalDate today) throws ArchiveException {
        Optional<TeamSheet> configured = night.configuration().teamSheet();
        if (configured.isEmpty()) {
            return;
        }
        TeamSheet sheet = configured.get();
        String where = sheet.file() + "\n" + sheet.sheet();
        TeamSheetFile file = new TeamSheetFile(sheet.file(), sheet.sheet());
        List<LotName> lots = new ArrayList<>();
        List<SheetRow> due = new ArrayList<>();
        List<SheetRow> others = new ArrayList<>();
        for (KeptRow kept : night.archive().sheetRows()) {
            if (kept.written().equals(where)) {
                others.add(SheetRow.fromJson(kept.body()));
            } else if (night.options().wants(kept.lot())) {
                due.add(SheetRow.fromJson(kept.body()));
                lots.add(kept.lot());
            }
        }
        if (due.isEmpty() && (others.isEmpty() || file.exists())) {
            return;
        }
        SheetOutcome outcome = update(file, new SheetUpdate(due, others, today));
        if (outcome instanceof SheetOutcome.Written written) {
            night.archive().sheetRowsWritten(lots, where);
            night.tally().teamSheet(written(sheet.file(), written));
        } else {
            night.tally().teamSheet(waiting(sheet.file(), due.size(), outcome));
        }
    }

    private static SheetOutcome update(TeamSheetFile file, SheetUpdate update) {
        try {
            return file.update(update);
        } catch (RuntimeException e) {
            // a bug stops the sheet and nothing else; the log has what is needed to mend it
            LOG.error("team sheet: internal fault", e);
            return new SheetOutcome.Refused("internal fault: " + e);
        }
    }

    private static SheetReport written(Path file, SheetOutcome.Written written) {
        String line = "sheet   " + written.added() + " rows added, " + written.changed() + " changed"
                + (written.columns().isEmpty() ? "" : ", " + written.columns().size() + " columns added") + " in "
                + file;
        return new SheetReport(
                Optional.of(line),
                written.notes().stream().map(note -> file + ": " + note).toList(),
                false);
    }

    private static SheetReport waiting(Path file, int rows, SheetOutcome outcome) {
        boolean refused = outcome instanceof SheetOutcome.Refused;
        String reason = outcome instanceof SheetOutcome.Refused because
                ? because.reason()
                : ((SheetOutcome.Waiting) outcome).reason();
        return new SheetReport(
                Optional.of("sheet   " + rows + " rows wait in the archive"),
                List.of(file + ": " + reason + "; it is as it was, and " + rows + (rows == 1 ? " row goes" : " rows go")
                        + " in with the next run"),
                refused);
    }
}
