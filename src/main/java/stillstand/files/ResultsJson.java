package stillstand.files;

import com.fasterxml.jackson.annotation.JsonFormat;
import com.fasterxml.jackson.annotation.JsonInclude;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.study.Provenance;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Interval;
import stillstand.uplift.LevelAnswer;
import tools.jackson.core.JacksonException;
import tools.jackson.core.JsonParser;
import tools.jackson.core.JsonToken;
import tools.jackson.core.StreamReadFeature;
import tools.jackson.core.TokenStreamLocation;
import tools.jackson.core.exc.StreamReadException;
import tools.jackson.databind.DeserializationFeature;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.MapperFeature;
import tools.jackson.databind.PropertyNamingStrategies;
import tools.jackson.databind.cfg.MapperConfig;
import tools.jackson.databind.introspect.AnnotatedMember;
import tools.jackson.databind.introspect.JacksonAnnotationIntrospector;
import tools.jackson.databind.json.JsonMapper;

/**
 * {@code results.json}: a {@link StudyResult}, key by key. The records are the format: a key is its component's name with
 * units and spread written the way the tables write them. Writing what was read gives the same bytes again.
 */
public final class ResultsJson {
    /** Name of the file in a results folder. */
    public static final String FILE = "results.json";

    private static final JsonMapper MAPPER = mapper();

    private ResultsJson() {}

    /**
     * The text of the file. Two spaces of indent, small objects on one line, doubles as short as they read back exactly.
     *
     * @throws IllegalArgumentException if a number of the result is not finite; the message says which
     */
    public static String text(StudyResult result) {
        JsonNode tree = MAPPER.valueToTree(result);
        firstNotFinite(tree, "").ifPresent(path -> {
            throw new IllegalArgumentException("every number of a result must be finite but " + path + " is not");
        });
        return JsonLayout.text(tree);
    }

    /**
     * Reads the text of the file, strictly: no unknown, missing or doubled key, nothing null, no other version.
     *
     * @param text content of a {@code results.json}
     */
    public static Loaded<StudyResult> read(String text) {
        try {
            JsonNode tree = MAPPER.readTree(text);
            Optional<InputProblem> odd = otherVersion(tree).or(() -> notFinite(tree));
            if (odd.isPresent()) {
                return Loaded.failed(List.of(odd.get()));
            }
            return Loaded.of(MAPPER.treeToValue(tree, StudyResult.class));
        } catch (StreamReadException e) {
            TokenStreamLocation place = e.getLocation();
            return Loaded.failed(List.of(new InputProblem(
                    FILE, place.getLineNr(), place.getColumnNr(), "", "broken json", "a file that Stillstand wrote")));
        } catch (JacksonException e) {
            return Loaded.failed(List.of(new InputProblem(
                    FILE, 0, 0, path(e), "nothing, or what does not belong there", "what Stillstand writes there")));
        }
    }

    /** Whether the text begins as a results file of any version of Stillstand does: with the provenance. */
    static boolean isOurs(String text) {
        try (JsonParser parser = MAPPER.createParser(text)) {
            if (parser.nextToken() != JsonToken.START_OBJECT || !"provenance".equals(parser.nextName())) {
                return false;
            }
            parser.nextToken();
            JsonNode provenance = MAPPER.reader()
                    .without(DeserializationFeature.FAIL_ON_TRAILING_TOKENS)
                    .readTree(parser);
            return provenance.has("version") && provenance.has("seed") && provenance.has("generator");
        } catch (JacksonException e) {
            return false;
        }
    }

    private static Optional<InputProblem> otherVersion(JsonNode tree) {
        String found = tree.path("provenance").path("version").stringValue("");
        if (found.equals(Provenance.CURRENT_VERSION)) {
            return Optional.empty();
        }
        return Optional.of(new InputProblem(
                FILE,
                0,
                0,
                "provenance.version",
                found.isEmpty() ? "nothing" : InputProblem.quote(found),
                "\"" + Provenance.CURRENT_VERSION + "\"; run the study again with this version of Stillstand"));
    }

