package stillstand.sealevel;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.ledger.Assumption;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.SplitNormal;

class HighstandTableTest {
    private static final HighstandTable DEFAULT = HighstandTable.fromCurve(
            ShippedPackage.SPRATT, ShippedPackage.STAGES, ShippedPackage.INDEPENDENT, HighstandOptions.DEFAULT);
    private static final HighstandTable PLAIN = HighstandTable.fromCurve(
            ShippedPackage.SPRATT, ShippedPackage.STAGES, HighstandOverrides.NONE, HighstandOptions.DEFAULT);

    @Test
    void independentEstimatesReplacePicks() {
        Highstand row = row(DEFAULT, "5e");
        assertEquals(new Normal(7.5, 1.5), row.level());
        assertEquals(122.5, row.ageKa());
        assertEquals(3.3, row.ageSigmaKa());
        assertEquals(13, row.durationKa());
        assertMarks(row, true, false, false);
        // an interstadial by class, whose level no longer comes from the curve
        assertMarks(row(DEFAULT, "5a"), true, false, false);
        assertEquals(5, row(DEFAULT, "5a").localOffsetSigmaMetres());
        assertEquals(2, row.localOffsetSigmaMetres());
    }

    @Test
    void picksKeepTheirAsymmetricBandAndTakeTheCurvesErrors() {
        Highstand row = row(PLAIN, "5c");
        SplitNormal level = (SplitNormal) row.level();
        assertEquals(-17.26, level.centre(), 1e-9);
        assertEquals((-17.26 + 35.67) / 1.96, level.sigmaLow(), 1e-3);
        assertEquals((-9.34 + 17.26) / 1.96, level.sigmaHigh(), 1e-3);
        assertEquals(0, row.ageSigmaKa());
        assertMarks(row, true, true, true);
        assertMarks(row(PLAIN, "5e"), true, false, true);
        assertEquals(3, PLAIN.sharedErrors().curveAgeSigmaKa());
        // by hand: half of 3 ka squared
        assertEquals(Math.sqrt(4.5), row.ownAgeSigmaKa(PLAIN.sharedErrors()), 1e-12);
        assertEquals(3, row.marginalAgeSigmaKa(PLAIN.sharedErrors()), 1e-12);
        double expected = Math.sqrt(Math.pow(level.standardDeviation(), 2) + 25 + 9 + 36);
        assertEquals(expected, row.marginalLevelSigmaMetres(PLAIN.sharedErrors()), 1e-12);
    }

    @Test
    void theHoloceneRowComesFirstAndTakesNothing() {
        for (HighstandTable table : List.of(DEFAULT, PLAIN)) {
            Highstand first = table.rows().get(0);
            assertEquals("1", first.stage());
            assertEquals(5.25, first.ageKa());
            assertEquals(1.3, first.ageSigmaKa());
            assertEquals(new Normal(0.7, 0.7), first.level());
            assertMarks(first, false, false, false);
            assertEquals(0, first.localOffsetSigmaMetres());
        }
    }

    @Test
    void aHoloceneOverrideReplacesTheDefault() {
        HighstandOverrides local =
                new HighstandOverrides("mine", List.of(ShippedPackage.entry("1", 5, 0.5, 1.5, 0.3, "a beach ridge")));
        HighstandTable table =
                HighstandTable.fromCurve(ShippedPackage.SPRATT, ShippedPackage.STAGES, local, HighstandOptions.DEFAULT);
        assertEquals(new Normal(1.5, 0.3), row(table, "1").level());
        assertMarks(row(table, "1"), false, false, false);
        assertFalse(says(table, "highstand of today's interglacial"));
    }

