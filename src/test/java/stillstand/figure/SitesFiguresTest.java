package stillstand.figure;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import stillstand.comparison.SiteComparison;
import stillstand.comparison.SiteMotion;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Interval;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;

/** Figures of several sites: the map, the coast and the differences say what the result says, and no label lies on another. */
class SitesFiguresTest {
    private static Quantity quantity(double median, double sd) {
        return new Quantity(
                median,
                Optional.of(median),
                Optional.of(sd),
                new Interval(median - sd, median + sd),
                new Interval(median - 2 * sd, median + 2 * sd),
                Rate.UNIT);
    }

    private static Rate rate(double median, double sd) {
        Quantity q = quantity(median, sd);
        return new Rate(
                median,
                q.mean(),
                q.sd(),
                q.interval68(),
                q.interval95(),
                q.interval68(),
                q.interval95(),
                Optional.empty(),
                Rate.UNIT);
    }

    /** Sites in a row across the date line, close together, each with two levels of the same two highstands. */
    private static StudyResult coast(int sites, boolean places) {
        List<LevelAnswer> levels = new ArrayList<>();
        List<SiteMotion> motions = new ArrayList<>();
        List<SiteComparison> pairs = new ArrayList<>();
        for (int s = 0; s < sites; s++) {
            String name = "Invented cape " + s;
            double median = 0.3 - 0.03 * s;
            levels.add(InventedCoasts.level(name, "L1", "5a", 82, 5 + s, median, 0.03, 1));
            levels.add(InventedCoasts.level(name, "L2", "5e", 123, 40 + s, median, 0.02, 1));
            motions.add(new SiteMotion(
                    name,
                    Optional.of("lee"),
                    Optional.of("L2"),
                    Optional.of(10 + 0.001 * s).filter(each -> places),
                    Optional.of(s % 2 == 0 ? 179.99 : -179.99).filter(each -> places),
                    Optional.of(0.4 * s),
                    Optional.empty(),
                    quantity(median, 0.02),
                    median > 0.05 ? 1 : 0,
                    Math.abs(median) <= 0.05 ? 1 : 0,
                    median < -0.05 ? 1 : 0,
                    median > 0.05 ? SiteMotion.UP : median < -0.05 ? SiteMotion.DOWN : SiteMotion.STABLE));
            if (s > 0) {
                pairs.add(new SiteComparison(
                        "Invented cape 0",
                        name,
                        Optional.of("L2"),
                        Optional.of("L2"),
                        rate(0.03 * s, 0.01),
                        1,
                        Optional.of(0.8),
                        new SiteComparison.Independent(quantity(0.03 * s, 0.03), 0.9),
                        SiteComparison.ONE_COAST,
                        Optional.empty()));
            }
        }
        StudyResult plain = InventedCoasts.study(levels, List.of(), List.of());
        return new StudyResult(
                plain.provenance(),
                plain.seaLevel(),
                plain.levels(),
                plain.waiting(),
                plain.flights(),
                plain.intervals(),
                plain.impliedSeaLevel(),
                plain.leverage(),
                plain.residuals(),
                plain.curveChoice(),
                plain.curveEvidence(),
                pairs,
                motions,
                List.of(),
                List.of(),
                plain.warnings(),
                plain.failures(),
                plain.ledger());
    }

    private static Figure figure(StudyResult result, FigureKind kind) {
        return Figures.of(result).figures().stream()
                .filter(each -> each.kind() == kind)
                .findFirst()
                .orElseThrow();
    }

    private static SvgTexts texts(StudyResult result, FigureKind kind, PageWidth width) throws IOException {
        return SvgTexts.of(figure(result, kind).bytes(FigureFormat.SVG, width, true, 300));
    }

    @ParameterizedTest
    @EnumSource(PageWidth.class)
    void labelsKeepApart(PageWidth width) throws IOException {
        for (int sites : new int[] {2, 12, 25}) {
            StudyResult result = coast(sites, true);
            for (FigureKind kind : List.of(FigureKind.MAP, FigureKind.COAST, FigureKind.DIFFERENCES)) {
                assertEquals(List.of(), texts(result, kind, width).faults(), sites + " sites, " + kind);
            }
        }
    }

    @Test
    void figuresSayWhatTheResultSays() throws IOException {
        StudyResult result = coast(4, true);
        assertEquals("coast-lee", figure(result, FigureKind.COAST).name());
        assertTrue(texts(result, FigureKind.MAP, PageWidth.TWO).words().contains("Invented cape 1 0.27 ± 0.02"));
        String coast =
                String.join(" ", texts(result, FigureKind.COAST, PageWidth.TWO).words());
        assertTrue(coast.contains("2 Invented cape 1 0.27 ± 0.02"), coast);
        List<String> differences =
                texts(result, FigureKind.DIFFERENCES, PageWidth.TWO).words();
        assertTrue(differences.contains("0.06 (0.04 to 0.08), >99 %"), "" + differences);
        assertTrue(differences.contains("Invented cape 0 less Invented cape 2"), "" + differences);
    }

    @Test
    void whatIsNotThereIsSaid() {
        Figures figures = Figures.of(coast(3, false));
        assertTrue(figures.absences()
                .contains(new Figures.Absence(
                        FigureKind.MAP, Optional.empty(), "fewer than two sites have a latitude and longitude")));
        assertEquals(
                List.of(),
                Figures.of(coast(1, true)).absences().stream()
                        .filter(absence -> absence.kind() == FigureKind.MAP)
                        .toList());
    }
}
