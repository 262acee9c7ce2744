package nightlag.pipeline.config;

import static org.assertj.core.api.Assertions.assertThat;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class UnitsTest {
    private static Unit unit(String symbol, QuantityKind kind) {
        Parsed<Unit> parsed = Units.parse(symbol, kind);
        assertThat(parsed).as("%s", parsed).isInstanceOf(Parsed.Value.class);
        return parsed.toOptional().orElseThrow();
    }

    /** Exact by the SI's definitions; pound and inch by the agreement of 1959, standard gravity by the CGPM of 1901. */
    @ParameterizedTest(name = "1 {0} = {2}")
    @CsvSource(delimiter = '|', quoteCharacter = '"', textBlock = """
                    s           | TIME                   | 1
                    ms          | TIME                   | 1e-3
                    µs          | TIME                   | 1e-6
                    μs          | TIME                   | 1e-6
                    us          | TIME                   | 1e-6
                    min         | TIME                   | 60
                    h           | TIME                   | 3600
                    d           | TIME                   | 86400
                    a           | TIME                   | 31557600
                    Hz          | FREQUENCY              | 1
                    kHz         | FREQUENCY              | 1e3
                    mHz         | FREQUENCY              | 1e-3
                    rad/s       | FREQUENCY              | 0.15915494309189535
                    °/s         | FREQUENCY              | 0.002777777777777778
                    rad         | ANGLE                  | 1
                    mrad        | ANGLE                  | 1e-3
                    °           | ANGLE                  | 0.017453292519943295
                    deg         | ANGLE                  | 0.017453292519943295
                    m           | LENGTH                 | 1
                    cm          | LENGTH                 | 1e-2
                    mm          | LENGTH                 | 1e-3
                    µm          | LENGTH                 | 1e-6
                    nm          | LENGTH                 | 1e-9
                    in          | LENGTH                 | 0.0254
                    mm²         | AREA                   | 1e-6
                    mm2         | AREA                   | 1e-6
                    mm^2        | AREA                   | 1e-6
                    cm·cm       | AREA                   | 1e-4
                    g/cm³       | DENSITY                | 1e3
                    kg/m3       | DENSITY                | 1
                    kg·m-3      | DENSITY                | 1
                    g·cm⁻³      | DENSITY                | 1e3
                    N·m         | TORQUE                 | 1
                    mN·m        | TORQUE                 | 1e-3
                    µN*m        | TORQUE                 | 1e-6
                    uN.m        | TORQUE                 | 1e-6
                    mNm         | TORQUE                 | 1e-3
                    gf·cm       | TORQUE                 | 9.80665e-5
                    N           | FORCE                  | 1
                    mN          | FORCE                  | 1e-3
                    gf          | FORCE                  | 9.80665e-3
                    lbf         | FORCE                  | 4.4482216152605
                    Pa          | STRESS                 | 1
                    kPa         | STRESS                 | 1e3
                    MPa         | STRESS                 | 1e6
                    GPa         | STRESS                 | 1e9
                    mPa         | STRESS                 | 1e-3
                    N/mm²       | STRESS                 | 1e6
                    dyn/cm^2    | STRESS                 | 0.1
                    bar         | STRESS                 | 1e5
                    psi         | STRESS                 | 6894.7572931683613367
                    1           | RATIO                  | 1
                    %           | RATIO                  | 0.01
                    mm/mm       | RATIO                  | 1
                    µm/m        | RATIO                  | 1e-6
                    K           | TEMPERATURE            | 1
                    mK          | TEMPERATURE_DIFFERENCE | 1e-3
                    1/K         | EXPANSION              | 1
                    K⁻¹         | EXPANSION              | 1
                    Pa·s        | VISCOSITY              | 1
                    mPas        | VISCOSITY              | 1e-3
                    1/MPa       | COMPLIANCE_OF_MATERIAL | 1e-6
                    kJ/mol      | ENERGY_PER_MOLE        | 1e3
                    kg·m²       | INERTIA                | 1
                    g·cm²       | INERTIA                | 1e-7
                    N·m·s       | FRICTION               | 1
                    N·m·s/rad   | FRICTION               | 1
                    N·m/(rad/s) | FRICTION               | 1
                    g           | MASS                   | 1e-3
                    N·s/m       | DAMPING                | 1
                    N/(m/s)     | DAMPING                | 1
                    rad/(N·m)   | ANGULAR_COMPLIANCE     | 1
                    rad/N/m     | ANGULAR_COMPLIANCE     | 1
                    µrad/(mN·m) | ANGULAR_COMPLIANCE     | 1e-3
                    µm/N        | LINEAR_COMPLIANCE      | 1e-6
                    mV          | VOLTAGE                | 1e-3
                    """)
    void spellings(String symbol, QuantityKind kind, double si) {
        assertThat(unit(symbol, kind).factor()).isEqualTo(si);
        assertThat(unit(symbol, kind).offset()).isZero();
        assertThat(Units.isUnit(symbol)).isTrue();
    }

    @ParameterizedTest
    @ValueSource(strings = {"°C", "degC", "Cel", "℃", "ºC", " °C "})
    void celsius(String symbol) {
        assertThat(unit(symbol, QuantityKind.TEMPERATURE).toSi(25)).isEqualTo(298.15);
        assertThat(Units.parse(symbol, QuantityKind.TEMPERATURE_DIFFERENCE)).isInstanceOf(Parsed.Refused.class);
    }

    @ParameterizedTest(name = "{0} is no unit of {1}")
    @CsvSource(textBlock = """
                    kpa,      STRESS
                    Mpa,      STRESS
                    KPa,      STRESS
                    mn·m,     TORQUE
                    NM,       TORQUE
                    hz,       FREQUENCY
                    HZ,       FREQUENCY
                    Min,      TIME
                    sec,      TIME
                    °c,       TEMPERATURE
                    C,        TEMPERATURE
                    k,        TEMPERATURE
                    1/s,      FREQUENCY
                    rad,      FREQUENCY
                    1,        FREQUENCY
                    rad·Hz,   FREQUENCY
                    Hz,       TIME
                    rad,      RATIO
                    °,        RATIO
                    1,        ANGLE
                    %,        ANGLE
                    N,        TORQUE
                    J,        FORCE
                    °C/min,   TEMPERATURE
                    1/°C,     EXPANSION
                    Pa,       COMPLIANCE_OF_MATERIAL
                    rad/N·m,  ANGULAR_COMPLIANCE
                    N·,       FORCE
                    (N,       FORCE
                    N),       FORCE
                    /N,       FORCE
                    N//m,     FORCE
                    N^,       FORCE
                    N^x,      FORCE
                    mm²²,     AREA
                    kkg,      MASS
                    mkg,      MASS
                    dB,       RATIO
                    5,        RATIO
                    """)
    void refused(String symbol, QuantityKind kind) {
        assertThat(Units.parse(symbol, kind)).isInstanceOf(Parsed.Refused.class);
    }

    @Test
    void whatIsNoUnitAtAll() {
        assertThat(Units.isUnit("")).isFalse();
        assertThat(Units.isUnit("190,0")).isFalse();
        assertThat(Units.isUnit("L-17")).isFalse();
        assertThat(Units.isUnit("(".repeat(10_000))).isFalse();
        assertThat(Units.isUnit("m".repeat(10_000))).isFalse();
    }

    /** Both mean one turn a second; no other kind of quantity takes a frequency, and none converts it. */
    @Test
    void hertzAndRadiansASecondAreNeverConfused() {
        assertThat(unit("Hz", QuantityKind.FREQUENCY).toSi(1)).isEqualTo(1);
        assertThat(unit("rad/s", QuantityKind.FREQUENCY).toSi(2 * Math.PI)).isEqualTo(1);
        for (QuantityKind kind : QuantityKind.values()) {
            if (kind != QuantityKind.FREQUENCY) {
                assertThat(Units.parse("Hz", kind)).as("%s", kind).isInstanceOf(Parsed.Refused.class);
                assertThat(Units.parse("rad/s", kind)).as("%s", kind).isInstanceOf(Parsed.Refused.class);
            }
        }
    }

    @Test
    void everyKindTakesItsOwnUnitAndItsExamples() {
        for (QuantityKind kind : QuantityKind.values()) {
            assertThat(unit(kind.si(), kind).toSi(1)).as("%s", kind).isEqualTo(1);
            kind.examples().forEach(example -> unit(example, kind));
        }
    }

    @Test
    void sensitivityOfATransducer() {
        assertThat(Units.parseSensitivity("mN·m/V", QuantityKind.TORQUE)
                        .toOptional()
                        .orElseThrow()
                        .factor())
                .isEqualTo(1e-3);
        assertThat(Units.parseSensitivity("mN·m/mV", QuantityKind.TORQUE)
                        .toOptional()
                        .orElseThrow()
                        .factor())
                .isEqualTo(1);
        assertThat(Units.parseSensitivity("mN·m", QuantityKind.TORQUE)).isInstanceOf(Parsed.Refused.class);
        assertThat(Units.parseSensitivity("N/V", QuantityKind.TORQUE)).isInstanceOf(Parsed.Refused.class);
    }
}
