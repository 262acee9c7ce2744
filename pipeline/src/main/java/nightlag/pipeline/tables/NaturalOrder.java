package nightlag.pipeline.tables;

import java.util.Comparator;

/** Texts by their characters, but digits standing together as the number they are: "s2" before "s10". */
final class NaturalOrder implements Comparator<String> {
    static final NaturalOrder INSTANCE = new NaturalOrder();

    private NaturalOrder() {}

    @Override
    public int compare(String left, String right) {
        int i = 0;
        int j = 0;
        while (i < left.length() && j < right.length()) {
            int order;
            if (isDigit(left.charAt(i)) && isDigit(right.charAt(j))) {
                int endLeft = endOfDigits(left, i);
                int endRight = endOfDigits(right, j);
                order = compareNumbers(left.substring(i, endLeft), right.substring(j, endRight));
                i = endLeft;
                j = endRight;
            } else {
                order = Character.compare(left.charAt(i), right.charAt(j));
                i++;
                j++;
            }
            if (order != 0) {
                return order;
            }
        }
        int rest = Integer.compare(left.length() - i, right.length() - j);
        // "01" and "1" are the same number but not the same text
        return rest != 0 ? rest : left.compareTo(right);
    }

    private static int compareNumbers(String left, String right) {
        String one = left.replaceFirst("^0+", "");
        String other = right.replaceFirst("^0+", "");
        int byLength = Integer.compare(one.length(), other.length());
        return byLength != 0 ? byLength : one.compareTo(other);
    }

    private static int endOfDigits(String text, int start) {
        int end = start;
        while (end < text.length() && isDigit(text.charAt(end))) {
            end++;
        }
        return end;
    }

    private static boolean isDigit(char c) {
        return c >= '0' && c <= '9';
    }
}
