package stillstand.figure;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import stillstand.SampleFlight;
import stillstand.SampleLeverage;
import stillstand.SampleStudy;
import stillstand.sensitivity.LevelTornado;
import stillstand.sensitivity.Leverage;
import stillstand.study.StudyResult;
import stillstand.study.StudyResult.CurvePoint;
import stillstand.study.StudyResult.CurveUsed;
import stillstand.study.StudyResult.HighstandUsed;
import stillstand.study.StudyResult.SeaLevelUsed;
import stillstand.uncertainty.DensityBins;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightResult.Fate;
import stillstand.uplift.FlightResult.Pairing;
import stillstand.uplift.FlightResult.Segment;
import stillstand.uplift.FlightResult.Unmatched;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelAnswer.Budget;
import stillstand.uplift.LevelAnswer.Share;
import stillstand.uplift.LevelAnswer.StageProbability;
import stillstand.uplift.LevelResidual;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;

/** Results of invented coasts, for figures: what each level records follows from a rate and an invented sea. */
final class InventedCoasts {
    private static final List<HighstandUsed> STANDS = List.of(
            stand("1", 5.5, 0.8),
            stand("3c", 52, -64),
            stand("5a", 81, -9),
            stand("5c", 99, -11),
            stand("5e", 123, 7),
            stand("6d", 171, -58),
            stand("7a", 199, -2),
            stand("7c", 214, -9),
            stand("7e", 238, -14),
            stand("9a", 285, -37),
            stand("9c", 304, -33),
            stand("9e", 329, -3),
            stand("11a", 388, -22),
            stand("11c", 406, 9),
            stand("13a", 493, -13),
            stand("13c", 518, -46),
            stand("15a", 573, -9),
            stand("15c", 597, -26),
            stand("15e", 615, -12),
            stand("17c", 688, -12),
            stand("19c", 775, -8));

    private InventedCoasts() {}

    private static HighstandUsed stand(String stage, double ageKa, double levelMetres) {
        boolean high = levelMetres > -20;
        return new HighstandUsed(
                stage,
                high ? "interglacial" : "interstadial",
                ageKa,
                3,
                levelMetres,
                high ? 4 : 11,
                stage.equals("5e") ? "an invented compilation" : "invented-sea");
    }

    /** A fast coast with a flight of 8 levels; 7c left nothing, and the younger seas overran 3c and 6d. */
    static StudyResult flight() {
        return matched("Heron Stair", 1.1, 8);
    }

    /** A slow coast without a flight: three levels, a stage each. */
    static StudyResult slow() {
        List<LevelAnswer> levels = List.of(
                level("Still Bay", "S1", "5e", 123, 8.1, 0.009, 0.02, 1),
                level("Still Bay", "S2", "11c", 406, 12, 0.0074, 0.011, 1),
                level("Still Bay", "S3", "1", 5.5, 0.9, 0.02, 0.15, 1));
        return study(levels, List.of(), List.of());
    }

    /** A sinking coast with a flight of 6 drowned levels. */
    static StudyResult drowned() {
        return matched("Quiet Shoals", -0.3, 6);
    }

    /** A coast with a flight of so many levels. */
    static StudyResult matched(String site, double rate, int count) {
        List<LevelAnswer> levels = new ArrayList<>();
        List<Pairing> pairings = new ArrayList<>();
        List<Unmatched> unmatched = new ArrayList<>();
        List<Fate> fates = new ArrayList<>();
        List<LevelResidual> residuals = new ArrayList<>();
        double youngerMetres = Double.NEGATIVE_INFINITY;
        for (int i = 0; i < STANDS.size(); i++) {
            HighstandUsed stand = STANDS.get(i);
            double metres = rate * stand.ageKa() + stand.levelMetres();
            boolean overrun = rate > 0 && metres < youngerMetres;
            boolean passed = stand.stage().equals("7c") && count < 15;
            boolean recorded = !overrun && !passed && levels.size() < count;
            if (recorded) {
                String name = "H" + (levels.size() + 1);
                double probability = 0.98 - 0.03 * levels.size();
                levels.add(
                        level(site, name, stand.stage(), stand.ageKa(), metres + (i % 3 - 1), rate, 0.02, probability));
                pairings.add(new Pairing(name, stand.stage(), probability));
                if (i > 0) {
                    pairings.add(new Pairing(name, STANDS.get(i - 1).stage(), (1 - probability) / 2));
                }
                unmatched.add(new Unmatched(name, (1 - probability) / 2));
                residuals.add(new LevelResidual(site, name, metres, metres + (i % 3 - 1), 3));
            }
            fates.add(new Fate(
                    stand.stage(),
                    stand.ageKa(),
                    metres,
                    4,
                    recorded ? 0.93 : 0.02,
                    passed ? 0.9 : 0.03,
                    overrun ? 0.91 : 0.02,
                    recorded || passed || overrun ? 0.01 : 0.9,
                    0.02));
            youngerMetres = Math.max(youngerMetres, metres);
        }
        return study(levels, List.of(flight(site, rate, pairings, unmatched, fates)), residuals);
    }

