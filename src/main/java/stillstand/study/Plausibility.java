package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.function.Function;
import java.util.stream.Collectors;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormsAt;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Uncertain;

/** Checks that look across rows and tables: what contradicts itself, and what can be read but is odd. */
final class Plausibility {
    private static final String ELEVATION = "elevation_m";
    /** Heights above this are asked about; marine terraces are not looked for so high. */
    private static final double HIGH_METRES = 1500;

    private static final double MILLIMETRES_LIKELY = 10_000;
    private static final double SIGMAS_OF_ROOM = 3;
    private static final double SHARE_OF_ROOM = 0.05;

    private Plausibility() {}

    static void check(
            List<SitesTable.SiteRow> sites,
            List<LevelsTable.LevelRow> levels,
            List<SamplesTable.SampleRow> samples,
            Function<String, List<SeaLevelCase>> seaLevel) {
        Map<String, List<LevelsTable.LevelRow>> bySite = levels.stream()
                .collect(Collectors.groupingBy(level -> level.key().site()));
        for (SitesTable.SiteRow site : sites) {
            List<LevelsTable.LevelRow> own = bySite.getOrDefault(site.name(), List.of());
            checkUnit(site, own);
            site.surveyedMetres().ifPresent(range -> checkSurvey(site, range, own));
        }
        Map<LevelsTable.Key, LevelsTable.LevelRow> byKey = new HashMap<>();
        levels.forEach(level -> byKey.putIfAbsent(level.key(), level));
        Map<LevelsTable.Key, List<DatedSample>> used = new HashMap<>();
        for (SamplesTable.SampleRow row : samples) {
            LevelsTable.LevelRow level = byKey.get(row.key());
            if (level != null && row.sample().filter(DatedSample::used).isPresent()) {
                DatedSample sample = row.sample().get();
                used.computeIfAbsent(row.key(), key -> new ArrayList<>()).add(sample);
                checkHeight(row, sample, level);
                checkSpan(row, sample, level, seaLevel.apply(row.key().site()));
            }
        }
        for (LevelsTable.LevelRow level : levels) {
            checkCurve(level, seaLevel.apply(level.key().site()));
            checkDates(level, used.getOrDefault(level.key(), List.of()));
        }
    }

    private static void checkUnit(SitesTable.SiteRow site, List<LevelsTable.LevelRow> levels) {
        Optional<LevelsTable.LevelRow> highest = levels.stream()
                .filter(level -> height(level) > HIGH_METRES)
                .max((a, b) -> Double.compare(height(a), height(b)));
        highest.ifPresent(level -> level.reader()
                .warn(
                        ELEVATION,
                        "heights at " + quote(site.name()) + " look like "
                                + (height(level) > MILLIMETRES_LIKELY ? "millimetres" : "feet") + " (up to "
                                + level.reader().text(ELEVATION) + "): they are read as metres"));
    }

    private static double height(LevelsTable.LevelRow level) {
        return level.elevationMetres().map(each -> Math.abs(each.mean())).orElse(0.0);
    }

    private static void checkSurvey(SitesTable.SiteRow site, Interval surveyed, List<LevelsTable.LevelRow> levels) {
        double highest = Double.NEGATIVE_INFINITY;
        boolean warned = false;
        for (LevelsTable.LevelRow level : levels) {
            // the range says where a terrace would have been seen: it binds no level that formed at its own age
            if (level.elevationMetres().isEmpty() || level.formsAt() != FormsAt.HIGHSTAND) {
                continue;
            }
            Uncertain elevation = level.elevationMetres().get();
            double height = elevation.mean() - site.datumOffsetMetres().mean();
            double room = SIGMAS_OF_ROOM * elevation.standardDeviation();
            String range = text(surveyed.low()) + " to " + text(surveyed.high()) + " m above mean sea level";
            highest = Math.max(highest, height);
            if (height < surveyed.low() - room || height > surveyed.high() + room) {
                level.reader()
                        .problem(
                                ELEVATION,
                                quote(level.reader().text(ELEVATION)),
                                "a height in the surveyed range of " + quote(site.name()) + " (" + range + ")");
                warned = true;
            } else if (height < surveyed.low() + room || height > surveyed.high() - room) {
                level.reader()
                        .warn(
                                ELEVATION,
                                "level " + quote(level.key().level())
                                        + " lies within three sigma of an end of the surveyed range (" + range + ")");
                warned = true;
            }
        }
        if (!warned && highest > 0 && surveyed.high() - highest < SHARE_OF_ROOM * highest) {
            site.reader()
                    .warn(
                            "surveyed_to_m",
                            "the surveyed range of " + quote(site.name())
                                    + " ends within 5 % of its highest level (" + text(highest)
                                    + " m above mean sea level)");
        }
    }

