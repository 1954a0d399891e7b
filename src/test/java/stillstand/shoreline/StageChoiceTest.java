package stillstand.shoreline;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

/** What a user says of a level's highstand, and how it is written in its cell. */
class StageChoiceTest {
    @Test
    void isWrittenAsItsCellIsRead() {
        assertEquals("", StageChoice.ANY.text());
        assertEquals("5e", StageChoice.pinnedTo("5e").text());
        assertEquals("5a|5c", new StageChoice(List.of("5a", "5c"), List.of()).text());
        assertEquals("!5e|!7a", new StageChoice(List.of(), List.of("5e", "7a")).text());
    }

    @Test
    void forbiddingAddsUpAndNeverAllowsMore() {
        StageChoice neither = StageChoice.ANY.without("5e").without("7a").without("5e");
        assertEquals("!5e|!7a", neither.text());
        assertFalse(neither.allows("5e"));
        assertTrue(neither.allows("5c"));
    }

    @Test
    void forbiddingOneOfTwoPinsTheOther() {
        StageChoice one = new StageChoice(List.of("5a", "5c"), List.of()).without("5a");
        assertEquals(Optional.of("5c"), one.pinned());
    }

    @Test
    void forbiddingThePinnedOneLeavesAnyOther() {
        StageChoice other = StageChoice.pinnedTo("5e").without("5e");
        assertEquals("!5e", other.text());
        assertTrue(other.allows("5c"));
    }
}
