package nightlag.pipeline.report;

/**
 * One axis of a chart.
 *
 * @param label what is along it
 * @param unit its unit; empty text for none
 * @param scale how values are spread along it
 */
record Axis(String label, String unit, Scale scale) {
    /** How values are spread. */
    enum Scale {
        LOG,
        LINEAR
    }

    static Axis log(String label, String unit) {
        return new Axis(label, unit, Scale.LOG);
    }

    static Axis linear(String label, String unit) {
        return new Axis(label, unit, Scale.LINEAR);
    }
}
