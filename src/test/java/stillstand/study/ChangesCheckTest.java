package stillstand.study;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyJson;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.study.StudySettings.Changes;
import stillstand.uplift.CauchyPrior;

/** More asked of the rate through time than levels and dates can bear; each asserts the whole message. */
class ChangesCheckTest {
    private static List<String> warnings(Changes changes, List<String> samples, String... levels) {
        StudySettings plain = StudyJson.defaults("A test");
        StudySettings settings = new StudySettings(
                plain.title(),
                plain.note(),
                plain.seed(),
                plain.draws(),
                plain.seaLevel(),
                new StudySettings.RateChoice(CauchyPrior.DEFAULT, changes),
                plain.matching(),
                plain.indicativeRange(),
                plain.screening(),
                plain.leverage());
        List<String> lines = new ArrayList<>(List.of("site,level,elevation_m,elevation_1sigma_m,highstand"));
        lines.addAll(List.of(levels));
        List<String> dated = new ArrayList<>(List.of("site,sample,level,age_ka,age_1sigma_ka"));
        dated.addAll(samples);
        Loaded<Study> loaded = StudyCheck.check(
                StudyInput.of(
                        StatedSettings.of(settings),
                        Grid.table(
                                "sites.csv",
                                "site,latitude,longitude,surveyed_from_m,surveyed_to_m",
                                "North,5,5,0,100"),
                        Grid.table("levels.csv", lines.toArray(String[]::new)),
                        Optional.of(Grid.table("samples.csv", dated.toArray(String[]::new)))),
                ShippedLibrary.load());
        assertEquals(List.of(), loaded.problems());
        return loaded.warnings().stream().map(InputWarning::placed).toList();
    }

    @Test
    void aChangeAskedOfTwoLevels() {
        assertEquals(
                List.of(
                        "sites.csv:2:1: a change of rate is asked of two levels of \"North\": so few fit any change, and the"
                                + " answer is the prior's"),
                warnings(
                        Changes.ONE,
                        List.of("North,A,T1,100,1", "North,B,T2,200,2"),
                        "North,T1,20,1,",
                        "North,T2,50,1,"));
    }

    @Test
    void moreChangesThanTheDatesCanBear() {
        List<String> twoDates = List.of("North,A,T1,100,1", "North,B,T3,240,2");
        String[] levels = {"North,T1,20,1,", "North,T2,50,1,", "North,T3,70,1,"};
        assertEquals(List.of(), warnings(Changes.ONE, twoDates, levels));
        assertEquals(
                List.of(
                        "sites.csv:2:1: up to two changes of rate asked of \"North\", which has 2 dated levels: without one on"
                                + " either side of each change it cannot be told from another pairing of levels and highstands"),
                warnings(Changes.CHOOSE, twoDates, levels));
        assertEquals(
                List.of(
                        "sites.csv:2:1: one change of rate asked of \"North\", which has 1 dated level: without one on either"
                                + " side of each change it cannot be told from another pairing of levels and highstands"),
                warnings(Changes.ONE, twoDates.subList(0, 1), levels));
        assertEquals(List.of(), warnings(Changes.GRADUAL, List.of(), levels));
        assertEquals(List.of(), warnings(Changes.NONE, List.of(), levels));
    }

    @Test
    void aChangeWhereNothingIsMatched() {
        assertEquals(
                List.of(
                        "sites.csv:2:1: a change of rate is asked for, but every level of \"North\" is tied to one highstand, so"
                                + " that no flight is matched: its levels keep one rate each"),
                warnings(Changes.ONE, List.of(), "North,T1,20,1,5c", "North,T2,50,1,5e", "North,T3,70,1,7a"));
    }
}
