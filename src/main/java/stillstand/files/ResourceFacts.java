package stillstand.files;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.ledger.InputProblem;
import stillstand.ledger.NearestName;
import stillstand.sealevel.CurveFacts;
import stillstand.sealevel.GuessedSpread;
import tools.jackson.databind.JsonNode;

/** What a resource of a package says under its {@code stillstand} key, checked, with defaults for what it leaves out. */
final class ResourceFacts {
    static final String KINDS_OF_A_USER = "\"curve\" or \"highstands\"";

    private static final List<String> KINDS = List.of("curve", "highstands", "stages");
    private static final List<String> KEYS = List.of(
            "kind",
            "citation",
            "terms",
            "zero",
            "age_scale",
            "spread",
            "default_level_1sigma_m",
            "correlation_time_ka",
            "curve_age_1sigma_ka",
            "usable_from_ka",
            "complete",
            "condensed",
            "caveats");

    private final JsonPlaces json;
    private final String at;
    private final JsonNode node;
    private final List<InputProblem> problems;
    private final String kind;
    private final String citation;
    private final boolean complete;
    private final Optional<GuessedSpread> guessedSpread;
    private final CurveFacts curve;

    /**
     * @param at key path of the resource
     * @param resource the whole of it
     * @param problems where what is wrong is added
     */
    ResourceFacts(JsonPlaces json, String at, JsonNode resource, List<InputProblem> problems) {
        this.json = json;
        this.at = at + ".stillstand";
        this.problems = problems;
        node = resource.path("stillstand");
        kind = kindStated(at);
        checkKeys();
        citation = text("citation")
                .or(() -> Optional.of(resource.path("sources").path(0).path("title"))
                        .filter(JsonNode::isString)
                        .map(JsonNode::stringValue))
                .orElse("source not stated");
        complete = flag("complete");
        guessedSpread = node.has("default_level_1sigma_m") ? guess() : Optional.empty();
        curve = new CurveFacts(
                citation,
                text("zero").orElse(CurveFacts.DEFAULT_ZERO),
                text("age_scale").orElse(CurveFacts.DEFAULT_AGE_SCALE),
                text("spread").orElse("as the header of its table says"),
                false,
                number("correlation_time_ka", Double.MIN_VALUE, CurveFacts.DEFAULT_CORRELATION_TIME_KA),
                number("curve_age_1sigma_ka", 0, CurveFacts.DEFAULT_CURVE_AGE_SIGMA_KA),
                number("usable_from_ka", 0, 0),
                caveats());
    }

    /** {@code curve}, {@code highstands} or {@code stages}; "" where none is stated. */
    String kind() {
        return kind;
    }

    String citation() {
        return citation;
    }

    /** Whether a highstand table is taken as it stands. */
    boolean isComplete() {
        return complete;
    }

    /** The spread of a curve that has none, if the package states one. */
    Optional<GuessedSpread> guessedSpread() {
        return guessedSpread;
    }

    CurveFacts curve() {
        return curve;
    }

    private String kindStated(String resourceAt) {
        JsonNode stated = node.path("kind");
        if (stated.isString() && KINDS.contains(stated.stringValue())) {
            return stated.stringValue();
        }
        String expected = KINDS_OF_A_USER;
        if (!node.isObject()) {
            String found = node.isMissingNode() ? "no key \"stillstand\"" : JsonPlaces.shown(node);
            problems.add(json.problem(
                    node.isMissingNode() ? resourceAt : at, found, "\"stillstand\": {\"kind\": " + expected + "}"));
        } else if (stated.isMissingNode()) {
            problems.add(json.problem(at, "no key \"kind\"", expected));
        } else {
            problems.add(json.problem(at + ".kind", JsonPlaces.shown(stated), expected));
        }
        return "";
    }

    private void checkKeys() {
        for (String key : node.propertyNames()) {
            if (!KEYS.contains(key)) {
                String expected = NearestName.of(key, KEYS)
                        .map(nearest -> "\"" + nearest + "\"")
                        .orElse("one of " + String.join(", ", KEYS));
                problems.add(json.problemOfKey(at + "." + key, "an unknown key", expected));
            }
        }
    }

    private Optional<String> text(String key) {
        JsonNode value = node.path(key);
        if (!value.isMissingNode() && !value.isString()) {
            problems.add(json.problem(at + "." + key, JsonPlaces.shown(value), "text"));
        }
        return value.isString() ? Optional.of(value.stringValue()) : Optional.empty();
    }

    private boolean flag(String key) {
        JsonNode value = node.path(key);
        if (!value.isMissingNode() && !value.isBoolean()) {
            problems.add(json.problem(at + "." + key, JsonPlaces.shown(value), "true or false"));
        }
        return value.isBoolean() && value.booleanValue();
    }

    private double number(String key, double least, double otherwise) {
        return node.has(key) ? number(node.path(key), at + "." + key, least).orElse(otherwise) : otherwise;
    }

    private Optional<Double> number(JsonNode value, String path, double least) {
        if (value.isNumber() && value.doubleValue() >= least && value.doubleValue() < Double.POSITIVE_INFINITY) {
            return Optional.of(value.doubleValue());
        }
        String found = value.isMissingNode() ? "nothing" : JsonPlaces.shown(value);
        problems.add(json.problem(path, found, least > 0 ? "a number above 0" : "a number, 0 or more"));
        return Optional.empty();
    }

    private Optional<GuessedSpread> guess() {
        String path = at + ".default_level_1sigma_m";
        JsonNode stated = node.path("default_level_1sigma_m");
        if (!stated.isObject()) {
            problems.add(
                    json.problem(path, JsonPlaces.shown(stated), "{\"interglacial\": …, \"elsewhere\": …} in metres"));
            return Optional.empty();
        }
        Optional<Double> interglacial = number(stated.path("interglacial"), path + ".interglacial", Double.MIN_VALUE);
        Optional<Double> elsewhere = number(stated.path("elsewhere"), path + ".elsewhere", Double.MIN_VALUE);
        return interglacial.flatMap(inside -> elsewhere.map(outside -> new GuessedSpread(inside, outside)));
    }

    private List<String> caveats() {
        List<String> caveats = new ArrayList<>();
        for (JsonNode each : node.path("caveats")) {
            if (each.isString()) {
                caveats.add(each.stringValue());
            }
        }
        return caveats;
    }
}