    private static Optional<InputProblem> notFinite(JsonNode tree) {
        return firstNotFinite(tree, "")
                .map(path -> new InputProblem(FILE, 0, 0, path, "no finite number or text", "one, or no such key"));
    }

    /** Path of the first null or not finite number. */
    private static Optional<String> firstNotFinite(JsonNode node, String path) {
        if (node.isNull() || (node.isFloatingPointNumber() && !Double.isFinite(node.doubleValue()))) {
            return Optional.of(path);
        }
        if (node.isObject()) {
            for (Map.Entry<String, JsonNode> entry : node.properties()) {
                String below = path.isEmpty() ? entry.getKey() : path + "." + entry.getKey();
                Optional<String> found = firstNotFinite(entry.getValue(), below);
                if (found.isPresent()) {
                    return found;
                }
            }
        }
        for (int i = 0; node.isArray() && i < node.size(); i++) {
            Optional<String> found = firstNotFinite(node.get(i), path + "[" + i + "]");
            if (found.isPresent()) {
                return found;
            }
        }
        return Optional.empty();
    }

    private static String path(JacksonException e) {
        return e.getPath().stream()
                .map(step ->
                        step.getPropertyName() == null ? "[" + step.getIndex() + "]" : "." + step.getPropertyName())
                .collect(Collectors.joining())
                .replaceFirst("^\\.", "");
    }

    private static JsonMapper mapper() {
        JsonFormat.Value array = JsonFormat.Value.forShape(JsonFormat.Shape.ARRAY);
        return JsonMapper.builder()
                .propertyNamingStrategy(new KeyNames())
                .annotationIntrospector(new AllRequired())
                .withConfigOverride(Interval.class, type -> type.setFormat(array))
                .withConfigOverride(LevelAnswer.Errors.class, type -> type.setFormat(array))
                .changeDefaultPropertyInclusion(
                        inclusion -> inclusion.withValueInclusion(JsonInclude.Include.NON_ABSENT))
                .disable(MapperFeature.SORT_PROPERTIES_ALPHABETICALLY, MapperFeature.ALLOW_COERCION_OF_SCALARS)
                .enable(StreamReadFeature.STRICT_DUPLICATE_DETECTION)
                .enable(
                        DeserializationFeature.FAIL_ON_UNKNOWN_PROPERTIES,
                        DeserializationFeature.FAIL_ON_NULL_FOR_PRIMITIVES,
                        DeserializationFeature.FAIL_ON_NULL_CREATOR_PROPERTIES)
                .disable(DeserializationFeature.ACCEPT_FLOAT_AS_INT)
                .build();
    }

    /** Every component must be there, save those that may be absent by their type. */
    private static final class AllRequired extends JacksonAnnotationIntrospector {
        private static final long serialVersionUID = 1L;

        @Override
        public Boolean hasRequiredMarker(MapperConfig<?> config, AnnotatedMember member) {
            return !member.getRawType().equals(Optional.class);
        }
    }

    /** From {@code levelSigmaMetres} to {@code level_1sigma_m}. */
    private static final class KeyNames extends PropertyNamingStrategies.NamingBase {
        private static final long serialVersionUID = 1L;

        @Override
        protected String translate(String component) {
            if (component.equals("highstandClass")) {
                return "class";
            }
            StringBuilder key = new StringBuilder();
            for (int i = 0; i < component.length(); i++) {
                char letter = component.charAt(i);
                if (letter >= 'A' && letter <= 'Z') {
                    key.append('_').append((char) (letter - 'A' + 'a'));
                } else {
                    key.append(letter);
                }
            }
            String snake = key.toString().replace("_sigma_", "_1sigma_");
            return snake.endsWith("_metres") ? snake.substring(0, snake.length() - "etres".length()) : snake;
        }
    }
}
