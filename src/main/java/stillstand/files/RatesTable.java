package stillstand.files;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Function;
import java.util.stream.Stream;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.Level;
import stillstand.study.StudyResult;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelAnswer.Bound;
import stillstand.uplift.LevelAnswer.Errors;
import stillstand.uplift.LevelAnswer.FirstOrder;
import stillstand.uplift.LevelAnswer.MonteCarlo;
import stillstand.uplift.LevelAnswer.SampleAnswer;
import stillstand.uplift.Rate;

/** {@code rates.csv}, for programs: a row for each level and under it one for each of its samples, all digits. */
final class RatesTable {
    private RatesTable() {}

    static String text(Evidence evidence, StudyResult result) {
        List<Row> rows = result.levels().stream()
                .flatMap(level -> rows(level, evidence, result))
                .toList();
        CsvTable<Row> table = new CsvTable<>(rows)
                .text("site", row -> row.level.site())
                .text("level", row -> row.level.level())
                .text("sample", row -> row.sample.map(SampleAnswer::sample).orElse(""));
        rate(table, "rate", Row::rate);
        rate(table, "with_prior", row -> row.ofLevel(LevelAnswer::rateWithPrior));
        table.number(
                        "first_order_m_per_kyr",
                        row -> row.ofLevel(LevelAnswer::firstOrder).map(FirstOrder::rate))
                .number(
                        "first_order_1sigma_m_per_kyr",
                        row -> row.ofLevel(LevelAnswer::firstOrder).map(FirstOrder::sigma))
                .number("probability_uplift", row -> row.ofLevel(LevelAnswer::probabilityUplift))
                .number(
                        "up_slower_than_m_per_kyr",
                        row -> row.ofLevel(LevelAnswer::bound).map(Bound::upSlowerThan))
                .number(
                        "down_slower_than_m_per_kyr",
                        row -> row.ofLevel(LevelAnswer::bound).map(Bound::downSlowerThan))
                .number(
                        "bound_probability",
                        row -> row.ofLevel(LevelAnswer::bound).map(Bound::probability))
                .text(
                        "draws",
                        row -> row.ofLevel(LevelAnswer::monteCarlo)
                                .map(draws -> Integer.toString(draws.draws()))
                                .orElse(""))
                .text(
                        "converged",
                        row -> row.ofLevel(LevelAnswer::monteCarlo)
                                .map(draws -> draws.converged() ? "yes" : "no")
                                .orElse(""))
                .number(
                        "error_median_m_per_kyr",
                        row -> row.ofLevel(LevelAnswer::monteCarlo).flatMap(MonteCarlo::errorMedian))
                .number("error_low95_m_per_kyr", row -> row.errors95().map(Errors::low))
                .number("error_high95_m_per_kyr", row -> row.errors95().map(Errors::high))
                .text("why_no_rate", Row::whyNoRate)
                .own("", Row::own)
                .own("site_", row -> evidence.ownOfSite(row.level.site()));
        return table.write();
    }

    /** The columns of a rate. */
    static <T> void rate(CsvTable<T> table, String name, Function<T, Optional<Rate>> rate) {
        table.number(name + "_median_m_per_kyr", row -> rate.apply(row).map(Rate::median))
                .number(name + "_mean_m_per_kyr", row -> rate.apply(row).flatMap(Rate::mean))
                .number(name + "_sd_m_per_kyr", row -> rate.apply(row).flatMap(Rate::sd))
                .number(
                        name + "_low68_m_per_kyr",
                        row -> rate.apply(row).map(found -> found.interval68().low()))
                .number(
                        name + "_high68_m_per_kyr",
                        row -> rate.apply(row).map(found -> found.interval68().high()))
                .number(
                        name + "_low95_m_per_kyr",
                        row -> rate.apply(row).map(found -> found.interval95().low()))
                .number(
                        name + "_high95_m_per_kyr",
                        row -> rate.apply(row).map(found -> found.interval95().high()))
                .number(
                        name + "_shortest_low68_m_per_kyr",
                        row -> rate.apply(row).map(found -> found.shortest68().low()))
                .number(
                        name + "_shortest_high68_m_per_kyr",
                        row -> rate.apply(row).map(found -> found.shortest68().high()))
                .number(
                        name + "_shortest_low95_m_per_kyr",
                        row -> rate.apply(row).map(found -> found.shortest95().low()))
                .number(
                        name + "_shortest_high95_m_per_kyr",
                        row -> rate.apply(row).map(found -> found.shortest95().high()));
    }

    private static Stream<Row> rows(LevelAnswer level, Evidence evidence, StudyResult result) {
        Map<String, String> own =
                evidence.level(level.site(), level.level()).map(Level::own).orElse(Map.of());
        String waiting = result.whyWaiting(level.site(), level.level()).orElse("");
        Stream<Row> samples = level.samples().stream().map(sample -> {
            Optional<DatedSample> dated = evidence.sample(level.site(), level.level(), sample.sample());
            return new Row(
                    level,
                    Optional.of(sample),
                    sample.whyNoRate().orElse(""),
                    dated.map(DatedSample::own).orElse(Map.of()));
        });
        return Stream.concat(Stream.of(new Row(level, Optional.empty(), waiting, own)), samples);
    }

    /** A level's own row, or the row of one of its samples. */
    private record Row(LevelAnswer level, Optional<SampleAnswer> sample, String whyNoRate, Map<String, String> own) {
        Optional<Rate> rate() {
            return sample.isPresent() ? sample.get().rate() : level.rate();
        }

        /** Something of the level's answer; absent in the row of a sample. */
        <T> Optional<T> ofLevel(Function<LevelAnswer, Optional<T>> what) {
            return sample.isPresent() ? Optional.empty() : what.apply(level);
        }

        Optional<Errors> errors95() {
            return ofLevel(LevelAnswer::monteCarlo).flatMap(MonteCarlo::errorInterval95);
        }
    }
}
