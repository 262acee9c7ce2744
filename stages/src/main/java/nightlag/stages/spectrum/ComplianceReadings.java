package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.DoubleSummaryStatistics;
import java.util.List;
import java.util.function.ToDoubleFunction;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.CreepReading;
import nightlag.stages.moduli.CreepStep;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;

/**
 * Readings that are linear in J0, 1/η0 and the strengths of retardation modes, as rows of unit covariance: strains of creep
 * curves, by the superposition of all steps before them (Boltzmann), with what those of a curve err by together
 * ({@link CreepErrors}), and complex compliances 1/G*.
 */
final class ComplianceReadings {
    /** What averaging over a twentieth of a decade may leave in a reading. */
    private static final double LEAST_RELATIVE_U = 5e-5;

    /** Where a bound is drawn from a reading, so many u of it are given away. */
    private static final double COVERAGE = 2;

    /** A stress below this share of the steps is rest: what is taken off is seldom to the last digit what was put on. */
    private static final double AT_REST = 0.05;

    private final List<CreepRow> creep = new ArrayList<>();
    private final List<CreepErrors> curves = new ArrayList<>();
    private final List<Waves> waves = new ArrayList<>();
    private double shortestS = Double.POSITIVE_INFINITY;
    private double longestS;
    private double largestPerPa;
    private final List<Integer> ends = new ArrayList<>();
    private final List<SupportedWindow> windows = new ArrayList<>();

    /** A strain after some steps, with its whole u: their stresses in Pa, the times since each in s. */
    private record CreepRow(double[] changesPa, double[] sinceS, double strain, double u) {
        /** What a compliance makes of the steps. */
        double sum(Kernel kernel) {
            double sum = 0;
            for (int k = 0; k < sinceS.length; k++) {
                sum += changesPa[k] * kernel.at(sinceS[k]);
            }
            return sum;
        }

        /** 1 where the stress was never below rest, −1 where never above it, 0 where both: then parts of a strain may cancel. */
        double sign() {
            double stress = 0;
            double low = 0;
            double high = 0;
            for (double change : changesPa) {
                stress += change;
                low = Math.min(low, stress);
                high = Math.max(high, stress);
            }
            double trace = AT_REST * (high - low);
            return low >= -trace ? 1 : high <= trace ? -1 : 0;
        }
    }

    /** A complex compliance; {@code first}, {@code mixed} and {@code second} make rows of unit variance of it. */
    private record Waves(double omega, Complex compliance, double first, double mixed, double second, double lossU) {}

    /** A function of the time since a step. */
    private interface Kernel {
        double at(double sinceS);
    }

    /** Readings of curves that begin at rest, brought to the temperature of the spectrum, and of moduli with a covariance. */
    static ComplianceReadings of(List<ShiftedCreep> creep, List<ModulusReading> moduli) {
        ComplianceReadings readings = new ComplianceReadings();
        for (ShiftedCreep oneTemperature : creep) {
            double a = Math.exp(oneTemperature.lnA());
            double b = Math.exp(oneTemperature.lnB());
            oneTemperature.curves().forEach(curve -> readings.add(curve, a, b));
            readings.ends.add(readings.creep.size());
        }
        moduli.forEach(readings::add);
        return readings;
    }

    private void add(ShiftedCreep.Weighed weighed, double a, double b) {
        CreepCurve curve = weighed.curve();
        curves.add(weighed.errors());
        double zero = curve.steps().get(0).strainBefore();
        double shortest = Double.POSITIVE_INFINITY;
        double longest = 0;
        for (CreepReading reading : curve.readings()) {
            int steps = reading.step();
            double[] changes = new double[steps];
            double[] since = new double[steps];
            for (int k = 0; k < steps; k++) {
                CreepStep step = curve.steps().get(k);
                changes[k] = b * step.changePa();
                since[k] = (reading.timeS() - step.atS()) / a;
            }
            double strain = reading.strain() - zero;
            double own = reading.complianceUPerPa()
                    * Math.abs(curve.steps().get(steps - 1).changePa());
            creep.add(new CreepRow(changes, since, strain, Math.max(own, LEAST_RELATIVE_U * Math.abs(strain))));
            largestPerPa = Math.max(largestPerPa, Math.abs(reading.compliancePerPa()) / b);
            shortest = Math.min(shortest, reading.sinceStepS() / a);
            longest = Math.max(longest, reading.timeS() / a);
        }
        windows.add(new SupportedWindow(shortest, longest));
        shortestS = Math.min(shortestS, shortest);
        longestS = Math.max(longestS, longest);
    }

