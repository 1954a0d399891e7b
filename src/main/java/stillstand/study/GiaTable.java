package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.function.Function;
import java.util.stream.Collectors;
import stillstand.sealevel.LocalDeparture;
import stillstand.uncertainty.Uncertain;

/**
 * The rows of {@code gia.csv}: local minus global sea level of a site or of a coast, at a highstand or at an age. What is said of a
 * site goes before what is said of its coast.
 */
final class GiaTable {
    static final String NAME = "gia.csv";

    private static final Column OFFSET = Column.withSpread("offset", "m");
    private static final Columns COLUMNS = new Columns(
            List.of(
                    Column.plain("site"),
                    Column.plain("coast"),
                    Column.plain("highstand"),
                    Column.plain("age_ka"),
                    OFFSET,
                    Column.plain("reference"),
                    Column.plain("note")),
            List.of("offset_m"));

    private final Findings findings;

    GiaTable(Findings findings) {
        this.findings = findings;
    }

    /** Where a row applies: a site, or a coast. */
    private record Place(boolean isSite, String name) {}

    /** What one place says. */
    private static final class Said {
        final Map<String, LocalDeparture.Estimate> stages = new LinkedHashMap<>();
        final Map<Double, LocalDeparture.Estimate> ages = new LinkedHashMap<>();
    }

    /**
     * The departure of each site that has one.
     *
     * @param stages for each site name, the labels a row may name; absent where sea level itself has problems
     */
    Map<String, LocalDeparture> read(
            Table table, List<SitesTable.SiteRow> sites, Function<String, Optional<StageLabels>> stages) {
        Map<String, List<SitesTable.SiteRow>> byCoast = sites.stream()
                .filter(site -> !site.reader().text("coast").isEmpty())
                .collect(Collectors.groupingBy(site -> site.reader().text("coast")));
        Map<String, SitesTable.SiteRow> byName = new HashMap<>();
        sites.forEach(site -> byName.putIfAbsent(site.name(), site));
        Map<Place, Said> said = new LinkedHashMap<>();
        for (RowReader row : RowReader.rowsOf(table, COLUMNS, findings)) {
            place(row, byName, byCoast).ifPresent(place -> {
                List<SitesTable.SiteRow> there = place.isSite()
                        ? Optional.ofNullable(byName.get(place.name())).stream().toList()
                        : byCoast.getOrDefault(place.name(), List.of());
                add(row, said.computeIfAbsent(place, each -> new Said()), there, stages);
            });
        }
        Map<String, LocalDeparture> departures = new HashMap<>();
        for (SitesTable.SiteRow site : sites) {
            Said own = said.getOrDefault(new Place(true, site.name()), new Said());
            Said coast = said.getOrDefault(new Place(false, site.reader().text("coast")), new Said());
            Map<String, LocalDeparture.Estimate> atStages = new HashMap<>(coast.stages);
            atStages.putAll(own.stages);
            Map<Double, LocalDeparture.Estimate> atAges = own.ages.isEmpty() ? coast.ages : own.ages;
            if (!atStages.isEmpty() || !atAges.isEmpty()) {
                List<LocalDeparture.AtAge> ages = new ArrayList<>();
                atAges.forEach((ageKa, estimate) -> ages.add(new LocalDeparture.AtAge(ageKa, estimate)));
                departures.put(site.name(), new LocalDeparture(atStages, ages));
            }
        }
        return departures;
    }

    private static Optional<Place> place(
            RowReader row, Map<String, SitesTable.SiteRow> byName, Map<String, List<SitesTable.SiteRow>> byCoast) {
        String site = row.text("site");
        String coast = row.text("coast");
        if (site.isEmpty() == coast.isEmpty()) {
            row.problem(
                    site.isEmpty() && !row.hasColumn("site") ? "coast" : "site",
                    site.isEmpty() ? "neither site nor coast" : "both a site and a coast",
                    "the site, or the coast, that the row is about");
            return Optional.empty();
        }
        Set<String> known = site.isEmpty() ? byCoast.keySet() : byName.keySet();
        String name = site.isEmpty() ? coast : site;
        if (!known.contains(name)) {
            row.problem(
                    site.isEmpty() ? "coast" : "site",
                    quote(name),
                    (site.isEmpty() ? "a coast of " : "a site of ") + SitesTable.NAME + RowReader.nearest(name, known));
            return Optional.empty();
        }
        return Optional.of(new Place(coast.isEmpty(), name));
    }

    private static void add(
            RowReader row, Said said, List<SitesTable.SiteRow> there, Function<String, Optional<StageLabels>> stages) {
        there.stream()
                .filter(site -> !site.reader().text("local_curve").isEmpty())
                .findFirst()
                .ifPresent(site -> row.problem(
                        row.text("site").isEmpty() ? "coast" : "site",
                        quote(site.name()) + ", which has a local_curve in " + SitesTable.NAME,
                        "one or the other: a local curve holds its own local sea level"));
        String where = there.get(0).name();
        Optional<LocalDeparture.Estimate> estimate = row.measured(OFFSET, where).map(GiaTable::estimate);
        if (estimate.isEmpty() && row.text(OFFSET.header()).isEmpty()) {
            row.problem(OFFSET.header(), "nothing", "local minus global sea level, m");
        }
        String stage = row.text("highstand");
        Optional<Double> age = row.length("age_ka");
        if (stage.isEmpty() == row.text("age_ka").isEmpty()) {
            row.problem(
                    stage.isEmpty() && !row.hasColumn("highstand") ? "age_ka" : "highstand",
                    stage.isEmpty() ? "neither highstand nor age_ka" : "both a highstand and an age",
                    "the highstand, or the age, of the offset");
        } else if (stage.isEmpty()) {
            if (age.isPresent() && estimate.isPresent() && said.ages.putIfAbsent(age.get(), estimate.get()) != null) {
                row.problem("age_ka", quote(row.text("age_ka")) + " a second time", "each age of a place once");
            }
        } else {
            stages.apply(where).ifPresent(labels -> {
                Optional<String> label = labels.labelOf(stage);
                if (label.isEmpty()) {
                    row.problem("highstand", quote(stage), labels.expected(stage));
                } else if (estimate.isPresent() && said.stages.putIfAbsent(label.get(), estimate.get()) != null) {
                    row.problem("highstand", quote(stage) + " a second time", "each highstand of a place once");
                }
            });
        }
    }

    private static LocalDeparture.Estimate estimate(Uncertain offsetMetres) {
        return new LocalDeparture.Estimate(offsetMetres.mean(), offsetMetres.standardDeviation());
    }
}
