package nightlag.pipeline.night;

/** Hears how far a night has come; called from the night's own thread. */
public interface Progress {
    /** Files that will be looked at. */
    void begin(int files);

    /** One of them is done. */
    void fileDone();

    /** All of them are done. */
    void end();

    /** Hears nothing. */
    static Progress silent() {
        return new Progress() {
            @Override
            public void begin(int files) {}

            @Override
            public void fileDone() {}

            @Override
            public void end() {}
        };
    }
}
