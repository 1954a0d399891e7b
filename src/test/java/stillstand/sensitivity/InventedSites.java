package stillstand.sensitivity;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.files.ShippedLibrary;
import stillstand.sealevel.HighstandOptions;
import stillstand.sealevel.HighstandOverrides;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.FormsAt;
import stillstand.shoreline.IndicativeMeaning;
import stillstand.shoreline.IndicativeRule;
import stillstand.shoreline.Level;
import stillstand.shoreline.Site;
import stillstand.shoreline.StageChoice;
import stillstand.study.Library;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Normal;
import stillstand.uplift.CauchyPrior;
import stillstand.uplift.DateRules;
import stillstand.uplift.MatchingRules;
import stillstand.uplift.SeaLevelBasis;

/** Invented sites under a shipped curve. */
final class InventedSites {
    static final SeaLevelCurve CURVE =
            ShippedLibrary.load().curve("spratt-lisiecki-2016").orElseThrow();
    private static final Library LIBRARY = ShippedLibrary.load();

    private InventedSites() {}

    /** A flight at about 0.4 m/kyr; the level that may be 5e is dated once. */
    static Supposition flight(double... heightsMetres) {
        List<Level> levels = new ArrayList<>();
        for (int i = 0; i < heightsMetres.length; i++) {
            boolean dated = Math.abs(heightsMetres[i] - 56) < 6;
            levels.add(level(
                    "T" + (i + 1), heightsMetres[i], dated ? List.of(date("D" + (i + 1), 125, 4)) : List.of()));
        }
        return new Supposition(
                site(levels),
                new SeaLevelBasis(CURVE.id(), Optional.of(CURVE), picks()),
                CauchyPrior.DEFAULT,
                MatchingRules.DEFAULT,
                IndicativeRule.QUADRATURE,
                DateRules.DEFAULT);
    }

    /** The curve's own highstands. */
    static HighstandTable picks() {
        return HighstandTable.fromCurve(
                CURVE, LIBRARY.stages(), HighstandOverrides.NONE, new HighstandOptions(true, true));
    }

    static Site site(List<Level> levels) {
        return new Site(
                "Site",
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                new Normal(0, 0.2),
                Optional.of(new Interval(2, 260)),
                Optional.empty(),
                levels,
                List.of(),
                "",
                Map.of());
    }

    static Level level(String name, double heightMetres, List<DatedSample> samples) {
        return new Level(
                name,
                new Normal(heightMetres, 1.5),
                new IndicativeMeaning("", new Exact(0), 3),
                FormsAt.HIGHSTAND,
                new Exact(0),
                new Exact(0),
                StageChoice.ANY,
                Optional.empty(),
                false,
                Optional.empty(),
                0,
                samples,
                "",
                Map.of());
    }

    static DatedSample date(String name, double ageKa, double sigmaKa) {
        return new DatedSample(
                name,
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                Optional.of(new Normal(ageKa, sigmaKa)),
                DatedSample.GrowthPosition.YES,
                DatedSample.Role.LEVEL,
                true,
                "",
                Optional.empty(),
                "",
                "",
                "",
                Map.of());
    }
}
