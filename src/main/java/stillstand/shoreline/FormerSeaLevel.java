package stillstand.shoreline;

import java.util.ArrayList;
import java.util.List;
import stillstand.shoreline.HeightTerm.Source;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

/**
 * Height of the sea that made a level or bathed a coral, in metres above present mean sea level, up positive.
 *
 * <p>Landform: {@code z = elevation - datum offset - cover - reference water level + lowering x age}, within the
 * indicative range, and up to one earthquake's uplift more. Coral in place:
 * {@code z = elevation - datum offset + depth of growth}. (Definitions of reference water level and indicative range:
 * Rovere et al. 2016, Earth-Science Reviews 159, 404-427.) The lowering term grows with age and is left to whoever draws
 * the age.
 */
public final class FormerSeaLevel {
    private FormerSeaLevel() {}

    /**
     * The terms of a landform's height, without its lowering.
     *
     * @param site gives the datum offset
     * @param level the landform
     * @param rule what its indicative range means
     */
    public static List<HeightTerm> ofLandform(Site site, Level level, IndicativeRule rule) {
        IndicativeMeaning meaning = level.meaning();
        List<HeightTerm> terms = new ArrayList<>();
        terms.add(new HeightTerm(Source.SURVEY, 1, level.elevationMetres()));
        terms.add(new HeightTerm(Source.DATUM, -1, site.datumOffsetMetres()));
        terms.add(new HeightTerm(Source.COVER, -1, level.coverMetres()));
        terms.add(new HeightTerm(Source.REFERENCE_WATER_LEVEL, -1, meaning.referenceWaterLevelMetres()));
        terms.add(new HeightTerm(Source.INDICATIVE_RANGE, 1, rule.errorMetres(meaning.rangeMetres())));
        if (level.coseismicStepMetres() > 0) {
            terms.add(new HeightTerm(Source.COSEISMIC_STEP, 1, new Uniform(0, level.coseismicStepMetres())));
        }
        return List.copyOf(terms);
    }

    /**
     * The terms of the height of the sea over a coral in place.
     *
     * @param site gives the datum offset
     * @param elevationMetres of the coral itself
     * @param depthMetres at which it grew, down positive
     */
    public static List<HeightTerm> ofCoral(Site site, Uncertain elevationMetres, Uncertain depthMetres) {
        return List.of(
                new HeightTerm(Source.SURVEY, 1, elevationMetres),
                new HeightTerm(Source.DATUM, -1, site.datumOffsetMetres()),
                new HeightTerm(Source.PALAEODEPTH, 1, depthMetres));
    }
}