    @Test
    void olderRowsGoOnEvery41KaTo2600() {
        List<Highstand> older =
                DEFAULT.rows().stream().filter(Highstand::isOlder).toList();
        assertEquals(774 + 41, older.get(0).ageKa());
        assertEquals(44, older.size()); // by hand: (2600 - 774) / 41 = 44.5
        assertEquals(774 + 44 * 41, older.get(43).ageKa());
        for (Highstand row : older) {
            assertEquals(12, row.ageSigmaKa());
            assertEquals(new Normal(-10, 15), row.level());
            assertEquals(8, row.durationKa());
            assertMarks(row, true, false, false);
            assertEquals(0, row.localOffsetSigmaMetres());
        }
        assertEquals(Optional.empty(), DEFAULT.find("older"));
        HighstandTable without = HighstandTable.fromCurve(
                ShippedPackage.SPRATT,
                ShippedPackage.STAGES,
                ShippedPackage.INDEPENDENT,
                new HighstandOptions(false, false));
        assertEquals("19c", without.rows().get(without.rows().size() - 1).stage());
        assertFalse(says(without, "older highstands beyond the table"));
        assertEquals(0, row(without, "5a").localOffsetSigmaMetres());
    }

    @Test
    void aStageTheCurveDoesNotShowHasNoRow() {
        assertEquals(Optional.empty(), PLAIN.find("3a"));
        HighstandTable bintanja = HighstandTable.fromCurve(
                ShippedPackage.BINTANJA, ShippedPackage.STAGES, HighstandOverrides.NONE, HighstandOptions.DEFAULT);
        assertEquals(Optional.empty(), bintanja.find("9c"));
        assertTrue(says(bintanja, "spread of curve bintanja-vandewal-2008 is a guess"));
        assertEquals(6, row(bintanja, "5e").level().standardDeviation(), 0.01);
        assertEquals(12, row(bintanja, "5a").level().standardDeviation(), 0.01);
    }

    @Test
    void anOverrideOfAStageTheCurveLacksIsToldAndNotUsed() {
        HighstandOverrides mine =
                new HighstandOverrides("mine", List.of(ShippedPackage.entry("3a", 38, 2, -60, 8, "mine")));
        HighstandTable table =
                HighstandTable.fromCurve(ShippedPackage.SPRATT, ShippedPackage.STAGES, mine, HighstandOptions.DEFAULT);
        assertEquals(Optional.empty(), table.find("3a"));
        assertTrue(table.assumptions()
                .contains(new Assumption(
                        "level and age of highstand 3a from table mine",
                        "not used: the curve shows no such highstand",
                        "mine",
                        "all")));
    }

    @Test
    void anUnknownOverrideIsRefused() {
        HighstandOverrides mine =
                new HighstandOverrides("mine", List.of(ShippedPackage.entry("5g", 80, 2, -10, 5, "mine")));
        assertEquals(
                "overrides 'mine' name stage '5g', which is not in the stage table",
                assertThrows(
                                IllegalArgumentException.class,
                                () -> HighstandTable.fromCurve(
                                        ShippedPackage.SPRATT, ShippedPackage.STAGES, mine, HighstandOptions.DEFAULT))
                        .getMessage());
    }

    @Test
    void aCurveWithoutHighstandsGivesNoTable() {
        assertFalse(HighstandTable.canComeFrom(ShippedPackage.LAMBECK, ShippedPackage.STAGES));
        assertTrue(HighstandTable.canComeFrom(ShippedPackage.SPRATT, ShippedPackage.STAGES));
        assertThrows(
                IllegalArgumentException.class,
                () -> HighstandTable.fromCurve(
                        ShippedPackage.LAMBECK,
                        ShippedPackage.STAGES,
                        HighstandOverrides.NONE,
                        HighstandOptions.DEFAULT));
    }

    @Test
    void anOwnTableGetsTheDefaultsUnlessItIsComplete() {
        List<HighstandEntry> entries = List.of(
                ShippedPackage.entry("T2", 200, 4, -5, 5, "mine"), ShippedPackage.entry("5a", 80, 2, -20, 5, "mine"));
        HighstandTable own =
                HighstandTable.own("mine", false, entries, ShippedPackage.STAGES, HighstandOptions.DEFAULT);
        assertEquals(List.of("1", "5a", "T2"), own.stages());
        assertTrue(own.rows().get(3).isOlder());
        assertEquals(241, own.rows().get(3).ageKa());
        assertMarks(row(own, "5a"), true, false, false);
        assertEquals(5, row(own, "5a").localOffsetSigmaMetres()); // the class of stage 5a
        assertEquals(2, row(own, "T2").localOffsetSigmaMetres()); // no such stage
        assertEquals(new SharedErrors(3, 6, 0), own.sharedErrors());
        assertFalse(says(own, "curve age error"));

        HighstandTable complete =
                HighstandTable.own("mine", true, entries, ShippedPackage.STAGES, HighstandOptions.DEFAULT);
        assertEquals(List.of("5a", "T2"), complete.stages());
        assertEquals(2, complete.rows().size());
        assertEquals(SharedErrors.NONE, complete.sharedErrors());
        assertEquals(0, row(complete, "5a").localOffsetSigmaMetres());
        assertEquals(5, row(complete, "5a").marginalLevelSigmaMetres(complete.sharedErrors()), 1e-12);
        // a setting that the study states still counts
        SharedErrors stated = new SharedErrors(2, 0, 0);
        assertEquals(Math.sqrt(29), row(complete, "5a").marginalLevelSigmaMetres(stated), 1e-12);
    }

