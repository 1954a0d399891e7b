package stillstand.shoreline;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Uniform;

class DepthTextTest {
    private static final HabitatTable HABITATS = new HabitatTable(List.of(
            new DepthHabitat(
                    "invented-coral",
                    "Invented coral",
                    "nowhere",
                    List.of("old-name"),
                    Optional.of(new Uniform(0, 5)),
                    "Nobody 2000",
                    ""),
            new DepthHabitat(
                    "unknown-coral",
                    "Unknown coral",
                    "nowhere",
                    List.of(),
                    Optional.empty(),
                    "Nobody 2000",
                    "too few")));

    @Test
    void rangeIsUniform() {
        assertEquals(new DepthText.Understood(new Uniform(1, 6), "the study"), read("1-6"));
        assertEquals(new DepthText.Understood(new Uniform(0, 0.5), "the study"), read(" 0 \u2013 .5 "));
    }

    @Test
    void logNormalHasMedianAndSigma() {
        assertEquals(new DepthText.Understood(new LogNormal(0, 3, 0.6), "the study"), read("lognormal 3 0.6"));
        // under a Turkish locale too
        assertEquals(new DepthText.Understood(new LogNormal(0, 3, 0.6), "the study"), read("LOGNORMAL 3  0.6"));
    }

    @Test
    void taxonHasItsOwnDepthAndSource() {
        assertEquals(new DepthText.Understood(new Uniform(0, 5), "Nobody 2000"), read("invented-coral"));
        assertEquals(new DepthText.Understood(new Uniform(0, 5), "Nobody 2000"), read("old-name"));
    }

    @ParameterizedTest
    @ValueSource(strings = {"6-1", "3-3"})
    void rangeUpsideDownIsRefused(String text) {
        assertRefused("the lesser depth first, such as \"1-6\"", text);
    }

    @ParameterizedTest
    @ValueSource(
            strings = {"lognormal", "lognormal 3", "lognormal 0 1", "lognormal 3 0", "lognormal 3 x", "lognormal 3 1 1"
            })
    void halfLogNormalIsRefused(String text) {
        assertRefused(
                "\"lognormal\", a median in metres and a standard deviation of the logarithm, both above 0, such as \"lognormal 3 0.6\"",
                text);
    }

    @Test
    void unknownTaxonIsToldTheNearest() {
        assertRefused(
                "a range such as \"1-6\", \"lognormal 3 0.6\", or a known taxon (the nearest known is \"invented-coral\")",
                "invented-corral");
    }

    @Test
    void taxonWithoutDepthIsToldWhy() {
        assertRefused(
                "a range such as \"1-6\" or \"lognormal 3 0.6\", since no depths are known of this taxon: too few",
                "unknown-coral");
    }

    @ParameterizedTest
    @ValueSource(strings = {"-1-6", "1-6 m", "1,5-6", "1e400-2", "NaN-2", "3"})
    void otherTextIsRefused(String text) {
        assertInstanceOf(DepthText.Refused.class, read(text));
    }

    private static void assertRefused(String expected, String text) {
        assertEquals(new DepthText.Refused(expected), read(text));
    }

    private static DepthText read(String text) {
        return DepthText.read(text, HABITATS);
    }
}
