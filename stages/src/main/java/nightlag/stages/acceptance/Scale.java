package nightlag.stages.acceptance;

/** The scale on which a figure is moved, averaged and interpolated: its logarithm, or where it is not above zero itself. */
enum Scale {
    LOG {
        @Override
        boolean has(Reading reading) {
            return reading.value() > 0;
        }

        @Override
        double of(Reading reading) {
            return Math.log(reading.value());
        }

        @Override
        double variance(Reading reading) {
            return reading.variance() / (reading.value() * reading.value());
        }

        @Override
        double value(double scaled) {
            return Math.exp(scaled);
        }

        @Override
        double perScaled(double scaled) {
            return Math.exp(scaled);
        }
    },
    LINEAR {
        @Override
        boolean has(Reading reading) {
            return true;
        }

        @Override
        double of(Reading reading) {
            return reading.value();
        }

        @Override
        double variance(Reading reading) {
            return reading.variance();
        }

        @Override
        double value(double scaled) {
            return scaled;
        }

        @Override
        double perScaled(double scaled) {
            return 1;
        }
    };

    /** Whether a reading can be put on it. */
    abstract boolean has(Reading reading);

    abstract double of(Reading reading);

    abstract double variance(Reading reading);

    /** The figure from where it is on the scale. */
    abstract double value(double scaled);

    /** How much the figure moves with where it is on the scale. */
    abstract double perScaled(double scaled);
}
