package stillstand.study;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.ledger.Assumption;

class JoinedLedgerTest {
    private static Assumption exactCover(String where) {
        return new Assumption("cover_m is exact", "spread 0", "the study", where);
    }

    @Test
    void whatHoldsForManyLevelsStandsOnce() {
        Assumption prior = new Assumption("prior", "cauchy", "default", "all");
        List<Assumption> joined = JoinedLedger.of(List.of(
                exactCover("A / 1"),
                prior,
                exactCover("A / 2"),
                exactCover("A / 2"),
                exactCover("A / 3"),
                exactCover("B / 1"),
                exactCover("B / 2"),
                exactCover("B / 3")));
        assertEquals(List.of(exactCover("A / 1; A / 2; A / 3; B / 1; and 2 more"), prior), joined);
    }
}
