package nightlag.pipeline.teamsheet;

import com.ctc.wstx.stax.WstxInputFactory;
import java.io.StringReader;
import java.util.Optional;
import javax.xml.stream.XMLInputFactory;
import javax.xml.stream.XMLStreamConstants;
import javax.xml.stream.XMLStreamException;
import org.codehaus.stax2.XMLInputFactory2;
import org.codehaus.stax2.XMLStreamReader2;

/**
 * The tags of an XML text, one after the other, each with its exact place: what is not changed can then be copied as it
 * stands. Woodstox rather than the JDK's own reader, whose character offsets drift (of 400,000 tags one in five was misplaced).
 * A document type is refused: no part of a workbook has one, and entities and external files come by it.
 */
final class XmlTags implements AutoCloseable {
    private final String part;
    private final String xml;
    private final XMLStreamReader2 reader;

    /**
     * Begins to read.
     *
     * @param part what the text is called in messages
     * @param xml the text
     */
    XmlTags(String part, String xml) throws SheetFault {
        this.part = part;
        this.xml = xml;
        XMLInputFactory factory = new WstxInputFactory();
        factory.setProperty(XMLInputFactory.SUPPORT_DTD, false);
        factory.setProperty(XMLInputFactory.IS_SUPPORTING_EXTERNAL_ENTITIES, false);
        factory.setProperty(XMLInputFactory.IS_COALESCING, true);
        factory.setProperty(XMLInputFactory2.P_PRESERVE_LOCATION, true);
        // else damage inside a text would come to light as a runtime exception, when the text is asked for
        factory.setProperty(XMLInputFactory2.P_LAZY_PARSING, false);
        try {
            reader = (XMLStreamReader2) factory.createXMLStreamReader(new StringReader(xml));
        } catch (XMLStreamException e) {
            throw damaged(e);
        }
    }

    /** Goes on to the next tag, end tag or text; false at the end. */
    boolean next() throws SheetFault {
        try {
            while (reader.hasNext()) {
                int event = reader.next();
                if (event == XMLStreamConstants.DTD) {
                    throw new SheetFault(part + " inside the workbook has a document type, which no workbook needs");
                }
                if (event == XMLStreamConstants.START_ELEMENT
                        || event == XMLStreamConstants.END_ELEMENT
                        || event == XMLStreamConstants.CHARACTERS) {
                    return true;
                }
            }
            return false;
        } catch (XMLStreamException e) {
            throw damaged(e);
        }
    }

    /** Goes on to the next start tag of this name; false at the end. */
    boolean nextStart(String localName) throws SheetFault {
        while (next()) {
            if (starts(localName)) {
                return true;
            }
        }
        return false;
    }

    boolean isText() {
        return reader.getEventType() == XMLStreamConstants.CHARACTERS;
    }

    boolean starts() {
        return reader.getEventType() == XMLStreamConstants.START_ELEMENT;
    }

    boolean starts(String localName) {
        return starts() && reader.getLocalName().equals(localName);
    }

    boolean ends(String localName) {
        return reader.getEventType() == XMLStreamConstants.END_ELEMENT
                && reader.getLocalName().equals(localName);
    }

    String localName() {
        return reader.getLocalName();
    }

    /** The prefix of the tag with its colon; empty where the namespace is the default one. */
    String prefix() {
        return reader.getPrefix().isEmpty() ? "" : reader.getPrefix() + ":";
    }

    String namespace() {
        return reader.getNamespaceURI() == null ? "" : reader.getNamespaceURI();
    }

    String text() {
        return reader.getText();
    }

    /** An attribute, whatever its namespace. */
    Optional<String> attribute(String localName) {
        for (int i = 0; i < reader.getAttributeCount(); i++) {
            if (reader.getAttributeLocalName(i).equals(localName)) {
                return Optional.of(reader.getAttributeValue(i));
            }
        }
        return Optional.empty();
    }

