package stillstand.study;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyJson;
import stillstand.ledger.InputProblem;

/** What a sinking coast cannot show; each asserts the whole message. */
class DrownedCheckTest {
    private static List<String> problems(String... levels) {
        List<String> lines = new ArrayList<>(List.of("site,level,elevation_m,elevation_1sigma_m,highstand,forms_at"));
        lines.addAll(List.of(levels));
        return StudyCheck.check(
                        StudyInput.of(
                                StatedSettings.of(StudyJson.defaults("A test")),
                                Grid.table(
                                        "sites.csv",
                                        "site,latitude,longitude,surveyed_from_m,surveyed_to_m",
                                        "Deep,5,5,-600,-50"),
                                Grid.table("levels.csv", lines.toArray(String[]::new)),
                                Optional.empty()),
                        ShippedLibrary.load())
                .problems()
                .stream()
                .map(InputProblem::message)
                .toList();
    }

    @Test
    void aDrownedFlightIsFine() {
        assertEquals(List.of(), problems("Deep,R1,-150,5,,drowning", "Deep,R2,-360,5,,drowning"));
    }

    @Test
    void aDrownedReefAboveTheSea() {
        assertEquals(
                List.of(
                        "levels.csv:2:3: elevation_m: found \"150\" beside forms_at drowning, expected a height below today's"
                                + " sea, since this reef drowned and stayed drowned"),
                problems("Deep,R1,150,5,,drowning", "Deep,R2,-360,5,,drowning"));
    }

    @Test
    void raisedAndDrownedAtOneSite() {
        assertEquals(
                List.of(
                        "levels.csv:3:6: forms_at: found \"drowning\" at a site where level \"T1\" forms at a highstand, expected"
                                + " levels of one kind at a site: a rising coast keeps highstands, a sinking one lowstands; give the"
                                + " drowned reefs a site of their own"),
                problems("Deep,T1,-60,5,5e,", "Deep,R2,-360,5,,drowning"));
    }

    @Test
    void aDrownedReefTiedToAHighstand() {
        assertEquals(
                List.of(
                        "levels.csv:2:5: highstand: found \"5e\" beside forms_at drowning, expected nothing: which lowstand"
                                + " drowned it is told by dates and depth, or by a table of stands of your own"),
                problems("Deep,R1,-150,5,5e,drowning"));
    }
}
