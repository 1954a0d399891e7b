package stillstand.files;

import java.math.BigInteger;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import stillstand.study.NumberForm;
import tools.jackson.core.JacksonException;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;
import tools.jackson.databind.node.ArrayNode;
import tools.jackson.databind.node.JsonNodeFactory;
import tools.jackson.databind.node.ObjectNode;

/**
 * The text of {@code study.json}, read and changed key by key. Keys that are not touched keep their values and their order; the
 * layout of the whole is made anew by a change.
 */
public final class SettingsText {
    private static final JsonMapper MAPPER = JsonMapper.builder().build();
    private static final Pattern STEP = Pattern.compile("([^.\\[\\]]+)|\\[(\\d+)]");

    private final ObjectNode root;

    private SettingsText(ObjectNode root) {
        this.root = root;
    }

    /** Empty where the text is no json object. */
    public static Optional<SettingsText> parse(String text) {
        try {
            return MAPPER.readTree(text) instanceof ObjectNode object
                    ? Optional.of(new SettingsText(object))
                    : Optional.empty();
        } catch (JacksonException e) {
            return Optional.empty();
        }
    }

    /**
     * What stands under a key, as it would be typed; empty where the key is not stated.
     *
     * @param keyPath such as {@code sea_level.curves[0].id}
     */
    public Optional<String> value(String keyPath) {
        JsonNode node = root;
        for (String step : steps(keyPath)) {
            node = isIndex(step) ? node.path(Integer.parseInt(step)) : node.path(step);
        }
        if (node.isMissingNode() || node.isNull()) {
            return Optional.empty();
        }
        return Optional.of(node.isString() ? node.stringValue() : node.toString());
    }

    /** How many items stand in a list. */
    public int size(String keyPath) {
        JsonNode node = root;
        for (String step : steps(keyPath)) {
            node = isIndex(step) ? node.path(Integer.parseInt(step)) : node.path(step);
        }
        return node.isArray() ? node.size() : 0;
    }

    /** The text with words under a key; blank takes the key away. */
    public String withWords(String keyPath, String words) {
        return with(
                keyPath, words.isBlank() ? Optional.empty() : Optional.of(JsonNodeFactory.instance.stringNode(words)));
    }

    /**
     * The text with a value under a key: a number, true, false, a list or an object where the text typed is one, else the
     * text itself, of which the check then says what it expected. Blank takes the key away.
     */
    public String withValue(String keyPath, String typed) {
        String text = typed.strip();
        return with(keyPath, text.isEmpty() ? Optional.empty() : Optional.of(node(text)));
    }

    /**
     * The text with the curves of a study and their weights in place of those before; a blank weight is not stated. What else
     * the text says of a curve that stays, stays.
     */
    public String withCurves(Map<String, String> weights) {
        ArrayNode list = JsonNodeFactory.instance.arrayNode();
        JsonNode before = root.path("sea_level").path("curves");
        weights.forEach((id, weight) -> {
            ObjectNode curve = list.addObject();
            curve.put("id", id);
            before.values().stream()
                    .filter(item -> item.path("id").stringValue("").equals(id))
                    .findFirst()
                    .ifPresent(item -> item.properties().forEach(key -> curve.set(key.getKey(), key.getValue())));
            curve.remove("weight");
            if (!weight.isBlank()) {
                curve.set("weight", node(weight.strip()));
            }
        });
        return with("sea_level.curves", list.isEmpty() ? Optional.empty() : Optional.of(list));
    }

    private static JsonNode node(String text) {
        Optional<Double> number = NumberForm.parse(text);
        if (number.isPresent()) {
            String plain = text.replace('\u2212', '-');
            return plain.matches("-?[0-9]+")
                    ? JsonNodeFactory.instance.numberNode(new BigInteger(plain))
                    : JsonNodeFactory.instance.numberNode(number.get());
        }
        if (text.equals("true") || text.equals("false")) {
            return JsonNodeFactory.instance.booleanNode(text.equals("true"));
        }
        if (text.startsWith("{") || text.startsWith("[")) {
            try {
                return MAPPER.readTree(text);
            } catch (JacksonException e) {
                return JsonNodeFactory.instance.stringNode(text);
            }
        }
        return JsonNodeFactory.instance.stringNode(text);
    }

    private String with(String keyPath, Optional<JsonNode> value) {
        ObjectNode changed = root.deepCopy();
        List<String> steps = steps(keyPath);
        List<ObjectNode> way = new ArrayList<>(List.of(changed));
        for (String step : steps.subList(0, steps.size() - 1)) {
            ObjectNode here = way.get(way.size() - 1);
            way.add(here.path(step) instanceof ObjectNode inside ? inside : inside(here, step, value.isPresent()));
        }
        String key = steps.get(steps.size() - 1);
        ObjectNode place = way.get(way.size() - 1);
        if (value.isPresent()) {
            place.set(key, value.get());
        } else {
            place.remove(key);
            for (int i = way.size() - 1; i > 0 && way.get(i).isEmpty(); i--) {
                way.get(i - 1).remove(steps.get(i - 1));
            }
        }
        return JsonLayout.text(changed);
    }

    private static ObjectNode inside(ObjectNode here, String step, boolean isKept) {
        ObjectNode fresh = JsonNodeFactory.instance.objectNode();
        if (isKept) {
            here.set(step, fresh);
        }
        return fresh;
    }

    private static List<String> steps(String keyPath) {
        List<String> steps = new ArrayList<>();
        Matcher matcher = STEP.matcher(keyPath);
        while (matcher.find()) {
            steps.add(matcher.group(1) == null ? matcher.group(2) : matcher.group(1));
        }
        return steps;
    }

    private static boolean isIndex(String step) {
        return Character.isDigit(step.charAt(0));
    }
}
