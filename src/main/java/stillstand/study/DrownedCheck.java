package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.List;
import java.util.function.Function;
import stillstand.shoreline.FormsAt;

/** Checks of reefs that drowned: what a sinking coast cannot show. */
final class DrownedCheck {
    private static final String FORMS_AT = "forms_at";
    private static final String DROWNING = quote(FormsAt.DROWNING.id());

    private DrownedCheck() {}

    static void check(
            List<SitesTable.SiteRow> sites,
            List<LevelsTable.LevelRow> levels,
            Function<String, List<SeaLevelCase>> seaLevel) {
        for (SitesTable.SiteRow site : sites) {
            List<LevelsTable.LevelRow> own = levels.stream()
                    .filter(level -> level.key().site().equals(site.name()))
                    .toList();
            List<LevelsTable.LevelRow> drowned = own.stream()
                    .filter(level -> level.formsAt() == FormsAt.DROWNING)
                    .toList();
            drowned.forEach(level -> checkHeight(level, site));
            drowned.stream()
                    .findFirst()
                    .ifPresent(first -> own.stream()
                            .filter(level -> level.formsAt() == FormsAt.HIGHSTAND)
                            .findFirst()
                            .ifPresent(raised -> mixed(first, raised)));
            boolean picked = seaLevel.apply(site.name()).stream()
                    .anyMatch(sea -> sea.curve()
                            .filter(curve -> curve.id().equals(sea.highstands().id()))
                            .isPresent());
            if (picked) {
                drowned.forEach(DrownedCheck::checkPin);
            }
        }
    }

    private static void checkHeight(LevelsTable.LevelRow level, SitesTable.SiteRow site) {
        level.elevationMetres()
                .filter(height -> height.mean() - site.datumOffsetMetres().mean() >= 0)
                .ifPresent(height -> level.reader()
                        .problem(
                                "elevation_m",
                                quote(level.reader().text("elevation_m")) + " beside " + FORMS_AT + " drowning",
                                "a height below today's sea, since this reef drowned and stayed drowned"));
    }

    private static void mixed(LevelsTable.LevelRow drowned, LevelsTable.LevelRow raised) {
        drowned.reader()
                .problem(
                        FORMS_AT,
                        DROWNING + " at a site where level "
                                + quote(raised.key().level()) + " forms at a highstand",
                        "levels of one kind at a site: a rising coast keeps highstands, a sinking one lowstands; give the"
                                + " drowned reefs a site of their own");
    }

    private static void checkPin(LevelsTable.LevelRow level) {
        String pin = level.reader().text("highstand");
        if (!pin.isEmpty()) {
            level.reader()
                    .problem(
                            "highstand",
                            quote(pin) + " beside forms_at drowning",
                            "nothing: which lowstand drowned it is told by dates and depth, or by a table of stands of your"
                                    + " own");
        }
    }
}
