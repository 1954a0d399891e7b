package stillstand.shoreline;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Uncertain;

/**
 * A transect or an island: levels that have risen or sunk together.
 *
 * @param name unique in a study
 * @param position where it lies
 * @param coast the coast or island group whose sites share local sea level
 * @param distanceAlongCoastKm along the coast, from any origin
 * @param datumOffsetMetres height of local mean sea level in the datum of the elevations, up positive
 * @param surveyedMetres heights above mean sea level, in which a terrace would have been seen
 * @param localCurve id of the curve that replaces the study's here
 * @param levels in the order of the table
 * @param samples dated samples tied to the site but to no level
 * @param note the user's own words
 * @param own the user's own columns ({@code x_…}), carried through
 */
public record Site(
        String name,
        Optional<Position> position,
        Optional<String> coast,
        Optional<Double> distanceAlongCoastKm,
        Uncertain datumOffsetMetres,
        Optional<Interval> surveyedMetres,
        Optional<String> localCurve,
        List<Level> levels,
        List<DatedSample> samples,
        String note,
        Map<String, String> own) {
    public Site {
        levels = List.copyOf(levels);
        samples = List.copyOf(samples);
        own = Map.copyOf(own);
        if (name.isBlank()) {
            throw new IllegalArgumentException("name of a site must not be blank");
        }
    }

    /** The same site with other levels. */
    public Site withLevels(List<Level> others) {
        return new Site(
                name,
                position,
                coast,
                distanceAlongCoastKm,
                datumOffsetMetres,
                surveyedMetres,
                localCurve,
                others,
                samples,
                note,
                own);
    }
}
