package nightlag.pipeline.tables;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.TreeMap;
import java.util.stream.Stream;
import nightlag.stages.LotResult;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.CreepCurve;
import nightlag.stages.moduli.CreepPart;
import nightlag.stages.moduli.CreepReading;
import nightlag.stages.moduli.CreepStep;
import nightlag.stages.moduli.FigureRow;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.Marker;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;
import nightlag.stages.spectrum.SpectrumRow;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class LotTablesTest {
    private static final Provenance FROM = new Provenance(
            "Heron 3",
            "L-17",
            List.of(new Provenance.Input("melt-bench/L-17/1/012.csv", "00ff")),
            List.of(new Provenance.Plan("conclusion", "ab12")),
            "1.2.3");

    @TempDir
    Path results;

    @Test
    void aPointIsWrittenInTheUnitsOfTheTable() throws IOException {
        ModulusPoint point = new ModulusPoint(
                new PointKey("Heron 3", "L-17", "1", "1", "012", "melt-bench/L-17/1/012.csv"),
                Optional.empty(),
                DeformationMode.SHEAR,
                OptionalDouble.of(463.15),
                OptionalDouble.of(463.15),
                OptionalDouble.of(1 / (2 * Math.PI)),
                OptionalDouble.empty(),
                OptionalDouble.of(0.01),
                OptionalDouble.of(50),
                Optional.of(new Moduli(3000, 4000, Optional.of(new ModuliCovariance(9, 16, 0)))),
                List.of(
                        new Harmonic(1, 30, 40, 1, OptionalDouble.empty()),
                        new Harmonic(3, -0.3, 0.4, 0.01, OptionalDouble.of(1e-5))),
                Quality.DOUBTFUL,
                List.of(Flag.FEW_CYCLES, Flag.NONLINEAR),
                OptionalDouble.of(2.5),
                512,
                OptionalDouble.of(Double.POSITIVE_INFINITY),
                OptionalDouble.of(60.5),
                OptionalDouble.of(500),
                List.of(),
                List.of(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                OptionalDouble.empty());

        write(LotResult.builder().points(List.of(point)).build());

        // |G*| = 5000 Pa, δ = atan(4/3), u(tan δ)² = (16/9 · 9 + 16)/3000²; a 1 rad/s oscillation has |η*| = |G*|
        assertThat(table("points")).isEqualTo("""
                        grade,lot,specimen,sweep,point,deformation,temperature_C,frequency_Hz,angular_frequency_rad_s,\
                        elapsed_s,strain_amplitude,stress_amplitude_Pa,storage_modulus_Pa,storage_modulus_u_Pa,\
                        loss_modulus_Pa,loss_modulus_u_Pa,complex_modulus_Pa,phase_angle_deg,tan_delta,tan_delta_u,\
                        complex_viscosity_Pa_s,relative_third_harmonic,quality,flags,cycles_used,samples_used,\
                        strain_snr_dB,stress_snr_dB,source_file,degrees_of_freedom
                        Heron 3,L-17,1,1,012,shear,190,0.15915494309189535,1,\
                        ,0.01,50,3000,3,\
                        4000,4,5000,53.13010235415598,1.3333333333333333,0.0018856180831641268,\
                        5000,0.01,doubtful,few-cycles;nonlinear,2.5,512,\
                        ,60.5,melt-bench/L-17/1/012.csv,500
                        """.replace("\n", "\r\n"));
        assertThat(table("harmonics")).isEqualTo("""
                        grade,lot,specimen,sweep,point,order,stress_in_phase_Pa,stress_out_of_phase_Pa,\
                        relative_intensity,relative_intensity_u,elastic_chebyshev_Pa,viscous_chebyshev_Pa_s,\
                        minimum_strain_modulus_Pa,largest_strain_modulus_Pa,\
                        minimum_rate_viscosity_Pa_s,largest_rate_viscosity_Pa_s
                        Heron 3,L-17,1,1,012,1,30,40,1,,3000,4000,2910,3030,3880,4040
                        Heron 3,L-17,1,1,012,3,-0.3,0.4,0.01,0.00001,30,40,,,,
                        """.replace("\n", "\r\n"));
    }

    @Test
    void aTableWithoutRowsIsItsHeader() throws IOException {
        write(LotResult.EMPTY);

        assertThat(table("markers"))
                .isEqualTo("grade,lot,specimen,sweep,property,temperature_C,frequency_Hz,value,u,unit,method\r\n");
        assertThat(table("spectrum"))
                .isEqualTo("grade,lot,specimen,reference_temperature_C,kind,form,time_s,value,low,high,unit\r\n");
        assertThat(table("points"))
                .startsWith("grade,lot,specimen,sweep,point,")
                .containsOnlyOnce("\r\n");
        assertThat(table("harmonics"))
                .startsWith("grade,lot,specimen,sweep,point,order,")
                .containsOnlyOnce("\r\n");
    }

    @Test
    void theGradesOwnFiguresStandPointByPoint() throws IOException {
        FigureRow first = derived("2", "rutting_factor", 1250, OptionalDouble.of(12.5));
        FigureRow second = derived("10", "damage", -0.5, OptionalDouble.empty());
        FigureRow third = derived("10", "rutting_factor", 1000, OptionalDouble.of(10));

        write(LotResult.builder().derived(List.of(third, first, second)).build());

        assertThat(table("derived")).isEqualTo("""
                        grade,lot,specimen,sweep,point,quantity,temperature_C,frequency_Hz,value,u,unit,source_file
                        Heron 3,L-17,1,1,2,rutting_factor,190,0.5,1250,12.5,Pa,bench/2.csv
                        Heron 3,L-17,1,1,10,damage,190,0.5,-0.5,,Pa,bench/10.csv
                        Heron 3,L-17,1,1,10,rutting_factor,190,0.5,1000,10,Pa,bench/10.csv
                        """.replace("\n", "\r\n"));
    }

    @Test
    void creepReadingsStandInTheOrderOfTime() throws IOException {
        CreepCurve curve = new CreepCurve(
                new PointKey("Heron 3", "L-17", "1", "1", "run", "bench/run.csv"),
                Optional.empty(),
                DeformationMode.SHEAR,
                OptionalDouble.of(463.15),
                OptionalDouble.empty(),
                true,
                List.of(
                        new CreepStep(CreepPart.LOAD, 0, 0, 0.5, 100, 0, 0, 0),
                        new CreepStep(CreepPart.RECOVERY, 10, 0, 0.5, -100, 0, 2e-3, 0)),
                List.of(
                        new CreepReading(2, 11, 1, 0, 1e-3, 1e-6, 1e-5, 1e-8),
                        new CreepReading(1, 2.5, 2.5, 100, 2e-3, 1e-6, 2e-5, 1e-8)),
                Quality.DOUBTFUL,
                List.of(Flag.DRIFTING, Flag.UNSETTLED),
                200,
                List.of());

        write(LotResult.builder().creep(List.of(curve)).build());

        assertThat(table("creep")).isEqualTo("""
                        grade,lot,specimen,sweep,temperature_C,time_s,stress_Pa,strain,compliance_1_Pa,compliance_u_1_Pa,part,\
                        point,step,step_time_s,deformation,quality,flags,source_file
                        Heron 3,L-17,1,1,190,2.5,100,0.002,0.00002,1e-8,load,\
                        run,1,2.5,shear,doubtful,drifting;unsettled,bench/run.csv
                        Heron 3,L-17,1,1,190,11,0,0.001,0.00001,1e-8,recovery,\
                        run,2,1,shear,doubtful,drifting;unsettled,bench/run.csv
                        """.replace("\n", "\r\n"));
    }

    private static FigureRow derived(String point, String quantity, double value, OptionalDouble u) {
        return new FigureRow(
                new PointKey("Heron 3", "L-17", "1", "1", point, "bench/" + point + ".csv"),
                OptionalDouble.of(463.15),
                OptionalDouble.of(0.5),
                quantity,
                value,
                u,
                "Pa");
    }

    @Test
    void markersAreSortedAndTemperaturesAreCelsiusInTheValueToo() throws IOException {
        Marker peak = new Marker(
                "1",
                "1",
                "glass_transition_loss_peak",
                OptionalDouble.empty(),
                OptionalDouble.of(1),
                300.4,
                OptionalDouble.of(0.2),
                "°C",
                "parabola through 5 points");
        Marker viscosity = new Marker(
                "",
                "",
                "zero_shear_viscosity",
                OptionalDouble.of(463.15),
                OptionalDouble.empty(),
                51234.5,
                OptionalDouble.empty(),
                "Pa·s",
                "sum of g τ, 8 modes");

        write(LotResult.builder().markers(List.of(peak, viscosity)).build());

        assertThat(table("markers").lines().skip(1))
                .containsExactly(
                        "Heron 3,L-17,,,zero_shear_viscosity,190,,51234.5,,Pa·s,\"sum of g τ, 8 modes\"",
                        "Heron 3,L-17,1,1,glass_transition_loss_peak,,1,27.25,0.2,°C,parabola through 5 points");
    }

    @Test
    void aSpectrumAscendsInTimeAndSaysItsUnit() throws IOException {
        SpectrumRow slow = mode(SpectrumRow.Kind.RELAXATION, 10, 2000);
        SpectrumRow fast = mode(SpectrumRow.Kind.RELAXATION, 0.01, 1e5);
        SpectrumRow retarded = mode(SpectrumRow.Kind.RETARDATION, 3e-7, 1.25e-12);

        write(LotResult.builder().spectrum(List.of(retarded, slow, fast)).build());

        assertThat(table("spectrum").lines().skip(1))
                .containsExactly(
                        "Heron 3,L-17,,190,relaxation,discrete,0.01,100000,,,Pa",
                        "Heron 3,L-17,,190,relaxation,discrete,10,2000,,,Pa",
                        "Heron 3,L-17,,190,retardation,discrete,3e-7,1.25e-12,,,1/Pa");
    }

    @Test
    void aPointWithoutModulusHasEmptyCells() throws IOException {
        write(LotResult.builder()
                .points(List.of(point("5", "b/5.csv", Optional.empty())))
                .build());

        assertThat(table("points").lines().skip(1))
                .containsExactly("Heron 3,L-17,1,1,5,extension,,,,,,,,,,,,,,,,,unusable,,,0,,,b/5.csv,");
    }

    @Test
    void whatIsNotFiniteIsAnEmptyCell() throws IOException {
        Moduli withoutStorage = new Moduli(0, 1e300, Optional.of(new ModuliCovariance(1, 1, 0)));
        write(LotResult.builder()
                .points(List.of(point("5", "b/5.csv", Optional.of(withoutStorage))))
                .build());

        assertThat(table("points").lines().skip(1))
                .containsExactly("Heron 3,L-17,1,1,5,extension,,,,,,,0,1,1e300,1,1e300,90,,,,,unusable,,,0,,,b/5.csv,");
    }

    @Test
    void pointsAreSortedByKeyWithDigitsAsNumbersAndThenBySourceFile() throws IOException {
        List<ModulusPoint> points = Stream.of(
                        "10 b/2.csv", "9 b/10.csv", "9 b/9.csv", "9.5 b/1.csv", "a2 b/1.csv", "a10 b/1.csv")
                .map(text -> text.split(" ", -1))
                .map(parts -> point(parts[0], parts[1], Optional.empty()))
                .toList();

        write(LotResult.builder().points(reversed(points)).build());

        assertThat(table("points").lines().skip(1).map(line -> line.split(",", -1)[4] + " " + line.split(",", -1)[28]))
                .containsExactly("9 b/9.csv", "9 b/10.csv", "9.5 b/1.csv", "10 b/2.csv", "a2 b/1.csv", "a10 b/1.csv");
    }

    @Test
    void textThatLooksLikeAFormulaIsMadeHarmless() throws IOException {
        Provenance hostile = new Provenance("=1+1", "../../etc", List.of(), List.of(), "1.2.3");
        PointKey key = new PointKey("=1+1", "../../etc", "@s", "+1", "-2", "a,\"b\"\r\nc/x.csv");

        LotTables.write(
                results,
                LotResult.builder()
                        .points(List.of(point(key, Optional.empty())))
                        .build(),
                hostile);

        Path folder = LotTables.folder(results, "=1+1", "../../etc");
        assertThat(folder.getParent().getParent()).isEqualTo(results);
        assertThat(Files.readString(folder.resolve("points.csv")))
                .contains("\r\n'=1+1,../../etc,'@s,'+1,'-2,extension,")
                .contains(",\"a,\"\"b\"\"\r\nc/x.csv\",");
    }

    @ParameterizedTest(name = "seed {0}")
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void theSameLotIsTheSameBytesInAnyOrderAndAnyLanguage(long seed) throws IOException {
        LotResult result = randomResult(seed);
        LotResult shuffled = LotResult.builder()
                .points(shuffled(result.points(), seed))
                .markers(shuffled(result.markers(), seed))
                .shiftFactors(shuffled(result.shiftFactors(), seed))
                .masterCurve(shuffled(result.masterCurve(), seed))
                .spectrum(shuffled(result.spectrum(), seed))
                .derived(shuffled(result.derived(), seed))
                .responses(result.responses())
                .acceptance(result.acceptance())
                .trend(result.trend())
                .prony(shuffled(result.prony(), seed))
                .build();
        Locale was = Locale.getDefault();

        write(result);
        Map<String, String> first = filesOfTheLot();
        try {
            Locale.setDefault(Locale.forLanguageTag("ar-EG-u-nu-arab"));
            write(shuffled);
        } finally {
            Locale.setDefault(was);
        }

        assertThat(filesOfTheLot()).isEqualTo(first);
        assertThat(first.keySet())
                .containsExactly(
                        "acceptance.csv",
                        "creep.csv",
                        "datapackage.json",
                        "derived.csv",
                        "harmonics.csv",
                        "markers.csv",
                        "master_curve.csv",
                        "points.csv",
                        "prony.csv",
                        "response.csv",
                        "shift_factors.csv",
                        "spectrum.csv");
        assertThat(first.values()).noneMatch(text -> text.contains("NaN") || text.contains("Infinity"));
    }

    @Test
    void whatAKilledRunLeftOnItsWayIsClearedAway() throws IOException {
        Path folder = Files.createDirectories(LotTables.folder(results, FROM.grade(), FROM.lot()));
        Files.writeString(folder.resolve("points.csv" + FolderSwap.ON_ITS_WAY), "half a ta");
        Files.writeString(folder.resolve("a-table-of-another-version.csv" + FolderSwap.ON_ITS_WAY), "x");
        Files.writeString(folder.resolve("notes.txt"), "a colleague's own file stays");

        write(LotResult.EMPTY);

        assertThat(filesOfTheLot().keySet())
                .containsExactly(
                        "acceptance.csv",
                        "creep.csv",
                        "datapackage.json",
                        "derived.csv",
                        "harmonics.csv",
                        "markers.csv",
                        "master_curve.csv",
                        "notes.txt",
                        "points.csv",
                        "prony.csv",
                        "response.csv",
                        "shift_factors.csv",
                        "spectrum.csv");
    }

    @Test
    void aTableThatCannotBeReplacedIsNamedAndNothingIsLeftOnItsWay() throws IOException {
        Path folder = LotTables.folder(results, FROM.grade(), FROM.lot());
        Files.createDirectories(folder.resolve("harmonics.csv").resolve("in the way"));

        assertThatThrownBy(() -> write(LotResult.EMPTY))
                .isInstanceOf(TableInUseException.class)
                .hasMessageContaining("cannot replace " + folder.resolve("harmonics.csv"));

        try (Stream<Path> left = Files.list(folder)) {
            assertThat(left.map(path -> path.getFileName().toString()))
                    .noneMatch(name -> name.endsWith(FolderSwap.ON_ITS_WAY));
        }
    }

    private void write(LotResult result) throws IOException {
        LotTables.write(results, result, FROM);
    }

    private String table(String name) throws IOException {
        return Files.readString(
                LotTables.folder(results, FROM.grade(), FROM.lot()).resolve(name + ".csv"));
    }

    private Map<String, String> filesOfTheLot() throws IOException {
        Map<String, String> texts = new TreeMap<>();
        try (Stream<Path> files = Files.list(LotTables.folder(results, FROM.grade(), FROM.lot()))) {
            for (Path file : files.toList()) {
                texts.put(file.getFileName().toString(), Files.readString(file));
            }
        }
        return texts;
    }

    private static SpectrumRow mode(SpectrumRow.Kind kind, double timeS, double value) {
        return new SpectrumRow(
                463.15, kind, SpectrumRow.Form.DISCRETE, timeS, value, OptionalDouble.empty(), OptionalDouble.empty());
    }

    private static ModulusPoint point(String point, String sourceFile, Optional<Moduli> moduli) {
        return point(new PointKey("Heron 3", "L-17", "1", "1", point, sourceFile), moduli);
    }

    private static ModulusPoint point(PointKey key, Optional<Moduli> moduli) {
        return new ModulusPoint(
                key,
                Optional.empty(),
                DeformationMode.EXTENSION,
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                moduli,
                List.of(),
                Quality.UNUSABLE,
                List.of(),
                OptionalDouble.empty(),
                0,
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                OptionalDouble.empty(),
                List.of(),
                List.of(),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                OptionalDouble.empty());
    }

    private static LotResult randomResult(long seed) {
        return new RandomLot(seed).result(FROM.grade(), FROM.lot());
    }

    private static <T> List<T> reversed(List<T> list) {
        List<T> reversed = new ArrayList<>(list);
        Collections.reverse(reversed);
        return reversed;
    }

    private static <T> List<T> shuffled(List<T> list, long seed) {
        List<T> shuffled = new ArrayList<>(list);
        Collections.shuffle(shuffled, new Random(seed));
        return shuffled;
    }
}
