package stillstand.sealevel;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import stillstand.ledger.Assumption;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.SplitNormal;
import stillstand.uncertainty.Uncertain;

/**
 * Sea level through time, as one reconstruction has it: a central line and a band about it, which need not be symmetrical.
 * Ages in ka before 1950, levels in metres above (positive) the curve's own zero.
 *
 * <p>Between the rows of its table the curve is interpolated by a {@link MonotoneCubic} of each column as published, and
 * resampled once to a uniform grid of {@value #STEP_KA} ka (finer for short curves, coarser for those beyond 26 Ma); all
 * reading is linear on that grid, so that a column of ages is read in a few operations each. The curve is never extrapolated.
 */
public final class SeaLevelCurve {
    private static final double STEP_KA = 0.025;
    private static final int FEWEST_CELLS = 4096;
    private static final int MOST_CELLS = 1 << 20;
    /** Standard deviations from the middle of a normal distribution to the bounds of its central 95 %. */
    private static final double SIGMAS_TO_95 = 1.96;
    /** Keeps a band that is one-sided at some age a distribution. */
    private static final double LEAST_SIGMA_METRES = 1e-9;
    /** A curve that starts older than this says nothing of today, so it cannot be moved to read 0 today. */
    private static final double OLDEST_TODAY_KA = 1;

    private final String id;
    private final CurveFacts facts;
    private final List<CurveKnot> knots;
    private final List<Assumption> assumptions;
    private final MonotoneCubic line;
    private final double fromKa;
    private final double toKa;
    private final double cellsPerKa;
    private final double[] levelsMetres;
    private final double[] sigmasLowMetres;
    private final double[] sigmasHighMetres;

    private SeaLevelCurve(
            String id,
            CurveFacts facts,
            List<CurveKnot> knots,
            double[] sigmasLowMetres,
            double[] sigmasHighMetres,
            List<Assumption> assumptions) {
        this.id = id;
        this.facts = facts;
        this.knots = List.copyOf(knots);
        this.assumptions = List.copyOf(assumptions);
        this.sigmasLowMetres = sigmasLowMetres;
        this.sigmasHighMetres = sigmasHighMetres;
        line = lineThrough(this.knots);
        double[] grid = grid(this.knots);
        levelsMetres = line.valuesAt(grid);
        fromKa = grid[0];
        toKa = grid[grid.length - 1];
        cellsPerKa = (grid.length - 1) / (toKa - fromKa);
    }

    /**
     * A curve with one standard deviation a row.
     *
     * @param agesKa strictly ascending, at least two
     * @param levelsMetres as many
     * @param sigmasMetres as many, 0 or more
     * @throws IllegalArgumentException if the columns differ in length, are too short, or a row is out of order or invalid
     */
    public static SeaLevelCurve withSigmas(
            String id, CurveFacts facts, double[] agesKa, double[] levelsMetres, double[] sigmasMetres) {
        List<CurveKnot> knots = knots(id, agesKa, levelsMetres, sigmasMetres, sigmasMetres);
        double[] sigmas = new MonotoneCubic(agesKa, sigmasMetres).valuesAt(grid(knots));
        return new SeaLevelCurve(id, facts, knots, sigmas, sigmas, List.of());
    }

    /**
     * A curve with the bounds of the central 95 % in each row, each sigma the distance to its bound over 1.96.
     *
     * @param agesKa strictly ascending, at least two
     * @param levelsMetres as many
     * @param lows95Metres as many, below the levels
     * @param highs95Metres as many, above the levels
     * @throws IllegalArgumentException if the columns differ in length, are too short, or a row is out of order or invalid
     */
    public static SeaLevelCurve withBounds95(
            String id,
            CurveFacts facts,
            double[] agesKa,
            double[] levelsMetres,
            double[] lows95Metres,
            double[] highs95Metres) {
        requireLength(id, agesKa.length, levelsMetres, lows95Metres, highs95Metres);
        double[] below = new double[agesKa.length];
        double[] above = new double[agesKa.length];
        for (int i = 0; i < agesKa.length; i++) {
            below[i] = (levelsMetres[i] - lows95Metres[i]) / SIGMAS_TO_95;
            above[i] = (highs95Metres[i] - levelsMetres[i]) / SIGMAS_TO_95;
        }
        List<CurveKnot> knots = knots(id, agesKa, levelsMetres, below, above);
        double[] grid = grid(knots);
        double[] levels = lineThrough(knots).valuesAt(grid);
        double[] sigmasLow = new MonotoneCubic(agesKa, lows95Metres).valuesAt(grid);
        double[] sigmasHigh = new MonotoneCubic(agesKa, highs95Metres).valuesAt(grid);
        for (int i = 0; i < grid.length; i++) {
            // two interpolated columns could cross where they nearly touch
            sigmasLow[i] = Math.max(0, levels[i] - sigmasLow[i]) / SIGMAS_TO_95;
            sigmasHigh[i] = Math.max(0, sigmasHigh[i] - levels[i]) / SIGMAS_TO_95;
        }
        return new SeaLevelCurve(id, facts, knots, sigmasLow, sigmasHigh, List.of());
    }

