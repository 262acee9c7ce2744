package nightlag.pipeline.decode;

import nightlag.pipeline.config.Problem;

/**
 * Makes the problems of one file, so that each says where it stands in the same way.
 *
 * @param file the file's name in tables
 */
record Complaints(String file) {
    private static final int SHOWN_CHARS = 60;

    /** A problem on a line (0: of the file as a whole) and, unless empty, in a column or at a key. */
    DecodeException at(int line, String place, String found, String expected) {
        return new DecodeException(new Problem(file, line, place, found, expected));
    }

    /** A piece of the file in quotation marks: shortened, control characters replaced by a middle dot. */
    static String shown(CharSequence text) {
        StringBuilder shown = new StringBuilder("'");
        int length = Math.min(text.length(), SHOWN_CHARS);
        for (int i = 0; i < length; i++) {
            char c = text.charAt(i);
            shown.append(Character.isISOControl(c) ? '·' : c);
        }
        return shown.append(length < text.length() ? "…'" : "'").toString();
    }
}
