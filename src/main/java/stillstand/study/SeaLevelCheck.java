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
        this.overrides =
                choice.overrides().map(id -> overrides(id, OVERRIDES)).orElse(Optional.of(HighstandOverrides.NONE));
    }

    /** The study's accounts of sea level; empty where they have problems. */
    List<SeaLevelCase> cases() {
        List<WeightedCurve> named = choice.curves();
        List<SeaLevelCase> cases = new ArrayList<>();
        List<WeightedCurve> read = new ArrayList<>();
        List<SeaLevelCurve> curves = new ArrayList<>();
        for (int i = 0; i < named.size(); i++) {
            WeightedCurve each = named.get(i);
            String path = stated.states(CURVES) ? CURVES + "[" + i + "].id" : CURVES;
            if (named.stream().limit(i).anyMatch(before -> before.label().equals(each.label()))) {
                findings.add(stated.problem(path, quote(each.id()) + " a second time", "each curve once"));
                continue;
            }
            if (choice.highstandTable().isEmpty() && isTable(each.id())) {
                fromTable(each.id(), each.weight(), Optional.empty(), path).ifPresent(cases::add);
                continue;
            }
            Optional<SeaLevelCurve> curve = curve(each.id(), path);
            curve.ifPresent(found -> {
                read.add(each);
                curves.add(found);
            });
            if (choice.highstandTable().isEmpty()) {
                curve.flatMap(found -> fromCurve(found, each, path, named.size() > 1))
                        .ifPresent(cases::add);
            }
        }
        if (cases.isEmpty() && named.size() > 1 && curves.size() == named.size()) {
            findings.add(stated.problem(
                    CURVES,
                    named.size() + " curves, none of which shows a highstand",
                    "a curve that shows one in some stage window, or highstands from a table"));
        }
        choice.highstandTable().ifPresent(id -> cases.addAll(underTable(id, read, curves)));
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

    private Optional<SeaLevelCase> fromCurve(
            SeaLevelCurve curve, WeightedCurve named, String path, boolean oneOfSeveral) {
        boolean shows = HighstandTable.canComeFrom(curve, library.stages());
        if (!shows && oneOfSeveral) {
            String why = "it shows no highstand in any stage window";
            findings.add(new Assumption("curve " + curve.id() + " is left out", why, "Stillstand's default", "all"));
            findings.add(stated.warning(path, "curve " + quote(curve.id()) + " is left out: " + why));
            return Optional.empty();
        }
        if (!shows) {
            findings.add(stated.problem(
                    path,
                    quote(curve.id()) + ", which shows no highstand",
                    "a curve that shows one in some stage window, or highstands from a table"));
            return Optional.empty();
        }
        Optional<HighstandOverrides> replaced = named.overrides()
                .map(id -> overrides(id, path.replaceFirst("\\.id$", ".overrides")))
                .orElse(overrides);
        return replaced.map(each -> {
            SeaLevelCase made = caseOf(curve, named.weight(), each);
            return new SeaLevelCase(
                    named.label(), made.weight(), made.curve(), made.highstands(), made.withoutOverrides());
        });
    }

    private SeaLevelCase caseOf(SeaLevelCurve curve, double weight, HighstandOverrides replaced) {
        HighstandTable table = HighstandTable.fromCurve(curve, library.stages(), replaced, options());
        Optional<HighstandTable> own = Optional.of(HighstandOverrides.NONE)
                .filter(none -> !none.equals(replaced))
                .map(none -> underSettings(HighstandTable.fromCurve(curve, library.stages(), none, options())));
        return new SeaLevelCase(curve.id(), weight, Optional.of(curve), underSettings(table), own);
    }

    /** Whether an id among the curves is that of a highstand table: one more account of sea level, which reads no curve. */
    private boolean isTable(String id) {
        return library.curve(id).isEmpty() && library.highstands(id).isPresent();
    }

    /** The table's highstands, beside each curve that levels and corals may read at their own ages. */
    private List<SeaLevelCase> underTable(String id, List<WeightedCurve> named, List<SeaLevelCurve> curves) {
        if (curves.size() < 2) {
            return fromTable(id, 1, curves.stream().findFirst(), TABLE).stream().toList();
        }
        List<SeaLevelCase> cases = new ArrayList<>();
        for (int i = 0; i < curves.size(); i++) {
            SeaLevelCurve curve = curves.get(i);
            fromTable(id, named.get(i).weight(), Optional.of(curve), TABLE)
                    .map(each -> new SeaLevelCase(curve.id(), each.weight(), each.curve(), each.highstands()))
                    .ifPresent(cases::add);
        }
        return cases;
    }

    private Optional<SeaLevelCase> fromTable(String id, double weight, Optional<SeaLevelCurve> curve, String path) {
        Optional<HighstandRows> rows = library.highstands(id);
        if (rows.isEmpty()) {
            findings.add(stated.problem(
                    path, quote(id), "the id of a highstand table" + RowReader.nearest(id, library.highstandIds())));
        }
        return rows.map(each -> new SeaLevelCase(
                id,
                weight,
                curve,
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
    private Optional<HighstandOverrides> overrides(String id, String path) {
        if (id.equals(WeightedCurve.NO_OVERRIDES)) {
            return Optional.of(HighstandOverrides.NONE);
        }
        Optional<HighstandRows> rows = library.highstands(id);
        if (rows.isEmpty()) {
            findings.add(stated.problem(
                    path,
                    quote(id),
                    "the id of a highstand table, or \"none\"" + RowReader.nearest(id, library.highstandIds())));
            return Optional.empty();
        }
        boolean known = true;
        for (HighstandEntry entry : rows.get().entries()) {
            if (library.stages().find(entry.stage()).isEmpty()) {
                known = false;
                findings.add(stated.problem(
                        path,
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
