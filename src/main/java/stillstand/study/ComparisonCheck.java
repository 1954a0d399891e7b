package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import stillstand.comparison.ComparisonRules.Pair;
import stillstand.ledger.InputWarning;
import stillstand.study.StatedSettings.Place;

/** Checks of what compares sites: pairs asked for, groups, places and distances. */
final class ComparisonCheck {
    private static final String COAST = "coast";
    private static final String DISTANCE = "distance_along_coast_km";
    private static final String LATITUDE = "latitude";

    private ComparisonCheck() {}

    static void check(StatedSettings settings, List<SitesTable.SiteRow> sites, Findings findings) {
        pairs(settings, sites.stream().map(SitesTable.SiteRow::name).toList(), findings);
        places(sites);
        if (sites.size() == 1 && settings.states("comparison")) {
            Place place = settings.places().getOrDefault("comparison", new Place(0, 0));
            findings.add(new InputWarning(
                    settings.file(),
                    place.line(),
                    place.column(),
                    "comparison: the study has one site, and nothing to compare it with"));
        }
        if (sites.size() > 1) {
            groups(sites);
        }
    }

    private static void pairs(StatedSettings settings, List<String> names, Findings findings) {
        List<Pair> pairs = settings.settings().comparison().pairs();
        for (int i = 0; i < pairs.size(); i++) {
            String path = "comparison.pairs[" + i + "]";
            Pair pair = pairs.get(i);
            int before = findings.problemCount();
            known(settings, path + "[0]", pair.a(), names, findings);
            known(settings, path + "[1]", pair.b(), names, findings);
            if (before == findings.problemCount() && pair.a().equals(pair.b())) {
                findings.add(settings.problem(path + "[1]", quote(pair.b()) + " beside itself", "another site"));
            }
        }
    }

    private static void known(
            StatedSettings settings, String path, String name, List<String> names, Findings findings) {
        if (!names.contains(name)) {
            findings.add(settings.problem(path, quote(name), "the name of a site" + RowReader.nearest(name, names)));
        }
    }

    /** A study without any place has been told so as a whole. */
    private static void places(List<SitesTable.SiteRow> sites) {
        boolean any =
                sites.stream().anyMatch(site -> !site.reader().text(LATITUDE).isEmpty());
        for (SitesTable.SiteRow site : sites) {
            if (any && site.reader().text(LATITUDE).isEmpty()) {
                site.reader()
                        .warn(
                                LATITUDE,
                                quote(site.name()) + " has no latitude and longitude: it is left off the map and out of"
                                        + " planar tilts");
            }
        }
    }

    private static void groups(List<SitesTable.SiteRow> sites) {
        Map<String, List<SitesTable.SiteRow>> byCoast = new LinkedHashMap<>();
        for (SitesTable.SiteRow site : sites) {
            String coast = site.reader().text(COAST);
            if (!coast.isEmpty()) {
                byCoast.computeIfAbsent(coast, name -> new ArrayList<>()).add(site);
            }
        }
        byCoast.forEach((coast, ofCoast) -> {
            if (ofCoast.size() == 1) {
                ofCoast.get(0)
                        .reader()
                        .warn(
                                COAST,
                                "coast " + quote(coast) + " has one site: it is compared only where study.json asks for"
                                        + " the pair");
            }
            distances(coast, ofCoast);
        });
    }

    private static void distances(String coast, List<SitesTable.SiteRow> sites) {
        long filled = sites.stream()
                .filter(site -> !site.reader().text(DISTANCE).isEmpty())
                .count();
        if (filled == 0) {
            return;
        }
        for (SitesTable.SiteRow site : sites) {
            if (site.reader().text(DISTANCE).isEmpty()) {
                site.reader()
                        .warn(
                                DISTANCE,
                                quote(site.name()) + " has no distance along the coast, though " + filled + " of "
                                        + sites.size() + " sites of coast " + quote(coast)
                                        + (filled == 1 ? " has" : " have")
                                        + " one: it is left out of the tilt");
            }
        }
    }
}
