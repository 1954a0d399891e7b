package stillstand.study;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyJson;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;

/** Traces that cannot be, or say nothing; each asserts the whole message. */
class TraceCheckTest {
    private static Loaded<Study> check(String... levels) {
        List<String> lines =
                new ArrayList<>(List.of("site,level,elevation_m,elevation_1sigma_m,highstand,forms_at,terrace"));
        lines.addAll(List.of(levels));
        return StudyCheck.check(
                StudyInput.of(
                        StatedSettings.of(StudyJson.defaults("A test")),
                        Grid.table(
                                "sites.csv",
                                "site,latitude,longitude,surveyed_from_m,surveyed_to_m",
                                "North,5,5,0,100",
                                "South,5,6,0,100"),
                        Grid.table("levels.csv", lines.toArray(String[]::new)),
                        Optional.empty()),
                ShippedLibrary.load());
    }

    private static List<String> problems(String... levels) {
        return check(levels).problems().stream().map(InputProblem::message).toList();
    }

    @Test
    void traceWithoutFault() {
        Loaded<Study> loaded =
                check("North,T1,20,1,,,Long", "North,T2,40,1,,,High", "South,S1,30,1,5e,,Long", "South,S2,60,1,,,High");
        assertEquals(List.of(), loaded.problems());
        assertEquals(List.of(), loaded.warnings());
    }

    @Test
    void aTraceAgainstAPin() {
        assertEquals(
                List.of(
                        "levels.csv:3:5: highstand: found \"5e\" on terrace \"Long\", expected a highstand that it can share"
                                + " with level \"T1\" of \"North\" on the same terrace, which is tied to \"5a|5c\""),
                problems("North,T1,20,1,5a|5c,,Long", "South,S1,30,1,5e,,Long"));
    }

    @Test
    void tracesThatCross() {
        assertEquals(
                List.of(
                        "levels.csv:4:7: terrace: found \"Long\" above \"High\", expected \"Long\" below \"High\", as at"
                                + " \"North\": traced terraces cannot cross"),
                problems(
                        "North,T1,20,1,,,Long",
                        "North,T2,40,1,,,High",
                        "South,S1,60,1,,,Long",
                        "South,S2,30,1,,,High"));
    }

    @Test
    void aTerraceTiedToItself() {
        assertEquals(
                List.of(
                        "levels.csv:3:7: terrace: found \"Long\" a second time at \"North\" (level \"T1\" has it), expected each"
                                + " traced terrace once at a site: it is one shoreline"),
                problems("North,T1,20,1,,,Long", "North,T2,40,1,,,Long", "South,S1,30,1,,,Long"));
    }

    @Test
    void aTraceOfALevelThatRecordsNoHighstand() {
        assertEquals(
                List.of(
                        "levels.csv:2:7: terrace: found \"Long\" beside forms_at event, expected nothing: only a level that is"
                                + " matched to a highstand shares one with another site"),
                problems("North,T1,20,1,,event,Long", "South,S1,30,1,,,Long"));
    }

    @Test
    void aTerraceAtOneSiteOnly() {
        assertEquals(
                List.of("levels.csv:2:7: terrace \"Long\" is traced to no other site, so that it says nothing"),
                check("North,T1,20,1,,,Long", "South,S1,30,1,,,").warnings().stream()
                        .map(InputWarning::placed)
                        .toList());
    }
}
