package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
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
import stillstand.SampleStudy;
import stillstand.figure.Figure;
import stillstand.figure.FigureFormat;
import stillstand.figure.PageWidth;
import stillstand.files.ResultsJson;
import stillstand.view.RecordModel.FigureWish;

/** The record without a toolkit: the ledger is searched, figures and results go to disk as the command line writes them. */
class RecordModelTest {
    @TempDir
    private Path folder;

    private final RecordModel model = new RecordModel(Runnable::run, Runnable::run);

    private void showSample(boolean stale) {
        model.show(Shown.of(SampleStudy.study(), SampleStudy.withoutFailure(), stale));
    }

    private FigureWish svg(List<Figure> figures) {
        return new FigureWish(figures, List.of(FigureFormat.SVG), PageWidth.ONE, true, 300);
    }

    @Test
    void survivesHavingNothing() {
        model.show(Shown.NOTHING);
        assertEquals("0 lines", model.found());
        assertEquals("No figures yet: run the study.", model.figureStatus());
        model.exportResults(folder.resolve("out"));
        assertEquals(
                "There is nothing to export yet: run the study.",
                model.messageProperty().get());
        assertFalse(Files.exists(folder.resolve("out")));
    }

    @Test
    void theLedgerIsSearchedByWordsInAnyCaseAndOrder() {
        showSample(false);
        assertEquals("2 lines", model.found());
        model.search("cauchy PRIOR");
        assertEquals("1 of 2 lines", model.found());
        assertEquals("=prior of the rate", model.ledger().get(0).assumption());
        model.search("no such word");
        assertEquals(List.of(), model.ledger());
        model.search("");
        assertEquals("2 lines", model.found());
    }

    @Test
    void oddInputAndFailuresAreListedAsTheTerminalSaysThem() {
        model.show(Shown.of(SampleStudy.study(), SampleStudy.result(), false));
        assertEquals(List.of("levels.csv:3:4: elevation_m: 1200 looks like feet"), model.warnings());
        assertEquals(List.of("East bay: its curve ends at 20 ka"), model.failures());
        assertTrue(model.provenance().contains(new Fact("Seed", "20261201")));
        assertTrue(RecordModel.caution().contains("local codes and licensed practice decide"));
    }

    @Test
    void figuresAreTheBytesThatDrawWouldWrite() throws IOException {
        showSample(false);
        Figure stair = model.figures().stream()
                .filter(figure -> figure.name().equals("stair-north-cliff"))
                .findFirst()
                .orElseThrow();
        model.exportFigures(svg(List.of(stair)), folder);
        assertEquals(
                "1 figure written to " + folder + " as svg.",
                model.messageProperty().get());
        assertArrayEquals(
                stair.bytes(FigureFormat.SVG, PageWidth.ONE, true, 300),
                Files.readAllBytes(folder.resolve("stair-north-cliff.svg")));
    }

    @Test
    void nothingChosenIsSaid() {
        showSample(false);
        model.exportFigures(svg(List.of()), folder);
        assertEquals(
                "Choose at least one figure and one format.",
                model.messageProperty().get());
    }

    @Test
    void resultsGoOutWholeAndNotOverSomebodysFiles() throws IOException {
        showSample(false);
        Path out = folder.resolve("out");
        model.exportResults(out);
        assertEquals("Results written to " + out + ".", model.messageProperty().get());
        assertEquals(ResultsJson.text(SampleStudy.withoutFailure()), Files.readString(out.resolve(ResultsJson.FILE)));
        assertTrue(Files.exists(out.resolve("figures/stair-north-cliff.pdf")));

        Path theirs = Files.createDirectory(folder.resolve("theirs"));
        Files.writeString(theirs.resolve("thesis.txt"), "years of work");
        model.exportResults(theirs);
        assertEquals("years of work", Files.readString(theirs.resolve("thesis.txt")));
        assertFalse(Files.exists(theirs.resolve(ResultsJson.FILE)));
        assertFalse(
                model.messageProperty().get().startsWith("Results written"),
                model.messageProperty().get());
    }

    @Test
    void staleResultsAreNotExportedWithTheNewStudy() {
        showSample(true);
        model.exportResults(folder.resolve("out"));
        assertTrue(model.messageProperty().get().startsWith("The study has changed since the run"));
        assertFalse(Files.exists(folder.resolve("out")));
    }

    @Test
    void aFolderThatCannotBeWrittenIsSaid() throws IOException {
        showSample(false);
        Path file = Files.writeString(folder.resolve("file"), "no folder");
        model.exportFigures(svg(model.figures()), file.resolve("inside"));
        assertTrue(
                model.messageProperty().get().startsWith("Not written: "),
                model.messageProperty().get());
        assertFalse(model.exportingProperty().get());
    }

    @Test
    void beforeTheFirstRunTheInputsOwnLinesStand() {
        model.show(Shown.of(SampleStudy.study()));
        assertEquals("2 lines", model.found());
        assertEquals(Optional.empty(), model.provenance().stream().findFirst());
    }
}
