package stillstand.figure;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Set;
import stillstand.sensitivity.LevelTornado;
import stillstand.study.StudyResult;
import stillstand.uplift.FlightResult;

/**
 * All figures of a result.
 *
 * @param figures what there is to draw: those of the study, then site by site
 * @param absences what there is not, and why
 */
public record Figures(List<Figure> figures, List<Absence> absences) {
    private static final int LONGEST_NAME = 50;

    public Figures {
        figures = List.copyOf(figures);
        absences = List.copyOf(absences);
    }

    /**
     * A figure that a site does not have.
     *
     * @param kind what it would show
     * @param site whose; absent where it would be the study's
     * @param reason a sentence without its full stop
     */
    public record Absence(FigureKind kind, Optional<String> site, String reason) {}

    /** Every figure that a result has something for; none of them is drawn yet. */
    public static Figures of(StudyResult result) {
        Gathering gathering = new Gathering();
        gathering.study(result);
        SiteView.all(result).forEach(site -> gathering.site(result, site));
        return new Figures(gathering.figures, gathering.absences);
    }

    private static final class Gathering {
        private static final List<FigureKind> OF_A_FLIGHT =
                List.of(FigureKind.PAIRINGS, FigureKind.FATES, FigureKind.RESIDUALS, FigureKind.HISTORY);

        private final List<Figure> figures = new ArrayList<>();
        private final List<Absence> absences = new ArrayList<>();
        private final Set<String> taken = new HashSet<>();

        private void study(StudyResult result) {
            if (CurvesFigure.has(result.seaLevel())) {
                add(FigureKind.CURVES, (name, width) -> CurvesFigure.page(name, result.seaLevel(), width));
            } else {
                absences.add(new Absence(FigureKind.CURVES, Optional.empty(), "the study has no sea level"));
            }
            if (ForestFigure.has(result)) {
                add(FigureKind.FOREST, (name, width) -> ForestFigure.page(name, result, width));
            } else {
                absences.add(new Absence(FigureKind.FOREST, Optional.empty(), "no level has a rate"));
            }
            if (result.siteMotion().size() > 1) {
                sites(result);
            }
        }

        /** What only a study of several sites has. */
        private void sites(StudyResult result) {
            if (MapFigure.has(result)) {
                add(FigureKind.MAP, (name, width) -> MapFigure.page(name, result, width));
            } else {
                lacking(FigureKind.MAP, "fewer than two sites have a latitude and longitude");
            }
            List<String> coasts = CoastFigure.coasts(result);
            for (String coast : coasts) {
                String name = unique(FigureKind.COAST.id() + "-" + stem(coast));
                figures.add(new Figure(
                        FigureKind.COAST,
                        Optional.empty(),
                        name,
                        width -> CoastFigure.page(name, result, coast, width)));
            }
            if (coasts.isEmpty()) {
                lacking(FigureKind.COAST, "no coast has two sites with distances along it");
            }
            if (DifferencesFigure.has(result)) {
                add(FigureKind.DIFFERENCES, (name, width) -> DifferencesFigure.page(name, result, width));
            } else {
                lacking(FigureKind.DIFFERENCES, "no two sites are compared");
            }
        }

        private void lacking(FigureKind kind, String reason) {
            absences.add(new Absence(kind, Optional.empty(), reason));
        }

        private void site(StudyResult result, SiteView site) {
            site(
                    FigureKind.STAIR,
                    site,
                    StairFigure.has(site),
                    "no level has a height in the results",
                    (name, width) ->
                            StairFigure.page(name, site, result.seaLevel().curves(), width));
            site(
                    FigureKind.RATES,
                    site,
                    RatesFigure.has(site),
                    "no level has a rate",
                    (name, width) -> RatesFigure.page(name, site, width));
            site(
                    FigureKind.BUDGET,
                    site,
                    SharesFigure.hasBudget(site),
                    "no rate has a budget of its spread",
                    (name, width) -> SharesFigure.budget(name, site, width));
            List<LevelTornado> tornados = result.leverage().tornado().stream()
                    .filter(tornado -> tornado.site().equals(site.site()))
                    .toList();
            site(
                    FigureKind.TORNADO,
                    site,
                    TornadoFigure.has(tornados),
                    "no level has a rate with an uncertain input",
                    (name, width) -> TornadoFigure.page(name, site, tornados, width));
            flight(site);
        }

        private void flight(SiteView site) {
            if (site.flight().isEmpty()) {
                for (FigureKind kind : OF_A_FLIGHT) {
                    absences.add(new Absence(kind, Optional.of(site.site()), "no flight was matched there"));
                }
                return;
            }
            FlightResult flight = site.flight().get();
            site(
                    FigureKind.PAIRINGS,
                    site,
                    !flight.unmatched().isEmpty(),
                    "no level takes part in the flight",
                    (name, width) -> PairingsFigure.page(name, site, flight, width));
            site(
                    FigureKind.FATES,
                    site,
                    !flight.missing().isEmpty(),
                    "the flight says nothing of any highstand",
                    (name, width) -> SharesFigure.fates(name, site, flight, width));
            site(
                    FigureKind.RESIDUALS,
                    site,
                    !site.residuals().isEmpty(),
                    "no level is matched to a highstand",
                    (name, width) -> ResidualsFigure.page(name, site, width));
            site(
                    FigureKind.HISTORY,
                    site,
                    flight.segments().size() > 1,
                    "the rate does not change in its model",
                    (name, width) -> HistoryFigure.page(name, site, flight, width));
        }

        private void site(FigureKind kind, SiteView site, boolean there, String whyNot, Drawing drawing) {
            if (there) {
                String name = unique(kind.id() + "-" + stem(site.site()));
                figures.add(new Figure(kind, Optional.of(site.site()), name, width -> drawing.page(name, width)));
            } else {
                absences.add(new Absence(kind, Optional.of(site.site()), whyNot));
            }
        }

        private void add(FigureKind kind, Drawing drawing) {
            String name = unique(kind.id());
            figures.add(new Figure(kind, Optional.empty(), name, width -> drawing.page(name, width)));
        }

        /** Two sites whose names differ in signs alone must not share a file. */
        private String unique(String wanted) {
            String name = wanted;
            for (int i = 2; !taken.add(name); i++) {
                name = wanted + "-" + i;
            }
            return name;
        }
    }

    /** Draws a figure under its name. */
    @FunctionalInterface
    private interface Drawing {
        Page page(String name, double widthPoints);
    }

    /** Letters and figures of any script in lower case, all else hyphens: a name every file system takes. */
    static String stem(String site) {
        String stem = site.toLowerCase(Locale.ROOT)
                .replaceAll("[^\\p{L}\\p{M}\\p{N}]+", "-")
                .replaceAll("^-|-$", "");
        int length = stem.codePointCount(0, stem.length());
        String cut = length <= LONGEST_NAME ? stem : stem.substring(0, stem.offsetByCodePoints(0, LONGEST_NAME));
        return cut.isEmpty() ? "site" : cut;
    }
}
