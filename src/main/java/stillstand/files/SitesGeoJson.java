package stillstand.files;

import java.util.List;
import stillstand.comparison.SiteMotion;
import stillstand.study.StudyResult;
import tools.jackson.databind.json.JsonMapper;
import tools.jackson.databind.node.ArrayNode;
import tools.jackson.databind.node.ObjectNode;

/** {@code sites.geojson}: a point for each site that has a place and a rate (RFC 7946). */
final class SitesGeoJson {
    private static final JsonMapper MAPPER = JsonMapper.builder().build();

    private SitesGeoJson() {}

    static boolean has(StudyResult result) {
        return result.siteMotion().stream().anyMatch(SitesGeoJson::isPlaced);
    }

    private static boolean isPlaced(SiteMotion site) {
        return site.latitude().isPresent() && site.longitude().isPresent();
    }

    static String text(StudyResult result) {
        ObjectNode root = MAPPER.createObjectNode();
        root.put("type", "FeatureCollection");
        ArrayNode features = root.putArray("features");
        List<SiteMotion> sites =
                result.siteMotion().stream().filter(SitesGeoJson::isPlaced).toList();
        for (SiteMotion site : sites) {
            ObjectNode feature = features.addObject();
            feature.put("type", "Feature");
            ObjectNode geometry = feature.putObject("geometry");
            geometry.put("type", "Point");
            double longitude = site.longitude().orElseThrow();
            geometry.putArray("coordinates")
                    .add(longitude > 180 ? longitude - 360 : longitude)
                    .add(site.latitude().orElseThrow());
            properties(feature.putObject("properties"), site);
        }
        return JsonLayout.text(root);
    }

    private static void properties(ObjectNode properties, SiteMotion site) {
        properties.put("site", site.site());
        site.coast().ifPresent(coast -> properties.put("coast", coast));
        site.level().ifPresent(level -> properties.put("level", level));
        site.distanceAlongCoastKm().ifPresent(km -> properties.put("distance_along_coast_km", km));
        site.areaKm2().ifPresent(km2 -> properties.put("area_km2", km2));
        properties.put("rate_median_m_per_kyr", site.rate().median());
        site.rate().sd().ifPresent(sd -> properties.put("rate_sd_m_per_kyr", sd));
        properties.put("rate_low95_m_per_kyr", site.rate().interval95().low());
        properties.put("rate_high95_m_per_kyr", site.rate().interval95().high());
        properties.put("probability_up", site.up());
        properties.put("probability_stable", site.stable());
        properties.put("probability_down", site.down());
        properties.put("motion", site.motion());
    }
}