    /** With J = 1/G, dJ = −dG/G²: the covariance of G turned and scaled. */
    private void add(ModulusReading reading) {
        Complex modulus = reading.moduli().complex();
        Complex compliance = new Complex(1, 0).over(modulus);
        Complex turn = compliance.times(compliance).times(-1);
        ModuliCovariance covariance = reading.moduli().covariance().orElseThrow();
        double a = covariance.storageVariance();
        double b = covariance.covariance();
        double c = covariance.lossVariance();
        double re = turn.re();
        double im = turn.im();
        double least = LEAST_RELATIVE_U * compliance.abs();
        double varianceRe = re * re * a - 2 * re * im * b + im * im * c + least * least;
        double varianceIm = im * im * a + 2 * re * im * b + re * re * c + least * least;
        double both = re * im * a + (re * re - im * im) * b - re * im * c;
        double root = Math.sqrt(varianceRe);
        double left = Math.sqrt(Math.max(1e-12 * varianceIm, varianceIm - both * both / varianceRe));
        waves.add(new Waves(
                reading.angularFrequency(),
                compliance,
                1 / root,
                -both / (varianceRe * left),
                1 / left,
                Math.sqrt(varianceIm)));
        largestPerPa = Math.max(largestPerPa, compliance.abs());
        shortestS = Math.min(shortestS, 1 / reading.angularFrequency());
        longestS = Math.max(longestS, 1 / reading.angularFrequency());
    }

    int rows() {
        return creep.size() + 2 * waves.size();
    }

    /** Which temperature of the creep a row belongs to; −1 for a modulus. */
    int temperature(int row) {
        for (int k = 0; k < ends.size(); k++) {
            if (row < ends.get(k)) {
                return k;
            }
        }
        return -1;
    }

    /**
     * The times that the readings support, in s. A creep curve gives the compliance itself, from its first reading to its last;
     * moduli as in {@link SupportedWindow}, and all between their ends where creep goes on where they end.
     */
    List<SupportedWindow> windows() {
        List<SupportedWindow> all = new ArrayList<>(windows);
        if (!waves.isEmpty()) {
            DoubleSummaryStatistics omega =
                    waves.stream().mapToDouble(Waves::omega).summaryStatistics();
            SupportedWindow alone = SupportedWindow.of(omega.getMin(), omega.getMax());
            double fastest = 1 / omega.getMax();
            double slowest = 1 / omega.getMin();
            all.add(new SupportedWindow(
                    windows.stream().anyMatch(window -> window.holds(fastest)) ? fastest : alone.shortestS(),
                    windows.stream().anyMatch(window -> window.holds(slowest)) ? slowest : alone.longestS()));
        }
        return all;
    }

    /**
     * The same for G. It follows from J up to its own time, and of that what came before the first reading counts for little from
     * {@code e^{π/2}} times there on, unless other readings show it.
     */
    List<SupportedWindow> windowsOfRelaxation() {
        List<SupportedWindow> all = windows();
        return all.stream()
                .map(window -> windows.contains(window)
                                && all.stream()
                                        .noneMatch(other -> other.shortestS() < window.shortestS()
                                                && other.holds(window.shortestS()))
                        ? window.later()
                        : window)
                .toList();
    }

    /** The times that fix a density: the last of a creep curve tell less of it than of the compliance itself. */
    SupportedWindow windowOfDensity() {
        List<SupportedWindow> all =
                new ArrayList<>(windows.stream().map(SupportedWindow::ofDensity).toList());
        if (!waves.isEmpty()) {
            DoubleSummaryStatistics omega =
                    waves.stream().mapToDouble(Waves::omega).summaryStatistics();
            SupportedWindow alone = SupportedWindow.of(omega.getMin(), omega.getMax());
            all.addAll(alone.shortestS() < alone.longestS() ? List.of(alone) : List.of());
        }
        return all.stream().reduce(SupportedWindow::with).orElseThrow();
    }

    /** Largest compliance read, 1/Pa. */
    double largestPerPa() {
        return largestPerPa;
    }

    /** Shortest time since a step, or 1/ω of the highest frequency, s. */
    double shortestS() {
        return shortestS;
    }

    /** Longest time since the first step, or 1/ω of the lowest frequency, s. */
    double longestS() {
        return longestS;
    }

