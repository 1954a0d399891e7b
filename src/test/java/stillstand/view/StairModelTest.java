package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Deque;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.shoreline.StageChoice;
import stillstand.uplift.FlightPreview;
import stillstand.uplift.PredictedStair;
import stillstand.view.StairPicture.Link;

/** The Stair without a toolkit: what is drawn, what a slid rate predicts, what a try previews, what an edit says. */
class StairModelTest {
    private final List<PairingEdit> edits = new ArrayList<>();
    private final StairModel model = new StairModel(Runnable::run, Runnable::run, edits::add);

    private void showAnswer() {
        model.show(Shown.of(InventedStair.study(), InventedStair.result(), false));
    }

    @Test
    void survivesHavingNothing() {
        model.show(Shown.NOTHING);
        model.select("P1");
        model.selectNext(1);
        model.pin("P1", "5a");
        model.step(1);
        model.slideTo(0.4);
        assertEquals("", model.selectedProperty().get());
        assertEquals(List.of(), edits);
        assertEquals(List.of(), model.levelFacts());
        assertTrue(model.status().startsWith("Nothing to draw"), model.status());
    }

    @Test
    void linesAreThePairingsOfTheAnswerAndTheirSlopeIsARate() {
        showAnswer();
        List<Link> links = model.answerLinks();
        // five pairings of 0.02 or more; the one of 0.01 has no line
        assertEquals(5, links.size());
        Link line = links.stream()
                .filter(link -> link.level().equals("P2") && link.stage().equals("5c"))
                .findFirst()
                .orElseThrow();
        assertEquals(0.7, line.probability());
        assertEquals(0.5, line.rateMetresPerKyr(), 1e-12); // (40.6 - -9.4) m in 100 kyr
        assertEquals(
                "P2 records 5c with probability 0.70: (40.6 − (−9.4) m) in 100.0 kyr = 0.500 m/kyr",
                StairReadings.link(line, false));
        assertEquals(
                List.of("9e"),
                model.pictureProperty().get().lost().stream()
                        .map(f -> f.highstand())
                        .toList());
    }

    @Test
    void theSliderBeginsAtTheAnswerAndMovesTheStaircase() {
        showAnswer();
        assertEquals(0.5, model.rateProperty().get());
        model.slideTo(0.25);
        PredictedStair stair = model.predictedProperty().get().orElseThrow();
        PredictedStair.Step of7a = stair.steps().get(3);
        assertEquals("7a", of7a.stage());
        assertEquals(49.5, of7a.heightMetres(), 1e-9); // -0.5 + 0.25 x 200
        model.rateProperty().set(0.5);
        assertEquals(
                99.5,
                model.predictedProperty().get().orElseThrow().steps().get(3).heightMetres(),
                1e-9);
        // P1 to P4 stand where they were put: 5a and 5c are off by nothing, 5e by 0.05 m
        assertTrue(model.miss().orElseThrow().contains("by 0.0 m"), model.miss().orElseThrow());
    }

    @Test
    void aTypedRateBeyondTheRangeWidensIt() {
        showAnswer();
        model.slideTo(3);
        assertEquals(3, model.rateProperty().get());
        assertTrue(model.rateRangeProperty().get().contains(3));
        model.slideTo(Double.NaN);
        assertEquals(3, model.rateProperty().get());
    }

    @Test
    void aRateSlidByHandComesBackWithItsSite() {
        showAnswer();
        model.slideTo(0.44);
        model.choose("Bare Point");
        assertFalse(model.rateProperty().get() == 0.44);
        model.choose(InventedStair.SITE);
        assertEquals(0.44, model.rateProperty().get());
    }

    @Test
    void freshResultsNeedNoPreview() {
        showAnswer();
        assertEquals(Optional.empty(), model.previewProperty().get());
        assertTrue(model.status().startsWith("Answer of the last run: 0.50 ± 0.02"), model.status());
    }

    @Test
    void pinningHandsOutTheCellAndPreviewsAtOnce() {
        showAnswer();
        model.pin("P2", "5a");
        assertEquals(List.of(new PairingEdit(InventedStair.SITE, "P2", "5a")), edits);
        FlightPreview preview = model.previewProperty().get().orElseThrow();
        assertTrue(preview.pairingsOf("P2").stream()
                .allMatch(pair -> pair.highstand().equals("5a")));
        assertTrue(model.status().startsWith("Preview, not the answer: "), model.status());
        assertTrue(model.previewLinks().stream()
                .anyMatch(link -> link.level().equals("P2") && link.stage().equals("5a")));
    }

    @Test
    void forbiddingSaysNotAndFreeingSaysNothing() {
        showAnswer();
        model.forbid("P2", "5c");
        model.forbid("P2", "5a");
        model.free("P2");
        assertEquals(
                List.of("!5c", "!5a", ""),
                edits.stream().map(PairingEdit::highstand).toList());
    }

    @Test
    void forbiddingOneOfTwoLeavesTheOther() {
        model.show(Shown.of(
                InventedStair.study(new StageChoice(List.of("5a", "5c"), List.of())), InventedStair.result(), false));
        model.forbid("P2", "5a");
        assertEquals("5c", edits.get(0).highstand());
    }

    @Test
    void aTryLeavesNoEditAndCanBeGivenUp() {
        showAnswer();
        model.attempt("P2", StageChoice.pinnedTo("5e"));
        assertTrue(model.previewProperty().get().isPresent());
        assertEquals("5e", model.choiceOf("P2").text());
        model.abandon("P2");
        assertEquals(Optional.empty(), model.previewProperty().get());
        assertEquals(StageChoice.ANY, model.choiceOf("P2"));
        assertEquals(List.of(), edits);
    }

