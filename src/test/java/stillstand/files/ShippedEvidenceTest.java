package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import stillstand.shoreline.DepthHabitat;
import stillstand.shoreline.IndicativeMeaning;
import stillstand.shoreline.Indicator;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

class ShippedEvidenceTest {
    private static final ShippedEvidence EVIDENCE = ShippedEvidence.load();

    @Test
    void everyIdIsWordsJoinedByHyphens() {
        Stream.of(
                        EVIDENCE.indicators().ids(),
                        EVIDENCE.habitats().ids(),
                        EVIDENCE.methods().ids())
                .flatMap(List::stream)
                .forEach(id -> assertTrue(id.matches("[a-z0-9]+(-[a-z0-9]+)*"), id));
    }

    /** A figure stands with the year of who published it. */
    @Test
    void everyFigureHasItsCitation() {
        EVIDENCE.indicators().indicators().stream()
                .filter(indicator -> indicator.meaning().isPresent())
                .forEach(
                        indicator -> assertTrue(indicator.source().matches(".*\\b(19|20)\\d\\d\\b.*"), indicator.id()));
        EVIDENCE.habitats().habitats().stream()
                .filter(habitat -> habitat.depthMetres().isPresent())
                .forEach(habitat -> assertTrue(habitat.source().matches(".*\\b(19|20)\\d\\d\\b.*"), habitat.id()));
        EVIDENCE.methods().methods().stream()
                .filter(method -> method.usualSpread().isPresent())
                .forEach(method -> assertTrue(method.source().matches(".*\\b(19|20)\\d\\d\\b.*"), method.id()));
    }

    @Test
    void noDepthIsAboveTheSea() {
        for (DepthHabitat habitat : EVIDENCE.habitats().habitats()) {
            habitat.depthMetres().ifPresent(depth -> assertEquals(0, depth.cumulativeProbability(-1e-9), habitat.id()));
        }
    }

    /** A taxon of which no depth is compiled says why. */
    @Test
    void everyHabitatWithoutDepthSaysWhy() {
        EVIDENCE.habitats().habitats().stream()
                .filter(habitat -> habitat.depthMetres().isEmpty())
                .forEach(habitat -> assertTrue(!habitat.note().isBlank(), habitat.id()));
    }

    @Test
    void tablesAreWhole() {
        assertEquals(22, EVIDENCE.indicators().indicators().size());
        assertEquals(60, EVIDENCE.habitats().habitats().size());
        assertEquals(9, EVIDENCE.methods().methods().size());
    }

    @Test
    void doubtfulFiguresDecideNothing() {
        assertEquals(
                Optional.empty(),
                EVIDENCE.habitats().find("favia").orElseThrow().depthMetres());
        assertEquals(
                Optional.empty(),
                EVIDENCE.methods().find("cosmogenic").orElseThrow().usualSpread());
    }

    @Test
    void oldNamesLeadToTheTaxon() {
        assertEquals(
                "orbicella-annularis",
                EVIDENCE.habitats().find("montastraea-annularis").orElseThrow().id());
    }

    @ParameterizedTest
    @CsvSource({"acropora-palmatta, acropora-palmata", "porites-sp, porites", "favia-palida, favia-pallida"})
    void unknownTaxonHasNearest(String unknown, String nearest) {
        assertEquals(Optional.of(nearest), EVIDENCE.habitats().nearestId(unknown));
    }

    @Test
    void unknownIndicatorAndMethodHaveNearest() {
        assertEquals(Optional.of("shoreline-angle"), EVIDENCE.indicators().nearestId("shore-line-angle"));
        assertEquals(Optional.of("u-series"), EVIDENCE.methods().nearestId("useries"));
    }

    @Test
    void indicatorHasItsMeaning() {
        Indicator notch = EVIDENCE.indicators().find("tidal-notch").orElseThrow();
        assertEquals(Optional.of(new IndicativeMeaning("tidal-notch", new Exact(0), 0.29)), notch.meaning());
        assertEquals(
                Optional.empty(),
                EVIDENCE.indicators().find("coral-microatoll").orElseThrow().meaning());
    }

    @Test
    void zoneIsUniform() {
        assertEquals(
                Optional.<Uncertain>of(new Uniform(6, 15)),
                EVIDENCE.habitats()
                        .find("tabular-acropora-indo-pacific")
                        .orElseThrow()
                        .depthMetres());
    }
}
