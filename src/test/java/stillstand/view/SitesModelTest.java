package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.SampleStudy;
import stillstand.figure.SiteView.Claim;
import stillstand.figure.SiteView.LevelView;
import stillstand.report.TerminalReport;
import stillstand.uplift.LevelAnswer;
import stillstand.view.SitesModel.Part;
import stillstand.view.SitesModel.TogetherRow;
import stillstand.view.SitesPicture.Kind;
import stillstand.view.SitesPicture.Spot;

/** How sites compare, in the words of the terminal, and where they lie. */
class SitesModelTest {
    private final SitesModel model = new SitesModel();

    private void showAll() {
        model.show(Shown.of(SampleStudy.study(), SampleStudy.result(), false));
    }

    @Test
    void beforeARunEveryPartSaysWhatToDo() {
        model.show(Shown.of(SampleStudy.study()));
        for (Part part : Part.values()) {
            assertEquals(Optional.of("Nothing to compare yet: run the study."), model.missing(part));
        }
        assertEquals("No map yet: run the study.", model.whyNoPicture());
        assertEquals(List.of(), model.views());
    }

    @Test
    void everySentenceIsOneOfTheTerminal() {
        showAll();
        String terminal =
                TerminalReport.text("A", SampleStudy.result(), "results").replaceAll("\\s+", " ");
        List<String> words = model.contentProperty().get().words();
        assertTrue(words.size() > 6, "only " + words.size());
        words.forEach(sentence -> assertTrue(terminal.contains(sentence), sentence));
    }

    @Test
    void theWrongAnswerStandsBesideTheDifferenceOnOneAxis() {
        showAll();
        SitesModel.Content content = model.contentProperty().get();
        assertEquals(1, content.differences().size());
        assertTrue(content.differenceAxis().contains(0), "whether a difference holds 0 can be seen");
        assertTrue(content.differenceAxis().contains(0.34)
                && content.differenceAxis().contains(0.46));
        assertEquals("A site counts as stable where its rate is within 0.05 m/kyr of 0.", model.note(Part.MOTION));
    }

    @Test
    void coastsAndTerracesAreSaidWithWhatWouldComeOutOtherwise() {
        showAll();
        List<TogetherRow> rows = model.contentProperty().get().together();
        assertEquals(
                List.of(
                        "mean, partially pooled",
                        "how far its sites differ",
                        "North cliff, drawn to the mean",
                        "South cliff, drawn to the mean",
                        "mean over areas",
                        "tilt along the coast",
                        "tilt over the map",
                        "tilt along the coast by 6 points",
                        "tilt over its age"),
                rows.stream().map(TogetherRow::what).toList());
        assertEquals(
                "by itself: 0.430 ± 0.020 m/kyr, 95 % 0.39 to 0.47", rows.get(2).beside());
        assertEquals("−0.0130 ± 0.0010 m/kyr per km", rows.get(5).answer());
        assertEquals(
                "were errors not shared: −0.0130 ± 0.0010 m/kyr per km",
                rows.get(5).beside());
        assertEquals("North cliff / T4", rows.get(8).of());
    }

    @Test
    void mapAndCoastAreOfferedAndKeptOverARun() {
        showAll();
        assertEquals(List.of("Map", "Along east"), model.views());
        SitesPicture map = model.pictureProperty().get();
        assertEquals(Kind.MAP, map.kind());
        assertEquals(
                List.of("North cliff", "South cliff"),
                map.spots().stream().map(spot -> spot.site().site()).toList());
        assertTrue(map.across().contains(-3.5) && map.across().contains(-3.25));
        model.choose("Along east");
        showAll();
        SitesPicture coast = model.pictureProperty().get();
        assertEquals(Kind.COAST, coast.kind());
        assertEquals(List.of(0.0, 30.0), coast.spots().stream().map(Spot::x).toList());
        assertEquals("T4", coast.spots().get(0).levels().get(0).name());
        assertEquals(
                "North cliff: up (>99 %), 0.430 ± 0.020 m/kyr",
                SitesModel.reading(coast.spots().get(0).site()));
    }

    @Test
    void levelsAreJoinedByTheProbabilityThatBothRecordOneHighstand() {
        LevelAnswer any = SampleStudy.result().levels().get(0);
        LevelView one =
                new LevelView("A", Optional.empty(), List.of(new Claim("5e", 0.75), new Claim("older", 0.25)), any);
        LevelView other =
                new LevelView("B", Optional.empty(), List.of(new Claim("older", 0.5), new Claim("5e", 0.5)), any);
        assertEquals(0.375, one.probabilitySameHighstand(other), 1e-12); // "older" names no one age
    }

    @Test
    void namesMakeRoomForEachOther() {
        assertArrayEquals(new double[] {10, 20, 50}, SitesPaper.apart(new double[] {10, 12, 50}, 10, 0, 100), 0);
        assertArrayEquals(new double[] {80, 90, 100}, SitesPaper.apart(new double[] {95, 96, 97}, 10, 0, 100), 0);
    }
}
