package nightlag.pipeline.decode;

/**
 * A place in a file that a complaint can be made about.
 *
 * @param complaints the file's
 * @param line line from 1; 0: the file as a whole
 * @param place the column or the tag
 */
record Spot(Complaints complaints, int line, String place) {
    /** What was found here and what was expected. */
    DecodeException complaint(String found, String expected) {
        return complaints.at(line, place, found, expected);
    }
}
