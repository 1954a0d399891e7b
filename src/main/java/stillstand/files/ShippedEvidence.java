package stillstand.files;

import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.io.Reader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVParser;
import org.apache.commons.csv.CSVRecord;
import stillstand.dating.DatingMethod;
import stillstand.dating.DatingMethodTable;
import stillstand.shoreline.DepthHabitat;
import stillstand.shoreline.DepthLimits;
import stillstand.shoreline.HabitatTable;
import stillstand.shoreline.Indicator;
import stillstand.shoreline.IndicatorTable;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

/**
 * The tables of evidence that come with the tool, from {@code indicators.csv}, {@code coral-depths.csv} and
 * {@code dating-methods.csv} on the class path. Each file says what its columns mean.
 *
 * @param indicators landforms and deposits
 * @param habitats depths at which corals grow
 * @param methods ways of dating
 */
public record ShippedEvidence(IndicatorTable indicators, HabitatTable habitats, DatingMethodTable methods) {
    private static final String FOLDER = "/stillstand/";

    private static final CSVFormat FORMAT = CSVFormat.RFC4180
            .builder()
            .setHeader()
            .setSkipHeaderRecord(true)
            .setCommentMarker('#')
            .get();

    /**
     * Reads all three.
     *
     * @throws IllegalStateException if a shipped row is wrong, which is a fault of the program
     */
    public static ShippedEvidence load() {
        return new ShippedEvidence(
                new IndicatorTable(rows("indicators.csv", ShippedEvidence::indicator)),
                new HabitatTable(rows("coral-depths.csv", ShippedEvidence::habitat)),
                new DatingMethodTable(rows("dating-methods.csv", ShippedEvidence::method)));
    }

    private static Indicator indicator(CSVRecord row) {
        String id = row.get("id");
        return new Indicator(
                id,
                row.get("name"),
                row.get("upper_limit"),
                row.get("lower_limit"),
                number(row, "reference_water_level_m")
                        .map(level -> Indicator.meaning(id, level, Double.parseDouble(row.get("range_m")))),
                Integer.parseInt(row.get("record_count")),
                row.get("source"));
    }

    private static DepthHabitat habitat(CSVRecord row) {
        String others = row.get("other_ids");
        return new DepthHabitat(
                row.get("id"),
                row.get("name"),
                row.get("province"),
                others.isBlank() ? List.of() : List.of(others.split(" ")),
                depthMetres(row),
                row.get("source"),
                row.get("note"));
    }

    private static Optional<Uncertain> depthMetres(CSVRecord row) {
        return switch (row.get("kind")) {
            case "distribution" ->
                Optional.of(new DepthLimits(
                                Double.parseDouble(row.get("upper95_m")),
                                Double.parseDouble(row.get("central_m")),
                                number(row, "lower68_m"),
                                Double.parseDouble(row.get("lower95_m")))
                        .depthMetres());
            case "zone" ->
                Optional.of(new Uniform(
                        Double.parseDouble(row.get("zone_min_m")), Double.parseDouble(row.get("zone_max_m"))));
            case "none" -> Optional.empty();
            default ->
                throw new IllegalArgumentException("kind must be distribution, zone or none but is " + row.get("kind"));
        };
    }

    private static DatingMethod method(CSVRecord row) {
        return new DatingMethod(
                row.get("id"),
                row.get("name"),
                number(row, "typical_spread_percent")
                        .map(percent -> new DatingMethod.Spread(
                                percent,
                                Integer.parseInt(row.get("usual_sigmas")),
                                Integer.parseInt(row.get("record_count")))),
                row.get("source"),
                row.get("note"));
    }

    private static Optional<Double> number(CSVRecord row, String column) {
        String text = row.get(column);
        return text.isBlank() ? Optional.empty() : Optional.of(Double.valueOf(text));
    }

    private static <T> List<T> rows(String file, Function<CSVRecord, T> toRow) {
        List<T> rows = new ArrayList<>();
        InputStream stream = ShippedEvidence.class.getResourceAsStream(FOLDER + file);
        if (stream == null) {
            throw new IllegalStateException("the program lacks its table " + file);
        }
        try (Reader reader = new InputStreamReader(stream, StandardCharsets.UTF_8);
                CSVParser parser = FORMAT.parse(reader)) {
            for (CSVRecord row : parser) {
                try {
                    rows.add(toRow.apply(row));
                } catch (IllegalArgumentException wrong) {
                    throw new IllegalStateException(
                            "the program's table " + file + " is wrong at line " + parser.getCurrentLineNumber(),
                            wrong);
                }
            }
        } catch (IOException broken) {
            throw new UncheckedIOException(broken);
        }
        return rows;
    }
}
