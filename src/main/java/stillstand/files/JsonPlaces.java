package stillstand.files;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import stillstand.ledger.InputProblem;
import stillstand.study.StatedSettings.Place;
import tools.jackson.core.JacksonException;
import tools.jackson.core.JsonParser;
import tools.jackson.core.JsonToken;
import tools.jackson.core.TokenStreamLocation;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;

/**
 * A json text as a tree, with the place of each value and of what is wrong with the text itself: broken json, a key stated
 * twice, a number too large to be one.
 *
 * @param file its name
 * @param root absent where the text is no json
 * @param places of values by key path, such as {@code sea_level.curves[0].id}; "" is the root
 * @param keyPlaces of the keys themselves, by the same paths
 * @param problems of the text
 */
record JsonPlaces(
        String file,
        Optional<JsonNode> root,
        Map<String, Place> places,
        Map<String, Place> keyPlaces,
        List<InputProblem> problems) {
    private static final JsonMapper MAPPER = JsonMapper.builder().build();

    static JsonPlaces parse(TextFile file) {
        Walk walk = new Walk(file.name());
        if (file.text().isBlank()) {
            walk.problems.add(InputProblem.ofFile(file.name(), "an empty file", "a json object"));
            return walk.result(Optional.empty());
        }
        try (JsonParser parser = MAPPER.createParser(file.text())) {
            parser.nextToken();
            walk.value(parser, "");
            if (parser.nextToken() != null) {
                walk.problem(parser.currentTokenLocation(), "", "more text after the end of the json", "nothing there");
                return walk.result(Optional.empty());
            }
        } catch (JacksonException e) {
            walk.problem(e.getLocation(), "", "text that is not json here", "json");
            return walk.result(Optional.empty());
        }
        return walk.result(Optional.of(MAPPER.readTree(file.text())));
    }

    /** The problem of a value, by its path. */
    InputProblem problem(String path, String found, String expected) {
        return at(places.getOrDefault(path, new Place(0, 0)), path, found, expected);
    }

    /** The problem of a key, by its path. */
    InputProblem problemOfKey(String path, String found, String expected) {
        return at(keyPlaces.getOrDefault(path, new Place(0, 0)), path, found, expected);
    }

    private InputProblem at(Place place, String path, String found, String expected) {
        return new InputProblem(file, place.line(), place.column(), path, found, expected);
    }

    /** What stands at a path, as a problem shows it. */
    static String shown(JsonNode node) {
        if (node.isString()) {
            return quote(node.stringValue());
        }
        if (node.isObject()) {
            return "an object { … }";
        }
        return node.isArray() ? "a list [ … ]" : node.toString();
    }

    private static final class Walk {
        private final String file;
        private final Map<String, Place> places = new LinkedHashMap<>();
        private final Map<String, Place> keyPlaces = new LinkedHashMap<>();
        private final List<InputProblem> problems = new ArrayList<>();

        Walk(String file) {
            this.file = file;
        }

        JsonPlaces result(Optional<JsonNode> root) {
            return new JsonPlaces(file, root, places, keyPlaces, problems);
        }

        /** Walks over the value that starts at the parser's token, to its last token. */
        void value(JsonParser parser, String path) {
            places.putIfAbsent(path, place(parser.currentTokenLocation()));
            JsonToken token = parser.currentToken();
            if (token == JsonToken.START_OBJECT) {
                object(parser, path);
            } else if (token == JsonToken.START_ARRAY) {
                for (int i = 0; parser.nextToken() != JsonToken.END_ARRAY; i++) {
                    value(parser, path + "[" + i + "]");
                }
            } else if (token != null && token.isNumeric()) {
                if (!Double.isFinite(Double.parseDouble(parser.getString()))) {
                    problem(parser.currentTokenLocation(), path, quote(parser.getString()), "a number that is finite");
                }
            }
        }

        private void object(JsonParser parser, String path) {
            Set<String> keys = new HashSet<>();
            while (parser.nextToken() != JsonToken.END_OBJECT) {
                String key = parser.currentName();
                String inside = path.isEmpty() ? key : path + "." + key;
                if (!keys.add(key)) {
                    problem(parser.currentTokenLocation(), inside, "this key a second time", "it once");
                }
                keyPlaces.putIfAbsent(inside, place(parser.currentTokenLocation()));
                parser.nextToken();
                value(parser, inside);
            }
        }

        void problem(TokenStreamLocation location, String path, String found, String expected) {
            Place place = place(location);
            problems.add(new InputProblem(file, place.line(), place.column(), path, found, expected));
        }

        private static Place place(TokenStreamLocation location) {
            return new Place(Math.max(0, location.getLineNr()), Math.max(0, location.getColumnNr()));
        }
    }
}
