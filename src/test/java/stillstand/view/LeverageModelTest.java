package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.SampleStudy;
import stillstand.report.TerminalReport;
import stillstand.sensitivity.Leverage;
import stillstand.sensitivity.NextMeasurement;
import stillstand.study.StudyResult;
import stillstand.view.LeverageModel.Missing;
import stillstand.view.LeverageModel.Part;
import stillstand.view.LeverageModel.Way;
import stillstand.view.LeveragePicture.InputRow;
import stillstand.view.LeveragePicture.LeftOutRow;

/** What answers hang on, in the words of the terminal. */
class LeverageModelTest {
    private final List<Boolean> asked = new ArrayList<>();
    private final LeverageModel model = new LeverageModel(asked::add);

    private static StudyResult with(Leverage leverage, boolean oneCurve) {
        StudyResult all = SampleStudy.result();
        return new StudyResult(
                all.provenance(),
                all.seaLevel(),
                all.levels(),
                all.waiting(),
                all.flights(),
                all.intervals(),
                all.impliedSeaLevel(),
                leverage,
                all.residuals(),
                oneCurve ? List.of() : all.curveChoice(),
                oneCurve ? List.of() : all.curveEvidence(),
                all.comparison(),
                all.siteMotion(),
                all.siteGroups(),
                all.terraceTilts(),
                all.warnings(),
                all.failures(),
                all.ledger());
    }

    private void showAll() {
        model.show(Shown.of(SampleStudy.study(), SampleStudy.result(), false));
    }

    @Test
    void beforeARunEveryPartSaysWhatToDo() {
        model.show(Shown.of(SampleStudy.study()));
        for (Part part : Part.values()) {
            assertEquals(
                    Optional.of(new Missing("Nothing hangs on anything yet: run the study.", Optional.empty())),
                    model.missing(part));
        }
        assertEquals(List.of(LeverageModel.EVERY), model.ratesOf());
    }

    @Test
    void everySentenceIsOneOfTheTerminal() {
        showAll();
        String terminal =
                TerminalReport.text("A", SampleStudy.result(), "results").replaceAll("\\s+", " ");
        for (Part part : Part.values()) {
            List<String> words = model.words(part);
            assertFalse(words.isEmpty(), part.title());
            words.forEach(sentence -> assertTrue(terminal.contains(sentence), sentence));
        }
    }

    @Test
    void mixturesStandBesideTheirCurves() {
        showAll();
        assertEquals(
                List.of("made-up-curve", "other-curve", "all, weighed by evidence", "all alike"),
                model.pictureProperty().get().curves().stream()
                        .map(LeveragePicture.CurveRow::curve)
                        .toList());
        assertEquals(
                "T4 5e",
                model.pictureProperty().get().curves().get(0).choice().matches().stream()
                        .map(match -> match.level() + " " + match.highstand().orElse("none"))
                        .reduce("", String::concat));
        assertTrue(model.pictureProperty().get().rateAxis().contains(0.4));
        model.choose("North cliff", "T4");
        assertEquals(
                "Only one curve serves this rate.",
                model.missing(Part.CURVES).orElseThrow().sentence());
        model.show(Shown.of(SampleStudy.study(), with(Leverage.NONE, true), false));
        assertEquals(
                Optional.of(Way.CHOOSE_CURVES),
                model.missing(Part.CURVES).orElseThrow().way());
    }

    @Test
    void tornadoOfAChosenLevelHasTheLongestBarFirstAndItsOtherHighstandsLast() {
        showAll();
        model.choose("North cliff", "T4");
        List<InputRow> rows = model.pictureProperty().get().inputs();
        assertEquals(
                List.of("shared offset", "survey", "age", "were it 5a"),
                rows.stream().map(InputRow::input).toList());
        assertEquals("T4 at 5e", rows.get(0).rateOf());
        assertEquals("0.485 to 0.387", rows.get(0).does());
        assertEquals("58.4 to 64.4 m", rows.get(1).range());
        assertEquals(Optional.empty(), rows.get(3).bar());
        assertTrue(model.pictureProperty().get().inputAxis().contains(-0.0488));
        assertTrue(model.pictureProperty().get().halving().isEmpty(), "that is the flight's");
        model.choose("North cliff", "the flight");
        assertEquals(
                List.of(-40.0, -3.5),
                model.pictureProperty().get().halving().stream()
                        .map(half -> half.width95ChangePercent())
                        .toList());
        assertTrue(model.pictureProperty().get().inputs().isEmpty());
    }

    @Test
    void measurementsKeepTheirRankAndSayHowSureItIs() {
        showAll();
        List<NextMeasurement> next = model.pictureProperty().get().next();
        assertEquals(
                List.of(-38.5, -5.0),
                next.stream().map(NextMeasurement::width95ChangePercent).toList());
        assertEquals("0.88 to 0.94 ± 0.004", LeverageModel.certainty(next.get(0)));
        assertEquals("", LeverageModel.tells(next.get(0)));
        assertEquals("", LeverageModel.certainty(next.get(1)));
    }

    @Test
    void whatMovesTheRateTheMostIsLeftOutFirst() {
        showAll();
        List<LeftOutRow> rows = model.pictureProperty().get().leftOut();
        assertEquals("sample", rows.get(0).what()); // without it T4 has no rate at all
        assertEquals(Optional.empty(), rows.get(0).without());
        assertEquals(
                List.of("curve", "level", "sample", "sample"),
                rows.stream().map(LeftOutRow::what).sorted().toList());
        for (int i = 1; i < rows.size(); i++) {
            assertTrue(rows.get(i - 1).move() >= rows.get(i).move());
        }
    }

    @Test
    void whatWasNotAskedIsSaidWithAWayToAsk() {
        model.show(Shown.of(SampleStudy.study(), with(Leverage.NONE, false), false));
        assertEquals(
                Optional.of(Way.ASK_AND_RUN),
                model.missing(Part.NEXT).orElseThrow().way());
        assertEquals(
                Optional.of(Way.ASK_AND_RUN),
                model.missing(Part.ASSUMPTIONS).orElseThrow().way());
        assertEquals(Optional.empty(), model.missing(Part.LEFT_OUT)); // levels are left out in every run
        assertTrue(model.note(Part.LEFT_OUT).endsWith("Samples only where the run is asked for it."));
        model.ask(false);
        assertEquals(List.of(), asked, "the study does not ask");
        model.ask(true);
        assertEquals(List.of(true), asked);
    }

    @Test
    void anotherRunKeepsSiteAndRateWhereTheyAreStillThere() {
        showAll();
        model.choose("North cliff", "T4");
        model.show(Shown.of(SampleStudy.study(), with(Leverage.NONE, false), true));
        assertEquals("T4", model.rateOf());
        assertTrue(model.pictureProperty().get().stale());
        model.choose("Old shore", "T4");
        assertEquals(LeverageModel.EVERY, model.rateOf());
        assertEquals(List.of(LeverageModel.EVERY, "S1"), model.ratesOf());
    }
}
