package stillstand.report;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputWarning;
import stillstand.study.StudyResult;
import stillstand.uplift.BetweenLevels;
import stillstand.uplift.FlightResult;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelAnswer.MonteCarlo;
import stillstand.uplift.LevelAnswer.SampleAnswer;
import stillstand.uplift.LevelAnswers;

/** A result as a summary to show a colleague: plain text of at most 100 columns, a screen a site. */
public final class TerminalReport {
    /** Widest line. */
    static final int WIDTH = 100;

    private static final int NAME_WIDTH = 16;
    private static final int STAGES_WIDTH = 18;
    private static final int ASSUMPTIONS_SHOWN = 8;
    private static final int WARNINGS_SHOWN = 10;
    private static final double DATES_DISAGREE_BELOW = 0.05;

    private final StudyResult result;
    private final List<String> lines = new ArrayList<>();

    private TerminalReport(StudyResult result) {
        this.result = result;
    }

    /**
     * The summary.
     *
     * @param title of the study
     * @param result what was found
     * @param folder where the files of the result are, as the user would write it
     */
    public static String text(String title, StudyResult result, String folder) {
        TerminalReport report = new TerminalReport(result);
        report.opening(title);
        report.sites();
        report.curves();
        report.together();
        report.oddities();
        report.assumptions(folder);
        report.closing(folder);
        return String.join("\n", report.lines) + "\n";
    }

    private void opening(String title) {
        say(title);
        say(Wording.CAUTION);
        say("Rates are in m/kyr (the same as mm/yr), uplift positive: median ± one standard deviation, and the shortest"
                + " interval that holds 95 %.");
    }

    private void sites() {
        Map<String, List<LevelAnswer>> sites = new LinkedHashMap<>();
        result.levels()
                .forEach(level -> sites.computeIfAbsent(level.site(), name -> new ArrayList<>())
                        .add(level));
        sites.forEach(this::site);
    }

    private void curves() {
        List<String> together = CurveChoiceReport.ofAll(result.curveEvidence());
        if (!together.isEmpty()) {
            lines.add("");
            together.forEach(this::say);
        }
    }

    private void site(String name, List<LevelAnswer> levels) {
        long rates = levels.stream().filter(level -> level.rate().isPresent()).count();
        lines.add("");
        say(name + ": " + Wording.counted(levels.size(), "level") + ", " + rates + " with a rate");
        result.flight(name)
                .ifPresent(flight -> new FlightReport(flight).opening().forEach(line -> say("  " + line)));
        for (LevelAnswer level : levels) {
            level.bound()
                    .ifPresent(bound -> level.rate()
                            .ifPresent(
                                    rate -> say("  " + level.level() + " moves " + Wording.bound(bound, rate) + ".")));
        }
        table(levels).lines().forEach(line -> lines.add("  " + Wording.cut(line, WIDTH - 2)));
        result.flight(name).ifPresent(this::flight);
        CurveChoiceReport.ofSite(name, result.curveChoice()).forEach(line -> say("  " + line));
        levels.forEach(this::remarks);
        for (BetweenLevels between : result.intervals()) {
            if (between.site().equals(name)) {
                say("  Between " + between.fromLevel() + " and " + between.toLevel() + ": "
                        + Wording.rate(between.rate()) + " m/kyr, 95 % " + Wording.interval95(between.rate()) + ".");
            }
        }
        new LeverageReport(name, result.leverage()).lines().forEach(line -> say("  " + line));
    }

    private void flight(FlightResult flight) {
        FlightReport report = new FlightReport(flight);
        report.pairings().lines().forEach(line -> lines.add("  " + Wording.cut(line, WIDTH - 2)));
        report.closing().forEach(line -> say("  " + line));
    }

    private static PlainTable table(List<LevelAnswer> levels) {
        PlainTable table =
                new PlainTable(List.of("Level", "Stage", "Age (ka)", "RSL (m)", "Rate", "95 %", "First order"), 2);
        for (LevelAnswer level : levels) {
            String name = Wording.cut(level.level(), NAME_WIDTH);
            if (level.rate().isPresent()) {
                table.row(List.of(
                        name,
                        Wording.cut(Wording.stages(level.stages()), STAGES_WIDTH),
                        level.age().map(Wording::quantity).orElse(""),
                        level.relativeSeaLevelMetres().map(Wording::quantity).orElse(""),
                        level.rate().map(Wording::rate).orElse(""),
                        level.rate().map(Wording::interval95).orElse(""),
                        level.firstOrder().map(Wording::firstOrder).orElse("")));
            }
            for (SampleAnswer sample : level.samples()) {
                sample.rate()
                        .ifPresent(rate -> table.row(List.of(
                                "  " + Wording.cut(sample.sample(), NAME_WIDTH - 2),
                                "at its own age",
                                sample.age().map(Wording::quantity).orElse(""),
                                "",
                                Wording.rate(rate),
                                Wording.interval95(rate),
                                "")));
            }
        }
        return table;
    }

