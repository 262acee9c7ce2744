package nightlag.stages.geometry;

import nightlag.stages.fault.ReductionFault;
import nightlag.stages.numeric.Complex;

/**
 * The specimen's own mass: a shear wave runs through the gap, and the wall that carries the transducer sees more or less
 * than G* (Schrag, Trans. Soc. Rheol. 21 (1977) 399). With gap h, density ρ and k = ω√(ρ/G*) the apparent modulus is
 * G* kh/sin kh at the fixed wall and G* kh cot kh at the moving one; for a cone of angle α and radius R, locally parallel,
 * h² is replaced by (3/5)(αR)².
 *
 * <p>With z = kh and the apparent modulus A, G* = ρω²h²/z² turns this into z sin z = ρω²h²/A (fixed) and
 * z tan z = ρω²h²/A (moving). Both are functions of w = z² alone. The root is the one that grows from w = 0 as the density
 * grows from nothing, the inertia-free modulus being that limit. Past the quarter-wave resonance of a nearly elastic layer
 * that root at the moving wall turns into one that would make work out of nothing (a negative storage or loss modulus);
 * then the root is taken that is reached by way of a stiff wall, if that one does not.
 */
public final class SampleInertia {
    /** A phase this far outside 0 to 90° is put down to noise. */
    private static final double NOISE_RAD = 0.1;

    private final MeasuringWall wall;
    private final double inertialStressPerSquaredFrequency;

    private SampleInertia(MeasuringWall wall, double inertialStressPerSquaredFrequency) {
        this.wall = wall;
        this.inertialStressPerSquaredFrequency = inertialStressPerSquaredFrequency;
    }

    /** Whether the wave in the gap of this kind of geometry is known here. */
    public static boolean knownFor(GeometryKind kind) {
        return switch (kind) {
            case PARALLEL_PLATE, CONE_PLATE, TWO_LAYER_SHEAR -> true;
            case COAXIAL_CYLINDERS,
                    ROD_TORSION,
                    BAR_TORSION,
                    CLAMPED_BENDING,
                    THREE_POINT_BENDING,
                    TENSION,
                    COMPRESSION,
                    NONE -> false;
        };
    }

    /**
     * For a geometry with a gap and a density.
     *
     * @throws ReductionFault if a dimension is missing or wrong
     */
    static SampleInertia of(GeometrySpec spec, MeasuringWall wall) throws ReductionFault {
        Sizes sizes = new Sizes(spec);
        double squaredGap;
        if (spec.kind() == GeometryKind.CONE_PLATE) {
            double rise = sizes.of(Dimension.CONE_ANGLE) * sizes.of(Dimension.DIAMETER) / 2;
            squaredGap = 0.6 * rise * rise;
        } else {
            double gap = sizes.of(Dimension.GAP);
            squaredGap = gap * gap;
        }
        return new SampleInertia(wall, sizes.of(Dimension.DENSITY) * squaredGap);
    }

    /** Density times the square of the gap, kg/m; for a cone of its mean over the torque. */
    public double massTimesSquaredGap() {
        return inertialStressPerSquaredFrequency;
    }

    /**
     * The specimen's modulus from the apparent one.
     *
     * @param apparentModulus stress at the wall over nominal strain, Pa
     * @param angularFrequency rad/s
     * @return G*, Pa
     * @throws ReductionFault if the root cannot be followed there, which happens only to a lossless layer at its turning
     *     point
     */
    public Complex correct(Complex apparentModulus, double angularFrequency) throws ReductionFault {
        double inertialStress = inertialStress(angularFrequency);
        Complex target = new Complex(inertialStress, 0).over(apparentModulus);
        ShearWave wave = new ShearWave(wall);
        Complex root = wave.rootFromOrigin(target)
                .or(() -> wave.rootByStiffWall(target))
                .orElseThrow(() -> new ReductionFault(
                        GeometryReason.GEOMETRY_SAMPLE_INERTIA_NO_ROOT.with(apparentModulus.abs(), inertialStress)));
        if (!nearlyPassive(root)) {
            root = wave.rootByStiffWall(target)
                    .filter(SampleInertia::nearlyPassive)
                    .orElse(root);
        }
        return new Complex(inertialStress, 0).over(root);
    }

    /**
     * What would be measured: the apparent modulus of a specimen.
     *
     * @param modulus G*, Pa
     * @param angularFrequency rad/s
     */
    public Complex apparent(Complex modulus, double angularFrequency) {
        Complex inertialStress = new Complex(inertialStress(angularFrequency), 0);
        return inertialStress.over(new ShearWave(wall).value(inertialStress.over(modulus)));
    }

    /**
     * The derivative of the corrected modulus by the apparent one, for covariances. The modulus is an analytic function of
     * the apparent one, so the one complex number turns and scales a small change.
     *
     * @param modulus G* as corrected, Pa
     * @param angularFrequency rad/s
     */
    public Complex sensitivity(Complex modulus, double angularFrequency) {
        // A = s/ψ(w), G = s/w: dA/dG = (ψ'/ψ²) w², its inverse is what is wanted
        ShearWave wave = new ShearWave(wall);
        Complex w = new Complex(inertialStress(angularFrequency), 0).over(modulus);
        Complex relative = wave.value(w).over(w);
        return relative.times(relative).over(wave.slope(w));
    }

    /** ρω²h² in Pa. */
    private double inertialStress(double angularFrequency) {
        return inertialStressPerSquaredFrequency * angularFrequency * angularFrequency;
    }

    /**
     * Whether w = ρω²h²/G* belongs to a material that stores and loses, not gives: G' and G'' at or above zero, but for what
     * noise does to a nearly viscous or nearly elastic one.
     */
    private static boolean nearlyPassive(Complex w) {
        double slack = NOISE_RAD * w.abs();
        return w.re() >= -slack && w.im() <= slack;
    }
}
