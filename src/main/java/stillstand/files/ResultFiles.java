package stillstand.files;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import stillstand.figure.Figures;
import stillstand.ledger.Assumption;
import stillstand.sensitivity.CurveChoice;
import stillstand.study.Study;
import stillstand.study.StudyResult;
import stillstand.uplift.FlightResult;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelAnswer.Budget;
import stillstand.uplift.LevelAnswer.Share;

/** The files of a results folder, from a study and what was found. */
public final class ResultFiles {
    private static final String FIGURES = "figures";

    private ResultFiles() {}

    /**
     * Writes all of them.
     *
     * @param folder an empty folder
     * @throws IOException if one cannot be written
     */
    public static void write(Path folder, Study study, StudyResult result) throws IOException {
        Evidence evidence = Evidence.of(study);
        write(folder, ResultsJson.FILE, ResultsJson.text(result));
        write(folder, "table1.csv", PaperTable.text(evidence, result));
        write(folder, "rates.csv", RatesTable.text(evidence, result));
        write(folder, "pairings.csv", pairings(result));
        write(folder, "budget.csv", budget(result));
        if (!result.curveChoice().isEmpty()) {
            write(folder, "curve-choice.csv", curveChoice(result));
        }
        if (!result.comparison().isEmpty()) {
            write(folder, "comparison.csv", ComparisonTable.text(result));
        }
        if (SitesGeoJson.has(result)) {
            write(folder, "sites.geojson", SitesGeoJson.text(result));
        }
        write(folder, "ledger.csv", ledger(result));
        LeverageTables.write(folder, result.leverage());
    }

    /**
     * Writes all of them, and the figures beside them.
     *
     * @param folder an empty folder
     * @param figures how they are drawn
     * @param threads at work at once
     * @return figures that could not be drawn
     * @throws IOException if a file cannot be written
     */
    public static List<FigureFiles.Fault> write(
            Path folder, Study study, StudyResult result, FigureFiles figures, int threads) throws IOException {
        write(folder, study, result);
        return figures.write(Figures.of(result).figures(), folder.resolve(FIGURES), threads);
    }

    private static void write(Path folder, String name, String text) throws IOException {
        Files.writeString(folder.resolve(name), text, StandardCharsets.UTF_8);
    }

    /** A row for each group of inputs of each level that has a budget. */
    static String budget(StudyResult result) {
        List<BudgetRow> rows = result.levels().stream()
                .flatMap(level -> level.budget().stream().flatMap(budget -> rows(level, budget)))
                .toList();
        return new CsvTable<>(rows)
                .text("site", row -> row.level.site())
                .text("level", row -> row.level.level())
                .text("input", BudgetRow::input)
                .number("share", row -> Optional.of(row.share.share()))
                .number("total_share", row -> Optional.of(row.share.totalShare()))
                .number("sd_if_exact_m_per_kyr", row -> Optional.of(row.share.sdIfExact()))
                .write();
    }

    private static Stream<BudgetRow> rows(LevelAnswer level, Budget budget) {
        return Stream.of(
                        row(level, "elevation", budget.elevation()),
                        row(level, "palaeodepth", budget.palaeodepth()),
                        row(level, "age", budget.age()),
                        row(level, "sea_level", budget.seaLevel()),
                        row(level, "surface_lowering", budget.surfaceLowering()))
                .flatMap(Optional::stream);
    }

    private static Optional<BudgetRow> row(LevelAnswer level, String input, Optional<Share> share) {
        return share.map(found -> new BudgetRow(level, input, found));
    }

    private record BudgetRow(LevelAnswer level, String input, Share share) {}

    /** A row for each level of a flight and each highstand it may record, and one for none. */
    static String pairings(StudyResult result) {
        List<PairingRow> rows = new ArrayList<>();
        for (FlightResult flight : result.flights()) {
            for (FlightResult.Unmatched level : flight.unmatched()) {
                flight.pairingsOf(level.level())
                        .forEach(pair -> rows.add(
                                new PairingRow(flight.site(), level.level(), pair.highstand(), pair.probability())));
                rows.add(new PairingRow(flight.site(), level.level(), "none", level.probability()));
            }
        }
        return new CsvTable<>(rows)
                .text("site", PairingRow::site)
                .text("level", PairingRow::level)
                .text("highstand", PairingRow::highstand)
                .number("probability", row -> Optional.of(row.probability))
                .write();
    }

    private record PairingRow(String site, String level, String highstand, double probability) {}

    /** A row for each curve and mixture of each level and flight. */
    static String curveChoice(StudyResult result) {
        CsvTable<CurveChoice> table = new CsvTable<>(result.curveChoice())
                .text("site", CurveChoice::site)
                .text("level", row -> row.level().orElse(""))
                .text("curve", CurveChoice::curve)
                .number("weight", row -> Optional.of(row.weight()))
                .number("log_evidence", CurveChoice::logEvidence);
        RatesTable.rate(table, "rate", row -> Optional.of(row.rate()));
        return table.text(
                        "records",
                        row -> row.matches().stream()
                                .map(match ->
                                        match.level() + " " + match.highstand().orElse("none"))
                                .collect(Collectors.joining("; ")))
                .write();
    }

    static String ledger(StudyResult result) {
        return new CsvTable<>(result.ledger())
                .text("assumption", Assumption::assumption)
                .text("value", Assumption::value)
                .text("source", Assumption::source)
                .text("applies_to", Assumption::appliesTo)
                .write();
    }
}