    @Test
    void impossiblePairingsAreSaidToBeImpossible() {
        showAnswer();
        model.pin("P1", "7a");
        model.pin("P2", "5a");
        assertEquals(Optional.empty(), model.previewProperty().get());
        assertTrue(model.status().startsWith("No rate of the prior"), model.status());
        assertFalse(model.previewingProperty().get());
    }

    @Test
    void theNewestWishAloneIsWorkedOn() {
        Deque<Runnable> waiting = new ArrayDeque<>();
        StairModel late = new StairModel(waiting::add, Runnable::run, edits::add);
        late.show(Shown.of(InventedStair.study(), InventedStair.result(), false));
        late.attempt("P2", StageChoice.pinnedTo("5a"));
        late.attempt("P2", StageChoice.pinnedTo("5c"));
        late.attempt("P2", StageChoice.pinnedTo("5e"));
        int worked = 0;
        while (!waiting.isEmpty()) {
            waiting.remove().run();
            worked++;
        }
        assertEquals(2, worked); // the first, and the last of the two that came meanwhile
        assertEquals(
                "5e",
                late.previewProperty()
                        .get()
                        .orElseThrow()
                        .pairingsOf("P2")
                        .get(0)
                        .highstand());
    }

    @Test
    void anAnswerOfAnEarlierSiteIsNotShown() {
        Deque<Runnable> waiting = new ArrayDeque<>();
        StairModel late = new StairModel(waiting::add, Runnable::run, edits::add);
        late.show(Shown.of(InventedStair.study(), InventedStair.result(), false));
        late.attempt("P2", StageChoice.pinnedTo("5a"));
        late.show(Shown.of(InventedStair.study(), InventedStair.result(), false));
        waiting.remove().run();
        assertEquals(Optional.empty(), late.previewProperty().get());
    }

    @Test
    void staleResultsStayAndAPreviewStandsBeside() {
        model.show(Shown.of(InventedStair.study(StageChoice.pinnedTo("5a")), InventedStair.result(), true));
        assertTrue(model.isStale());
        assertEquals(5, model.answerLinks().size());
        assertTrue(model.previewProperty().get().orElseThrow().pairingsOf("P2").stream()
                .allMatch(pair -> pair.highstand().equals("5a")));
    }

    @Test
    void beforeTheFirstRunThereAreLevelsAndAPreview() {
        model.show(Shown.of(InventedStair.study()));
        assertEquals(4, model.pictureProperty().get().levels().size());
        assertEquals(List.of(), model.answerLinks());
        FlightPreview preview = model.previewProperty().get().orElseThrow();
        assertTrue(preview.rate().shortest95().contains(0.5), preview.rate().toString());
        assertEquals(preview.rate().median(), model.rateProperty().get());
    }

    @Test
    void aSiteThatCannotBeMatchedSaysWhy() {
        model.show(Shown.of(InventedStair.study()));
        model.choose("Bare Point");
        assertEquals("No preview: no surveyed range is given.", model.status());
    }

    @Test
    void lastResultsStayWhileTheStudyHasProblems() {
        model.show(new Shown(Optional.empty(), Optional.of(InventedStair.result()), true));
        assertEquals(5, model.answerLinks().size());
        assertFalse(model.canPair("P2"));
        model.pin("P2", "5a");
        assertEquals(List.of(), edits);
        assertEquals(Optional.empty(), model.predictedProperty().get());
    }

    @Test
    void correlationsAreSteppedThroughAndTheLikeliestIsNotTheAnswer() {
        showAnswer();
        assertEquals(4, model.lenses().size());
        model.step(1);
        assertTrue(model.lensProperty().get().title().startsWith("Possible correlation 1 of 2: 0.30 to 0.33 m/kyr"));
        assertEquals(0.315, model.rateProperty().get(), 1e-12);
        // at 0.3 to 0.33 m/kyr the shoreline of 328 ka stands at 94 to 104 m, where P4 is
        assertTrue(
                model.answerLinks().stream()
                        .anyMatch(link ->
                                link.level().equals("P4") && link.stage().equals("9e")),
                model.answerLinks().toString());
        model.step(2);
        assertTrue(model.lensProperty().get().title().endsWith("not the answer"));
        // P3 is matched to nothing in it
        assertEquals(
                List.of("P1", "P2", "P4"),
                model.answerLinks().stream().map(Link::level).toList());
        model.step(1);
        assertEquals(5, model.answerLinks().size());
    }

    @Test
    void ofAChangedStudyAPossibleCorrelationHasNoLines() {
        model.show(Shown.of(InventedStair.study(StageChoice.pinnedTo("5a")), InventedStair.result(), true));
        model.step(1);
        assertTrue(model.lensProperty().get().title().endsWith("(run again to see its lines)"));
        assertEquals(List.of(), model.answerLinks());
    }

    @Test
    void aLevelOpensWithAllThatIsKnown() {
        showAnswer();
        model.select("P4");
        List<Fact> facts = model.levelFacts();
        assertTrue(facts.contains(new Fact("Records", "7a 100 %")), facts.toString());
        assertTrue(
                facts.contains(
                        new Fact("Without it", "the flight would give 0.41 ± 0.06 in place of 0.50 ± 0.02 m/kyr")),
                facts.toString());
        model.select("P1");
        assertTrue(
                model.levelFacts().contains(new Fact("Waits", "the flight of the site says its highstand")),
                model.levelFacts().toString());
    }

    @Test
    void levelsAreSteppedThroughByKeys() {
        showAnswer();
        model.selectNext(1);
        assertEquals("P1", model.selectedProperty().get());
        model.selectNext(-1);
        assertEquals("P4", model.selectedProperty().get());
    }
}
