package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import org.junit.jupiter.api.Test;

/** Settings changed key by key. */
class SettingsTextTest {
    private static final String TEXT =
            "{\"title\": \"A\", \"seed\": 7, \"sea_level\": {\"curves\": [{\"id\": \"b\", \"weight\": 2}]}, \"x\": 1}";

    @Test
    void valuesAreFoundByTheirPath() {
        SettingsText settings = SettingsText.parse(TEXT).orElseThrow();
        assertEquals(Optional.of("A"), settings.value("title"));
        assertEquals(Optional.of("7"), settings.value("seed"));
        assertEquals(Optional.of("b"), settings.value("sea_level.curves[0].id"));
        assertEquals(Optional.empty(), settings.value("sea_level.curves[1].id"));
        assertEquals(Optional.empty(), settings.value("rate.prior.kind"));
        assertEquals(1, settings.size("sea_level.curves"));
    }

    @Test
    void whatIsTypedBecomesWhatItLooksLike() {
        assertEquals("{\"title\": \"7\"}\n", at("{}").withWords("title", "7"));
        assertEquals("{\"seed\": 7}\n", at("{}").withValue("seed", " 7 "));
        assertEquals("{\"seed\": \"0,5\"}\n", at("{}").withValue("seed", "0,5"));
        assertEquals("{\"seed\": -0.5}\n", at("{}").withValue("seed", "\u22120.5"));
        assertEquals("{\"seed\": 9007199254740993}\n", at("{}").withValue("seed", "9007199254740993"));
        assertTrue(at("{}").withValue("matching.recording_probability", "{\"beta\": [4, 2.5]}")
                .contains("[4, 2.5]"));
        assertTrue(at("{}").withValue("matching.recording_probability", "{\"beta\"")
                .contains("\\\"beta"));
    }

    @Test
    void blankTakesTheKeyAndEmptyObjectsAway() {
        String one = at("{\"title\": \"A\"}").withValue("rate.prior.scale", "0.5");
        assertEquals(Optional.of("0.5"), at(one).value("rate.prior.scale"));
        assertEquals("{\"title\": \"A\"}\n", at(one).withValue("rate.prior.scale", " "));
    }

    @Test
    void otherKeysStay() {
        String after = at(TEXT).withCurves(new TreeMap<>(Map.of("c", "", "d", "0.5")));
        SettingsText changed = at(after);
        assertEquals(Optional.of("1"), changed.value("x"));
        assertEquals(Optional.of("c"), changed.value("sea_level.curves[0].id"));
        assertEquals(Optional.empty(), changed.value("sea_level.curves[0].weight"));
        assertEquals(Optional.of("0.5"), changed.value("sea_level.curves[1].weight"));
    }

    @Test
    void whatElseIsSaidOfACurveStays() {
        SettingsText settings =
                at("{\"sea_level\": {\"curves\": [{\"id\": \"b\", \"weight\": 2, \"overrides\": \"none\"}]}}");
        assertEquals(
                Optional.of("{\"id\":\"b\",\"overrides\":\"none\"}"),
                at(settings.withCurves(new TreeMap<>(Map.of("a", "", "b", "")))).value("sea_level.curves[1]"));
    }

    @Test
    void brokenJsonIsNoSettings() {
        assertFalse(SettingsText.parse("{\"title\": ").isPresent());
        assertFalse(SettingsText.parse("[1]").isPresent());
        assertFalse(SettingsText.parse("").isPresent());
    }

    @Test
    void schemaSaysWhatIsExpected() {
        assertEquals("a number above 0", StudyJson.expectedAt("rate.prior.scale"));
        assertEquals("a number above 0", StudyJson.expectedAt("sea_level.curves[0].weight"));
        assertEquals("", StudyJson.expectedAt("rate.nothing"));
    }

    private static SettingsText at(String text) {
        return SettingsText.parse(text).orElseThrow();
    }
}
