package nightlag.stages.spectrum;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.function.Function;
import nightlag.stages.moduli.ModulusReading;
import nightlag.stages.numeric.Complex;

/**
 * Weighs readings that come without uncertainties by what their scatter about a fit shows. It fits with each modulus erring
 * by a part of itself, reads the likeliest {@link ErrorModel} off what is left, and fits again with that one until it holds,
 * the errors then growing with the fitted moduli, which are surer than a single reading near zero. Of the fits, the one is
 * kept that makes the readings likeliest for its numbers (Schwarz, Ann. Stat. 6 (1978) 461).
 */
final class SelfWeighing {
    private static final int MOST_FITS = 3;

    /** Readings as weighted by a model, the modes fitted to them, and how unlikely both make the readings. */
    record Weighed(WeightedReadings readings, FittedModes modes, ErrorModel model, double cost) {}

    private final List<ModulusReading> readings;
    private final Function<WeightedReadings, FittedModes> search;

    SelfWeighing(List<ModulusReading> readings, Function<WeightedReadings, FittedModes> search) {
        this.readings = readings;
        this.search = search;
    }

    /** The fit that is kept. */
    Weighed fit() {
        ErrorModel model = ErrorModel.OF_EACH_MODULUS;
        List<Complex> moduli =
                readings.stream().map(reading -> reading.moduli().complex()).toList();
        List<Weighed> fits = new ArrayList<>();
        while (fits.size() < MOST_FITS && fits.stream().map(Weighed::model).noneMatch(model::isLike)) {
            WeightedReadings weighted = WeightedReadings.byModel(readings, model, moduli);
            FittedModes modes = search.apply(weighted);
            moduli = modulusOf(modes);
            List<ErrorModel.Residual> residuals = residuals(moduli);
            fits.add(new Weighed(weighted, modes, model, cost(model, residuals, modes)));
            model = ErrorModel.likeliest(residuals);
        }
        return fits.stream().min(Comparator.comparingDouble(Weighed::cost)).orElseThrow();
    }

    private static double cost(ErrorModel model, List<ErrorModel.Residual> residuals, FittedModes modes) {
        int numbers = modes.parameters() + (model.isMixed() ? 1 : 0);
        return model.unlikelihood(residuals) + numbers * ErrorModel.priceOfNumber(residuals);
    }

    private List<Complex> modulusOf(FittedModes modes) {
        RelaxationModes material = RelaxationModes.of(modes.equilibrium(), modes.times(), modes.strengths());
        return readings.stream()
                .map(reading -> material.modulusPa(reading.angularFrequency()))
                .toList();
    }

    private List<ErrorModel.Residual> residuals(List<Complex> fitted) {
        List<ErrorModel.Residual> residuals = new ArrayList<>();
        for (int i = 0; i < fitted.size(); i++) {
            Complex difference = readings.get(i).moduli().complex().minus(fitted.get(i));
            residuals.add(new ErrorModel.Residual(fitted.get(i), difference));
        }
        return residuals;
    }
}