    /**
     * A curve whose source gives no spread, or one that it does not explain.
     *
     * @param agesKa strictly ascending, at least two
     * @param levelsMetres as many
     * @param guess the spread that it gets instead
     * @param stages say which ages are interglacial
     * @throws IllegalArgumentException if the columns differ in length, are too short, or a row is out of order or invalid
     */
    public static SeaLevelCurve withGuessedSpread(
            String id,
            CurveFacts facts,
            double[] agesKa,
            double[] levelsMetres,
            GuessedSpread guess,
            StageTable stages) {
        double[] sigmas = new double[agesKa.length];
        for (int i = 0; i < sigmas.length; i++) {
            sigmas[i] = guess.sigmaMetresAt(agesKa[i], stages);
        }
        List<CurveKnot> knots = knots(id, agesKa, levelsMetres, sigmas, sigmas);
        double[] column = new MonotoneCubic(agesKa, sigmas).valuesAt(grid(knots));
        Assumption guessed = new Assumption(
                "spread of curve " + id + " is a guess",
                guess.interglacialSigmaMetres() + " m in interglacials, " + guess.elsewhereSigmaMetres()
                        + " m elsewhere (1 sigma)",
                "Stillstand's default",
                "all");
        return new SeaLevelCurve(id, facts, knots, column, column, List.of(guessed));
    }

    /** Lower-case words joined by hyphens, such as {@code spratt-lisiecki-2016}. */
    public String id() {
        return id;
    }

    /** What a user must know of it. */
    public CurveFacts facts() {
        return facts;
    }

    /** The rows of its table, young to old. */
    public List<CurveKnot> knots() {
        return knots;
    }

    /** What was supposed in making it: a guessed spread, another zero. */
    public List<Assumption> assumptions() {
        return assumptions;
    }

    /** Youngest age it covers, ka. */
    public double fromKa() {
        return fromKa;
    }

    /** Oldest age it covers, ka. */
    public double toKa() {
        return toKa;
    }

    /** Whether the age lies in its span. */
    public boolean covers(double ageKa) {
        return ageKa >= fromKa && ageKa <= toKa;
    }

    /** Whether the age lies in its span and is not too young for it ({@link CurveFacts#usableFromKa}). */
    public boolean isUsableAt(double ageKa) {
        return covers(ageKa) && ageKa >= facts.usableFromKa();
    }

    /**
     * The central line.
     *
     * @throws IllegalArgumentException if the curve does not cover the age
     */
    public double levelMetresAt(double ageKa) {
        return read(levelsMetres, ageKa);
    }

    /**
     * One standard deviation of the lower half of the band.
     *
     * @throws IllegalArgumentException if the curve does not cover the age
     */
    public double sigmaLowMetresAt(double ageKa) {
        return read(sigmasLowMetres, ageKa);
    }

    /**
     * One standard deviation of the upper half of the band.
     *
     * @throws IllegalArgumentException if the curve does not cover the age
     */
    public double sigmaHighMetresAt(double ageKa) {
        return read(sigmasHighMetres, ageKa);
    }

    /**
     * Slope of the central line in metres per ka of age: positive where the sea stood higher before, so was falling.
     *
     * @throws IllegalArgumentException if the curve does not cover the age
     */
    public double slopeMetresPerKaAt(double ageKa) {
        requireCovered(ageKa);
        return line.slopeAt(ageKa);
    }