    private static FlightResult flight(
            String site, double rate, List<Pairing> pairings, List<Unmatched> unmatched, List<Fate> fates) {
        FlightResult sample = SampleFlight.result();
        Rate found = rate(rate, 0.01);
        return new FlightResult(
                site,
                FlightResult.ONE_CHANGE,
                found,
                Optional.of(1.0),
                Optional.empty(),
                List.of(found.shortest68()),
                List.of(new Interval(rate - 0.2, rate - 0.17), found.shortest95()),
                List.of(0.6827),
                List.of(0.05, 0.9),
                List.of(
                        new Segment(0, Optional.of(150.0), found),
                        new Segment(150, Optional.empty(), rate(rate - 0.05, 0.03))),
                pairings,
                unmatched,
                0.0001,
                sample.mostProbable(),
                List.of(),
                -20,
                sample.numericalError(),
                fates,
                List.of(),
                List.of(),
                List.of(),
                sample.modelChoice());
    }

    /** The same result with other names: the levels' by number, the site's. */
    static StudyResult renamed(StudyResult result, String site, String prefix) {
        List<LevelAnswer> levels = result.levels().stream()
                .map(old -> new LevelAnswer(
                        site,
                        prefix + old.level(),
                        old.stages(),
                        old.rate(),
                        old.rateWithPrior(),
                        old.firstOrder(),
                        old.age(),
                        old.relativeSeaLevelMetres(),
                        old.probabilityUplift(),
                        old.bound(),
                        old.budget(),
                        old.monteCarlo(),
                        old.samples(),
                        old.coralsTogether(),
                        old.agreement()))
                .toList();
        return study(levels, List.of(), List.of());
    }

    static StudyResult study(List<LevelAnswer> levels, List<FlightResult> flights, List<LevelResidual> residuals) {
        StudyResult sample = SampleStudy.withoutFailure();
        return new StudyResult(
                sample.provenance(),
                new SeaLevelUsed(List.of(new CurveUsed("invented-sea", 1, sea())), STANDS),
                levels,
                List.of(),
                flights,
                List.of(),
                List.of(),
                tornados(levels),
                residuals,
                List.of(),
                List.of(),
                List.of(),
                List.of(),
                List.of());
    }

    private static List<LevelTornado> tornadosOf(List<LevelAnswer> levels) {
        return levels.stream()
                .flatMap(
                        level -> level
                                .rate()
                                .map(rate -> SampleLeverage.tornado(level.site(), level.level(), rate.median()))
                                .stream())
                .toList();
    }

    private static Leverage tornados(List<LevelAnswer> levels) {
        return new Leverage(tornadosOf(levels), List.of(), List.of(), List.of(), List.of());
    }

    /** High at the highstands, low half-way between them, straight in between. */
    private static List<CurvePoint> sea() {
        List<CurvePoint> points = new ArrayList<>();
        points.add(point(0.5, 0));
        for (int i = 0; i < STANDS.size(); i++) {
            HighstandUsed stand = STANDS.get(i);
            points.add(point(stand.ageKa(), stand.levelMetres()));
            if (i + 1 < STANDS.size()) {
                HighstandUsed older = STANDS.get(i + 1);
                double between = older.ageKa() - stand.ageKa();
                double low = Math.min(stand.levelMetres(), older.levelMetres()) - Math.min(1.2 * between, 80);
                points.add(point((stand.ageKa() + older.ageKa()) / 2, Math.max(low, -125)));
            }
        }
        return points;
    }

    private static CurvePoint point(double ageKa, double metres) {
        return new CurvePoint(ageKa, metres, metres - 8, metres + 8, metres - 16, metres + 16);
    }

    static LevelAnswer level(
            String site,
            String name,
            String stage,
            double ageKa,
            double metres,
            double rate,
            double sigma,
            double probability) {
        return new LevelAnswer(
                site,
                name,
                List.of(new StageProbability(stage, probability)),
                Optional.of(rate(rate, sigma)),
                Optional.empty(),
                Optional.empty(),
                Optional.of(quantity(ageKa, 3, "ka")),
                Optional.of(quantity(metres, 1.5, "m")),
                Optional.of(0.9),
                Optional.empty(),
                Optional.of(new Budget(share(0.21), Optional.empty(), share(0.125), share(0.6), Optional.empty())),
                Optional.empty(),
                List.of(),
                Optional.empty(),
                Optional.empty());
    }

    private static Optional<Share> share(double part) {
        return Optional.of(new Share(part, part, 0.01));
    }

    static Quantity quantity(double median, double sd, String unit) {
        return new Quantity(
                median,
                Optional.of(median),
                Optional.of(sd),
                new Interval(median - sd, median + sd),
                new Interval(median - 2 * sd, median + 2 * sd),
                unit);
    }

    /** A rate whose density is that of a normal number. */
    static Rate rate(double median, double sd) {
        Interval narrow = new Interval(median - sd, median + sd);
        Interval wide = new Interval(median - 1.96 * sd, median + 1.96 * sd);
        List<Double> hill = IntStream.range(0, 60)
                .mapToObj(i -> 0.04 * Math.exp(-0.5 * Math.pow((i - 29.5) / 10, 2)))
                .toList();
        return new Rate(
                median,
                Optional.of(median),
                Optional.of(sd),
                narrow,
                wide,
                narrow,
                wide,
                Optional.of(new DensityBins(median - 3 * sd, median + 3 * sd, hill)),
                Rate.UNIT);
    }
}
