package stillstand.study;

import java.util.List;
import java.util.Map;
import stillstand.comparison.TerraceTilt;

/**
 * What a study holds for comparing sites alone.
 *
 * @param areasKm2 by site, where an area is stated
 * @param terraces points measured on terraces, in the order of their table
 */
public record SitesData(Map<String, Double> areasKm2, List<TerracePoints> terraces) {
    /** Nothing. */
    public static final SitesData NONE = new SitesData(Map.of(), List.of());

    public SitesData {
        areasKm2 = Map.copyOf(areasKm2);
        terraces = List.copyOf(terraces);
    }

    /** The points of one level. */
    public record TerracePoints(String site, String level, List<TerraceTilt.Point> points) {
        public TerracePoints {
            points = List.copyOf(points);
        }
    }
}
