package stillstand.files;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.study.ArchivedCurve;
import tools.jackson.core.JsonParser;
import tools.jackson.core.JsonToken;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;

/**
 * The {@code datapackage.json} of a study's own curves, to which a resource can be added without touching the rest of its text.
 *
 * @param text as it stands
 * @param resources that it has
 * @param end place in the text of the bracket that closes the list of resources
 */
record CurveDescriptor(String text, List<JsonNode> resources, int end) {
    private static final JsonMapper MAPPER = JsonMapper.builder().build();
    private static final String EMPTY = """
            {
              "profile": "tabular-data-package",
              "name": "curves",
              "title": "Sea-level curves of this study",
              "resources": []
            }
            """;

    /** One without resources. */
    static CurveDescriptor empty() {
        return parse(new TextFile(CurvePackage.DESCRIPTOR, EMPTY, "")).value().orElseThrow();
    }

    /** Reads one; of its resources only that they are a list. */
    static Loaded<CurveDescriptor> parse(TextFile file) {
        JsonPlaces json = JsonPlaces.parse(file);
        if (!json.problems().isEmpty() || json.root().isEmpty()) {
            return Loaded.failed(json.problems());
        }
        JsonNode list = json.root().get().path("resources");
        if (!list.isArray()) {
            InputProblem problem = list.isMissingNode()
                    ? json.problem("", "no key \"resources\"", "a list of resources")
                    : json.problem("resources", JsonPlaces.shown(list), "a list of resources");
            return Loaded.failed(List.of(problem));
        }
        List<JsonNode> resources = new ArrayList<>();
        list.forEach(resources::add);
        return Loaded.of(new CurveDescriptor(file.text(), resources, endOfResources(file.text())));
    }

    /** The text with one more resource at the end of the list. */
    String with(JsonNode resource) {
        String before = text.substring(0, end).stripTrailing();
        String indented = JsonLayout.text(resource).strip().replace("\n", "\n    ");
        String comma = resources.isEmpty() ? "" : ",";
        return before + comma + "\n    " + indented + "\n  " + text.substring(end);
    }

    /** The entry of an imported curve, with its Table Schema. */
    static JsonNode resource(String id, String path, ArchivedCurve curve, Optional<String> citation) {
        Map<String, Object> resource = new LinkedHashMap<>();
        resource.put("name", id);
        resource.put("path", path);
        resource.put("profile", "tabular-data-resource");
        resource.put("format", "csv");
        resource.put("mediatype", "text/csv");
        resource.put("encoding", "utf-8");
        resource.put("dialect", ordered("delimiter", ",", "header", true, "commentChar", "#"));
        citation.ifPresent(source -> resource.put("sources", List.of(ordered("title", source))));
        List<Object> fields = new ArrayList<>(
                curve.header().stream().map(CurveDescriptor::field).toList());
        resource.put(
                "schema",
                ordered(
                        "fields",
                        fields,
                        "missingValues",
                        List.of(""),
                        "primaryKey",
                        curve.header().get(0)));
        Map<String, Object> ours = ordered("kind", "curve");
        citation.ifPresent(source -> ours.put("citation", source));
        if (!curve.spreadMeaning().isEmpty()) {
            ours.put("spread", curve.spreadMeaning());
        }
        resource.put("stillstand", ours);
        return MAPPER.valueToTree(resource);
    }

    private static Object field(String name) {
        Map<String, Object> constraints = ordered("required", true);
        if (name.equals("age_ka") || name.contains("sigma")) {
            constraints.put("minimum", 0);
        }
        return ordered("name", name, "type", "number", "description", meaning(name), "constraints", constraints);
    }

    private static String meaning(String name) {
        return switch (name) {
            case "age_ka" -> "Thousand years before 1950, positive backwards.";
            case "level_m" -> "Sea level in metres above (positive) or below (negative) the zero of this curve.";
            case "level_1sigma_m" -> "One standard deviation of the level, metres.";
            case "level_2sigma_m" -> "Two standard deviations of the level, metres.";
            case "level_low95_m" -> "Lower bound of the central 95 %, metres.";
            default -> "Upper bound of the central 95 %, metres.";
        };
    }

    private static Map<String, Object> ordered(Object... keysAndValues) {
        Map<String, Object> keys = new LinkedHashMap<>();
        for (int i = 0; i < keysAndValues.length; i += 2) {
            keys.put(String.valueOf(keysAndValues[i]), keysAndValues[i + 1]);
        }
        return keys;
    }

    /** Where the list under the root's key {@code resources} closes. */
    private static int endOfResources(String text) {
        try (JsonParser parser = MAPPER.createParser(text)) {
            parser.nextToken();
            while (parser.nextToken() == JsonToken.PROPERTY_NAME) {
                boolean found = parser.currentName().equals("resources");
                parser.nextToken();
                parser.skipChildren();
                if (found) {
                    return (int) parser.currentTokenLocation().getCharOffset();
                }
            }
        }
        throw new IllegalArgumentException("no list of resources");
    }
}
