package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyFolder;
import stillstand.study.Library;
import stillstand.study.Study;
import stillstand.view.SeaLevelModel.Line;
import stillstand.view.SeaLevelModel.Stand;

/** Choosing and comparing the shipped curves, without a toolkit. */
class SeaLevelModelTest {
    private static final String SPRATT = "spratt-lisiecki-2016";
    private static final String WAELBROECK = "waelbroeck-2002";
    private static final Library LIBRARY = ShippedLibrary.load();
    private static final Study STUDY =
            StudyFolder.read(Path.of("demo/velloe-island"), LIBRARY).value().orElseThrow();

    private final List<SeaLevelEdit> edits = new ArrayList<>();
    private final SeaLevelModel model = new SeaLevelModel(LIBRARY, edits::add);

    private Stand stand(String stage) {
        return model.pictureProperty().get().stands().stream()
                .filter(stand -> stand.stage().equals(stage))
                .findFirst()
                .orElseThrow();
    }

    @Test
    void withoutAStudyCurvesCanBeLookedAtButNothingIsAskedFor() {
        model.lookAt(SPRATT, true);
        assertEquals(1, model.pictureProperty().get().lines().size());
        model.override(SeaLevelModel.NO_OVERRIDES);
        assertEquals(List.of(), edits);
    }

    @Test
    void theStudysCurveIsDrawnWithItsHighstandsAsUsed() {
        model.show(Shown.of(STUDY));
        assertEquals(
                List.of(SPRATT),
                model.pictureProperty().get().lines().stream().map(Line::id).toList());
        assertTrue(model.isChosen(SPRATT));
        assertEquals("Highstands as the study uses them.", model.status());
        Stand last = stand("5e");
        assertEquals(7.5, last.metres(), 1e-9); // the independent estimate the demo's ledger names
        assertEquals(122.5, last.ageKa(), 1e-9);
        assertTrue(last.replaced());
        assertEquals(121, last.pick().orElseThrow().ageKa(), 1); // where the curve itself has it
        assertFalse(stand("9e").replaced());
        assertEquals(8, model.pictureProperty().get().cells().get(0).size());
    }

    @Test
    void choosingHandsOutCurvesAndOverrides() {
        model.show(Shown.of(STUDY));
        model.choose(WAELBROECK, true);
        model.override(SeaLevelModel.NO_OVERRIDES);
        assertEquals(
                List.of(
                        new SeaLevelEdit(List.of(SPRATT, WAELBROECK), Optional.of("independent-highstands")),
                        new SeaLevelEdit(List.of(SPRATT, WAELBROECK), Optional.empty())),
                edits);
        assertFalse(stand("5e").replaced()); // shown at once, before the study has taken it
        model.chooseOnly(WAELBROECK);
        assertEquals(List.of(WAELBROECK), edits.get(2).curves());
    }

    @Test
    void theLastCurveCannotBeLeft() {
        model.show(Shown.of(STUDY));
        model.choose(SPRATT, false);
        assertTrue(model.isChosen(SPRATT));
        assertEquals(List.of(), edits);
    }

    @Test
    void curvesForComparisonAreDrawnAndNotAskedFor() {
        model.show(Shown.of(STUDY));
        model.lookAt(WAELBROECK, true);
        assertEquals(2, model.pictureProperty().get().lines().size());
        assertFalse(model.pictureProperty().get().lines().get(1).inUse());
        model.lookAt(WAELBROECK, false);
        assertEquals(1, model.pictureProperty().get().lines().size());
        assertEquals(List.of(), edits);
    }

    @Test
    void zoomKeepsThePlaceUnderThePointer() {
        model.wholeView();
        double before = part(122.5);
        model.zoom(0.5, 122.5, 0);
        assertEquals(before, part(122.5), 1e-9);
        assertEquals(215, model.paneProperty().get().agesKa().width(), 1e-9);
        model.wholeView();
        assertEquals(430, model.paneProperty().get().agesKa().width(), 1e-9);
    }

    private double part(double ageKa) {
        return (ageKa - model.paneProperty().get().agesKa().low())
                / model.paneProperty().get().agesKa().width();
    }

    @Test
    void hoverReadsEveryCurveThatCoversTheAge() {
        model.show(Shown.of(STUDY));
        model.lookAt(WAELBROECK, true);
        String there = model.reading(20);
        assertTrue(there.startsWith("20.0 ka; " + SPRATT + " −1"), there); // the last glacial, more than 100 m lower
        assertTrue(there.contains("; " + WAELBROECK + " −1"), there);
        assertFalse(model.reading(700).contains(WAELBROECK)); // beyond its end
    }
}