    private static void checkHeight(SamplesTable.SampleRow row, DatedSample sample, LevelsTable.LevelRow level) {
        if (sample.elevationMetres().isEmpty() || level.elevationMetres().isEmpty()) {
            return;
        }
        Uncertain own = sample.elevationMetres().get();
        Uncertain terrace = level.elevationMetres().get();
        double above = own.mean() - terrace.mean();
        double sigma = Math.hypot(own.standardDeviation(), terrace.standardDeviation());
        if (above > 0 && above > SIGMAS_OF_ROOM * sigma) {
            row.reader()
                    .warn(
                            ELEVATION,
                            "sample " + quote(sample.name()) + " stands " + text(above) + " m above its level "
                                    + quote(level.key().level()) + ", more than three sigma of both heights ("
                                    + text(SIGMAS_OF_ROOM * sigma) + " m)");
        }
    }

    /** The age of a level that reads the curve at its own age must lie on the curve. */
    private static void checkSpan(
            SamplesTable.SampleRow row, DatedSample sample, LevelsTable.LevelRow level, List<SeaLevelCase> seaLevel) {
        List<SeaLevelCurve> curves =
                seaLevel.stream().flatMap(sea -> sea.curve().stream()).toList();
        if (level.formsAt() != FormsAt.ANY || curves.isEmpty() || sample.ageKa().isEmpty()) {
            return;
        }
        double age = sample.ageKa().get().quantile(0.5);
        if (curves.stream().noneMatch(curve -> curve.covers(age))) {
            String header = List.of("age_ka", "age_max_ka", "age_table").stream()
                    .filter(each -> !row.reader().text(each).isEmpty())
                    .findFirst()
                    .orElse("age_ka");
            row.reader()
                    .problem(
                            header,
                            quote(row.reader().text(header)),
                            "an age on curve "
                                    + curves.stream().map(Plausibility::span).collect(Collectors.joining(" or "))
                                    + ", at which level " + quote(level.key().level()) + " is read");
        }
    }

    private static String span(SeaLevelCurve curve) {
        return quote(curve.id()) + " (" + text(curve.fromKa()) + " to " + text(curve.toKa()) + " ka)";
    }

    private static void checkCurve(LevelsTable.LevelRow level, List<SeaLevelCase> seaLevel) {
        if (level.formsAt() == FormsAt.ANY
                && !seaLevel.isEmpty()
                && seaLevel.stream().allMatch(each -> each.curve().isEmpty())) {
            level.reader()
                    .problem(
                            "forms_at",
                            quote(level.reader().text("forms_at")) + ", while study.json names no curve",
                            "sea_level.curves to name one, since such a level reads it at its own age");
        }
    }

    private static void checkDates(LevelsTable.LevelRow level, List<DatedSample> used) {
        boolean onlyMinimum =
                !used.isEmpty() && used.stream().allMatch(sample -> sample.dates() == DatedSample.Role.MINIMUM);
        if (onlyMinimum && level.highstand().pinned().isEmpty()) {
            level.reader()
                    .warn(
                            "level",
                            "level " + quote(level.key().level())
                                    + " is dated by minimum ages only: nothing says how old it is at most");
        }
    }

    private static String text(double value) {
        return value == Math.rint(value) && Math.abs(value) < 1e9
                ? Long.toString((long) value)
                : String.format(Locale.ROOT, "%.1f", value);
    }
}
