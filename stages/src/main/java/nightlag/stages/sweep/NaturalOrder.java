package nightlag.stages.sweep;

/**
 * Order of text in which runs of digits count as numbers: {@code p2} before {@code p10}. Text that is equal in this sense,
 * such as {@code 1} and {@code 01}, goes by its characters, so that no two different texts are equal.
 */
public final class NaturalOrder {
    private NaturalOrder() {}

    /** Negative, zero or positive as the left text comes before, is, or comes after the right one. */
    public static int compare(String left, String right) {
        int i = 0;
        int j = 0;
        while (i < left.length() && j < right.length()) {
            if (isDigit(left.charAt(i)) && isDigit(right.charAt(j))) {
                int endLeft = endOfDigits(left, i);
                int endRight = endOfDigits(right, j);
                int order = compareNumbers(left.substring(i, endLeft), right.substring(j, endRight));
                if (order != 0) {
                    return order;
                }
                i = endLeft;
                j = endRight;
            } else {
                int order = Character.compare(left.charAt(i), right.charAt(j));
                if (order != 0) {
                    return order;
                }
                i++;
                j++;
            }
        }
        int order = Integer.compare(left.length() - i, right.length() - j);
        return order != 0 ? order : left.compareTo(right);
    }

    private static int compareNumbers(String left, String right) {
        String bareLeft = withoutLeadingZeros(left);
        String bareRight = withoutLeadingZeros(right);
        int order = Integer.compare(bareLeft.length(), bareRight.length());
        return order != 0 ? order : bareLeft.compareTo(bareRight);
    }

    private static String withoutLeadingZeros(String digits) {
        int i = 0;
        while (i < digits.length() && digits.charAt(i) == '0') {
            i++;
        }
        return digits.substring(i);
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