    /** What was read. */
    double[] target() {
        double[] target = new double[rows()];
        put(target, CreepRow::strain);
        for (int i = 0; i < waves.size(); i++) {
            put(target, i, waves.get(i).compliance());
        }
        return target;
    }

    /** One mode of unit strength. */
    double[] mode(double lambda) {
        return column(ofMode(lambda), waveOfMode(lambda));
    }

    private static Kernel ofMode(double lambda) {
        return since -> -Math.expm1(-since / lambda);
    }

    private static Response waveOfMode(double lambda) {
        return omega -> new Complex(1, 0).over(new Complex(1, omega * lambda));
    }

    /** Its derivative by ln λ. */
    double[] modeByLogTime(double lambda) {
        return column(since -> -since / lambda * Math.exp(-since / lambda), omega -> {
            Complex one = new Complex(1, omega * lambda);
            return new Complex(0, -omega * lambda).over(one.times(one));
        });
    }

    /** J0 of 1/Pa. */
    double[] instantaneous() {
        return column(since -> 1, omega -> new Complex(1, 0));
    }

    /** 1/η0 of 1/(Pa·s). */
    double[] flow() {
        return column(since -> since, omega -> new Complex(0, -1 / omega));
    }

    /** A function of angular frequency. */
    private interface Response {
        Complex at(double omega);
    }

    /** The most a mode can be: all else that makes a strain or a compliance up has the same sign; 1/Pa. */
    double mostOfMode(double lambda) {
        return most(ofMode(lambda), waveOfMode(lambda));
    }

    /** The most J0 can be, 1/Pa. */
    double mostInstantaneous() {
        return most(since -> 1, omega -> new Complex(1, 0));
    }

    /** The most 1/η0 can be, 1/(Pa·s). */
    double mostFlow() {
        return most(since -> since, omega -> new Complex(0, -1 / omega));
    }

    private double most(Kernel kernel, Response response) {
        double most = Double.POSITIVE_INFINITY;
        for (CreepRow row : creep) {
            if (row.sign() != 0) {
                most = least(most, row.sign() * row.strain() + COVERAGE * row.u(), row.sign() * row.sum(kernel));
            }
        }
        for (Waves row : waves) {
            Complex part = response.at(row.omega());
            most = least(most, row.compliance().re() + COVERAGE / row.first(), part.re());
            most = least(most, -row.compliance().im() + COVERAGE * row.lossU(), -part.im());
        }
        return most;
    }

    private static double least(double most, double room, double part) {
        return part > 0 && room > 0 ? Math.min(most, room / part) : most;
    }

    /** The most a relaxation mode can be, as G(t) is at most 1/J(t) and all parts of a modulus are positive; Pa. */
    double mostOfRelaxation(double tau) {
        double most = Double.POSITIVE_INFINITY;
        for (CreepRow row : creep) {
            double least = row.sign() * row.strain() - COVERAGE * row.u();
            if (row.sinceS().length == 1 && least > 0) {
                most = Math.min(most, Math.abs(row.changesPa()[0]) / least * Math.exp(row.sinceS()[0] / tau));
            }
        }
        for (Waves row : waves) {
            Complex modulus = new Complex(1, 0).over(row.compliance());
            double u = COVERAGE * modulus.abs() * row.lossU() / row.compliance().abs();
            Complex part = new Complex(1, 0).over(new Complex(1, -1 / (row.omega() * tau)));
            most = least(most, modulus.re() + u, part.re());
            most = least(most, modulus.im() + u, part.im());
        }
        return most;
    }

    private double[] column(Kernel kernel, Response response) {
        double[] column = new double[rows()];
        put(column, row -> row.sum(kernel));
        for (int i = 0; i < waves.size(); i++) {
            put(column, i, response.at(waves.get(i).omega()));
        }
        return column;
    }

    /** The strains of each curve, whitened. */
    private void put(double[] column, ToDoubleFunction<CreepRow> strain) {
        int first = 0;
        for (CreepErrors errors : curves) {
            double[] strains = creep.subList(first, first + errors.size()).stream()
                    .mapToDouble(strain)
                    .toArray();
            System.arraycopy(errors.whitened(strains), 0, column, first, strains.length);
            first += strains.length;
        }
    }

    private void put(double[] column, int i, Complex value) {
        Waves row = waves.get(i);
        int at = creep.size() + 2 * i;
        column[at] = row.first() * value.re();
        column[at + 1] = row.mixed() * value.re() + row.second() * value.im();
    }
}
