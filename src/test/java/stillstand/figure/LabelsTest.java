package stillstand.figure;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import org.junit.jupiter.params.provider.ValueSource;
import stillstand.study.StudyResult;

/** No text of a figure lies on another or leaves the page, whatever the study. */
class LabelsTest {
    private static SvgTexts texts(Figure figure, PageWidth width, boolean titled) throws IOException {
        return SvgTexts.of(figure.bytes(FigureFormat.SVG, width, titled, 300));
    }

    private static Map<String, List<String>> faults(StudyResult result, PageWidth width) throws IOException {
        Map<String, List<String>> faults = new TreeMap<>();
        for (Figure figure : Figures.of(result).figures()) {
            List<String> found = new ArrayList<>(texts(figure, width, true).faults());
            if (!found.isEmpty()) {
                faults.put(figure.name(), found);
            }
        }
        return faults;
    }

    @ParameterizedTest
    @ValueSource(ints = {4, 8, 12, 18})
    void fastFlights(int levels) throws IOException {
        StudyResult result = InventedCoasts.matched("Heron Stair", 1.1, levels);
        assertEquals(levels, result.levels().size());
        for (PageWidth width : PageWidth.values()) {
            assertEquals(Map.of(), faults(result, width), width.id());
        }
    }

    /** Heights of a sinking coast lie close together, and every highstand of the invented sea has left one. */
    @ParameterizedTest
    @ValueSource(ints = {4, 8, 12, 20})
    void crowdedFlights(int levels) throws IOException {
        StudyResult result = InventedCoasts.matched("Quiet Shoals", -0.02, levels);
        assertEquals(levels, result.levels().size());
        for (PageWidth width : PageWidth.values()) {
            assertEquals(Map.of(), faults(result, width), width.id());
        }
    }

    @ParameterizedTest
    @EnumSource(PageWidth.class)
    void longNamesAndOtherScripts(PageWidth width) throws IOException {
        StudyResult result = InventedCoasts.renamed(
                InventedCoasts.flight(),
                "A site whose name has sixty characters, Þórshöfn or Ακτή or 石",
                "Upper marine terrace above the old harbour at Кавказ, no. 123 ");
        assertEquals(Map.of(), faults(result, width));
    }

    @Test
    void namesAreCutInTheirMiddle() {
        String cut = Face.fitted("Upper marine terrace, number 12", Style.text(), 60);
        assertTrue(cut.startsWith("Upper") && cut.endsWith("12") && cut.contains("…"), cut);
        assertTrue(Face.width(cut, Style.text()) <= 60);
        assertEquals("T4", Face.fitted("T4", Style.text(), 60));
    }

    @Test
    void titleAndNoteGoWithTheSwitchAndTheKeyStays() throws IOException {
        Figure stair = Figures.of(InventedCoasts.flight()).figures().stream()
                .filter(figure -> figure.kind() == FigureKind.STAIR)
                .findFirst()
                .orElseThrow();
        SvgTexts titled = texts(stair, PageWidth.TWO, true);
        SvgTexts bare = texts(stair, PageWidth.TWO, false);
        assertTrue(titled.words().contains("Heron Stair: sea level, and the stair it left"));
        assertFalse(bare.words().contains("Heron Stair: sea level, and the stair it left"));
        assertTrue(bare.words().contains("invented-sea"));
        assertTrue(bare.page().getHeight() < titled.page().getHeight());
    }

    /** A label alone stays where it wants to be; two that meet give way by half each; a limit pushes back. */
    @Test
    void labelsGiveWay() {
        assertArrayEquals(new double[] {5, 20}, LabelColumn.places(new double[] {5, 20}, 8, 0, 100), 1e-12);
        assertArrayEquals(new double[] {7, 15}, LabelColumn.places(new double[] {10, 12}, 8, 0, 100), 1e-12);
        assertArrayEquals(new double[] {0, 8, 16}, LabelColumn.places(new double[] {1, 1, 1}, 8, 0, 100), 1e-12);
        assertArrayEquals(new double[] {84, 92, 100}, LabelColumn.places(new double[] {99, 99, 99}, 8, 0, 100), 1e-12);
        assertArrayEquals(new double[0], LabelColumn.places(new double[0], 8, 0, 100));
    }
}
