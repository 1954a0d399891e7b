package stillstand.ledger;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class NearestNameTest {
    private static final List<String> KNOWN = List.of("elevation_m", "level_m", "5a", "5c", "INDICATOR");

    @Test
    void findsTheNameWithFewestChanges() {
        assertEquals(Optional.of("elevation_m"), NearestName.of("elevaton_m", KNOWN));
        assertEquals(Optional.of("level_m"), NearestName.of("levels_m", KNOWN));
        assertEquals(Optional.of("5a"), NearestName.of("5e", KNOWN));
    }

    @Test
    void twoLettersSwappedAreOneChange() {
        assertEquals(Optional.of("seed"), NearestName.of("sede", List.of("note", "seed")));
        assertEquals(Optional.of("title"), NearestName.of("titel", List.of("title")));
    }

    @Test
    void caseDoesNotCountWhateverTheLocale() {
        assertEquals(Optional.of("INDICATOR"), NearestName.of("indicator", KNOWN));
    }

    @Test
    void namesNothingLike() {
        assertEquals(Optional.empty(), NearestName.of("longitude", KNOWN));
        assertEquals(Optional.empty(), NearestName.of("x", List.of()));
    }
}
