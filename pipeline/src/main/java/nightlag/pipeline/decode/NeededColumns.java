package nightlag.pipeline.decode;

import java.util.ArrayList;
import java.util.List;
import java.util.TreeMap;
import nightlag.pipeline.config.ColumnRef;
import nightlag.pipeline.config.Instrument;
import nightlag.pipeline.config.TagSource;

/** The columns an instrument file asks for. */
final class NeededColumns {
    private NeededColumns() {}

    /** The columns of channels and of column tags. */
    static List<ColumnRef> of(Instrument instrument) {
        List<ColumnRef> columns = new ArrayList<>();
        new TreeMap<>(instrument.channels()).values().forEach(channel -> columns.add(channel.column()));
        for (TagSource source : new TreeMap<>(instrument.tags()).values()) {
            if (source instanceof TagSource.DataColumn data) {
                columns.add(data.column());
            }
        }
        return columns;
    }
}
