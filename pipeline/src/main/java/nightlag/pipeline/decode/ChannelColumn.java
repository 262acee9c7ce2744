package nightlag.pipeline.decode;

import java.util.EnumMap;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import nightlag.pipeline.config.Channel;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.Instrument;
import nightlag.pipeline.config.QuantityKind;
import nightlag.pipeline.config.Unit;

/**
 * A channel in one file: which cell it is and what the number in it means.
 *
 * @param kind what its values stand for
 * @param channel the channel as the instrument file has it
 * @param index position of its cell from 0
 * @param unit the unit in force in this file
 * @param unitFrom where that unit stands
 * @param decimal decimal sign
 * @param complaints the file's
 */
record ChannelColumn(
        QuantityKind kind,
        Channel channel,
        int index,
        Unit unit,
        String unitFrom,
        char decimal,
        Complaints complaints) {

    /** The channels of a file. */
    static Map<ChannelName, ChannelColumn> of(Instrument instrument, Columns columns) throws DecodeException {
        Map<ChannelName, ChannelColumn> found = new EnumMap<>(ChannelName.class);
        for (Map.Entry<ChannelName, Channel> entry : new TreeMap<>(instrument.channels()).entrySet()) {
            Channel channel = entry.getValue();
            QuantityKind kindOfCell = channel.sensitivity().isPresent()
                    ? QuantityKind.VOLTAGE
                    : entry.getKey().kind();
            int index = columns.indexOf(channel.column());
            Optional<Unit> inFile = columns.unitOf(index, channel.column(), kindOfCell);
            found.put(
                    entry.getKey(),
                    new ChannelColumn(
                            entry.getKey().kind(),
                            channel,
                            index,
                            inFile.orElse(channel.unit()),
                            inFile.isPresent() ? "unit row, line " + columns.unitLine() : "[channels]",
                            instrument.files().decimal(),
                            columns.complaints()));
        }
        return found;
    }

    /** The SI value of this channel in a row; NaN if the cell is empty. */
    double read(Cells cells, int line) throws DecodeException {
        if (cells.empty(index)) {
            return Double.NaN;
        }
        double number = cells.number(index, decimal);
        double value = unit.toSi(number) - channel.zero();
        double si = (channel.invert() ? -value : value) * channel.sensitivity().orElse(1);
        if (!Double.isFinite(si)) {
            throw Quantities.notANumber(cells.text(index), decimal, spot(line));
        }
        if (si <= 0 && (kind == QuantityKind.TEMPERATURE || kind == QuantityKind.FREQUENCY)) {
            Quantities.possible(si, kind, cells.text(index), spot(line));
        }
        return si;
    }

    /** This column on a line. */
    Spot spot(int line) {
        return new Spot(complaints, line, channel.column().toString());
    }
}
