package nightlag.pipeline.decode;

/** Makes records of rows. */
sealed interface RowTaker permits WaveformRows, RollingRows, ModuliRows {
    /** Takes a row. */
    void row(Cells cells, int line) throws DecodeException;

    /** No more rows: the last record is complete. */
    void end() throws DecodeException;
}
