package nightlag.pipeline;

import static org.assertj.core.api.Assertions.fail;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * Checks of what a night wrote that run in Node, from {@code pipeline/src/test/node}; {@code npm ci} there fetches what they
 * use. Where something a check needs is missing it is skipped, except where the environment says {@code CI=true}.
 */
public final class NodeCheck {
    private static final Path FOLDER = Path.of("src", "test", "node").toAbsolutePath();

    private NodeCheck() {}

    /** Skips the test, or fails it, unless a Node package has been fetched. */
    public static void needs(String nodePackage) {
        needs(
                Files.isDirectory(FOLDER.resolve("node_modules").resolve(nodePackage)),
                "run `npm ci` in pipeline/src/test/node to have this checked");
    }

    /** Skips the test, or fails it, unless something is there. */
    public static void needs(boolean there, String whatToDo) {
        if (!there && "true".equals(System.getenv("CI"))) {
            fail(whatToDo);
        }
        assumeTrue(there, whatToDo);
    }

    /** What a check says, a line each, errors included. */
    public static List<String> lines(String script, String... arguments) throws IOException, InterruptedException {
        List<String> command = new ArrayList<>(List.of("node", script));
        command.addAll(Arrays.asList(arguments));
        Process node = new ProcessBuilder(command)
                .directory(FOLDER.toFile())
                .redirectErrorStream(true)
                .start();
        String said = new String(node.getInputStream().readAllBytes(), StandardCharsets.UTF_8);
        node.waitFor();
        return said.lines().toList();
    }
}
