package stillstand.files;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import stillstand.sensitivity.AssumptionSwitch;
import stillstand.sensitivity.CurveLeftOut;
import stillstand.sensitivity.LevelTornado;
import stillstand.sensitivity.LevelTornado.Bar;
import stillstand.sensitivity.Leverage;
import stillstand.sensitivity.NextMeasurement;
import stillstand.sensitivity.NextMeasurement.PairingGain;
import stillstand.sensitivity.SampleLeftOut;
import stillstand.sensitivity.ShortRate;

/** The tables of what answers hang on; only those that have a row are written. */
final class LeverageTables {
    private LeverageTables() {}

    static void write(Path folder, Leverage leverage) throws IOException {
        write(folder, "tornado.csv", leverage.tornado(), tornado(leverage));
        write(folder, "next-measurements.csv", leverage.nextMeasurements(), nextMeasurements(leverage));
        write(folder, "assumption-switches.csv", leverage.assumptionSwitches(), switches(leverage));
        write(folder, "samples-left-out.csv", leverage.samplesLeftOut(), samples(leverage));
        write(folder, "curves-left-out.csv", leverage.curvesLeftOut(), curves(leverage));
    }

    private static void write(Path folder, String name, List<?> rows, String text) throws IOException {
        if (!rows.isEmpty()) {
            Files.writeString(folder.resolve(name), text, StandardCharsets.UTF_8);
        }
    }

    private record BarRow(LevelTornado tornado, Bar bar) {}

    /** A row for each input of each level. */
    static String tornado(Leverage leverage) {
        List<BarRow> rows = leverage.tornado().stream()
                .flatMap(tornado -> tornado.bars().stream().map(bar -> new BarRow(tornado, bar)))
                .toList();
        return new CsvTable<>(rows)
                .text("site", row -> row.tornado.site())
                .text("level", row -> row.tornado.level())
                .text("highstand", row -> row.tornado.stage().orElse(""))
                .number("rate_at_medians_m_per_kyr", row -> Optional.of(row.tornado.rate()))
                .text("input", row -> row.bar.input())
                .text("unit", row -> row.bar.unit())
                .number("input_low68", row -> Optional.of(row.bar.input68().low()))
                .number("input_high68", row -> Optional.of(row.bar.input68().high()))
                .number("input_low95", row -> Optional.of(row.bar.input95().low()))
                .number("input_high95", row -> Optional.of(row.bar.input95().high()))
                .number("rate_at_low68_m_per_kyr", row -> Optional.of(row.bar.rateAtLow68()))
                .number("rate_at_high68_m_per_kyr", row -> Optional.of(row.bar.rateAtHigh68()))
                .number("rate_at_low95_m_per_kyr", row -> Optional.of(row.bar.rateAtLow95()))
                .number("rate_at_high95_m_per_kyr", row -> Optional.of(row.bar.rateAtHigh95()))
                .write();
    }

    /** A row for each measurement, ranked. */
    static String nextMeasurements(Leverage leverage) {
        return new CsvTable<>(leverage.nextMeasurements())
                .text("site", NextMeasurement::site)
                .text("rate_of", NextMeasurement::rateOf)
                .text("level", NextMeasurement::level)
                .text("sample", row -> row.sample().orElse(""))
                .text("measurement", NextMeasurement::measurement)
                .number("sigma", row -> Optional.of(row.sigma()))
                .text("unit", NextMeasurement::unit)
                .number("width95_m_per_kyr", row -> Optional.of(row.width95()))
                .number("expected_width95_m_per_kyr", row -> Optional.of(row.expectedWidth95()))
                .number("width95_change_percent", row -> Optional.of(row.width95ChangePercent()))
                .number("width95_change_percent_error", row -> Optional.of(row.width95ChangePercentError()))
                .number("probability_wider", row -> Optional.of(row.probabilityWider()))
                .number("pairing_certainty", row -> row.pairing().map(PairingGain::certainty))
                .number("expected_pairing_certainty", row -> row.pairing().map(PairingGain::expectedCertainty))
                .number("pairing_certainty_error", row -> row.pairing().map(PairingGain::error))
                .number("effective_draws", row -> Optional.of(row.effectiveDraws()))
                .write();
    }

    /** A row for each rate that an assumption touches. */
    static String switches(Leverage leverage) {
        CsvTable<AssumptionSwitch> table = new CsvTable<>(leverage.assumptionSwitches())
                .text("site", AssumptionSwitch::site)
                .text("rate_of", AssumptionSwitch::rateOf)
                .text("assumption", AssumptionSwitch::assumption)
                .text("was", AssumptionSwitch::was)
                .text("would_be", AssumptionSwitch::wouldBe);
        rate(table, "rate", row -> Optional.of(row.rate()));
        rate(table, "rate_would_be", AssumptionSwitch::rateWouldBe);
        return table.write();
    }

    /** A row for each sample. */
    static String samples(Leverage leverage) {
        CsvTable<SampleLeftOut> table = new CsvTable<>(leverage.samplesLeftOut())
                .text("site", SampleLeftOut::site)
                .text("level", SampleLeftOut::level)
                .text("sample", SampleLeftOut::sample);
        rate(table, "level_rate", SampleLeftOut::levelRate);
        rate(table, "level_rate_without", SampleLeftOut::levelRateWithout);
        rate(table, "flight_rate", SampleLeftOut::flightRate);
        rate(table, "flight_rate_without", SampleLeftOut::flightRateWithout);
        return table.write();
    }

    /** A row for each rate and each of several curves. */
    static String curves(Leverage leverage) {
        CsvTable<CurveLeftOut> table = new CsvTable<>(leverage.curvesLeftOut())
                .text("site", CurveLeftOut::site)
                .text("rate_of", CurveLeftOut::rateOf)
                .text("curve", CurveLeftOut::curve)
                .number("weight", row -> Optional.of(row.weight()));
        rate(table, "rate", row -> Optional.of(row.rate()));
        rate(table, "rate_without", row -> Optional.of(row.rateWithout()));
        return table.write();
    }

    private static <R> void rate(CsvTable<R> table, String prefix, Function<R, Optional<ShortRate>> rate) {
        table.number(prefix + "_median_m_per_kyr", row -> rate.apply(row).map(ShortRate::median))
                .number(
                        prefix + "_low95_m_per_kyr",
                        row -> rate.apply(row).map(each -> each.interval95().low()))
                .number(
                        prefix + "_high95_m_per_kyr",
                        row -> rate.apply(row).map(each -> each.interval95().high()));
    }
}
