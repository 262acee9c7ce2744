package nightlag.pipeline.decode;

import java.util.List;
import java.util.Optional;
import nightlag.pipeline.config.ChannelName;
import nightlag.pipeline.config.Layout;
import nightlag.pipeline.config.TagName;

/**
 * How a raw file decodes: for a person who is setting up an instrument.
 *
 * @param file its name in tables
 * @param charset the charset it is read in
 * @param byteOrderMark whether a byte-order mark decided that
 * @param layout how records stand in it
 * @param headerLine line of the header; 0: there is none
 * @param columns header texts in order; empty without a header
 * @param firstDataLine line of the first row; 0: there is none
 * @param channels the channels, in the order of {@link ChannelName}
 * @param tags every fact that is set or, where there are rows, has a default, in the order of {@link TagName}
 */
public record FileDescription(
        String file,
        String charset,
        boolean byteOrderMark,
        Layout layout,
        int headerLine,
        List<String> columns,
        int firstDataLine,
        List<DescribedChannel> channels,
        List<DescribedTag> tags) {
    /** Copies the lists. */
    public FileDescription {
        columns = List.copyOf(columns);
        channels = List.copyOf(channels);
        tags = List.copyOf(tags);
    }

    /**
     * One channel.
     *
     * @param name the channel
     * @param column its number from 1
     * @param header its header text
     * @param unit the unit of its cells
     * @param unitFrom where that stands
     * @param si the SI unit of the values
     * @param firstValues SI values of the first rows, empty where a cell is
     */
    public record DescribedChannel(
            ChannelName name,
            int column,
            Optional<String> header,
            String unit,
            String unitFrom,
            String si,
            List<Optional<Double>> firstValues) {
        /** Copies the list. */
        public DescribedChannel {
            firstValues = List.copyOf(firstValues);
        }
    }

    /**
     * One fact about the first record.
     *
     * @param name the fact
     * @param text as written
     * @param value SI value with its unit, for a quantity
     * @param from where it came from
     */
    public record DescribedTag(TagName name, String text, Optional<String> value, String from) {}
}
