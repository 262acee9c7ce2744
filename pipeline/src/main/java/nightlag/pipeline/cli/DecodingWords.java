package nightlag.pipeline.cli;

import java.util.stream.Collectors;
import nightlag.pipeline.decode.FileDescription;
import nightlag.pipeline.decode.FileDescription.DescribedChannel;

/** How a file decodes, in words. */
final class DecodingWords {
    private DecodingWords() {}

    /** Its charset, its layout and where its rows stand. */
    static String head(FileDescription file) {
        return file.charset() + (file.byteOrderMark() ? " by its byte-order mark" : "") + ", layout "
                + file.layout().word()
                + (file.headerLine() > 0 ? ", header in line " + file.headerLine() : ", no header")
                + (file.firstDataLine() > 0 ? ", data from line " + file.firstDataLine() : ", no rows of data");
    }

    /** Where a channel stands, and its first values in SI if there are rows. */
    static String channel(DescribedChannel channel) {
        String place = "column " + channel.column()
                + channel.header().map(header -> " '" + header + "'").orElse("") + " in " + channel.unit() + " ("
                + channel.unitFrom() + ")";
        if (channel.firstValues().isEmpty()) {
            return place;
        }
        return place + ": "
                + channel.firstValues().stream()
                        .map(value -> value.map(Figures::sevenDigits).orElse("empty"))
                        .collect(Collectors.joining(", "))
                + " … " + channel.si();
    }
}
