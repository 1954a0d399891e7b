package stillstand;

import static com.tngtech.archunit.lang.syntax.ArchRuleDefinition.noClasses;
import static com.tngtech.archunit.library.dependencies.SlicesRuleDefinition.slices;
import static org.junit.jupiter.api.Assertions.assertEquals;

import com.tngtech.archunit.core.domain.Dependency;
import com.tngtech.archunit.core.domain.JavaClass;
import com.tngtech.archunit.core.domain.JavaClasses;
import com.tngtech.archunit.core.importer.ClassFileImporter;
import com.tngtech.archunit.core.importer.ImportOption;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;
import org.junit.jupiter.api.Test;

/** The house rules of DEVELOPERS.md, as one table and a few sentences. */
class ArchitectureTest {
    private static final JavaClasses CODE =
            new ClassFileImporter(List.of(new ImportOption.DoNotIncludeTests())).importPackages("stillstand");

    private static final Set<String> ENGINE =
            Set.of("ledger", "uncertainty", "sealevel", "dating", "shoreline", "uplift", "sensitivity", "comparison");

    /** Package -> the packages of ours it may use. Every class lives in one of these, or is {@code Main}. */
    private static final Map<String, Set<String>> MAY_USE = Map.ofEntries(
            Map.entry("ledger", Set.of()),
            Map.entry("uncertainty", Set.of("ledger")),
            Map.entry("sealevel", Set.of("ledger", "uncertainty")),
            Map.entry("dating", Set.of("ledger", "uncertainty")),
            Map.entry("shoreline", Set.of("ledger", "uncertainty", "dating")),
            Map.entry("uplift", Set.of("ledger", "uncertainty", "sealevel", "dating", "shoreline")),
            Map.entry("comparison", Set.of("ledger", "uncertainty", "sealevel", "dating", "shoreline", "uplift")),
            Map.entry("sensitivity", Set.of("ledger", "uncertainty", "sealevel", "dating", "shoreline", "uplift")),
            Map.entry("study", ENGINE),
            Map.entry("files", with(ENGINE, "study", "figure")),
            Map.entry("figure", with(ENGINE, "study")),
            Map.entry("report", with(ENGINE, "study", "figure")),
            Map.entry("cli", with(ENGINE, "study", "files", "figure", "report")),
            Map.entry("view", with(ENGINE, "study", "files", "figure", "report")));

    private static Set<String> with(Set<String> base, String... more) {
        Set<String> all = new TreeSet<>(base);
        all.addAll(List.of(more));
        return all;
    }

    @Test
    void packagesUseOnlyWhatTheTableAllows() {
        Set<String> broken = new TreeSet<>();
        for (JavaClass type : CODE) {
            String from = room(type);
            if (from.equals("Main")) {
                continue;
            }
            Set<String> allowed = MAY_USE.get(from);
            if (allowed == null) {
                broken.add(type.getName() + " lives in no package of the table");
                continue;
            }
            for (Dependency use : type.getDirectDependenciesFromSelf()) {
                JavaClass target = use.getTargetClass().getBaseComponentType();
                if (target.getPackageName().startsWith("stillstand")) {
                    String to = room(target);
                    if (!to.equals(from) && !allowed.contains(to)) {
                        broken.add(from + " uses " + to + ": " + use.getDescription());
                    }
                }
            }
        }
        assertEquals(Set.of(), broken);
    }

    /** Name of the package below the root; "Main" for the one class in the root itself. */
    private static String room(JavaClass type) {
        String rest = type.getPackageName().substring("stillstand".length());
        return rest.isEmpty() ? "Main" : rest.substring(1).replaceFirst("\\..*", "");
    }

    @Test
    void packagesFormNoCycle() {
        slices().matching("stillstand.(*)..").should().beFreeOfCycles().check(CODE);
    }

    @Test
    void engineKnowsNoFileClockOrProperty() {
        noClasses()
                .that()
                .resideInAnyPackage(
                        "stillstand.ledger..",
                        "stillstand.uncertainty..",
                        "stillstand.sealevel..",
                        "stillstand.dating..",
                        "stillstand.shoreline..",
                        "stillstand.uplift..",
                        "stillstand.comparison..",
                        "stillstand.sensitivity..",
                        "stillstand.study..")
                .should()
                .dependOnClassesThat()
                .resideInAnyPackage("java.nio.file..", "java.time..", "java.util.logging..")
                .orShould()
                .callMethod(System.class, "currentTimeMillis")
                .orShould()
                .callMethod(System.class, "nanoTime")
                .orShould()
                .callMethod(System.class, "getProperty", String.class)
                .orShould()
                .callMethod(System.class, "getenv", String.class)
                .check(CODE);
    }

    /** But for the toolkit's chooser of folders, which hands one out. */
    @Test
    void nobodyUsesJavaIoFile() {
        noClasses()
                .that()
                .doNotHaveFullyQualifiedName("stillstand.view.Dialogs")
                .should()
                .dependOnClassesThat()
                .haveFullyQualifiedName("java.io.File")
                .check(CODE);
    }

    @Test
    void randomnessIsMadeInDrawStreamsAlone() {
        noClasses()
                .should()
                .dependOnClassesThat()
                .haveFullyQualifiedName("java.util.Random")
                .orShould()
                .dependOnClassesThat()
                .haveFullyQualifiedName("java.util.concurrent.ThreadLocalRandom")
                .orShould()
                .callMethod(Math.class, "random")
                .check(CODE);
        noClasses()
                .that()
                .doNotHaveFullyQualifiedName("stillstand.uncertainty.DrawStreams")
                .should()
                .dependOnClassesThat()
                .haveFullyQualifiedName("org.apache.commons.rng.simple.RandomSource")
                .check(CODE);
    }

    @Test
    void csvAndJsonStayInFiles() {
        noClasses()
                .that()
                .resideOutsideOfPackage("stillstand.files..")
                .should()
                .dependOnClassesThat()
                .resideInAnyPackage(
                        "org.apache.commons.csv..", "tools.jackson..", "com.fasterxml.jackson..", "com.networknt..")
                .check(CODE);
    }

    @Test
    void drawingStaysInFigureAndFilesOutOfIt() {
        noClasses()
                .that()
                .resideOutsideOfPackage("stillstand.figure..")
                .should()
                .dependOnClassesThat()
                .resideInAnyPackage("java.awt..", "javax.imageio..", "org.apache.batik..", "org.apache.pdfbox..")
                .check(CODE);
        noClasses()
                .that()
                .resideInAPackage("stillstand.figure..")
                .should()
                .dependOnClassesThat()
                .resideInAnyPackage("java.nio.file..", "java.time..", "javafx..")
                .check(CODE);
    }

    @Test
    void windowStaysInViewAndModelsKnowNoControl() {
        noClasses()
                .that()
                .resideOutsideOfPackage("stillstand.view..")
                .should()
                .dependOnClassesThat()
                .resideInAPackage("javafx..")
                .check(CODE);
        noClasses()
                .that()
                .resideInAPackage("stillstand.view..")
                .and()
                .haveSimpleNameEndingWith("Model")
                .should()
                .dependOnClassesThat()
                .resideInAnyPackage("javafx.scene..", "javafx.stage..", "javafx.application..")
                .check(CODE);
    }

    @Test
    void standardStreamsStayInCli() {
        noClasses()
                .that()
                .resideOutsideOfPackages("stillstand.cli..")
                .should()
                .accessField(System.class, "out")
                .orShould()
                .accessField(System.class, "err")
                .orShould()
                .accessField(System.class, "in")
                .check(CODE);
    }
}
