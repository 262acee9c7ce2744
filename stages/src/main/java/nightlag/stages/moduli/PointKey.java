package nightlag.stages.moduli;

/**
 * What a point is called. Points with equal keys but for the source file are repeats.
 *
 * @param grade material grade
 * @param lot lot of the grade
 * @param specimen specimen of the lot
 * @param sweep sweep of the specimen
 * @param point point of the sweep, as text
 * @param sourceFile the intake folder's name, '/', and the path below it
 */
public record PointKey(String grade, String lot, String specimen, String sweep, String point, String sourceFile) {}
