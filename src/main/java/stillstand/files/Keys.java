package stillstand.files;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import stillstand.study.StudySettings.Setting;
import tools.jackson.databind.JsonNode;

/**
 * The keys of a json object that a schema has seen: what has the wrong type, or is null, or has a problem of its own, counts
 * as absent.
 *
 * @param path of the object, "" for the root
 * @param node the object, or whatever stands in its place
 * @param bad paths of values that have problems
 */
record Keys(String path, JsonNode node, Set<String> bad) {
    String pathOf(String key) {
        return path.isEmpty() ? key : path + "." + key;
    }

    boolean isBad(String key) {
        return bad.contains(pathOf(key));
    }

    boolean has(String key) {
        return node.has(key) && !isBad(key);
    }

    /** The object under a key, without keys where there is none. */
    Keys inside(String key) {
        return new Keys(pathOf(key), node.path(key), bad);
    }

    /** The objects of a list. */
    List<Keys> items(String key) {
        List<Keys> items = new ArrayList<>();
        for (JsonNode item : node.path(key)) {
            items.add(new Keys(pathOf(key) + "[" + items.size() + "]", item, bad));
        }
        return items;
    }

    Optional<String> text(String key) {
        return value(key).filter(JsonNode::isString).map(JsonNode::stringValue);
    }

    Optional<Double> number(String key) {
        return value(key).filter(JsonNode::isNumber).map(JsonNode::doubleValue);
    }

    Optional<Long> whole(String key) {
        return value(key)
                .filter(JsonNode::isNumber)
                .map(number -> number.decimalValue().longValue());
    }

    Optional<Boolean> flag(String key) {
        return value(key).filter(JsonNode::isBoolean).map(JsonNode::booleanValue);
    }

    /** A list of numbers, empty where there is none. */
    List<Double> numbers(String key) {
        List<Double> numbers = new ArrayList<>();
        value(key)
                .ifPresent(list -> list.forEach(item -> {
                    if (item.isNumber()) {
                        numbers.add(item.doubleValue());
                    }
                }));
        return numbers;
    }

    /** A number, or a default that is marked as one. */
    Setting setting(String key, double otherwise) {
        return number(key).map(value -> new Setting(value, true)).orElse(new Setting(otherwise, false));
    }

    private Optional<JsonNode> value(String key) {
        return has(key) ? Optional.of(node.path(key)) : Optional.empty();
    }
}
