package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import stillstand.shoreline.DatedSample;
import stillstand.uplift.FlightSetup;
import stillstand.uplift.RateChanges;

/** Warnings where more is asked of the rate through time than levels and dates can bear. */
final class ChangesCheck {
    /** With so few levels any change of rate can be had. */
    private static final int FEW_LEVELS = 2;

    private ChangesCheck() {}

    static void check(
            StudySettings.RateChoice rate,
            List<SitesTable.SiteRow> sites,
            List<LevelsTable.LevelRow> levels,
            List<SamplesTable.SampleRow> samples) {
        RateChanges changes = new RateChanges(
                RateChanges.Models.valueOf(rate.changes().name()),
                rate.changeBetweenKa().low(),
                rate.changeBetweenKa().high());
        for (SitesTable.SiteRow site : sites) {
            List<LevelsTable.LevelRow> flight = levels.stream()
                    .filter(level -> level.key().site().equals(site.name()) && FlightSetup.takesPart(level.formsAt()))
                    .toList();
            if (changes.isAsked() && !flight.isEmpty()) {
                check(changes, site, flight, samples);
            }
        }
    }

    private static void check(
            RateChanges changes,
            SitesTable.SiteRow site,
            List<LevelsTable.LevelRow> flight,
            List<SamplesTable.SampleRow> samples) {
        boolean matched =
                flight.stream().anyMatch(level -> FlightSetup.isToBeMatched(level.formsAt(), level.highstand()));
        if (!matched) {
            site.reader()
                    .warn(
                            "site",
                            "a change of rate is asked for, but every level of " + quote(site.name())
                                    + " is tied to one highstand, so that no flight is matched: its levels keep one"
                                    + " rate each");
            return;
        }
        if (flight.size() <= FEW_LEVELS) {
            site.reader()
                    .warn(
                            "site",
                            "a change of rate is asked of " + (flight.size() == 1 ? "one level" : "two levels") + " of "
                                    + quote(site.name()) + ": so few fit any change, and the answer is the prior's");
        }
        Set<LevelsTable.Key> dated = samples.stream()
                .filter(row -> row.sample().filter(ChangesCheck::dates).isPresent())
                .map(SamplesTable.SampleRow::key)
                .collect(Collectors.toSet());
        long count =
                flight.stream().filter(level -> dated.contains(level.key())).count();
        if (changes.most() > 0 && count < changes.most() + 1) {
            site.reader()
                    .warn(
                            "site",
                            (changes.most() == 1 ? "one change" : "up to two changes") + " of rate asked of "
                                    + quote(site.name()) + ", which has " + count + " dated "
                                    + (count == 1 ? "level" : "levels")
                                    + ": without one on either side of each change it cannot be told from another"
                                    + " pairing of levels and highstands");
        }
    }

    private static boolean dates(DatedSample sample) {
        return sample.used()
                && sample.dates() == DatedSample.Role.LEVEL
                && sample.ageKa().isPresent();
    }
}
