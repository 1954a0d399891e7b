package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Function;
import java.util.stream.Collectors;
import stillstand.sealevel.HighstandTable;
import stillstand.shoreline.FormsAt;
import stillstand.shoreline.StageChoice;
import stillstand.uplift.FlightSetup;

/** Checks of the flights: what matching needs, and what of the input cannot be matched. */
final class FlightCheck {
    private static final String HIGHSTAND = "highstand";
    /** So many levels at just one height are asked about. */
    private static final int MANY_AT_ONE_HEIGHT = 4;

    private FlightCheck() {}

    static void check(
            List<SitesTable.SiteRow> sites,
            List<LevelsTable.LevelRow> levels,
            Function<String, List<SeaLevelCase>> seaLevel) {
        levels.forEach(FlightCheck::checkPin);
        Map<String, List<LevelsTable.LevelRow>> bySite = levels.stream()
                .collect(Collectors.groupingBy(level -> level.key().site()));
        for (SitesTable.SiteRow site : sites) {
            List<LevelsTable.LevelRow> own = bySite.getOrDefault(site.name(), List.of());
            List<LevelsTable.LevelRow> flight = inOrder(own.stream()
                    .filter(level -> FlightSetup.takesPart(level.formsAt()))
                    .toList());
            boolean read = site.toSite().isPresent()
                    && own.stream().allMatch(level -> level.toLevel().isPresent());
            if (read && flight.stream().anyMatch(FlightCheck::isToBeMatched)) {
                checkRange(site, flight);
                checkHeights(site, flight);
                List<HighstandTable> tables = seaLevel.apply(site.name()).stream()
                        .map(SeaLevelCase::highstands)
                        .toList();
                tables.stream()
                        .max(Comparator.comparingInt(table -> table.rows().size()))
                        .ifPresent(table -> checkCount(site, flight, table));
                checkOrder(flight, tables);
            }
        }
    }

    /** Where the sea level itself has problems a pin cannot be read: then nothing is known of what it leaves open. */
    private static boolean isToBeMatched(LevelsTable.LevelRow level) {
        boolean unread =
                !level.reader().text(HIGHSTAND).isEmpty() && level.highstand().equals(StageChoice.ANY);
        return !unread && FlightSetup.isToBeMatched(level.formsAt(), level.highstand());
    }

    private static void checkPin(LevelsTable.LevelRow level) {
        String pin = level.reader().text(HIGHSTAND);
        FormsAt formsAt = level.formsAt();
        if (pin.isEmpty()) {
            return;
        }
        if (formsAt == FormsAt.EVENT) {
            level.reader()
                    .problem(
                            HIGHSTAND,
                            quote(pin) + " beside forms_at event",
                            "nothing: one earthquake's step records no highstand");
        } else if (formsAt == FormsAt.MARINE_LIMITING || formsAt == FormsAt.TERRESTRIAL_LIMITING) {
            level.reader()
                    .problem(
                            HIGHSTAND,
                            quote(pin) + " beside forms_at " + formsAt.id(),
                            "nothing: a limiting point bounds the rate at its own date and records no highstand");
        }
    }

    private static void checkRange(SitesTable.SiteRow site, List<LevelsTable.LevelRow> flight) {
        if (!site.reader().text("surveyed_from_m").isEmpty()
                || !site.reader().text("surveyed_to_m").isEmpty()) {
            return;
        }
        String level = flight.stream()
                .filter(FlightCheck::isToBeMatched)
                .map(each -> each.key().level())
                .findFirst()
                .orElseThrow();
        site.reader()
                .problem(
                        "surveyed_from_m",
                        "nothing",
                        "the lowest and (surveyed_to_m) highest height at " + quote(site.name())
                                + " at which a terrace would have been seen, since level " + quote(level)
                                + " is tied to no single highstand: a highstand without a terrace is evidence only"
                                + " where one would have been seen");
    }

    private static void checkHeights(SitesTable.SiteRow site, List<LevelsTable.LevelRow> flight) {
        Map<Double, Integer> counts = new HashMap<>();
        for (LevelsTable.LevelRow level : flight) {
            level.elevationMetres().ifPresent(height -> counts.merge(height.mean(), 1, Integer::sum));
        }
        for (LevelsTable.LevelRow level : flight) {
            double height = level.elevationMetres().map(each -> each.mean()).orElse(Double.NaN);
            int count = counts.getOrDefault(height, 0);
            if (count >= MANY_AT_ONE_HEIGHT) {
                counts.remove(height);
                level.reader()
                        .warn(
                                "elevation_m",
                                count + " levels of " + quote(site.name()) + " stand at one height ("
                                        + level.reader().text("elevation_m")
                                        + " m): a highstand leaves one shoreline, so most of them will count as strays");
            }
        }
    }

    private static void checkCount(SitesTable.SiteRow site, List<LevelsTable.LevelRow> flight, HighstandTable table) {
        int rows = table.rows().size();
        if (flight.size() > rows) {
            site.reader()
                    .warn(
                            "site",
                            flight.size() + " levels of " + quote(site.name()) + " are matched to the "
                                    + (rows == 1 ? "one highstand" : rows + " highstands") + " of "
                                    + quote(table.id()) + ": at least " + (flight.size() - rows)
                                    + " will count as strays");
        }
    }

    /** Whether some table has for every pinned level a highstand that the pins leave to it, higher ones older. */
    private static void checkOrder(List<LevelsTable.LevelRow> flight, List<HighstandTable> tables) {
        List<Optional<Crossing>> crossings =
                tables.stream().map(table -> crossing(flight, table)).toList();
        if (crossings.stream().allMatch(Optional::isPresent)) {
            crossings.stream()
                    .flatMap(Optional::stream)
                    .findFirst()
                    .ifPresent(crossing -> crossing.level()
                            .reader()
                            .problem(
                                    HIGHSTAND,
                                    quote(crossing.level().reader().text(HIGHSTAND)),
                                    "a highstand older than " + quote(crossing.stage()) + ", to which level "
                                            + quote(crossing.below())
                                            + " below it is tied: higher shorelines are older, and each"
                                            + " highstand left one"));
        }
    }

    /** A level whose pin leaves it no highstand older than that of a level below it. */
    private record Crossing(LevelsTable.LevelRow level, String stage, String below) {}

    private static Optional<Crossing> crossing(List<LevelsTable.LevelRow> flight, HighstandTable table) {
        List<String> stages = table.rows().stream().map(row -> row.stage()).toList();
        int last = -1;
        String below = "";
        for (LevelsTable.LevelRow level : flight) {
            boolean drowned = level.formsAt() == FormsAt.DROWNING; // there deeper is older
            if (level.highstand().only().isEmpty() || level.doubtful() || drowned) {
                continue;
            }
            int next = last + 1;
            while (next < stages.size() && !level.highstand().allows(stages.get(next))) {
                next++;
            }
            if (next == stages.size()) {
                return Optional.of(new Crossing(level, stages.get(Math.max(0, last)), below));
            }
            last = next;
            below = level.key().level();
        }
        return Optional.empty();
    }

    /** Lowest first, by {@code order} where given, as {@link FlightSetup} has it. */
    private static List<LevelsTable.LevelRow> inOrder(List<LevelsTable.LevelRow> levels) {
        return FlightSetup.inOrder(
                levels,
                LevelsTable.LevelRow::order,
                level -> level.elevationMetres().map(each -> each.mean()).orElse(0.0));
    }
}
