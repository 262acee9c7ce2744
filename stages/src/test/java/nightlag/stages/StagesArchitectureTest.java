package nightlag.stages;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.methods;
import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.Architectures.layeredArchitecture;

import com.tngtech.archunit.base.DescribedPredicate;
import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.domain.JavaClasses;
import com.tngtech.archunit.core.importer.ImportOption;
import com.tngtech.archunit.junit.AnalyzeClasses;
import com.tngtech.archunit.junit.ArchTest;
import com.tngtech.archunit.lang.ArchRule;
import java.util.Date;
import java.util.Locale;
import java.util.Random;
import java.util.TimeZone;

/** The rules that keep the stages pure and in their order. */
@AnalyzeClasses(packages = "nightlag.stages", importOptions = ImportOption.DoNotIncludeTests.class)
class StagesArchitectureTest {
    private static final String[] FLOW = {
        "waveform", "geometry", "moduli", "sweep", "superposition", "spectrum", "response", "acceptance"
    };

    private static final DescribedPredicate<JavaClass> NUMERICAL_LIBRARIES =
            JavaClass.Predicates.resideInAnyPackage("org.apache.commons.math3..", "org.jtransforms..", "org.visnow..");

    /** A stage uses the stages before it and what lies under all of them. */
    @ArchTest
    static void aStageUsesOnlyThoseBeforeIt(JavaClasses classes) {
        var layers = layeredArchitecture()
                .consideringOnlyDependenciesInLayers()
                .withOptionalLayers(true)
                .layer("fault")
                .definedBy("nightlag.stages.fault..")
                .layer("numeric")
                .definedBy("nightlag.stages.numeric..")
                .layer("top")
                .definedBy("nightlag.stages");
        for (String stage : FLOW) {
            layers = layers.layer(stage).definedBy("nightlag.stages." + stage + "..");
        }
        layers = layers.whereLayer("top").mayNotBeAccessedByAnyLayer();
        layers = layers.whereLayer("fault").mayNotAccessAnyLayer();
        layers = layers.whereLayer("numeric").mayOnlyAccessLayers("fault");
        for (int i = 0; i < FLOW.length; i++) {
            String[] allowed = new String[i + 2];
            System.arraycopy(FLOW, 0, allowed, 0, i);
            allowed[i] = "fault";
            allowed[i + 1] = "numeric";
            layers = layers.whereLayer(FLOW[i]).mayOnlyAccessLayers(allowed);
        }
        layers.check(classes);
    }

    @ArchTest
    static final ArchRule onlyNumericImportsTheNumericalLibraries = noClasses()
            .that()
            .resideOutsideOfPackage("nightlag.stages.numeric..")
            .should()
            .dependOnClassesThat(NUMERICAL_LIBRARIES);

    @ArchTest
    static final ArchRule noLibraryTypeLeavesNumeric = methods()
            .that()
            .arePublic()
            .and()
            .areDeclaredInClassesThat()
            .resideInAPackage("nightlag.stages.numeric..")
            .should()
            .notHaveRawReturnType(NUMERICAL_LIBRARIES)
            .andShould()
            .notHaveRawParameterTypes(DescribedPredicate.anyElementThat(NUMERICAL_LIBRARIES));

    @ArchTest
    static final ArchRule stagesTouchNothingOfTheWorld = noClasses()
            .should()
            .dependOnClassesThat()
            .resideInAnyPackage(
                    "java.io..",
                    "java.nio..",
                    "java.net..",
                    "java.sql..",
                    "java.time..",
                    "java.util.concurrent..",
                    "java.util.logging..",
                    "org.apache.logging..",
                    "org.tomlj..");

    @ArchTest
    static final ArchRule stagesAskNoClockThreadOrSystem = noClasses()
            .should()
            .callMethod(System.class, "currentTimeMillis")
            .orShould()
            .callMethod(System.class, "nanoTime")
            .orShould()
            .callMethod(System.class, "getProperty", String.class)
            .orShould()
            .callMethod(System.class, "getenv", String.class)
            .orShould()
            .callMethod(System.class, "getenv")
            .orShould()
            .callMethod(Locale.class, "getDefault")
            .orShould()
            .callMethod(String.class, "format", String.class, Object[].class)
            .orShould()
            .callMethod(String.class, "formatted", Object[].class)
            .orShould()
            .callMethod(Math.class, "random")
            .orShould()
            .callConstructor(Random.class)
            .orShould()
            .dependOnClassesThat()
            .belongToAnyOf(Date.class, TimeZone.class)
            .orShould()
            .dependOnClassesThat()
            .areAssignableTo(Thread.class)
            .orShould()
            .accessField(System.class, "out")
            .orShould()
            .accessField(System.class, "err");
}
