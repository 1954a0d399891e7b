package stillstand.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.atomic.AtomicBoolean;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.files.ShippedLibrary;
import stillstand.files.StudyFolder;
import stillstand.ledger.InputWarning;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.study.Study;
import stillstand.study.StudyResult;
import stillstand.study.StudyRunner;
import stillstand.uplift.FlightResult;

/** Flights through files and command: what is written and said, and what cannot be matched. */
class FlightStudyTest {
    private static final String LEVELS = "site,level,elevation_m,elevation_1sigma_m,forms_at,highstand";

    @TempDir
    Path folder;

    private StudyOnDisk study(String... levels) throws IOException {
        String[] lines = new String[levels.length + 1];
        lines[0] = LEVELS;
        System.arraycopy(levels, 0, lines, 1, levels.length);
        return new StudyOnDisk(folder)
                .with("study.json", "{\"title\": \"Flights\"}")
                .with("sites.csv", "site,latitude,longitude,surveyed_from_m,surveyed_to_m", "Stair,1,2,2,120")
                .with("levels.csv", lines);
    }

    @Test
    void aSiteWithEveryLevelPinnedHasNoFlightAndNeedsNoRange() throws IOException {
        StudyResult result = study("Stair,T1,52,3,,5e", "Stair,T2,80,3,,7e")
                .with("sites.csv", "site,latitude,longitude", "Stair,1,2")
                .run("--draws", "16384");
        assertEquals(List.of(), result.flights());
        assertEquals(
                2,
                result.levels().stream()
                        .filter(level -> level.rate().isPresent())
                        .count());
    }

    @Test
    void aRangeBelowTheSeaIsNotMatchedAndPinnedLevelsKeepTheirRate() throws IOException {
        StudyResult result = study("Stair,Q1,-30,1,,5e", "Stair,Q2,-60,1,,")
                .with("sites.csv", "site,latitude,longitude,surveyed_from_m,surveyed_to_m", "Stair,1,2,-100,-10")
                .run("--draws", "16384");
        assertEquals(List.of(), result.flights());
        assertTrue(StudyOnDisk.level(result, "Q1").rate().isPresent());
        assertEquals(
                "no flight is matched: the surveyed range lies wholly below today's sea, where shorelines are not matched",
                result.whyWaiting("Stair", "Q2").orElseThrow());
    }

    /** A table of one row, and more levels than rows: odd, said, and done. */
    @Test
    void moreLevelsThanHighstandsAreWarnedAboutAndMatched() throws IOException {
        StudyResult result = study("Stair,T1,52,3,,", "Stair,T2,80,3,,")
                .withCompleteTable("5e,122,2,5,2")
                .run("--draws", "16384");
        assertEquals(
                List.of(
                        "2 levels of \"Stair\" are matched to the one highstand of \"own\": at least 1 will count as strays"),
                result.warnings().stream().map(InputWarning::message).toList());
        FlightResult flight = result.flights().get(0);
        double none = flight.unmatched().stream()
                .mapToDouble(FlightResult.Unmatched::probability)
                .sum();
        assertTrue(none >= 1, "at least one of the two is a stray: " + none);
    }

    @Test
    void threadsChangeNoByte() throws IOException {
        StudyOnDisk study = study("Stair,T1,16,2,,", "Stair,T2,28,2,,5a|5c", "Stair,T3,52,3,,");
        Set<String> results = new HashSet<>();
        for (String threads : List.of("1", "2", "7")) {
            study.run("--draws", "16384", "--threads", threads);
            results.add(Files.readString(folder.resolve("results/results.json")));
        }
        assertEquals(1, results.size());
        assertTrue(results.iterator().next().contains("\"pairings\": ["));
    }

    @Test
    void aHeldLevelThatNoRateCanHaveLeftIsNamedAndOtherSitesFinish() throws IOException {
        StudyOnDisk study = study("Stair,T1,16,1,,", "Stair,T2,110,0.1,,5e", "Other,O1,30,2,,", "Other,O2,50,2,,5e")
                .with(
                        "sites.csv",
                        "site,latitude,longitude,surveyed_from_m,surveyed_to_m,rate_prior",
                        "Stair,1,2,2,120,half-cauchy 1 from 0.001 to 0.1",
                        "Other,1,3,2,120,");
        assertEquals(3, study.execute("run", "--draws", "16384"));
        StudyResult result = study.results();
        assertEquals(
                List.of(new StudyResult.Failure(
                        "Stair",
                        "no rate of the prior (half-cauchy 1 from 0.001 to 0.1) can have left this flight; without level 'T2' one"
                                + " could")),
                result.failures());
        assertEquals(
                List.of("Other"),
                result.flights().stream().map(FlightResult::site).toList());
    }

