package stillstand.uplift;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormsAt;
import stillstand.shoreline.IndicativeMeaning;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.shoreline.StageChoice;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;

/** Levels of which only the dates matter. */
final class DatedLevels {
    private DatedLevels() {}

    /** A date of its level, by something in place whose height says nothing. */
    static DatedSample date(String name, Uncertain ageKa) {
        return sample(name, Optional.empty(), Optional.empty(), ageKa);
    }

    /** A coral in place. */
    static DatedSample coral(String name, Uncertain elevationMetres, Uncertain depthMetres, Uncertain ageKa) {
        return sample(name, Optional.of(elevationMetres), Optional.of(depthMetres), ageKa);
    }

    private static DatedSample sample(
            String name, Optional<Uncertain> elevationMetres, Optional<Uncertain> depthMetres, Uncertain ageKa) {
        return new DatedSample(
                name,
                Optional.empty(),
                Optional.empty(),
                elevationMetres,
                Optional.of(ageKa),
                DatedSample.GrowthPosition.YES,
                DatedSample.Role.LEVEL,
                true,
                "",
                depthMetres,
                "",
                "",
                "",
                Map.of());
    }

    /** A site with one level. */
    static Site site(Level level) {
        return new Site(
                "site",
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                new Exact(0),
                Optional.empty(),
                Optional.empty(),
                List.of(level),
                List.of(),
                "",
                Map.of());
    }

    /** A level that formed at a highstand of which nothing is said but its dates. */
    static Level terrace(List<DatedSample> dates) {
        return level(FormsAt.HIGHSTAND, new Normal(30, 1), dates);
    }

    static Level level(FormsAt formsAt, Uncertain elevationMetres, List<DatedSample> dates) {
        return new Level(
                "level",
                elevationMetres,
                new IndicativeMeaning("", new Exact(0), 0),
                formsAt,
                new Exact(0),
                new Exact(0),
                StageChoice.ANY,
                Optional.empty(),
                false,
                Optional.empty(),
                0,
                dates,
                "",
                Map.of());
    }
}
