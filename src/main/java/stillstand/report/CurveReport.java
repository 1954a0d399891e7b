package stillstand.report;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.sealevel.CurveFacts;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandOptions;
import stillstand.sealevel.HighstandOverrides;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.SharedErrors;
import stillstand.study.HighstandRows;
import stillstand.study.Library;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Summary;

/** The sea-level curves that a study may name, in plain text of at most 100 columns. */
public final class CurveReport {
    /** The overrides of a study that states none. */
    private static final String USUAL_OVERRIDES = "independent-highstands";

    /** Heads of {@link #highstandRows}. */
    public static final List<String> HIGHSTAND_COLUMNS =
            List.of("Stage", "Class", "Pick (ka)", "Pick (m)", "95 % (m)", "Used (ka)", "Used (m)", "From");

    private static final String INDENT = "  ";
    private static final String HANGING = "    ";

    private final List<String> lines = new ArrayList<>();

    private CurveReport() {}

    /** All curves with what to know of each, and the highstand tables. */
    public static String list(Library library) {
        CurveReport report = new CurveReport();
        for (SeaLevelCurve curve : library.curves()) {
            report.say(curve.id() + ": " + span(curve) + ", usable from "
                    + ka(curve.facts().usableFromKa()));
            report.facts(curve);
        }
        if (!library.highstands().isEmpty()) {
            report.say("Highstand tables: "
                    + String.join(
                            ", ",
                            library.highstands().stream()
                                    .map(CurveReport::counted)
                                    .toList()) + ".");
        }
        report.say("More of one: stillstand curves show ID. An archived table of your own: stillstand curves import.");
        return report.text();
    }

    /** One curve: its source and facts, the highstands it shows, and those a study gets from it by default. */
    public static String show(SeaLevelCurve curve, Library library) {
        CurveReport report = new CurveReport();
        CurveFacts facts = curve.facts();
        report.say(curve.id());
        report.say(INDENT + "Source: " + facts.citation());
        report.say(INDENT + "Span: " + span(curve) + ", "
                + Wording.counted(curve.knots().size(), "row") + ", usable from " + ka(facts.usableFromKa()));
        report.facts(curve);
        report.say(INDENT + "Errors: its ages ± " + ka(facts.curveAgeSigmaKa())
                + " (1 sigma); an error of its level is forgotten in " + ka(facts.correlationTimeKa()));
        facts.caveats().forEach(caveat -> report.say(INDENT + "Caveat: " + caveat));
        report.highstands(curve, library);
        return report.text();
    }

    private void facts(SeaLevelCurve curve) {
        CurveFacts facts = curve.facts();
        say(INDENT + (facts.spreadIsGuessed() ? "Spread, guessed at every age: " : "Spread: ") + facts.spreadMeaning());
        say(INDENT + "Zero: " + facts.zero());
        say(INDENT + "Ages: " + facts.ageScale());
    }

    private void highstands(SeaLevelCurve curve, Library library) {
        if (!HighstandTable.canComeFrom(curve, library.stages())) {
            say("It shows no highstand in any stage window: name a highstand table beside it.");
            return;
        }
        HighstandTable own =
                HighstandTable.fromCurve(curve, library.stages(), HighstandOverrides.NONE, HighstandOptions.DEFAULT);
        Optional<HighstandRows> overrides = library.highstands(USUAL_OVERRIDES);
        HighstandTable used = overrides
                .map(rows -> HighstandTable.fromCurve(
                        curve,
                        library.stages(),
                        new HighstandOverrides(rows.id(), rows.entries()),
                        HighstandOptions.DEFAULT))
                .orElse(own);
        lines.add("");
        say("Highstands: picked from the curve, and as a study uses them unless it says otherwise (* from table "
                + USUAL_OVERRIDES + ", † Stillstand's own). ± is 1 sigma; in use it holds the shared errors too.");
        PlainTable table = new PlainTable(HIGHSTAND_COLUMNS, 2);
        highstandRows(own, used, curve.id()).forEach(table::row);
        table.lines().forEach(line -> lines.add(INDENT + line));
        long older = used.rows().stream().filter(Highstand::isOlder).count();
        say("Beyond them " + older + " generic ones follow, one every 41 ka.");
        if (curve.facts().spreadIsGuessed()) {
            say("Every band of a pick above is a guess: the source gives none that can be used.");
        }
    }

    /**
     * The highstands of a curve as picked and as used, a row each, young to old, without the generic older ones.
     *
     * @param own as picked from the curve
     * @param used with what replaces them
     * @param curve its id
     */
    public static List<List<String>> highstandRows(HighstandTable own, HighstandTable used, String curve) {
        return used.rows().stream()
                .filter(row -> !row.isOlder())
                .map(row -> cells(row, own.find(row.stage()).orElse(row), used.sharedErrors(), curve))
                .toList();
    }

    private static List<String> cells(Highstand used, Highstand own, SharedErrors shared, String curve) {
        boolean isPick = own.source().equals(curve);
        Interval band = Summary.of(own.level()).interval95();
        return List.of(
                used.stage(),
                used.highstandClass().word(),
                isPick ? Wording.number(Digits.text(own.ageKa(), 1)) : "",
                isPick ? tenths(own.level().quantile(0.5)) : "",
                isPick ? tenths(band.low()) + " to " + tenths(band.high()) : "",
                withSigma(used.ageKa(), used.marginalAgeSigmaKa(shared)),
                withSigma(used.level().mean(), used.marginalLevelSigmaMetres(shared)),
                isPick ? (used.source().equals(curve) ? "curve" : "*") : "†");
    }

    private static String counted(HighstandRows table) {
        return table.id() + " (" + Wording.counted(table.entries().size(), "stage") + ")";
    }

    private static String span(SeaLevelCurve curve) {
        return Digits.text(curve.fromKa()) + " to " + ka(curve.toKa());
    }

    private static String withSigma(double value, double sigma) {
        return tenths(value) + " ± " + Digits.text(sigma, 1);
    }

    private static String ka(double value) {
        return Digits.text(value) + " ka";
    }

    private static String tenths(double value) {
        return Wording.number(Digits.text(value, 1));
    }

    private void say(String text) {
        String indent = text.startsWith(INDENT) ? INDENT : "";
        lines.addAll(
                Wording.wrapped(text, TerminalReport.WIDTH - indent.length(), indent.isEmpty() ? "" : HANGING).stream()
                        .map(line -> line.startsWith(HANGING) ? line : indent + line)
                        .toList());
    }

    private String text() {
        return String.join("\n", lines) + "\n";
    }
}
