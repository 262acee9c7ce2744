package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;
import nightlag.stages.numeric.AnchoredValue;
import nightlag.stages.numeric.DoubleDouble;

/**
 * Times and strengths of a discrete spectrum with more digits than a double holds: the retardation time of a weak mode
 * can lie nearer to its relaxation time than a double can tell, and the way back needs the difference.
 *
 * @param times strictly rising
 * @param strengths positive
 */
record ModeSet(List<AnchoredValue> times, List<DoubleDouble> strengths) {
    ModeSet {
        times = List.copyOf(times);
        strengths = List.copyOf(strengths);
    }

    /** Modes from plain numbers, sorted by time; equal times become one mode, strengths of zero none. */
    static ModeSet of(double[] times, double[] strengths) {
        if (times.length != strengths.length) {
            throw new IllegalArgumentException(times.length + " times but " + strengths.length + " strengths");
        }
        for (int i = 0; i < times.length; i++) {
            if (!(times[i] > 0 && times[i] < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException("time " + i + " must be positive and finite, it is " + times[i]);
            }
            if (!(strengths[i] >= 0 && strengths[i] < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException(
                        "strength " + i + " must be finite and not negative, it is " + strengths[i]);
            }
        }
        List<AnchoredValue> distinct = new ArrayList<>();
        List<DoubleDouble> sums = new ArrayList<>();
        IntStream.range(0, times.length)
                .filter(i -> strengths[i] > 0)
                .boxed()
                .sorted(Comparator.comparingDouble(i -> times[i]))
                .forEach(i -> {
                    int last = distinct.size() - 1;
                    if (last >= 0 && distinct.get(last).anchor() == times[i]) {
                        sums.set(last, sums.get(last).plus(strengths[i]));
                    } else {
                        distinct.add(AnchoredValue.of(times[i]));
                        sums.add(DoubleDouble.of(strengths[i]));
                    }
                });
        return new ModeSet(distinct, sums);
    }

    int count() {
        return times.size();
    }

    double time(int i) {
        return times.get(i).value();
    }

    double strength(int i) {
        return strengths.get(i).value();
    }

    double[] timeValues() {
        return times.stream().mapToDouble(AnchoredValue::value).toArray();
    }

    double[] strengthValues() {
        return strengths.stream().mapToDouble(DoubleDouble::value).toArray();
    }

    DoubleDouble strengthSum() {
        return strengths.stream().reduce(DoubleDouble.ZERO, DoubleDouble::plus);
    }

    /** Strength times time of each mode. */
    List<DoubleDouble> firstMoments() {
        return IntStream.range(0, count())
                .mapToObj(i -> strengths.get(i).times(times.get(i).toDoubleDouble()))
                .toList();
    }

    /** Σ strength·time. */
    DoubleDouble firstMoment() {
        return firstMoments().stream().reduce(DoubleDouble.ZERO, DoubleDouble::plus);
    }

    /** Σ strength·time². */
    double secondMoment() {
        return IntStream.range(0, count())
                .mapToDouble(i -> strength(i) * time(i) * time(i))
                .sum();
    }
}