    @Test
    void aTableWithAYoungRowKeepsItsOwnHolocene() {
        HighstandTable own = HighstandTable.own(
                "mine",
                false,
                List.of(ShippedPackage.entry("H", 6, 0.5, 1, 0.5, "mine")),
                ShippedPackage.STAGES,
                HighstandOptions.DEFAULT);
        assertEquals(List.of("H"), own.stages());
    }

    @Test
    void statedSharedErrorsStandInTheLedgerAsTheStudys() {
        HighstandTable stated = DEFAULT.with(new SharedErrors(1, 6, 3));
        assertTrue(stated.assumptions()
                .contains(new Assumption("offset common to all highstands", "1.0 m (1 sigma)", "the study", "all")));
        assertEquals(
                1,
                stated.assumptions().stream()
                        .filter(line -> line.assumption().equals("offset common to all highstands"))
                        .count());
        assertEquals(1, stated.sharedErrors().offsetSigmaMetres());
    }

    @Test
    void everyDefaultStandsInTheLedger() {
        for (String expected : List.of(
                "highstands are picked from a curve",
                "level and age of highstand 5e from table independent-highstands",
                "older highstands beyond the table",
                "highstand of today's interglacial",
                "offset common to all highstands",
                "factor common to interstadials",
                "curve age error",
                "local minus global sea level is not measured")) {
            assertTrue(says(DEFAULT, expected), expected);
        }
    }

    @Test
    void aMistypedStageFindsItsNeighbour() {
        assertEquals(Optional.of("11c"), DEFAULT.nearest("11cc"));
        assertEquals(Optional.of("5e"), DEFAULT.nearest("5E"));
        assertEquals(Optional.empty(), DEFAULT.nearest("holocene"));
    }

    @Test
    void badTablesAreRefused() {
        List<HighstandEntry> twice = List.of(
                ShippedPackage.entry("a", 80, 2, -20, 5, "mine"), ShippedPackage.entry("a", 90, 2, -20, 5, "mine"));
        assertEquals(
                "stage 'a' stands twice in highstand table 'mine'",
                assertThrows(
                                IllegalArgumentException.class,
                                () -> HighstandTable.own(
                                        "mine", true, twice, ShippedPackage.STAGES, HighstandOptions.DEFAULT))
                        .getMessage());
        assertThrows(
                IllegalArgumentException.class,
                () -> HighstandTable.own("m", true, List.of(), ShippedPackage.STAGES, HighstandOptions.DEFAULT));
        assertThrows(IllegalArgumentException.class, () -> ShippedPackage.entry("older", 80, 2, -20, 5, "mine"));
        assertThrows(IllegalArgumentException.class, () -> ShippedPackage.entry("a", 0, 2, -20, 5, "mine"));
        assertThrows(IllegalArgumentException.class, () -> ShippedPackage.entry("a", 5, Double.NaN, -20, 5, "mine"));
    }

    private static boolean says(HighstandTable table, String assumption) {
        return table.assumptions().stream().anyMatch(line -> line.assumption().equals(assumption));
    }

    private static Highstand row(HighstandTable table, String stage) {
        return table.find(stage).orElseThrow();
    }

    private static void assertMarks(Highstand row, boolean offset, boolean factor, boolean curveAge) {
        assertEquals(offset, row.takesOffset());
        assertEquals(factor, row.takesInterstadialFactor());
        assertEquals(curveAge, row.takesCurveAgeError());
    }
}
