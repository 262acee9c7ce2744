package nightlag.pipeline.report;

/**
 * The way to a lot's part of the page.
 *
 * @param anchor its place
 * @param grade grade
 * @param lot lot
 */
public record LotLink(String anchor, String grade, String lot) {}
