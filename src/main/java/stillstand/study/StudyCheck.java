package stillstand.study;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.function.Function;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.sealevel.LocalDeparture;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.study.StatedSettings.Place;

/**
 * Every check of a study, on tables: all problems at once, in reading order, before anything is computed. Terminal and
 * window go through here alike.
 */
public final class StudyCheck {
    private final StudyInput input;
    private final Library library;
    private final Findings findings = new Findings();

    private StudyCheck(StudyInput input, Library library) {
        this.input = input;
        this.library = library;
    }

    /**
     * Checks a study.
     *
     * @param input what was read
     * @param library the tool's curves and tables, the user's own among them
     */
    public static Loaded<Study> check(StudyInput input, Library library) {
        return new StudyCheck(input, library).run();
    }

    private Loaded<Study> run() {
        input.problems().forEach(findings::add);
        input.warnings().forEach(findings::add);
        input.ledger().forEach(findings::add);
        input.settings().ifPresent(this::checkSettings);
        Optional<SeaLevelCheck> seaLevel =
                input.settings().map(settings -> new SeaLevelCheck(settings, library, findings));
        List<SeaLevelCase> cases = seaLevel.map(SeaLevelCheck::cases).orElse(List.of());

        List<SitesTable.SiteRow> sites = input.sites()
                .map(table -> new SitesTable(library, findings).read(table))
                .orElse(List.of());
        Map<String, List<SeaLevelCase>> local = new HashMap<>();
        for (SitesTable.SiteRow site : sites) {
            seaLevel.flatMap(check -> check.local(site.reader(), cases))
                    .ifPresent(account -> local.put(site.name(), List.of(account)));
        }
        Set<String> names = new LinkedHashSet<>();
        sites.forEach(site -> names.add(site.name()));
        Function<String, List<SeaLevelCase>> at = site -> local.getOrDefault(site, cases);
        Function<String, Optional<StageLabels>> labels = site -> labels(at.apply(site));
        List<LevelsTable.LevelRow> levels = input.levels()
                .map(table -> new LevelsTable(library, findings).read(table, names, labels))
                .orElse(List.of());
        List<SamplesTable.SampleRow> samples = input.samples()
                .map(table -> new SamplesTable(library, input.ages(), findings).read(table, names, byName(levels)))
                .orElse(List.of());
        Plausibility.check(sites, levels, samples, at);
        FlightCheck.check(sites, levels, at);
        DrownedCheck.check(sites, levels, at);
        input.settings().ifPresent(stated -> TraceCheck.check(stated.settings(), levels, at));
        input.settings()
                .ifPresent(stated -> ChangesCheck.check(stated.settings().rate(), sites, levels, samples));
        Function<String, List<SeaLevelCase>> serving = ServingCurves.of(sites, levels, samples, at, findings);
        Map<String, LocalDeparture> departures = input.gia()
                .map(table -> new GiaTable(findings).read(table, sites, labels))
                .orElse(Map.of());
        input.settings().ifPresent(settings -> ComparisonCheck.check(settings, sites, findings));
        List<SitesData.TerracePoints> terraces = input.points()
                .map(table -> new PointsTable(findings).read(table, byName(levels)))
                .orElse(List.of());

        List<InputWarning> warnings = sorted(findings.warnings());
        if (findings.problemCount() > 0 || input.settings().isEmpty()) {
            return new Loaded<>(Optional.empty(), findings.problems(), warnings);
        }
        Study study = new Study(
                input.settings().get().settings(),
                plans(sites, levels, samples, site -> onItsCoast(site, serving.apply(site), departures)),
                cases,
                warnings,
                findings.ledger(),
                input.inputs(),
                new SitesData(areas(sites), terraces));
        return new Loaded<>(Optional.of(study), List.of(), warnings);
    }

    private Optional<StageLabels> labels(List<SeaLevelCase> cases) {
        return Optional.of(cases.stream().map(SeaLevelCase::highstands).toList())
                .filter(tables -> !tables.isEmpty())
                .map(tables -> new StageLabels(tables, library.stages()));
    }

    private static List<SeaLevelCase> onItsCoast(
            String site, List<SeaLevelCase> cases, Map<String, LocalDeparture> departures) {
        return Optional.ofNullable(departures.get(site))
                .map(departure -> cases.stream()
                        .map(sea -> sea.at(departure, site, GiaTable.NAME))
                        .toList())
                .orElse(cases);
    }

    private void checkSettings(StatedSettings stated) {
        stated.defaults().forEach(findings::add);
        warnUnused(stated, "screening", stated.states("screening"));
    }

    private void warnUnused(StatedSettings stated, String keyPath, boolean isStated) {
        if (isStated) {
            Place place = stated.places().getOrDefault(keyPath, new Place(0, 0));
            findings.add(new InputWarning(stated.file(), place.line(), place.column(), keyPath + " is not used yet"));
        }
    }

    private static Map<String, Double> areas(List<SitesTable.SiteRow> sites) {
        Map<String, Double> areas = new HashMap<>();
        sites.forEach(site -> site.areaKm2().ifPresent(km2 -> areas.put(site.name(), km2)));
        return areas;
    }

    private static Map<String, Set<String>> byName(List<LevelsTable.LevelRow> levels) {
        Map<String, Set<String>> names = new HashMap<>();
        for (LevelsTable.LevelRow level : levels) {
            names.computeIfAbsent(level.key().site(), site -> new HashSet<>())
                    .add(level.key().level());
        }
        return names;
    }

    private List<SitePlan> plans(
            List<SitesTable.SiteRow> siteRows,
            List<LevelsTable.LevelRow> levelRows,
            List<SamplesTable.SampleRow> sampleRows,
            Function<String, List<SeaLevelCase>> seaLevel) {
        Map<LevelsTable.Key, List<DatedSample>> samples = new HashMap<>();
        for (SamplesTable.SampleRow row : sampleRows) {
            samples.computeIfAbsent(row.key(), key -> new ArrayList<>())
                    .add(row.sample().orElseThrow());
        }
        Map<String, List<Level>> levels = new LinkedHashMap<>();
        for (LevelsTable.LevelRow row : levelRows) {
            levels.computeIfAbsent(row.key().site(), site -> new ArrayList<>())
                    .add(row.toLevel().orElseThrow().apply(samples.getOrDefault(row.key(), List.of())));
        }
        List<SitePlan> plans = new ArrayList<>();
        for (SitesTable.SiteRow row : siteRows) {
            Site site = row.toSite()
                    .orElseThrow()
                    .apply(
                            levels.getOrDefault(row.name(), List.of()),
                            samples.getOrDefault(new LevelsTable.Key(row.name(), ""), List.of()));
            plans.add(new SitePlan(
                    site,
                    row.prior()
                            .orElseGet(() -> input.settings()
                                    .orElseThrow()
                                    .settings()
                                    .rate()
                                    .prior()),
                    seaLevel.apply(row.name())));
        }
        return plans;
    }

    private static List<InputWarning> sorted(List<InputWarning> warnings) {
        return warnings.stream()
                .sorted(Comparator.comparing(InputWarning::file)
                        .thenComparingLong(InputWarning::line)
                        .thenComparingInt(InputWarning::column))
                .toList();
    }
}