    /** An attribute that is a whole number. */
    int number(String localName, int otherwise) throws SheetFault {
        Optional<String> text = attribute(localName);
        if (text.isEmpty()) {
            return otherwise;
        }
        try {
            return Integer.parseInt(text.get().strip());
        } catch (NumberFormatException e) {
            throw new SheetFault(
                    part + " inside the workbook is damaged: " + localName + " is \"" + text.get() + "\"", e);
        }
    }

    /** Where the tag begins. */
    int start() throws SheetFault {
        return offset(reader.getLocationInfo().getStartingCharOffset());
    }

    /** Where what follows the tag begins. */
    int end() throws SheetFault {
        try {
            return offset(reader.getLocationInfo().getEndingCharOffset());
        } catch (XMLStreamException e) {
            throw damaged(e);
        }
    }

    /** The start tag as it stands in the text. */
    Tag tag() throws SheetFault {
        int start = start();
        int end = end();
        return new Tag(start, end, xml.substring(start, end));
    }

    private int offset(long place) throws SheetFault {
        if (place < 0 || place > xml.length()) {
            throw new SheetFault(part + " inside the workbook cannot be taken apart");
        }
        return (int) place;
    }

    private SheetFault damaged(XMLStreamException e) {
        return new SheetFault(
                part + " inside the workbook is damaged (line "
                        + e.getLocation().getLineNumber() + ": "
                        + String.valueOf(e.getMessage()).lines().findFirst().orElse("") + ")",
                e);
    }

    @Override
    public void close() throws SheetFault {
        try {
            reader.close();
        } catch (XMLStreamException e) {
            throw damaged(e);
        }
    }

    /**
     * A start tag.
     *
     * @param start where it begins
     * @param end where what follows it begins
     * @param raw all of it
     */
    record Tag(int start, int end, String raw) {
        boolean selfClosed() {
            return raw.endsWith("/>");
        }

        /** The value of an attribute that needs no unescaping, such as a number or a block of cells. */
        Optional<String> attribute(String name) {
            int[] place = attributePlace(name);
            if (place.length == 0) {
                return Optional.empty();
            }
            String text = raw.substring(place[0], place[1]);
            return Optional.of(text.substring(text.indexOf('=') + 1).strip())
                    .map(value -> value.substring(1, value.length() - 1));
        }

        /** The tag with one attribute of no namespace set, all else as it stands. */
        String with(String name, String value) {
            String text = name + "=\"" + XmlText.attribute(value) + "\"";
            int[] place = attributePlace(name);
            if (place.length > 0) {
                return raw.substring(0, place[0]) + text + raw.substring(place[1]);
            }
            int close = raw.length() - (selfClosed() ? 2 : 1);
            while (Character.isWhitespace(raw.charAt(close - 1))) {
                close--;
            }
            return raw.substring(0, close) + " " + text + raw.substring(close);
        }

        /** The tag without an attribute. */
        String without(String name) {
            int[] place = attributePlace(name);
            return place.length == 0 ? raw : raw.substring(0, place[0]).stripTrailing() + raw.substring(place[1]);
        }

        /** From where to where an attribute stands; empty where there is none. */
        private int[] attributePlace(String name) {
            int at = 1;
            while (at < raw.length() && !Character.isWhitespace(raw.charAt(at))) {
                at++;
            }
            while (true) {
                while (at < raw.length() && Character.isWhitespace(raw.charAt(at))) {
                    at++;
                }
                int equals = raw.indexOf('=', at);
                if (equals < 0) {
                    return new int[0];
                }
                int open = equals + 1;
                while (Character.isWhitespace(raw.charAt(open))) {
                    open++;
                }
                int close = raw.indexOf(raw.charAt(open), open + 1) + 1;
                if (raw.substring(at, equals).strip().equals(name)) {
                    return new int[] {at, close};
                }
                at = close;
            }
        }
    }
}
