package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.function.Function;
import stillstand.uplift.FlightSetup;

/** Checks of terraces that were traced from site to site. */
final class TraceCheck {
    private static final String TERRACE = "terrace";

    private TraceCheck() {}

    static void check(
            StudySettings settings, List<LevelsTable.LevelRow> levels, Function<String, List<SeaLevelCase>> seaLevel) {
        Map<String, List<LevelsTable.LevelRow>> terraces = new LinkedHashMap<>();
        for (LevelsTable.LevelRow level : levels) {
            String terrace = level.reader().text(TERRACE);
            if (!terrace.isEmpty()) {
                checkKind(level, terrace);
                terraces.computeIfAbsent(terrace, name -> new ArrayList<>()).add(level);
            }
        }
        terraces.forEach(TraceCheck::checkSites);
        terraces.forEach(TraceCheck::checkPins);
        checkCrossing(levels);
        terraces.values().stream()
                .map(found -> found.get(0))
                .findFirst()
                .ifPresent(first -> checkUse(settings, first, levels, seaLevel));
    }

    private static void checkKind(LevelsTable.LevelRow level, String terrace) {
        if (!FlightSetup.takesPart(level.formsAt())) {
            level.reader()
                    .problem(
                            TERRACE,
                            quote(terrace) + " beside forms_at "
                                    + level.formsAt().id(),
                            "nothing: only a level that is matched to a highstand shares one with another site");
        }
    }

    private static void checkSites(String terrace, List<LevelsTable.LevelRow> levels) {
        Map<String, LevelsTable.LevelRow> bySite = new LinkedHashMap<>();
        for (LevelsTable.LevelRow level : levels) {
            LevelsTable.LevelRow other = bySite.putIfAbsent(level.key().site(), level);
            if (other != null) {
                level.reader()
                        .problem(
                                TERRACE,
                                quote(terrace) + " a second time at "
                                        + quote(level.key().site()) + " (level "
                                        + quote(other.key().level()) + " has it)",
                                "each traced terrace once at a site: it is one shoreline");
            }
        }
        if (levels.size() == 1) {
            levels.get(0)
                    .reader()
                    .warn(
                            TERRACE,
                            "terrace " + quote(terrace) + " is traced to no other site, so that it says nothing");
        }
    }

    private static void checkPins(String terrace, List<LevelsTable.LevelRow> levels) {
        Optional<LevelsTable.LevelRow> before = Optional.empty();
        for (LevelsTable.LevelRow level : levels) {
            Set<String> only = new LinkedHashSet<>(level.highstand().only());
            if (only.isEmpty() || level.doubtful()) {
                continue;
            }
            if (before.isPresent()) {
                Set<String> both = new LinkedHashSet<>(before.get().highstand().only());
                both.retainAll(only);
                if (both.isEmpty()) {
                    level.reader()
                            .problem(
                                    "highstand",
                                    quote(level.reader().text("highstand")) + " on terrace " + quote(terrace),
                                    "a highstand that it can share with level "
                                            + quote(before.get().key().level()) + " of "
                                            + quote(before.get().key().site())
                                            + " on the same terrace, which is tied to "
                                            + quote(before.get().reader().text("highstand")));
                    return;
                }
            }
            before = Optional.of(level);
        }
    }

    /** Terraces that stand in one order at one site and in the other at another. */
    private static void checkCrossing(List<LevelsTable.LevelRow> levels) {
        Map<List<String>, LevelsTable.LevelRow> above = new LinkedHashMap<>();
        Map<String, List<LevelsTable.LevelRow>> bySite = new LinkedHashMap<>();
        levels.stream()
                .filter(level -> FlightSetup.takesPart(level.formsAt()))
                .forEach(level -> bySite.computeIfAbsent(level.key().site(), site -> new ArrayList<>())
                        .add(level));
        for (List<LevelsTable.LevelRow> site : bySite.values()) {
            List<LevelsTable.LevelRow> traced = FlightSetup.inOrder(
                            site,
                            LevelsTable.LevelRow::order,
                            level -> level.elevationMetres()
                                    .map(each -> each.mean())
                                    .orElse(0.0))
                    .stream()
                    .filter(level -> !level.reader().text(TERRACE).isEmpty())
                    .toList();
            for (int i = 0; i < traced.size(); i++) {
                for (int k = i + 1; k < traced.size(); k++) {
                    String low = traced.get(i).reader().text(TERRACE);
                    String high = traced.get(k).reader().text(TERRACE);
                    LevelsTable.LevelRow other = above.get(List.of(high, low));
                    if (other != null) {
                        traced.get(k)
                                .reader()
                                .problem(
                                        TERRACE,
                                        quote(high) + " above " + quote(low),
                                        quote(high) + " below " + quote(low) + ", as at "
                                                + quote(other.key().site()) + ": traced terraces cannot cross");
                        return;
                    }
                    above.putIfAbsent(List.of(low, high), traced.get(k));
                }
            }
        }
    }

    private static void checkUse(
            StudySettings settings,
            LevelsTable.LevelRow first,
            List<LevelsTable.LevelRow> levels,
            Function<String, List<SeaLevelCase>> seaLevel) {
        boolean several = levels.stream()
                .anyMatch(level -> seaLevel.apply(level.key().site()).size() > 1);
        if (several) {
            first.reader()
                    .warn(
                            TERRACE,
                            "traced terraces are not used where a study has several curves: each site stands alone");
        } else if (settings.rate().changes() != StudySettings.Changes.NONE) {
            first.reader()
                    .warn(TERRACE, "traced terraces are not used where the rate may change: each site stands alone");
        }
    }
}
