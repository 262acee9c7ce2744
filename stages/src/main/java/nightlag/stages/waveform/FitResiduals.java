package nightlag.stages.waveform;

/** What a search for spikes must know of a fit. */
interface FitResiduals {
    /** The samples that entered. */
    Samples samples();

    /** What the model leaves of each channel. */
    double[][] residuals();

    /** The number of columns of the model. */
    int columns();

    /** The largest amplitude of a channel. */
    double largestAmplitude(int channel);
}
