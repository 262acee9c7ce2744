package nightlag.stages.acceptance;

import java.util.List;
import java.util.OptionalDouble;
import java.util.function.Supplier;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.ModulusPoint;

/**
 * What limits are held against.
 *
 * @param points the lot's points, unusable ones too; of amplitude sweeps only those in the linear range
 * @param markers its markers, in table order; asked for only where a limit is on one
 */
public record Lot(List<ModulusPoint> points, Supplier<List<Marker>> markers) {
    /** Copies the list. */
    public Lot {
        points = List.copyOf(points);
    }

    /**
     * The lot if something that many records share were off by its standard uncertainty.
     *
     * @param influence what, in a word
     * @param kelvin by how much all temperatures are off, where it is the temperature
     * @param lot the lot as it would be
     */
    public record Moved(String influence, OptionalDouble kelvin, Lot lot) {}
}
