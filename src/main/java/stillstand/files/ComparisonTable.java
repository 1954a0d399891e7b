package stillstand.files;

import java.util.Optional;
import stillstand.comparison.SiteComparison;
import stillstand.study.StudyResult;

/** {@code comparison.csv}: a row for each pair of sites, the answer and beside it the wrong one that takes them for independent. */
final class ComparisonTable {
    private ComparisonTable() {}

    static String text(StudyResult result) {
        return new CsvTable<>(result.comparison())
                .text("a", SiteComparison::a)
                .text("b", SiteComparison::b)
                .text("a_level", pair -> pair.aLevel().orElse(""))
                .text("b_level", pair -> pair.bLevel().orElse(""))
                .number(
                        "difference_median_m_per_kyr",
                        pair -> Optional.of(pair.difference().median()))
                .number("difference_mean_m_per_kyr", pair -> pair.difference().mean())
                .number("difference_sd_m_per_kyr", pair -> pair.difference().sd())
                .number(
                        "difference_low68_m_per_kyr",
                        pair -> Optional.of(pair.difference().interval68().low()))
                .number(
                        "difference_high68_m_per_kyr",
                        pair -> Optional.of(pair.difference().interval68().high()))
                .number(
                        "difference_low95_m_per_kyr",
                        pair -> Optional.of(pair.difference().interval95().low()))
                .number(
                        "difference_high95_m_per_kyr",
                        pair -> Optional.of(pair.difference().interval95().high()))
                .number("probability_a_faster", pair -> Optional.of(pair.probabilityAFaster()))
                .number("correlation", SiteComparison::correlation)
                .text("shared_errors", SiteComparison::sharedErrors)
                .number("effective_fraction", SiteComparison::effectiveFraction)
                .number(
                        "independent_low95_m_per_kyr",
                        pair -> Optional.of(
                                pair.independent().difference().interval95().low()))
                .number(
                        "independent_high95_m_per_kyr",
                        pair -> Optional.of(
                                pair.independent().difference().interval95().high()))
                .number(
                        "independent_probability_a_faster",
                        pair -> Optional.of(pair.independent().probabilityAFaster()))
                .write();
    }
}
