package stillstand.study;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import org.junit.jupiter.api.Test;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyJson;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;

/** What a flight needs and what cannot be matched; each asserts the whole message. */
class FlightCheckTest {
    private static final String LEVELS = "site,level,elevation_m,elevation_1sigma_m,highstand,forms_at,certainty,order";

    private static Loaded<Study> check(String site, String... levels) {
        List<String> lines = new ArrayList<>(List.of(LEVELS));
        lines.addAll(List.of(levels));
        return StudyCheck.check(
                StudyInput.of(
                        StatedSettings.of(StudyJson.defaults("A test")),
                        Grid.table("sites.csv", "site,latitude,longitude,surveyed_from_m,surveyed_to_m", site),
                        Grid.table("levels.csv", lines.toArray(String[]::new)),
                        Optional.empty()),
                ShippedLibrary.load());
    }

    private static List<String> problems(Loaded<?> loaded) {
        return loaded.problems().stream().map(InputProblem::message).toList();
    }

    private static List<String> warnings(Loaded<?> loaded) {
        return loaded.warnings().stream().map(InputWarning::placed).toList();
    }

    @Test
    void theSurveyedRangeIsAskedForWithTheReason() {
        assertEquals(
                List.of(
                        "sites.csv:2:4: surveyed_from_m: found nothing, expected the lowest and (surveyed_to_m) highest height at"
                                + " \"North\" at which a terrace would have been seen, since level \"T2\" is tied to no single"
                                + " highstand: a highstand without a terrace is evidence only where one would have been seen"),
                problems(check("North,5,5,,", "North,T1,10,1,5e,,,", "North,T2,20,1,7a|7c,,,")));
    }

    @Test
    void noRangeIsNeededWhereNothingIsMatched() {
        assertEquals(
                List.of(),
                problems(check(
                        "North,5,5,,",
                        "North,T1,10,1,5e,,,",
                        "North,T2,20,1,,event,,",
                        "North,T3,5,1,,marine-limiting,,")));
    }

    @Test
    void aRangeUpsideDown() {
        assertEquals(
                List.of("sites.csv:2:5: surveyed_to_m: found \"5\", expected a height above surveyed_from_m (60)"),
                problems(check("North,5,5,60,5", "North,T1,10,1,,,,")));
    }

    @Test
    void pinsOutOfOrder() {
        assertEquals(
                List.of(
                        "levels.csv:3:5: highstand: found \"5a|5c\", expected a highstand older than \"5e\", to which level \"T1\""
                                + " below it is tied: higher shorelines are older, and each highstand left one"),
                problems(check(
                        "North,5,5,0,100", "North,T1,10,1,5e,,,", "North,T2,20,1,5a|5c,,,", "North,T3,30,1,,,,")));
    }

    @Test
    void onePinTwiceIsOutOfOrderToo() {
        assertEquals(
                List.of(
                        "levels.csv:3:5: highstand: found \"5e\", expected a highstand older than \"5e\", to which level \"T1\""
                                + " below it is tied: higher shorelines are older, and each highstand left one"),
                problems(check("North,5,5,0,100", "North,T1,10,1,5e,,,", "North,T2,20,1,5e,,,", "North,T3,30,1,,,,")));
    }

    @Test
    void orderOutranksHeightAndDoubtfulPinsBindNothing() {
        assertEquals(
                List.of(),
                problems(check(
                        "North,5,5,0,100",
                        "North,T1,21,1,5c,,,1",
                        "North,T2,20,1,5e,,,2",
                        "North,T3,30,1,5a,,doubtful,")));
    }

    @Test
    void pinsOutsideTheTable() {
        assertEquals(
                List.of(
                        "levels.csv:2:5: highstand: found \"5f\", expected a highstand of \"spratt-lisiecki-2016\" (nearest:"
                                + " \"5a\")"),
                problems(check("North,5,5,0,100", "North,T1,10,1,5f,,,")));
    }

    @Test
    void limitingPointsAndEventsHaveNoPin() {
        assertEquals(
                List.of(
                        "levels.csv:2:5: highstand: found \"5e\" beside forms_at marine-limiting, expected nothing: a limiting point"
                                + " bounds the rate at its own date and records no highstand",
                        "levels.csv:3:5: highstand: found \"1\" beside forms_at event, expected nothing: one earthquake's step"
                                + " records no highstand"),
                problems(check("North,5,5,0,100", "North,T1,10,1,5e,marine-limiting,,", "North,T2,2,1,1,event,,")));
    }

    @Test
    void twentyLevelsAtOneHeight() {
        String[] levels = IntStream.rangeClosed(1, 20)
                .mapToObj(i -> "North,T" + i + ",30,1,,,,")
                .toArray(String[]::new);
        Loaded<Study> loaded = check("North,5,5,0,100", levels);
        assertEquals(List.of(), problems(loaded));
        assertEquals(
                List.of("levels.csv:2:3: 20 levels of \"North\" stand at one height (30 m): a highstand leaves one"
                        + " shoreline, so most of them will count as strays"),
                warnings(loaded));
    }
}
