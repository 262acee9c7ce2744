package nightlag.pipeline.archive;

import java.nio.file.Path;
import java.util.Collection;
import java.util.List;
import nightlag.stages.Reduction;

/** The archive file. Not safe for use by several threads; the night's own thread owns it. */
public final class Archive implements AutoCloseable {
    private Archive() {}

    /** Opens the archive, making it where it is not there yet. Opening and reading an existing one touches no file. */
    public static Archive open(Path file) throws ArchiveException {
        throw new UnsupportedOperationException();
    }

    /** All files, by table name. */
    public List<ArchivedFile> files() throws ArchiveException {
        throw new UnsupportedOperationException();
    }

    /** Commits these outcomes in one transaction. */
    public void commit(Collection<FileOutcome> outcomes) throws ArchiveException {
        throw new UnsupportedOperationException();
    }

    /** Notes a file's new size and modified time where its content turned out to be the same. */
    public void touched(Collection<ArchivedFile> files) throws ArchiveException {
        throw new UnsupportedOperationException();
    }

    /** All lots that have points, or are due because they lost theirs; sorted. */
    public List<LotState> lots() throws ArchiveException {
        throw new UnsupportedOperationException();
    }

    /** All reductions of a lot, in no particular order; only points of this lot are in them. */
    public List<Reduction> reductions(LotName lot) throws ArchiveException {
        throw new UnsupportedOperationException();
    }

    /** The files with points in a lot, by table name, for the provenance in its data package. */
    public List<ArchivedFile> filesOf(LotName lot) throws ArchiveException {
        throw new UnsupportedOperationException();
    }

    /** Notes that a lot's tables are swapped in; a lot without points is forgotten. */
    public void concluded(LotName lot, String conclusionFingerprint) throws ArchiveException {
        throw new UnsupportedOperationException();
    }

    @Override
    public void close() throws ArchiveException {
        throw new UnsupportedOperationException();
    }
}
