package nightlag.pipeline.teamsheet;

import java.io.IOException;
import java.io.InputStream;
import java.io.OutputStream;
import java.nio.ByteBuffer;
import java.nio.charset.CharacterCodingException;
import java.nio.charset.StandardCharsets;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.zip.ZipException;
import org.apache.commons.compress.archivers.zip.ZipArchiveEntry;
import org.apache.commons.compress.archivers.zip.ZipArchiveOutputStream;
import org.apache.commons.compress.archivers.zip.ZipFile;
import org.apache.commons.compress.utils.SeekableInMemoryByteChannel;

/** An .xlsx as the zip file of parts that it is; a part that is not replaced is copied with its compressed bytes. */
final class Book implements AutoCloseable {
    /** A part of more bytes is taken for damage, or for a trap. */
    private static final long MOST_BYTES = 1L << 30;

    private static final String MARK = "\uFEFF";

    private final ZipFile zip;
    private final Map<String, String> replaced = new LinkedHashMap<>();

    private Book(ZipFile zip) {
        this.zip = zip;
    }

    /** Opens the bytes of a file. */
    static Book of(byte[] bytes) throws SheetFault {
        if (bytes.length > 1 && (bytes[0] & 0xFF) == 0xD0 && (bytes[1] & 0xFF) == 0xCF) {
            throw new SheetFault("the workbook has a password, or is an old .xls; save it as .xlsx without a password");
        }
        try {
            return new Book(ZipFile.builder()
                    .setSeekableByteChannel(new SeekableInMemoryByteChannel(bytes))
                    .get());
        } catch (IOException e) {
            throw new SheetFault(
                    "this is no whole .xlsx (" + e.getMessage() + "); open it in the office program and save it again",
                    e);
        }
    }

    boolean has(String part) {
        return replaced.containsKey(part) || zip.getEntry(part) != null;
    }

    /** The text of a part, as it was replaced if it was. */
    String text(String part) throws SheetFault {
        String ours = replaced.get(part);
        if (ours != null) {
            return ours;
        }
        ZipArchiveEntry entry = zip.getEntry(part);
        if (entry == null) {
            throw new SheetFault(
                    "the workbook has no part " + part + "; open it in the office program and save it again");
        }
        if (entry.getSize() > MOST_BYTES) {
            throw new SheetFault("the part " + part + " of the workbook is larger than 1 GiB");
        }
        try (InputStream in = zip.getInputStream(entry)) {
            byte[] bytes = in.readNBytes((int) MOST_BYTES);
            String text = StandardCharsets.UTF_8
                    .newDecoder()
                    .decode(ByteBuffer.wrap(bytes))
                    .toString();
            // XML in UTF-8 is the same without a byte-order mark
            return text.startsWith(MARK) ? text.substring(1) : text;
        } catch (CharacterCodingException e) {
            throw new SheetFault("the part " + part + " of the workbook is not UTF-8", e);
        } catch (IOException e) {
            throw new SheetFault(
                    "the part " + part + " of the workbook is damaged (" + e.getMessage()
                            + "); open it in the office program and save it again",
                    e);
        }
    }

    /** Puts a text in the place of a part's, or makes the part. */
    void replace(String part, String text) {
        replaced.put(part, text);
    }

    void writeTo(OutputStream out) throws IOException {
        List<ZipArchiveEntry> entries = Collections.list(zip.getEntriesInPhysicalOrder());
        ZipArchiveOutputStream to = new ZipArchiveOutputStream(out);
        Map<String, String> left = new LinkedHashMap<>(replaced);
        for (ZipArchiveEntry entry : entries) {
            Optional<String> ours = Optional.ofNullable(left.remove(entry.getName()));
            if (ours.isPresent()) {
                write(to, entry.getName(), entry.getTime(), ours.get());
            } else {
                to.addRawArchiveEntry(entry, raw(entry));
            }
        }
        for (Map.Entry<String, String> part : left.entrySet()) {
            write(to, part.getKey(), entries.get(0).getTime(), part.getValue());
        }
        to.finish();
        to.flush();
    }

    private InputStream raw(ZipArchiveEntry entry) throws IOException {
        InputStream raw = zip.getRawInputStream(entry);
        if (raw == null) {
            throw new ZipException(entry.getName() + " cannot be copied");
        }
        return raw;
    }

    private static void write(ZipArchiveOutputStream to, String name, long time, String text) throws IOException {
        ZipArchiveEntry entry = new ZipArchiveEntry(name);
        entry.setTime(time);
        to.putArchiveEntry(entry);
        to.write(text.getBytes(StandardCharsets.UTF_8));
        to.closeArchiveEntry();
    }

    @Override
    public void close() throws IOException {
        zip.close();
    }
}
