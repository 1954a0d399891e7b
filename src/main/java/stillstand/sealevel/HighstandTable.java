package stillstand.sealevel;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Set;
import stillstand.ledger.Assumption;
import stillstand.ledger.NearestName;
import stillstand.uncertainty.Uncertain;

/**
 * The highstands that levels of a coast are pinned or matched to.
 *
 * @param id of the curve or table it comes from
 * @param complete whether it is taken as it stands: no default row or error is added
 * @param rows young to old; only the generic older ones share a label
 * @param sharedErrors that its rows take by their marks, by default
 * @param assumptions every default that entered
 */
public record HighstandTable(
        String id, boolean complete, List<Highstand> rows, SharedErrors sharedErrors, List<Assumption> assumptions) {
    private static final String OURS = "Stillstand's default";
    private static final double OLDER_STEP_KA = 41;
    private static final double OLDEST_KA = 2600;
    /** A table with a row younger than this has its own idea of today's interglacial. */
    private static final double HOLOCENE_ENDS_KA = 11.7;

    /** @throws IllegalArgumentException if there is no row, a label stands twice, or ages do not ascend */
    public HighstandTable {
        rows = List.copyOf(rows);
        assumptions = List.copyOf(assumptions);
        if (rows.isEmpty()) {
            throw new IllegalArgumentException("highstand table '" + id + "' has no row");
        }
        Set<String> labels = new HashSet<>();
        double lastKa = 0;
        for (Highstand row : rows) {
            if (!row.isOlder() && !labels.add(row.stage())) {
                throw new IllegalArgumentException(
                        "stage '" + row.stage() + "' stands twice in highstand table '" + id + "'");
            }
            if (!(row.ageKa() >= lastKa)) {
                throw new IllegalArgumentException("rows of highstand table '" + id
                        + "' must run from young to old but '" + row.stage() + "' is younger than the row above it");
            }
            lastKa = row.ageKa();
        }
    }

    /**
     * Highstands picked from a curve, some of them replaced by better estimates.
     *
     * @throws IllegalArgumentException if the curve shows no highstand in any window (see {@link #canComeFrom}), or an
     *     override's stage is unknown to the stage table
     */
    public static HighstandTable fromCurve(
            SeaLevelCurve curve, StageTable stages, HighstandOverrides overrides, HighstandOptions options) {
        List<Assumption> ledger = new ArrayList<>(curve.assumptions());
        List<Highstand> rows = new ArrayList<>();
        for (Stage stage : stages.stages()) {
            if (!stage.label().equals(Stage.HOLOCENE)) {
                TurningPoints.highstand(curve, stage).ifPresent(pick -> rows.add(picked(curve, stage, pick, options)));
            }
        }
        if (rows.isEmpty()) {
            throw new IllegalArgumentException("curve '" + curve.id() + "' shows no highstand in any stage window");
        }
        rows.add(Highstand.holocene());
        ledger.add(new Assumption(
                "highstands are picked from a curve",
                "highest turning point of prominence " + metres(TurningPoints.LEAST_PROMINENCE_METRES)
                        + " or more in each stage window",
                curve.facts().citation(),
                "all"));
        override(rows, overrides, stages, ledger);
        return withDefaults(curve.id(), rows, SharedErrors.ofCurve(curve.facts().curveAgeSigmaKa()), options, ledger);
    }

    /** Whether the curve shows a highstand in any stage window, so that a table can be made from it. */
    public static boolean canComeFrom(SeaLevelCurve curve, StageTable stages) {
        return stages.stages().stream()
                .anyMatch(stage -> !stage.label().equals(Stage.HOLOCENE)
                        && TurningPoints.highstand(curve, stage).isPresent());
    }

    /**
     * A user's own table. Its rows but that of stage 1 take the common offset, none an interstadial factor or a curve age
     * error; a complete table gets no default error and no row beside its own, but its rows still take an offset that a study
     * states.
     *
     * @param entries in any order
     * @param stages give the class of a row that states none; a label they do not know is taken for an interglacial
     * @throws IllegalArgumentException if there is no entry or a label stands twice
     */
    public static HighstandTable own(
            String id, boolean complete, List<HighstandEntry> entries, StageTable stages, HighstandOptions options) {
        List<Assumption> ledger = new ArrayList<>();
        List<Highstand> rows = new ArrayList<>();
        for (HighstandEntry entry : entries) {
            rows.add(ownRow(entry, !complete && options.defaultLocalOffset(), stages));
        }
        if (complete) {
            rows.sort(Comparator.comparingDouble(Highstand::ageKa));
            ledger.add(new Assumption(
                    "highstand table is complete",
                    "no row, shared error, local offset or older highstand is added",
                    "table " + id,
                    "all"));
            return new HighstandTable(id, true, rows, SharedErrors.NONE, ledger);
        }
        if (!rows.isEmpty() && rows.stream().noneMatch(row -> row.ageKa() < HOLOCENE_ENDS_KA)) {
            rows.add(Highstand.holocene());
        }
        return withDefaults(id, rows, SharedErrors.ofCurve(0), options, ledger);
    }

    /** The row of this stage; never a generic older one. */
    public Optional<Highstand> find(String stage) {
        return rows.stream()
                .filter(row -> !row.isOlder() && row.stage().equals(stage))
                .findFirst();
    }

    /** Labels of the rows, young to old, without generic older ones. */
    public List<String> stages() {
        return rows.stream().filter(row -> !row.isOlder()).map(Highstand::stage).toList();
    }

    /** The label most like this name, for messages; empty where none is like it. */
    public Optional<String> nearest(String stage) {
        return NearestName.of(stage, stages());
    }

    /** The same table under shared errors of which at least one is the user's own; the ledger says which. */
    public HighstandTable with(SharedErrors other) {
        List<Assumption> ledger = new ArrayList<>(assumptions);
        List<Assumption> defaults = sharedLines(sharedErrors, OURS);
        List<Assumption> stated = sharedLines(other, "the study");
        for (int i = 0; i < stated.size(); i++) {
            if (!stated.get(i).value().equals(defaults.get(i).value())) {
                ledger.remove(defaults.get(i));
                ledger.add(stated.get(i));
            }
        }
        return new HighstandTable(id, complete, rows, other, ledger);
    }

    /**
     * The same table on a coast whose departure from global sea level is known, wholly or at some highstands; the others keep their
     * default.
     *
     * @param where the site or coast, for the ledger
     * @param source who says so
     */
    public HighstandTable at(LocalDeparture departure, String where, String source) {
        List<Highstand> local = new ArrayList<>();
        List<Assumption> ledger = new ArrayList<>(assumptions);
        List<String> without = new ArrayList<>();
        for (Highstand row : rows) {
            Optional<LocalDeparture.Estimate> estimate = row.isOlder() ? Optional.empty() : departure.at(row);
            local.add(estimate.map(row::withLocal).orElse(row));
            if (estimate.isPresent()) {
                ledger.add(new Assumption(
                        "local minus global sea level at highstand " + row.stage(),
                        String.format(
                                Locale.ROOT,
                                "%+.1f ± %.1f m (1 sigma)",
                                estimate.get().offsetMetres(),
                                estimate.get().sigmaMetres()),
                        source,
                        where));
            } else if (!row.isOlder() && row.localOffsetSigmaMetres() > 0) {
                without.add(row.stage());
            }
        }
        if (!without.isEmpty()) {
            ledger.add(new Assumption(
                    "local minus global sea level has no row and gets the default",
                    String.join(", ", without),
                    OURS,
                    where));
        }
        return new HighstandTable(id, complete, local, sharedErrors, ledger);
    }

    private static List<Assumption> sharedLines(SharedErrors shared, String source) {
        return List.of(
                new Assumption(
                        "offset common to all highstands",
                        metres(shared.offsetSigmaMetres()) + " (1 sigma)",
                        source,
                        "all"),
                new Assumption(
                        "factor common to interstadials",
                        metres(shared.interstadialSigmaMetres()) + " (1 sigma)",
                        source,
                        "all"),
                new Assumption("curve age error", kiloyears(shared.curveAgeSigmaKa()) + " (1 sigma)", source, "all"));
    }

    private static Highstand picked(SeaLevelCurve curve, Stage stage, TurningPoint pick, HighstandOptions options) {
        boolean interstadial = stage.highstandClass() == HighstandClass.INTERSTADIAL;
        // at the pick itself, not at the nearest node of the curve's grid
        Uncertain level = curve.readAt(pick.ageKa()).plus(pick.levelMetres() - curve.levelMetresAt(pick.ageKa()));
        return new Highstand(
                stage.label(),
                stage.highstandClass(),
                pick.ageKa(),
                0,
                level,
                stage.durationKa(),
                stage.existsProbability(),
                true,
                interstadial,
                true,
                options.defaultLocalOffset() ? stage.highstandClass().localOffsetSigmaMetres() : 0,
                curve.id());
    }

    private static Highstand ownRow(HighstandEntry entry, boolean defaultLocalOffset, StageTable stages) {
        HighstandClass highstandClass = entry.highstandClass()
                .or(() -> stages.find(entry.stage()).map(Stage::highstandClass))
                .orElse(HighstandClass.INTERGLACIAL);
        boolean local = defaultLocalOffset && !entry.stage().equals(Stage.HOLOCENE);
        return new Highstand(
                entry.stage(),
                highstandClass,
                entry.ageKa(),
                entry.ageSigmaKa(),
                entry.level(),
                entry.durationKa().orElse(0.0),
                entry.existsProbability().orElse(1.0),
                !entry.stage().equals(Stage.HOLOCENE),
                false,
                false,
                local ? highstandClass.localOffsetSigmaMetres() : 0,
                entry.source());
    }

    private static void override(
            List<Highstand> rows, HighstandOverrides overrides, StageTable stages, List<Assumption> ledger) {
        String table = "table " + overrides.id();
        for (HighstandEntry entry : overrides.entries()) {
            Stage stage = stages.find(entry.stage())
                    .orElseThrow(() -> new IllegalArgumentException("overrides '" + overrides.id() + "' name stage '"
                            + entry.stage() + "', which is not in the stage table"));
            boolean replaced = false;
            for (int i = 0; i < rows.size(); i++) {
                if (rows.get(i).stage().equals(stage.label())) {
                    rows.set(i, rows.get(i).overriddenBy(entry));
                    replaced = true;
                }
            }
            String what = replaced
                    ? String.format(
                            Locale.ROOT,
                            "%.1f ± %.1f m at %.1f ± %.1f ka (1 sigma)",
                            entry.level().mean(),
                            entry.level().standardDeviation(),
                            entry.ageKa(),
                            entry.ageSigmaKa())
                    : "not used: the curve shows no such highstand";
            ledger.add(new Assumption(
                    "level and age of highstand " + stage.label() + " from " + table, what, entry.source(), "all"));
        }
    }

    private static HighstandTable withDefaults(
            String id, List<Highstand> rows, SharedErrors shared, HighstandOptions options, List<Assumption> ledger) {
        rows.sort(Comparator.comparingDouble(Highstand::ageKa));
        if (options.olderRows() && !rows.isEmpty()) {
            double lastKa = rows.get(rows.size() - 1).ageKa();
            for (int k = 1; lastKa + k * OLDER_STEP_KA <= OLDEST_KA; k++) {
                rows.add(Highstand.older(lastKa + k * OLDER_STEP_KA));
            }
            ledger.add(new Assumption(
                    "older highstands beyond the table",
                    "one every 41 ka from " + kiloyears(lastKa + OLDER_STEP_KA)
                            + " to 2600 ka: -10 ± 15 m, age ± 12 ka (1 sigma)",
                    OURS,
                    "all"));
        }
        if (rows.stream().anyMatch(row -> row.equals(Highstand.holocene()))) {
            ledger.add(new Assumption(
                    "highstand of today's interglacial", "0.7 ± 0.7 m at 5.25 ± 1.3 ka (1 sigma)", OURS, "all"));
        }
        List<Assumption> lines = sharedLines(shared, OURS);
        ledger.add(lines.get(0));
        if (rows.stream().anyMatch(Highstand::takesInterstadialFactor)) {
            ledger.add(lines.get(1));
        }
        if (rows.stream().anyMatch(Highstand::takesCurveAgeError)) {
            ledger.add(lines.get(2));
        }
        if (options.defaultLocalOffset()) {
            ledger.add(new Assumption(
                    "local minus global sea level is not measured",
                    "2 m at interglacials, 5 m at interstadials (1 sigma)",
                    OURS,
                    "all"));
        }
        return new HighstandTable(id, false, rows, shared, ledger);
    }

    private static String metres(double value) {
        return String.format(Locale.ROOT, "%.1f m", value);
    }

    private static String kiloyears(double value) {
        return String.format(Locale.ROOT, "%.1f ka", value);
    }
}
