package stillstand.files;

import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Function;
import stillstand.shoreline.DatedSample;
import stillstand.shoreline.Level;
import stillstand.study.StudyResult;
import stillstand.study.StudyResult.HighstandUsed;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;
import stillstand.uncertainty.Uncertain;
import stillstand.uplift.FlightResult;
import stillstand.uplift.FlightSetup;
import stillstand.uplift.LevelAnswer;
import stillstand.uplift.LevelAnswer.StageProbability;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;

/**
 * {@code table1.csv}, for a paper: rates to one significant digit of their standard deviation, other computed numbers to
 * two, what the user gave as it was given. Highstand and age of a level that is tied to no single highstand are those that the
 * flight of its site gives it, where there is one.
 */
final class PaperTable {
    private static final int RATE_DIGITS = 1;
    private static final int OTHER_DIGITS = 2;

    private PaperTable() {}

    static String text(Evidence evidence, StudyResult result) {
        List<Row> rows = result.levels().stream()
                .map(answer -> row(answer, evidence, result))
                .toList();
        CsvTable<Row> table = new CsvTable<>(rows)
                .text("site", row -> row.answer.site())
                .text("level", row -> row.answer.level())
                .text("indicator", row -> row.ofLevel(level -> level.meaning().indicator()))
                .text("elevation_m", row -> row.ofLevel(level -> given(level.elevationMetres(), Uncertain::mean)))
                .text(
                        "elevation_1sigma_m",
                        row -> row.ofLevel(level -> given(level.elevationMetres(), Uncertain::standardDeviation)));
        quantity(table, "relative_sea_level", "m", row -> row.answer.relativeSeaLevelMetres());
        table.text("stage", row -> row.stage.map(StageProbability::highstand).orElse(""))
                .text(
                        "stage_probability",
                        row -> row.stage
                                .map(stage -> Digits.text(stage.probability(), 2))
                                .orElse(""))
                .text("sea_level_m", row -> row.ofHighstand(HighstandUsed::levelMetres))
                .text("sea_level_1sigma_m", row -> row.ofHighstand(HighstandUsed::levelSigmaMetres));
        quantity(table, "age", "ka", Row::age);
        table.text(
                        "samples_accepted",
                        row -> row.ofLevel(level -> Long.toString(level.samples().stream()
                                .filter(DatedSample::used)
                                .count())))
                .text(
                        "samples_total",
                        row -> row.ofLevel(
                                level -> Integer.toString(level.samples().size())))
                .text("rate_m_per_kyr", row -> row.ofRate(Rate::median))
                .text("rate_1sigma_m_per_kyr", row -> row.ofRate(PaperTable::sigma))
                .text(
                        "rate_low95_m_per_kyr",
                        row -> row.ofRate(rate -> rate.shortest95().low()))
                .text(
                        "rate_high95_m_per_kyr",
                        row -> row.ofRate(rate -> rate.shortest95().high()))
                .text("why_no_rate", Row::whyNoRate)
                .own("", row -> row.level.map(Level::own).orElse(Map.of()))
                .own("site_", row -> evidence.ownOfSite(row.answer.site()));
        return table.write();
    }

    private static void quantity(
            CsvTable<Row> table, String name, String unit, Function<Row, Optional<Quantity>> quantity) {
        table.text(
                        name + "_" + unit,
                        row -> quantity.apply(row)
                                .map(found -> Digits.text(found.median(), sigma(found), OTHER_DIGITS))
                                .orElse(""))
                .text(
                        name + "_1sigma_" + unit,
                        row -> quantity.apply(row)
                                .map(found -> Digits.text(sigma(found), sigma(found), OTHER_DIGITS))
                                .orElse(""));
    }

    private static Row row(LevelAnswer answer, Evidence evidence, StudyResult result) {
        Optional<Level> level = evidence.level(answer.site(), answer.level());
        Optional<FlightResult> flight = result.flight(answer.site())
                .filter(found -> level.filter(known -> FlightSetup.isToBeMatched(known.formsAt(), known.highstand()))
                        .isPresent());
        Optional<StageProbability> stage = flight.isPresent()
                ? flight.get().pairingsOf(answer.level()).stream()
                        .map(pair -> new StageProbability(pair.highstand(), pair.probability()))
                        .findFirst()
                : answer.stages().stream().max(Comparator.comparingDouble(StageProbability::probability));
        Optional<Quantity> age = answer.age()
                .or(() -> flight.stream()
                        .flatMap(found -> found.predictedAges().stream())
                        .filter(predicted -> predicted.level().equals(answer.level()))
                        .map(FlightResult.PredictedAge::age)
                        .findFirst());
        Optional<HighstandUsed> highstand = stage.flatMap(likeliest -> result.seaLevel().highstands().stream()
                .filter(used -> used.stage().equals(likeliest.highstand()))
                .findFirst());
        String waiting = result.whyWaiting(answer.site(), answer.level()).orElse("");
        return new Row(answer, level, stage, highstand, age, waiting);
    }

    private static String given(Uncertain number, Function<Uncertain, Double> what) {
        return Digits.text(what.apply(number));
    }

    private static double sigma(Quantity quantity) {
        return sigma(quantity.sd(), quantity.interval68());
    }

    private static double sigma(Rate rate) {
        return sigma(rate.sd(), rate.interval68());
    }

    /** Half the 68 % interval stands in where a standard deviation does not exist. */
    private static double sigma(Optional<Double> sd, Interval interval68) {
        return sd.orElse(interval68.width() / 2);
    }

    private record Row(
            LevelAnswer answer,
            Optional<Level> level,
            Optional<StageProbability> stage,
            Optional<HighstandUsed> highstand,
            Optional<Quantity> age,
            String whyNoRate) {
        String ofLevel(Function<Level, String> what) {
            return level.map(what).orElse("");
        }

        String ofHighstand(Function<HighstandUsed, Double> what) {
            return highstand
                    .map(used -> Digits.text(what.apply(used), used.levelSigmaMetres(), OTHER_DIGITS))
                    .orElse("");
        }

        String ofRate(Function<Rate, Double> what) {
            return answer.rate()
                    .map(rate -> Digits.text(what.apply(rate), sigma(rate), RATE_DIGITS))
                    .orElse("");
        }
    }
}
