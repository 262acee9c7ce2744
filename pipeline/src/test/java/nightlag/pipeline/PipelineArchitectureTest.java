package nightlag.pipeline;

import static com.tngtech.archunit.base.DescribedPredicate.not;
import static com.tngtech.archunit.core.domain.JavaClass.Predicates.resideInAPackage;
import static com.tngtech.archunit.core.domain.JavaClass.Predicates.resideInAnyPackage;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;

import com.tngtech.archunit.core.importer.ImportOption;
import com.tngtech.archunit.junit.AnalyzeClasses;
import com.tngtech.archunit.junit.ArchTest;
import com.tngtech.archunit.lang.ArchRule;
import nightlag.pipeline.archive.Archive;
import nightlag.pipeline.decode.RawFileDecoder;
import nightlag.pipeline.intake.IntakeScan;
import nightlag.pipeline.tables.LotTables;
import nightlag.pipeline.tables.NightTables;
import nightlag.pipeline.teamsheet.TeamSheetFile;

/** The rules that keep the rooms of the pipeline apart: the night alone knows them all. */
@AnalyzeClasses(packages = "nightlag.pipeline", importOptions = ImportOption.DoNotIncludeTests.class)
class PipelineArchitectureTest {
    @ArchTest
    static final ArchRule configurationKnowsNoOtherRoom = room("config").mayUse();

    @ArchTest
    static final ArchRule intakeKnowsTheConfiguration = room("intake").mayUse("config");

    @ArchTest
    static final ArchRule decodingKnowsConfigurationAndIntake = room("decode").mayUse("config", "intake");

    @ArchTest
    static final ArchRule theArchiveKnowsNoOtherRoom = room("archive").mayUse();

    @ArchTest
    static final ArchRule tablesKnowNoOtherRoom = room("tables").mayUse();

    @ArchTest
    static final ArchRule theReportKnowsNoOtherRoom = room("report").mayUse();

    @ArchTest
    static final ArchRule theTeamSheetKnowsNoOtherRoom = room("teamsheet").mayUse();

    @ArchTest
    static final ArchRule nothingButTheCommandLineKnowsTheNight = noClasses()
            .that()
            .resideOutsideOfPackages("nightlag.pipeline.cli..", "nightlag.pipeline.night..")
            .should()
            .dependOnClassesThat()
            .resideInAPackage("nightlag.pipeline.night..");

    @ArchTest
    static final ArchRule nothingKnowsTheCommandLine = noClasses()
            .that()
            .resideOutsideOfPackage("nightlag.pipeline.cli..")
            .should()
            .dependOnClassesThat()
            .resideInAPackage("nightlag.pipeline.cli..");

    @ArchTest
    static final ArchRule onlyTheCommandLineEndsTheProcess = noClasses()
            .that()
            .doNotHaveFullyQualifiedName("nightlag.pipeline.cli.Nightlag")
            .should()
            .callMethod(System.class, "exit", int.class);

    /** It prints what the night found; it reads and writes nothing itself. */
    @ArchTest
    static final ArchRule theCommandLineLeavesTheWorkToTheNight = noClasses()
            .that()
            .resideInAPackage("nightlag.pipeline.cli..")
            .should()
            .dependOnClassesThat()
            .belongToAnyOf(
                    Archive.class,
                    IntakeScan.class,
                    LotTables.class,
                    NightTables.class,
                    RawFileDecoder.class,
                    TeamSheetFile.class);

    /** Expressions are compiled there and handed over as functions. */
    @ArchTest
    static final ArchRule onlyTheConfigurationKnowsTheLanguageOfExpressions = noClasses()
            .that()
            .resideOutsideOfPackage("nightlag.pipeline.config..")
            .should()
            .dependOnClassesThat()
            .resideInAPackage("com.ezylang..");

    private static Room room(String name) {
        return new Room(name);
    }

    private record Room(String name) {
        ArchRule mayUse(String... rooms) {
            String[] allowed = new String[rooms.length + 1];
            for (int i = 0; i < rooms.length; i++) {
                allowed[i] = "nightlag.pipeline." + rooms[i] + "..";
            }
            allowed[rooms.length] = "nightlag.pipeline." + name + "..";
            return noClasses()
                    .that()
                    .resideInAPackage("nightlag.pipeline." + name + "..")
                    .should()
                    .dependOnClassesThat(resideInAPackage("nightlag.pipeline..").and(not(resideInAnyPackage(allowed))));
        }
    }
}
