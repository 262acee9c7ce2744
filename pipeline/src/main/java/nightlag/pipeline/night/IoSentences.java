package nightlag.pipeline.night;

import java.io.IOException;
import java.nio.file.AccessDeniedException;
import java.nio.file.FileSystemException;
import java.nio.file.InvalidPathException;
import java.nio.file.NoSuchFileException;
import java.nio.file.NotDirectoryException;

/** What an input or output error means to a person. */
final class IoSentences {
    private IoSentences() {}

    /** What a name that this platform cannot write down means. */
    static String of(InvalidPathException e) {
        return "the name '" + e.getInput() + "' cannot be written in the charset that Java found for file names ("
                + System.getProperty("sun.jnu.encoding") + "); start with a UTF-8 locale, such as LC_ALL=C.UTF-8";
    }

    /** One clause, without the class names that exceptions put in front of it. */
    static String of(IOException e) {
        if (e instanceof NoSuchFileException || e instanceof java.io.FileNotFoundException) {
            return "it is not there";
        }
        if (e instanceof AccessDeniedException denied) {
            return "access is denied (" + denied.getFile() + ")";
        }
        if (e instanceof NotDirectoryException) {
            return "it is not a folder";
        }
        if (e instanceof FileSystemException system && system.getReason() != null) {
            return system.getReason() + " (" + system.getFile() + ")";
        }
        return e.getMessage() == null ? e.getClass().getSimpleName() : e.getMessage();
    }
}
