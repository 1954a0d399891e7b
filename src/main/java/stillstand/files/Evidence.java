package stillstand.files;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.study.SitePlan;
import stillstand.study.Study;

/** What the study says of the sites, levels and samples of a result, by name. */
record Evidence(List<Site> sites) {
    static Evidence of(Study study) {
        return new Evidence(study.sites().stream().map(SitePlan::site).toList());
    }

    Optional<Level> level(String site, String level) {
        return site(site)
                .flatMap(place -> place.levels().stream()
                        .filter(known -> known.name().equals(level))
                        .findFirst());
    }

    Optional<DatedSample> sample(String site, String level, String sample) {
        return level(site, level)
                .flatMap(known -> known.samples().stream()
                        .filter(dated -> dated.name().equals(sample))
                        .findFirst());
    }

    Map<String, String> ownOfSite(String site) {
        return site(site).map(Site::own).orElse(Map.of());
    }

    private Optional<Site> site(String name) {
        return sites.stream().filter(site -> site.name().equals(name)).findFirst();
    }
}
