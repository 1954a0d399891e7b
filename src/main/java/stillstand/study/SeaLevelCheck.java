package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputWarning;
import stillstand.sealevel.CurveFacts;
import stillstand.sealevel.HighstandEntry;
import stillstand.sealevel.HighstandOptions;
import stillstand.sealevel.HighstandOverrides;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.SharedErrors;
import stillstand.study.StudySettings.SeaLevelChoice;
import stillstand.study.StudySettings.WeightedCurve;

/** What the settings and the library make of past sea level: the curves and highstands in use. */
final class SeaLevelCheck {
    private static final String CURVES = StatedSettings.CURVES;
    private static final String OVERRIDES = "sea_level.highstands.overrides";
    private static final String TABLE = "sea_level.highstands.table";

    private final StatedSettings stated;
    private final SeaLevelChoice choice;
    private final Library library;
    private final Findings findings;
    private final Optional<HighstandOverrides> overrides;

    SeaLevelCheck(StatedSettings stated, Library library, Findings findings) {
        this.stated = stated;
        this.choice = stated.settings().seaLevel();
        this.library = library;
        this.findings = findings;
        this.overrides = overrides();
    }

    /** The study's accounts of sea level; empty where they have problems. */
    List<SeaLevelCase> cases() {
        List<WeightedCurve> named = choice.curves();
        if (named.size() > 1) {
            findings.add(stated.problem(
                    CURVES, named.size() + " curves", "one: several curves in one study are not possible yet"));
        }
        List<SeaLevelCase> cases = new ArrayList<>();
        List<SeaLevelCurve> curves = new ArrayList<>();
        for (int i = 0; i < named.size(); i++) {
            String path = stated.states(CURVES) ? CURVES + "[" + i + "].id" : CURVES;
            Optional<SeaLevelCurve> curve = curve(named.get(i).id(), path);
            curve.ifPresent(curves::add);
            if (choice.highstandTable().isEmpty()) {
                double weight = named.get(i).weight();
                curve.flatMap(each -> fromCurve(each, weight, path)).ifPresent(cases::add);
            }
        }
        choice.highstandTable().flatMap(id -> fromTable(id, curves)).ifPresent(cases::add);
        choice.highstandTable().ifPresent(this::tellWhatACurveLeaves);
        return cases;
    }

    /** A curve asked for on the command line does less than one would think where highstands come from a table. */
    private void tellWhatACurveLeaves(String table) {
        if (stated.isReplaced(CURVES)) {
            String left = "levels tied to highstands keep those of table " + quote(table);
            findings.add(new InputWarning(
                    StatedSettings.COMMAND_LINE,
                    0,
                    0,
                    CURVES + ": a curve is read only where levels and corals use their own ages; " + left));
            findings.add(new Assumption(
                    "a curve from the command line does not change pinned levels",
                    left,
                    "the study takes its highstands from a table",
                    "all"));
        }
    }

    /** The account of sea level that replaces the study's at one site; absent where it has problems. */
    Optional<SeaLevelCase> local(RowReader row, List<SeaLevelCase> cases) {
        Optional<SeaLevelCurve> curve = library.curve(row.text("local_curve")).map(this::underSettings);
        if (curve.isEmpty()) {
            return Optional.empty();
        }
        if (stated.isReplaced(CURVES)) {
            row.warn("local_curve", "the site keeps this curve, whatever the command line says");
        }
        if (choice.highstandTable().isPresent()) {
            return cases.stream()
                    .findFirst()
                    .map(each -> new SeaLevelCase(each.id(), each.weight(), curve, each.highstands()));
        }
        if (!HighstandTable.canComeFrom(curve.get(), library.stages())) {
            row.problem(
                    "local_curve",
                    quote(row.text("local_curve")) + ", which shows no highstand",
                    "a curve that shows one in some stage window");
            return Optional.empty();
        }
        return overrides.map(each -> caseOf(curve.get(), 1, each));
    }

    private Optional<SeaLevelCurve> curve(String id, String path) {
        Optional<SeaLevelCurve> curve = library.curve(id);
        if (curve.isEmpty()) {
            findings.add(
                    stated.problem(path, quote(id), "the id of a curve" + RowReader.nearest(id, library.curveIds())));
        }
        if (choice.rezero() && curve.isPresent() && !canBeRezeroed(curve.get())) {
            findings.add(stated.problem(
                    "sea_level.rezero",
                    "true, while curve " + quote(id) + " starts at "
                            + curve.get().fromKa() + " ka",
                    "a curve that reaches today, or false"));
            return Optional.empty();
        }
        return curve.map(this::underSettings);
    }