    /**
     * Sea level at one age known exactly, from this curve alone: the band there, without errors of the curve's ages and
     * without what highstands share.
     *
     * @throws IllegalArgumentException if the curve does not cover the age
     */
    public Uncertain readAt(double ageKa) {
        double level = levelMetresAt(ageKa);
        double low = sigmaLowMetresAt(ageKa);
        double high = sigmaHighMetresAt(ageKa);
        return low == 0 && high == 0
                ? new Exact(level)
                : new SplitNormal(level, Math.max(low, LEAST_SIGMA_METRES), Math.max(high, LEAST_SIGMA_METRES));
    }

    /**
     * The central line at a column of ages.
     *
     * @param agesKa any order
     * @param outMetres as long; filled with levels (may be {@code agesKa} itself)
     * @throws IllegalArgumentException if the curve does not cover one of the ages
     */
    public void levelsAt(double[] agesKa, double[] outMetres) {
        for (int i = 0; i < agesKa.length; i++) {
            outMetres[i] = read(levelsMetres, agesKa[i]);
        }
    }

    /**
     * Sea level with its error at a column of ages: the central line plus {@code u} times the lower sigma where
     * {@code u < 0} and the upper one otherwise.
     *
     * @param agesKa any order, already moved by the curve's age error
     * @param deviates as many values of {@code u}, standard normal
     * @param outMetres as long; filled with levels (may be one of the other two)
     * @throws IllegalArgumentException if the curve does not cover one of the ages
     */
    public void readAt(double[] agesKa, double[] deviates, double[] outMetres) {
        for (int i = 0; i < agesKa.length; i++) {
            requireCovered(agesKa[i]);
            double place = (agesKa[i] - fromKa) * cellsPerKa;
            int cell = Math.min((int) place, levelsMetres.length - 2);
            double part = place - cell;
            double[] sigmas = deviates[i] < 0 ? sigmasLowMetres : sigmasHighMetres;
            double level = levelsMetres[cell] + part * (levelsMetres[cell + 1] - levelsMetres[cell]);
            outMetres[i] = level + deviates[i] * (sigmas[cell] + part * (sigmas[cell + 1] - sigmas[cell]));
        }
    }

    /**
     * Highest minus lowest value of the central line over a stretch of time.
     *
     * @param youngKa young end
     * @param oldKa old end, {@code youngKa} or older
     * @throws IllegalArgumentException if the curve does not cover both ends, or they are the wrong way round
     */
    public double variationMetres(double youngKa, double oldKa) {
        if (!(youngKa <= oldKa)) {
            throw new IllegalArgumentException("youngKa must not be above oldKa but is " + youngKa + " with " + oldKa);
        }
        double start = levelMetresAt(youngKa);
        double end = levelMetresAt(oldKa);
        double lowest = Math.min(start, end);
        double highest = Math.max(start, end);
        for (CurveKnot knot : knots) {
            if (knot.ageKa() > youngKa && knot.ageKa() < oldKa) {
                lowest = Math.min(lowest, knot.levelMetres());
                highest = Math.max(highest, knot.levelMetres());
            }
        }
        return highest - lowest;
    }

    /** The same curve under other facts. */
    public SeaLevelCurve with(CurveFacts other) {
        return new SeaLevelCurve(id, other, knots, sigmasLowMetres, sigmasHighMetres, assumptions);
    }

    /**
     * The same curve moved so that its youngest row reads 0 m.
     *
     * @throws IllegalArgumentException if that row is older than 1 ka, so that it says nothing of today
     */
    public SeaLevelCurve rezeroed() {
        CurveKnot youngest = knots.get(0);
        if (!(youngest.ageKa() <= OLDEST_TODAY_KA)) {
            throw new IllegalArgumentException(
                    "curve '" + id + "' starts at " + youngest.ageKa() + " ka and cannot be moved to read 0 m today");
        }
        double shift = -youngest.levelMetres();
        List<CurveKnot> moved = knots.stream()
                .map(knot -> new CurveKnot(
                        knot.ageKa(), knot.levelMetres() + shift, knot.sigmaLowMetres(), knot.sigmaHighMetres()))
                .toList();
        List<Assumption> more = new ArrayList<>(assumptions);
        String by = String.format(Locale.ROOT, "%+.2f m", shift);
        more.add(new Assumption("curve " + id + " is moved to read 0 m today", by, "the study", "all"));
        CurveFacts movedFacts = facts.withZero(facts.zero() + "; moved by " + by + " to read 0 m today");
        return new SeaLevelCurve(id, movedFacts, moved, sigmasLowMetres, sigmasHighMetres, more);
    }

