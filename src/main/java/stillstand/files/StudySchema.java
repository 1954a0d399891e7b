package stillstand.files;

import com.networknt.schema.Error;
import com.networknt.schema.Schema;
import com.networknt.schema.SchemaRegistry;
import com.networknt.schema.SpecificationVersion;
import com.networknt.schema.path.NodePath;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import stillstand.ledger.InputProblem;
import stillstand.ledger.NearestName;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;

/**
 * The shape of {@code study.json}, from the JSON Schema that ships with the tool. Each {@code description} in the schema is
 * what a problem there says it expected.
 */
final class StudySchema {
    private static final String RESOURCE = "/stillstand/study.schema.json";

    private final JsonNode document;
    private final Schema schema;

    private StudySchema(JsonNode document) {
        this.document = document;
        schema = SchemaRegistry.withDefaultDialect(SpecificationVersion.DRAFT_2020_12)
                .getSchema(document);
    }

    static StudySchema load() {
        return new StudySchema(JsonMapper.builder().build().readTree(ShippedFile.bytes(RESOURCE)));
    }

    /** What should stand under a key, in words; "" for a key that it does not know. */
    String expectedAt(String keyPath) {
        JsonNode schemaOf = document;
        for (String step : keyPath.replace("[", ".[").split("\\.", -1)) {
            schemaOf = step.startsWith("[")
                    ? schemaOf.path("items")
                    : schemaOf.path("properties").path(step);
        }
        return schemaOf.path("description").stringValue("");
    }

    /** Everything in which a json text departs from the schema; one problem a key. */
    List<InputProblem> problems(JsonPlaces json, JsonNode root) {
        Map<String, InputProblem> problems = new LinkedHashMap<>();
        for (Error error : schema.validate(root)) {
            InputProblem problem = problem(json, root, error);
            problems.putIfAbsent(problem.header(), problem);
        }
        return new ArrayList<>(problems.values());
    }

    private InputProblem problem(JsonPlaces json, JsonNode root, Error error) {
        Node node = nodeOf(error, root);
        String key = String.valueOf(error.getProperty());
        String inside = node.path().isEmpty() ? key : node.path() + "." + key;
        JsonNode known = node.schemaOf().path("properties");
        if (!node.isChoice() && error.getKeyword().equals("additionalProperties")) {
            return json.problemOfKey(inside, "an unknown key", knownKey(key, known));
        }
        if (!node.isChoice() && error.getKeyword().equals("required")) {
            InputProblem place = json.problem(node.path(), "nothing", expected(known.path(key)));
            return new InputProblem(
                    place.file(), place.line(), place.column(), inside, place.found(), place.expected());
        }
        return json.problem(node.path(), JsonPlaces.shown(node.value()), expected(node.schemaOf()));
    }

    private static String expected(JsonNode schemaOf) {
        return schemaOf.path("description").stringValue("something else");
    }

    private static String knownKey(String key, JsonNode known) {
        List<String> names = new ArrayList<>(known.propertyNames());
        names.remove("$schema");
        return NearestName.of(key, names).map(name -> "\"" + name + "\"").orElse("one of " + String.join(", ", names));
    }

    /**
     * Where an error belongs.
     *
     * @param path of the value in the study
     * @param value that is wrong
     * @param schemaOf what the schema says of it
     * @param isChoice whether the schema offers alternatives there
     */
    private record Node(String path, JsonNode value, JsonNode schemaOf, boolean isChoice) {}

    /** The place of the error itself or, of an error inside one of several alternatives, that of the choice. */
    private Node nodeOf(Error error, JsonNode root) {
        List<String> all =
                List.of(error.getSchemaLocation().getFragment().toString().split("/", -1));
        int choice = all.indexOf("anyOf");
        JsonNode schemaOf = document;
        int depth = 0;
        for (String step : all.subList(1, choice > 0 ? choice : all.size() - 1)) {
            schemaOf = schemaOf.path(step);
            depth += step.equals("properties") || step.equals("items") ? 1 : 0;
        }
        NodePath place = error.getInstanceLocation();
        StringBuilder path = new StringBuilder();
        JsonNode value = root;
        for (int i = 0; i < depth; i++) {
            if (place.getElement(i) instanceof Integer index) {
                path.append('[').append(index).append(']');
                value = value.path(index);
            } else {
                path.append(path.isEmpty() ? "" : ".").append(place.getName(i));
                value = value.path(place.getName(i));
            }
        }
        return new Node(path.toString(), value, schemaOf, choice > 0);
    }
}
