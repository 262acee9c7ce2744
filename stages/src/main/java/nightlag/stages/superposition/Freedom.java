package nightlag.stages.superposition;

/**
 * Degrees of freedom of a sum of squares about smooth curves. With H the matrix that turns values into fitted ones, a curve that
 * bends no more than the fitted one leaves n − tr(2H − H²) times the errors' variance (Hastie &amp; Tibshirani, Generalized
 * Additive Models (1990), 3.5). One that bends as freely as its stiffness allows leaves n − tr H times it, what the fit
 * smooths away included.
 *
 * @param ofErrors n − tr(2H − H²)
 * @param ofAll n − tr H
 */
record Freedom(double ofErrors, double ofAll) {
    static final Freedom NONE = new Freedom(0, 0);

    Freedom plus(Freedom other) {
        return new Freedom(ofErrors + other.ofErrors, ofAll + other.ofAll);
    }
}