    /**
     * The same curve on a coast whose departure from it is known at ages: the line is moved, and the band widened by the spread
     * of the departure. Without ages the curve stays as it is.
     *
     * @param where the site or coast, for the ledger
     * @param source who says so
     */
    public SeaLevelCurve at(LocalDeparture departure, String where, String source) {
        if (departure.atAges().isEmpty()) {
            return this;
        }
        List<CurveKnot> moved = knots.stream()
                .map(knot -> {
                    LocalDeparture.Estimate here = departure.atAge(knot.ageKa()).orElseThrow();
                    return new CurveKnot(
                            knot.ageKa(),
                            knot.levelMetres() + here.offsetMetres(),
                            Math.hypot(knot.sigmaLowMetres(), here.sigmaMetres()),
                            Math.hypot(knot.sigmaHighMetres(), here.sigmaMetres()));
                })
                .toList();
        double[] lows = sigmasLowMetres.clone();
        double[] highs = sigmasHighMetres.clone();
        for (int i = 0; i < lows.length; i++) {
            double sigma =
                    departure.atAge(fromKa + i / cellsPerKa).orElseThrow().sigmaMetres();
            lows[i] = Math.hypot(lows[i], sigma);
            highs[i] = Math.hypot(highs[i], sigma);
        }
        List<Assumption> more = new ArrayList<>(assumptions);
        more.add(new Assumption(
                "curve " + id + " is read at local sea level",
                "moved by the departures at " + departure.atAges().size()
                        + " ages, linear between them and as at the nearest beyond them",
                source,
                where));
        return new SeaLevelCurve(id, facts, moved, lows, highs, more);
    }

    private double read(double[] column, double ageKa) {
        requireCovered(ageKa);
        double place = (ageKa - fromKa) * cellsPerKa;
        int cell = Math.min((int) place, column.length - 2);
        return column[cell] + (place - cell) * (column[cell + 1] - column[cell]);
    }

    private void requireCovered(double ageKa) {
        if (!(ageKa >= fromKa && ageKa <= toKa)) {
            throw new IllegalArgumentException(
                    ageKa + " ka lies outside curve '" + id + "' (" + fromKa + " to " + toKa + " ka)");
        }
    }

    private static double[] grid(List<CurveKnot> knots) {
        double fromKa = knots.get(0).ageKa();
        double toKa = knots.get(knots.size() - 1).ageKa();
        double spanKa = toKa - fromKa;
        int cells = (int) Math.min(MOST_CELLS, Math.max(FEWEST_CELLS, Math.round(spanKa / STEP_KA)));
        double[] grid = new double[cells + 1];
        for (int i = 0; i < cells; i++) {
            grid[i] = Math.min(toKa, fromKa + i * (spanKa / cells));
        }
        grid[cells] = toKa;
        return grid;
    }

    private static MonotoneCubic lineThrough(List<CurveKnot> knots) {
        return new MonotoneCubic(
                knots.stream().mapToDouble(CurveKnot::ageKa).toArray(),
                knots.stream().mapToDouble(CurveKnot::levelMetres).toArray());
    }

    private static List<CurveKnot> knots(
            String id, double[] agesKa, double[] levelsMetres, double[] sigmasLowMetres, double[] sigmasHighMetres) {
        requireLength(id, agesKa.length, levelsMetres, sigmasLowMetres, sigmasHighMetres);
        List<CurveKnot> knots = new ArrayList<>(agesKa.length);
        for (int i = 0; i < agesKa.length; i++) {
            if (i > 0 && !(agesKa[i] > agesKa[i - 1])) {
                throw new IllegalArgumentException(
                        "ages of curve '" + id + "' must ascend but " + agesKa[i] + " ka follows " + agesKa[i - 1]);
            }
            knots.add(new CurveKnot(agesKa[i], levelsMetres[i], sigmasLowMetres[i], sigmasHighMetres[i]));
        }
        return knots;
    }

    private static void requireLength(String id, int rows, double[]... columns) {
        if (rows < 2) {
            throw new IllegalArgumentException("curve '" + id + "' must have at least 2 rows but has " + rows);
        }
        for (double[] column : columns) {
            if (column.length != rows) {
                throw new IllegalArgumentException(
                        "columns of curve '" + id + "' must be equally long but are " + rows + " and " + column.length);
            }
        }
    }
}
