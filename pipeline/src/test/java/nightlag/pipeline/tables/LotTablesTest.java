package nightlag.pipeline.tables;

import static org.assertj.core.api.Assertions.assertThat;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import nightlag.stages.LotResult;
import nightlag.stages.geometry.DeformationMode;
import nightlag.stages.moduli.Flag;
import nightlag.stages.moduli.Harmonic;
import nightlag.stages.moduli.Moduli;
import nightlag.stages.moduli.ModuliCovariance;
import nightlag.stages.moduli.ModulusPoint;
import nightlag.stages.moduli.PointKey;
import nightlag.stages.moduli.Quality;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

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
                List.of());

        write(new LotResult(List.of(point), List.of(), List.of(), List.of()));

        // |G*| = 5000 Pa, δ = atan(4/3), u(tan δ)² = (16/9 · 9 + 16)/3000²; a 1 rad/s oscillation has |η*| = |G*|
        assertThat(table("points"))
                .isEqualTo("""
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
                        """.formatted(Cells.number(Math.sqrt(32) / 3000)).replace("\n", "\r\n"));
        assertThat(table("harmonics")).isEqualTo("""
                        grade,lot,specimen,sweep,point,order,stress_in_phase_Pa,stress_out_of_phase_Pa,\
                        relative_intensity,relative_intensity_u
                        Heron 3,L-17,1,1,012,1,30,40,1,
                        Heron 3,L-17,1,1,012,3,-0.3,0.4,0.01,0.00001
                        """.replace("1e-05", "0.00001").replace("\n", "\r\n"));
    }

    private void write(LotResult result) throws IOException {
        LotTables.write(results, result, FROM);
    }

    private String table(String name) throws IOException {
        return Files.readString(
                LotTables.folder(results, FROM.grade(), FROM.lot()).resolve(name + ".csv"));
    }
}
