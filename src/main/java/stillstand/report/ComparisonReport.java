package stillstand.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import stillstand.comparison.Estimate;
import stillstand.comparison.PlanarTilt;
import stillstand.comparison.SiteComparison;
import stillstand.comparison.SiteGroup;
import stillstand.comparison.SiteMotion;
import stillstand.comparison.TerraceTilt;
import stillstand.comparison.Tilt;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Digits;
import stillstand.uplift.Quantity;

/** What the sites of a study read like together. */
public final class ComparisonReport {
    private static final int PAIRS_SHOWN = 12;
    private static final int SITES_SHOWN = 20;
    private static final int GROUPS_SHOWN = 8;
    private static final double ROUGH = 0.05;
    private static final double STRAIGHT = 0.05;

    private final StudyResult result;

    /** What a result says of its sites. */
    public ComparisonReport(StudyResult result) {
        this.result = result;
    }

    /** Lines, the first a heading; none where a study has one site and no points of terraces. */
    public List<String> lines() {
        List<String> lines = new ArrayList<>();
        if (result.siteMotion().size() > 1) {
            lines.add("Sites together");
            motions(lines);
            pairs(lines);
            groups(lines);
        }
        for (TerraceTilt tilt : result.terraceTilts()) {
            if (lines.isEmpty()) {
                lines.add("Terraces by their points");
            }
            lines.add("  " + terrace(tilt));
        }
        return lines;
    }

    private void motions(List<String> lines) {
        List<SiteMotion> sites = result.siteMotion();
        for (SiteMotion site : sites.stream().limit(SITES_SHOWN).toList()) {
            lines.add("  " + site.site() + ": " + site.motion() + " (" + percent(probability(site)) + "), "
                    + Wording.quantity(site.rate()) + " m/kyr"
                    + site.level().map(level -> ", by level " + level).orElse("") + ".");
        }
        more(lines, sites.size() - SITES_SHOWN, "sites", "results.json");
    }

    private static double probability(SiteMotion site) {
        return switch (site.motion()) {
            case SiteMotion.UP -> site.up();
            case SiteMotion.DOWN -> site.down();
            default -> site.stable();
        };
    }

    private void pairs(List<String> lines) {
        List<SiteComparison> pairs = result.comparison();
        for (SiteComparison pair : pairs.stream().limit(PAIRS_SHOWN).toList()) {
            lines.add("  " + pair.a() + " less " + pair.b() + ": " + Wording.rate(pair.difference()) + " m/kyr, 95 % "
                    + Wording.interval95(pair.difference()) + "; " + pair.a() + " is faster with probability "
                    + percent(pair.probabilityAFaster()) + " (were their errors not shared, 95 % "
                    + interval(pair.independent().difference()) + " and "
                    + percent(pair.independent().probabilityAFaster()) + ")." + rough(pair.effectiveFraction()));
        }
        more(lines, pairs.size() - PAIRS_SHOWN, "pairs", "comparison.csv");
    }

    /** A warning where the sites fit each other's sea level badly; else blank. */
    public static String rough(Optional<Double> fraction) {
        return fraction.filter(part -> part < ROUGH)
                .map(part -> " Rough: the two fit each other's sea level badly (" + percent(part)
                        + " of the draws are effective).")
                .orElse("");
    }

    private void groups(List<String> lines) {
        List<SiteGroup> groups = result.siteGroups();
        for (SiteGroup group : groups.stream().limit(GROUPS_SHOWN).toList()) {
            group.pooled()
                    .ifPresent(pooled -> lines.add("  " + group.group() + ", "
                            + Wording.counted(group.sites().size(), "site") + " pooled: their mean is "
                            + Wording.quantity(pooled.mean()) + " m/kyr, and they differ by "
                            + Wording.quantity(pooled.spread()) + "."));
            group.areaMean()
                    .ifPresent(mean -> lines.add(
                            "  " + group.group() + ", mean over areas: " + Wording.quantity(mean) + " m/kyr."));
            group.tilt().ifPresent(tilt -> lines.add("  " + group.group() + ", tilt along the coast: " + along(tilt)));
            group.plane().ifPresent(plane -> lines.add("  " + group.group() + ", tilt over the map: " + plane(plane)));
        }
        more(lines, groups.size() - GROUPS_SHOWN, "groups", "results.json");
    }

    private static String along(Tilt tilt) {
        return estimate(tilt.sharedErrors().slope()) + " ("
                + plusMinus(tilt.independent().slope()) + " were the errors not shared)."
                + straight(tilt.sharedErrors().p(), "line");
    }

    private static String plane(PlanarTilt tilt) {
        PlanarTilt.Plane plane = tilt.sharedErrors();
        return steepest(plane) + " ("
                + plusMinus(tilt.independent().steepest()) + " were the errors not shared)."
                + straight(plane.p(), "plane");
    }

    /** {@code 0.012 ± 0.004 m/kyr per km toward 045 degrees}. */
    public static String steepest(PlanarTilt.Plane plane) {
        return estimate(plane.steepest()) + " toward "
                + String.format(Locale.ROOT, "%03.0f", plane.steepestToDegrees() % 360) + " degrees";
    }

    private static String terrace(TerraceTilt tilt) {
        String slope = tilt.along()
                .map(ComparisonReport::along)
                .or(() -> tilt.plane().map(ComparisonReport::plane))
                .orElse("");
        return tilt.site() + " / " + tilt.level() + ", tilt by " + tilt.points() + " points: " + slope
                + tilt.rate()
                        .map(rate -> " Over its age: " + estimate(rate) + ".")
                        .orElse("");
    }

    /** A warning where no line or plane fits; else blank. */
    public static String straight(Optional<Double> p, String shape) {
        return p.filter(chance -> chance < STRAIGHT)
                .map(chance -> " No " + shape + " fits well: so much scatter comes by chance with probability "
                        + Digits.text(chance, chance, 1) + ".")
                .orElse("");
    }

    /** {@code 0.012 ± 0.004 m/kyr per km}. */
    public static String estimate(Estimate estimate) {
        return Wording.number(Digits.text(estimate.value(), estimate.sd(), 2)) + " " + plusMinus(estimate) + " "
                + estimate.unit();
    }

    private static String plusMinus(Estimate estimate) {
        return "± " + Digits.text(estimate.sd(), estimate.sd(), 2);
    }

    /** {@code 0.40 to 0.47}: equal tails, 0.95. */
    public static String interval(Quantity quantity) {
        double sigma = quantity.sd().orElse(quantity.interval68().width() / 2);
        return Wording.number(Digits.text(quantity.interval95().low(), sigma, 1)) + " to "
                + Wording.number(Digits.text(quantity.interval95().high(), sigma, 1));
    }

    /** A probability, never 0 or 100 %: draws are too few to say so. */
    public static String percent(double probability) {
        if (probability < 0.005) {
            return "<1 %";
        }
        return probability >= 0.995 ? ">99 %" : Math.round(100 * probability) + " %";
    }

    private static void more(List<String> lines, int count, String things, String where) {
        if (count > 0) {
            lines.add("  and " + count + " more " + things + " in " + where);
        }
    }
}