    private static boolean canBeRezeroed(SeaLevelCurve curve) {
        return curve.fromKa() <= 1;
    }

    private SeaLevelCurve underSettings(SeaLevelCurve curve) {
        CurveFacts facts = curve.facts();
        SeaLevelCurve set = curve.with(facts.with(
                choice.correlationTimeKa().orElse(facts.correlationTimeKa()),
                choice.curveAgeSigmaKa().orElse(facts.curveAgeSigmaKa())));
        return choice.rezero() && canBeRezeroed(set) ? set.rezeroed() : set;
    }

    private Optional<SeaLevelCase> fromCurve(SeaLevelCurve curve, double weight, String path) {
        if (!HighstandTable.canComeFrom(curve, library.stages())) {
            findings.add(stated.problem(
                    path,
                    quote(curve.id()) + ", which shows no highstand",
                    "a curve that shows one in some stage window, or highstands from a table"));
            return Optional.empty();
        }
        return overrides.map(each -> caseOf(curve, weight, each));
    }

    private SeaLevelCase caseOf(SeaLevelCurve curve, double weight, HighstandOverrides replaced) {
        HighstandTable table = HighstandTable.fromCurve(curve, library.stages(), replaced, options());
        Optional<HighstandTable> own = Optional.of(HighstandOverrides.NONE)
                .filter(none -> !none.equals(replaced))
                .map(none ->
                        underSettings(HighstandTable.fromCurve(curve, library.stages(), none, options())));
        return new SeaLevelCase(curve.id(), weight, Optional.of(curve), underSettings(table), own);
    }

    private Optional<SeaLevelCase> fromTable(String id, List<SeaLevelCurve> curves) {
        Optional<HighstandRows> rows = library.highstands(id);
        if (rows.isEmpty()) {
            findings.add(stated.problem(
                    TABLE, quote(id), "the id of a highstand table" + RowReader.nearest(id, library.highstandIds())));
        }
        return rows.map(each -> new SeaLevelCase(
                id,
                1,
                curves.stream().findFirst(),
                underSettings(HighstandTable.own(id, each.complete(), each.entries(), library.stages(), options()))));
    }

    private HighstandOptions options() {
        return new HighstandOptions(choice.olderThanCurve(), true);
    }

    /** The table under what the study states of shared errors; what it does not state stays the table's own. */
    private HighstandTable underSettings(HighstandTable table) {
        SharedErrors own = table.sharedErrors();
        SharedErrors set = new SharedErrors(
                choice.sharedLevelSigmaMetres().stated()
                        ? choice.sharedLevelSigmaMetres().value()
                        : own.offsetSigmaMetres(),
                choice.interstadialSigmaMetres().stated()
                        ? choice.interstadialSigmaMetres().value()
                        : own.interstadialSigmaMetres(),
                choice.curveAgeSigmaKa().orElse(own.curveAgeSigmaKa()));
        choice.curveAgeSigmaKa()
                .ifPresent(sigma -> findings.add(
                        new Assumption("curve age error is stated", sigma + " ka (1 sigma)", "the study", "all")));
        return set.equals(own) ? table : table.with(set);
    }

    /** What replaces a curve's own highstands; absent where it has problems. */
    private Optional<HighstandOverrides> overrides() {
        if (choice.overrides().isEmpty()) {
            return Optional.of(HighstandOverrides.NONE);
        }
        String id = choice.overrides().get();
        Optional<HighstandRows> rows = library.highstands(id);
        if (rows.isEmpty()) {
            findings.add(stated.problem(
                    OVERRIDES,
                    quote(id),
                    "the id of a highstand table, or \"none\"" + RowReader.nearest(id, library.highstandIds())));
            return Optional.empty();
        }
        boolean known = true;
        for (HighstandEntry entry : rows.get().entries()) {
            if (library.stages().find(entry.stage()).isEmpty()) {
                known = false;
                findings.add(stated.problem(
                        OVERRIDES,
                        quote(id) + " with a stage " + quote(entry.stage()),
                        "only stages of the stage table"
                                + library.stages()
                                        .nearest(entry.stage())
                                        .map(name -> " (nearest: " + quote(name) + ")")
                                        .orElse("")));
            }
        }
        return known ? Optional.of(new HighstandOverrides(id, rows.get().entries())) : Optional.empty();
    }
}