    /** What the table cannot say of a level. */
    private void remarks(LevelAnswer level) {
        result.whyWaiting(level.site(), level.level())
                .ifPresent(reason -> say("  " + level.level()
                        + (reason.equals(LevelAnswers.ONE_EARTHQUAKE)
                                ? " is one earthquake's step: it records no sea level, and stays out of rates and matching."
                                : " waits: " + reason + ".")));
        for (SampleAnswer sample : level.samples()) {
            sample.whyNoRate()
                    .ifPresent(reason -> say("  " + level.level() + ", " + sample.sample() + ": " + reason + "."));
        }
        level.coralsTogether()
                .ifPresent(rate -> say("  The corals of " + level.level() + " together, each at its own age: "
                        + Wording.rate(rate) + " m/kyr, 95 % " + Wording.interval95(rate) + "."));
        level.agreement()
                .filter(agreement -> agreement.p() < DATES_DISAGREE_BELOW)
                .ifPresent(agreement -> say("  The dates of " + level.level() + " disagree: so large a scatter comes by"
                        + " chance with probability below " + DATES_DISAGREE_BELOW
                        + ". If the older ones are inherited or reworked, mark them in samples.csv (dates = maximum): the"
                        + " youngest then dates the last occupation."));
        if (level.monteCarlo().isPresent() && !level.monteCarlo().get().converged()) {
            say("  " + level.level() + ": "
                    + level.monteCarlo().map(MonteCarlo::draws).orElse(0)
                    + " draws did not settle the digits asked for; its last digit may move with the seed.");
        }
    }

    private void together() {
        List<String> all = new ComparisonReport(result).lines();
        if (!all.isEmpty()) {
            lines.add("");
            all.forEach(this::say);
        }
    }

    private void oddities() {
        if (!result.failures().isEmpty()) {
            lines.add("");
            say("Not done:");
            result.failures().forEach(failure -> say("  " + failure.site() + ": " + failure.reason()));
        }
        if (!result.warnings().isEmpty()) {
            lines.add("");
            say("Odd in the input:");
            result.warnings().stream()
                    .limit(WARNINGS_SHOWN)
                    .map(InputWarning::placed)
                    .forEach(warning -> say("  " + warning));
            more(result.warnings().size() - WARNINGS_SHOWN, "results.json");
        }
    }

    private void assumptions(String folder) {
        if (result.ledger().isEmpty()) {
            return;
        }
        lines.add("");
        say("What it rests on:");
        List<Assumption> first = result.ledger().stream()
                .sorted((a, b) -> Boolean.compare(isLocal(a), isLocal(b)))
                .limit(ASSUMPTIONS_SHOWN)
                .toList();
        for (Assumption line : first) {
            String where = isLocal(line) ? " [" + line.appliesTo() + "]" : "";
            say("  " + line.assumption() + ": " + line.value() + " (" + line.source() + ")" + where);
        }
        more(result.ledger().size() - first.size(), folder + "/ledger.csv");
    }

    private static boolean isLocal(Assumption line) {
        return !line.appliesTo().equals("all");
    }

    private void more(int count, String where) {
        if (count > 0) {
            say("  and " + count + " more in " + where);
        }
    }

    private void closing(String folder) {
        lines.add("");
        say("In " + folder
                + ": table1.csv for a paper, rates.csv with all digits, budget.csv with what each input does,"
                + " ledger.csv with every assumption, results.json with all of it.");
        say("Stillstand " + result.provenance().version() + ", seed "
                + result.provenance().seed() + ".");
    }

    private void say(String text) {
        String indent = text.startsWith("  ") ? "  " : "";
        lines.addAll(Wording.wrapped(text, WIDTH - indent.length(), indent.isEmpty() ? "" : "  ").stream()
                .map(line -> line.startsWith(indent) ? line : indent + line)
                .toList());
    }
}
