package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.view.EvidenceModel.Finding;

/** Settings and tables, and the list of what is wrong in them. */
class EvidenceModelTest {
    @TempDir
    private Path folder;

    @Test
    void findingLeadsToItsCell() throws IOException {
        EvidenceModel evidence = open();
        GridModel levels = evidence.grid("levels.csv").orElseThrow();
        levels.write(1, 2, "12o");
        evidence.partProperty().set("sites.csv");
        Finding finding = evidence.findings().get(0);
        assertTrue(finding.isProblem());
        evidence.goTo(finding);
        assertEquals("levels.csv", evidence.partProperty().get());
        assertEquals(CellRange.at(1, 2), levels.chosen());
        assertEquals(finding.sentence(), levels.markAtCaret().orElseThrow().sentence());
        assertEquals(1, evidence.problemCount("levels.csv"));
    }

    @Test
    void findingLeadsToItsKey() throws IOException {
        EvidenceModel evidence = open();
        SettingsModel settings = evidence.settings();
        settings.write(field(settings, "rate.prior.scale"), "0,5");
        assertEquals(
                Optional.of("study.json:7:36: rate.prior.scale: found \"0,5\", expected a number above 0"),
                settings.problem("rate.prior.scale").map(EvidenceModelTest::withoutPlace));
        evidence.goTo(evidence.findings().get(0));
        assertEquals("study.json", evidence.partProperty().get());
        assertEquals(
                Optional.of("rate.prior.scale"), evidence.wantedKeyProperty().get());
        settings.write(field(settings, "rate.prior.scale"), "0.5");
        assertEquals(Optional.empty(), settings.problem("rate.prior.scale"));
        settings.write(field(settings, "rate.prior.scale"), "");
        assertFalse(evidence.text("study.json").contains("prior"));
    }

    private static String withoutPlace(String sentence) {
        return sentence.replaceFirst("study.json:\\d+:\\d+:", "study.json:7:36:");
    }

    @Test
    void nextGoesRound() throws IOException {
        EvidenceModel evidence = open();
        GridModel levels = evidence.grid("levels.csv").orElseThrow();
        levels.write(0, 2, "a");
        levels.write(1, 2, "b");
        int all = evidence.findings().size();
        Finding first = evidence.next(false).orElseThrow();
        for (int i = 1; i < all; i++) {
            evidence.next(false);
        }
        assertEquals(Optional.of(first), evidence.next(false));
        assertEquals(Optional.of(evidence.findings().get(all - 1)), evidence.next(true));
    }

    @Test
    void brokenTableIsMendedAsText() throws IOException {
        Path study = OpenStudies.template(folder);
        Files.writeString(study.resolve("levels.csv"), "site,level\n\"A,one\n");
        EvidenceModel evidence = OpenStudies.evidence(OpenStudies.document(study));
        assertEquals(Optional.empty(), evidence.grid("levels.csv"));
        assertTrue(evidence.hasText("levels.csv"));
        assertEquals(
                "a quoted cell that never ends",
                evidence.document().checked().problems().stream()
                        .filter(problem -> problem.file().equals("levels.csv"))
                        .findFirst()
                        .orElseThrow()
                        .found());
        evidence.writeText("levels.csv", "site,level,elevation_m,elevation_1sigma_m\n");
        assertTrue(evidence.grid("levels.csv").isPresent());
    }

    @Test
    void brokenSettingsAreMendedAsText() throws IOException {
        Path study = OpenStudies.template(folder);
        Files.writeString(study.resolve("study.json"), "{\"title\": ");
        EvidenceModel evidence = OpenStudies.evidence(OpenStudies.document(study));
        assertFalse(evidence.settings().isReadable());
        evidence.writeText("study.json", "{\"title\": \"mended\"}");
        assertTrue(evidence.settings().isReadable());
    }

    @Test
    void unreadableBytesAreNotWrittenOver() throws IOException {
        Path study = OpenStudies.template(folder);
        byte[] utf16 = "site,level\n".getBytes(java.nio.charset.StandardCharsets.UTF_16);
        Files.write(study.resolve("levels.csv"), utf16);
        EvidenceModel evidence = OpenStudies.evidence(OpenStudies.document(study));
        assertFalse(evidence.hasText("levels.csv"));
        SettingsModel settings = evidence.settings();
        settings.write(field(settings, "title"), "other");
        evidence.document().save(() -> {});
        assertEquals(List.of(utf16.length), List.of(Files.readAllBytes(study.resolve("levels.csv")).length));
    }

    @Test
    void tableThatIsMissingIsAdded() throws IOException {
        Path study = OpenStudies.template(folder);
        Files.delete(study.resolve("samples.csv"));
        EvidenceModel evidence = OpenStudies.evidence(OpenStudies.document(study));
        assertEquals(Optional.empty(), evidence.grid("samples.csv"));
        evidence.addTable("samples.csv");
        assertTrue(evidence.grid("samples.csv").isPresent());
        assertEquals(
                0, evidence.problemCount("samples.csv"), evidence.findings().toString());
        evidence.document().undo();
        assertEquals(Optional.empty(), evidence.grid("samples.csv"));
    }

    @Test
    void curvesAreChosenAndWeighed() throws IOException {
        EvidenceModel evidence = open();
        SettingsModel settings = evidence.settings();
        settings.use("waelbroeck-2002", true);
        settings.use("spratt-lisiecki-2016", true);
        settings.weigh("spratt-lisiecki-2016", "0.5");
        assertEquals(
                "{waelbroeck-2002=, spratt-lisiecki-2016=0.5}",
                settings.curves().toString());
        settings.weigh("spratt-lisiecki-2016", "-1");
        assertTrue(settings.problemOfCurves().orElseThrow().contains("a number above 0"));
        settings.use("spratt-lisiecki-2016", false);
        assertEquals(Optional.empty(), settings.problemOfCurves());
        assertTrue(settings.curveIds().contains("waelbroeck-2002"));
    }

    @Test
    void everyFieldIsAKeyOfTheSchema() throws IOException {
        for (SettingsModel.Field field : open().settings().fields()) {
            assertFalse(field.expected().isEmpty(), field.keyPath());
        }
    }

    private EvidenceModel open() throws IOException {
        return OpenStudies.evidence(OpenStudies.document(OpenStudies.template(folder)));
    }

    private static SettingsModel.Field field(SettingsModel settings, String keyPath) {
        return settings.fields().stream()
                .filter(field -> field.keyPath().equals(keyPath))
                .findFirst()
                .orElseThrow();
    }
}
