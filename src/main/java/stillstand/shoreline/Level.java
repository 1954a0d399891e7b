package stillstand.shoreline;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.uncertainty.Uncertain;

/**
 * One terrace or reef level of a site.
 *
 * @param name unique in its site
 * @param elevationMetres surveyed height in the site's own datum, up positive
 * @param meaning how the landform's height stands to the sea level that made it
 * @param formsAt when it formed
 * @param coverMetres thickness of sediment over the landform, 0 or more
 * @param loweringMetresPerKyr rate at which its surface has been lowered, 0 or more
 * @param highstand what the user says of its highstand
 * @param terrace name of a shoreline traced between sites
 * @param doubtful whether it may well be no shoreline at all
 * @param order place in the flight, 1 = lowest; absent = by height
 * @param coseismicStepMetres uplift of one earthquake, by up to which the level may stand short; 0 or more
 * @param samples its dated samples
 * @param note the user's own words
 * @param own the user's own columns ({@code x_…}), carried through
 */
public record Level(
        String name,
        Uncertain elevationMetres,
        IndicativeMeaning meaning,
        FormsAt formsAt,
        Uncertain coverMetres,
        Uncertain loweringMetresPerKyr,
        StageChoice highstand,
        Optional<String> terrace,
        boolean doubtful,
        Optional<Integer> order,
        double coseismicStepMetres,
        List<DatedSample> samples,
        String note,
        Map<String, String> own) {
    public Level {
        samples = List.copyOf(samples);
        own = Map.copyOf(own);
        if (name.isBlank()) {
            throw new IllegalArgumentException("name of a level must not be blank");
        }
        if (!(coseismicStepMetres >= 0 && coseismicStepMetres < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("coseismicStepMetres must be 0 or more but is " + coseismicStepMetres);
        }
    }

    /** The same level under another choice of its highstand. */
    public Level withHighstand(StageChoice other) {
        return new Level(
                name,
                elevationMetres,
                meaning,
                formsAt,
                coverMetres,
                loweringMetresPerKyr,
                other,
                terrace,
                doubtful,
                order,
                coseismicStepMetres,
                samples,
                note,
                own);
    }

    /** The same level with other samples. */
    public Level withSamples(List<DatedSample> others) {
        return new Level(
                name,
                elevationMetres,
                meaning,
                formsAt,
                coverMetres,
                loweringMetresPerKyr,
                highstand,
                terrace,
                doubtful,
                order,
                coseismicStepMetres,
                others,
                note,
                own);
    }
}
