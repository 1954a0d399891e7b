package stillstand.sealevel;

import java.io.IOException;
import java.io.InputStream;
import java.io.StringReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.List;
import java.util.Optional;
import org.apache.commons.csv.CSVFormat;
import org.apache.commons.csv.CSVParser;
import org.apache.commons.csv.CSVRecord;
import stillstand.uncertainty.Normal;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;

/** The shipped package as the jar holds it, read without any check: the tests' own reader. */
final class ShippedPackage {
    static final JsonNode DESCRIPTOR = descriptor();
    static final StageTable STAGES = stages();
    static final HighstandOverrides INDEPENDENT = independent();
    static final SeaLevelCurve SPRATT = curve("spratt-lisiecki-2016");
    static final SeaLevelCurve WAELBROECK = curve("waelbroeck-2002");
    static final SeaLevelCurve BINTANJA = curve("bintanja-vandewal-2008");
    static final SeaLevelCurve LAMBECK = curve("lambeck-2014");
    static final List<SeaLevelCurve> CURVES = List.of(SPRATT, WAELBROECK, BINTANJA, LAMBECK);

    private ShippedPackage() {}

    static JsonNode resource(String name) {
        for (JsonNode each : DESCRIPTOR.get("resources")) {
            if (each.get("name").asString().equals(name)) {
                return each;
            }
        }
        throw new IllegalArgumentException("no resource " + name);
    }

    /** Rows of a resource by header; the header is the first row that is no comment. */
    static List<CSVRecord> rows(String name) {
        return parse(name).getRecords();
    }

    static List<String> header(String name) {
        return parse(name).getHeaderNames();
    }

    private static CSVParser parse(String name) {
        CSVFormat format = CSVFormat.DEFAULT
                .builder()
                .setCommentMarker('#')
                .setHeader()
                .setSkipHeaderRecord(true)
                .get();
        String path = "/sea-level-curves/" + resource(name).get("path").asString();
        try (InputStream in = open(path)) {
            return format.parse(new StringReader(new String(in.readAllBytes(), StandardCharsets.UTF_8)));
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    static double[] column(String name, String header) {
        return rows(name).stream().mapToDouble(row -> number(row, header)).toArray();
    }

    private static SeaLevelCurve curve(String id) {
        JsonNode ours = resource(id).get("stillstand");
        CurveFacts facts = new CurveFacts(
                ours.get("citation").asString(),
                ours.get("zero").asString(),
                ours.get("age_scale").asString(),
                ours.get("spread").asString(),
                ours.has("default_level_1sigma_m"),
                ours.get("correlation_time_ka").asDouble(),
                ours.get("curve_age_1sigma_ka").asDouble(),
                ours.get("usable_from_ka").asDouble(),
                List.of());
        double[] ages = column(id, "age_ka");
        double[] levels = column(id, "level_m");
        if (ours.has("default_level_1sigma_m")) {
            JsonNode guess = ours.get("default_level_1sigma_m");
            GuessedSpread spread = new GuessedSpread(
                    guess.get("interglacial").asDouble(), guess.get("elsewhere").asDouble());
            return SeaLevelCurve.withGuessedSpread(id, facts, ages, levels, spread, STAGES);
        }
        if (rows(id).get(0).isMapped("level_2sigma_m")) {
            double[] sigmas = column(id, "level_2sigma_m");
            for (int i = 0; i < sigmas.length; i++) {
                sigmas[i] /= 2;
            }
            return SeaLevelCurve.withSigmas(id, facts, ages, levels, sigmas);
        }
        return SeaLevelCurve.withBounds95(
                id, facts, ages, levels, column(id, "level_low95_m"), column(id, "level_high95_m"));
    }

    private static StageTable stages() {
        return new StageTable(rows("stages").stream()
                .map(row -> new Stage(
                        row.get("stage"),
                        Optional.of(row.get("also_called")).filter(name -> !name.isBlank()),
                        number(row, "from_ka"),
                        number(row, "to_ka"),
                        HighstandClass.ofWord(row.get("class")).orElseThrow(),
                        number(row, "duration_ka"),
                        number(row, "exists_probability")))
                .toList());
    }

    private static HighstandOverrides independent() {
        return new HighstandOverrides(
                "independent-highstands",
                rows("independent-highstands").stream()
                        .map(row -> entry(
                                row.get("stage"),
                                number(row, "age_ka"),
                                number(row, "age_1sigma_ka"),
                                number(row, "level_m"),
                                number(row, "level_1sigma_m"),
                                row.get("source")))
                        .toList());
    }

    static HighstandEntry entry(
            String stage, double ageKa, double ageSigmaKa, double levelMetres, double sigmaMetres, String source) {
        return new HighstandEntry(
                stage,
                ageKa,
                ageSigmaKa,
                new Normal(levelMetres, sigmaMetres),
                Optional.empty(),
                Optional.empty(),
                Optional.empty(),
                source);
    }

    private static double number(CSVRecord row, String header) {
        return Double.parseDouble(row.get(header));
    }

    private static JsonNode descriptor() {
        try (InputStream in = open("/sea-level-curves/datapackage.json")) {
            return JsonMapper.shared().readTree(in);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    private static InputStream open(String path) {
        InputStream in = ShippedPackage.class.getResourceAsStream(path);
        if (in == null) {
            throw new IllegalStateException("not on the class path: " + path);
        }
        return in;
    }
}