    @Test
    void pairingsAndPaperTableAndTerminalTellTheFlight() throws IOException {
        StudyOnDisk study = study("Stair,T1,16,2,,", "Stair,T2,28,2,,", "Stair,T3,52,3,,5e", "Stair,E1,4,0.1,event,");
        StudyResult result = study.run("--draws", "16384");
        FlightResult flight = result.flights().get(0);
        assertEquals(3, flight.unmatched().size());
        String pairings = Files.readString(folder.resolve("results/pairings.csv"));
        assertTrue(pairings.startsWith("site,level,highstand,probability\nStair,T1,5a,0."), pairings);
        assertTrue(pairings.contains("\nStair,T3,5e,1.0\nStair,T3,none,0.0\n"), pairings);
        assertTrue(pairings.contains("\nStair,T1,none,0."), pairings);
        String paper = Files.readString(folder.resolve("results/table1.csv"));
        assertTrue(paper.lines().anyMatch(line -> line.startsWith("Stair,T2,") && line.contains(",5c,0.")), paper);
        assertTrue(study.out().contains("Flight of 3 levels: 0.3"), study.out());
        assertTrue(study.out().contains("Sliding the rate by hand would have given"), study.out());
        assertTrue(
                study.out()
                        .contains("E1 is one earthquake's step: it records no sea level, and stays out of rates and"),
                study.out());
        for (FlightResult.Fate fate : flight.missing()) {
            assertEquals(
                    1,
                    fate.recorded() + fate.unseen() + fate.reoccupied() + fate.outside() + fate.absent(),
                    1e-4,
                    fate.highstand());
        }
    }

    @Test
    void aFlightStopsWhenAsked() throws IOException {
        study("Stair,T1,16,2,,", "Stair,T2,28,2,,", "Stair,T3,52,3,,");
        Study study = StudyFolder.read(
                        folder,
                        ShippedLibrary.load(),
                        new SettingsChanges(Optional.empty(), Optional.of(16384), List.of(), false))
                .value()
                .orElseThrow();
        AtomicBoolean asked = new AtomicBoolean();
        RunMonitor monitor = new RunMonitor() {
            @Override
            public void step(String what, double fraction) {
                asked.compareAndSet(false, what.equals("Stair / flight"));
            }

            @Override
            public boolean isCancelled() {
                return asked.get();
            }
        };
        ExecutorService executor = Executors.newFixedThreadPool(2);
        try {
            assertThrows(RunCancelledException.class, () -> StudyRunner.run(study, executor, monitor));
        } finally {
            executor.shutdownNow();
        }
        assertTrue(asked.get());
    }

    @Test
    void predictPrintsAndWritesAndOverwritesNothing() throws IOException {
        StudyOnDisk study = study("Stair,T1,52,3,,5e");
        Path file = folder.resolve("stair.csv");
        List<String> options = List.of("--rate", "0.4", "--before", "150=1", "--out", file.toString());
        assertEquals(0, study.execute("predict", options.toArray(String[]::new)));
        assertTrue(
                study.out().startsWith("Staircase of 0.4 m/kyr, 1.0 before 150.0 ka under spratt-lisiecki-2016:\n"),
                study.out());
        // 7.5 m at 122.5 ka; -0.5 m at 200 ka
        assertTrue(study.out().contains("  5e         stands "), study.out());
        assertTrue(Files.readString(file).contains("\n5e,122.5,7.5,56.5,"), Files.readString(file));
        assertTrue(Files.readString(file).contains("\n7a,200.0,-0.5,109.5,"), Files.readString(file));
        assertEquals(1, study.execute("predict", options.toArray(String[]::new)));
        assertEquals("--out: " + file + " is there already; nothing was written\n", study.err());
    }
}
