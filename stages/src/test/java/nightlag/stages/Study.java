package nightlag.stages;

import java.util.Locale;

/**
 * How long the statistical studies (tests tagged {@code study}) run. All of them run in every build, on few draws; with
 * {@code -Dnightlag.study=long} they take more draws and more conditions and print the tables of {@code stages/README.md}.
 */
public final class Study {
    private Study() {}

    /** Whether the long form was asked for. */
    public static boolean isLong() {
        return "long".equals(System.getProperty("nightlag.study"));
    }

    /** One of two numbers of draws. */
    public static int draws(int inABuild, int inTheLongForm) {
        return isLong() ? inTheLongForm : inABuild;
    }

    /** A row of a table, in the long form only. */
    public static void row(String format, Object... values) {
        if (isLong()) {
            System.out.println(String.format(Locale.ROOT, format, values));
        }
    }
}
