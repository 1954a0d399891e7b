package stillstand.files;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import stillstand.comparison.ComparisonRules;
import stillstand.comparison.ComparisonRules.Pair;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.sensitivity.MeasurementPlan;
import stillstand.shoreline.IndicativeRule;
import stillstand.study.StatedSettings;
import stillstand.study.StudySettings;
import stillstand.study.StudySettings.Changes;
import stillstand.study.StudySettings.Decay;
import stillstand.study.StudySettings.Draws;
import stillstand.study.StudySettings.Matching;
import stillstand.study.StudySettings.RateChoice;
import stillstand.study.StudySettings.Recording;
import stillstand.study.StudySettings.Screening;
import stillstand.study.StudySettings.SeaLevelChoice;
import stillstand.study.StudySettings.Strays;
import stillstand.study.StudySettings.WeightedCurve;
import stillstand.uncertainty.Interval;
import stillstand.uplift.RatePrior;
import tools.jackson.databind.JsonNode;

/**
 * Reads {@code study.json}. Every key but {@code title} has a default, which becomes a line of the ledger; all problems come
 * at once, each with line, column and key path.
 */
public final class StudyJson {
    /** The name of the file. */
    public static final String NAME = "study.json";

    private static final StudySchema SCHEMA = StudySchema.load();

    private final JsonPlaces json;
    private final Keys root;
    private final List<InputProblem> problems = new ArrayList<>();
    private final List<Assumption> defaults = new ArrayList<>();

    private StudyJson(JsonPlaces json, Keys root) {
        this.json = json;
        this.root = root;
    }

    /** What should stand under a key, in the words of a problem there; "" for an unknown key. */
    public static String expectedAt(String keyPath) {
        return SCHEMA.expectedAt(keyPath);
    }

    /** Reads the settings that a text holds. */
    static Loaded<StatedSettings> parse(TextFile file) {
        JsonPlaces json = JsonPlaces.parse(file);
        if (json.root().isEmpty()) {
            return Loaded.failed(json.problems());
        }
        List<InputProblem> problems = new ArrayList<>(json.problems());
        Set<String> seen = badPaths(problems);
        SCHEMA.problems(json, json.root().get()).stream()
                .filter(problem -> !seen.contains(problem.header()))
                .forEach(problems::add);
        StudyJson reader = new StudyJson(json, new Keys("", json.root().get(), badPaths(problems)));
        if (problems.stream().noneMatch(problem -> problem.header().isEmpty())) {
            StudySettings settings = reader.settings();
            problems.addAll(reader.problems);
            if (problems.isEmpty()) {
                return Loaded.of(new StatedSettings(file.name(), settings, reader.defaults, json.places(), Set.of()));
            }
        }
        return Loaded.failed(problems.stream().sorted().toList());
    }

    private static Set<String> badPaths(List<InputProblem> problems) {
        return Set.copyOf(problems.stream().map(InputProblem::header).toList());
    }

    /** All settings; where a key has a problem its default stands in, and the whole is thrown away. */
    private StudySettings settings() {
        Keys draws = root.inside("draws");
        return new StudySettings(
                root.text("title").orElse("a study"),
                root.text("note").orElse(""),
                root.whole("seed").orElseGet(() -> assumed("seed", 20261201L)),
                new Draws(
                        draws.whole("maximum").map(Long::intValue).orElseGet(() -> assumed("draws.maximum", 1 << 20)),
                        draws.whole("significant_digits")
                                .map(Long::intValue)
                                .orElseGet(() -> assumed("draws.significant_digits", 2)),
                        Optional.empty()),
                seaLevel(root.inside("sea_level")),
                rate(),
                matching(root.inside("matching")),
                indicativeRange(),
                screening(root.inside("screening")),
                root.has("leverage") ? Optional.of(leverage(root.inside("leverage"))) : Optional.empty(),
                comparison(root.inside("comparison")));
    }

    private static MeasurementPlan leverage(Keys keys) {
        MeasurementPlan usual = MeasurementPlan.DEFAULT;
        return new MeasurementPlan(
                keys.number("date_1sigma_ka").orElse(usual.dateSigmaKa()),
                keys.number("survey_1sigma_m").orElse(usual.surveySigmaMetres()));
    }

    private SeaLevelChoice seaLevel(Keys keys) {
        Keys highstands = keys.inside("highstands");
        String from = highstands.text("from").orElseGet(() -> assumed("sea_level.highstands.from", "curve"));
        boolean fromTable = from.equals("table");
        Optional<String> table = highstands.text("table");
        if (fromTable && table.isEmpty() && !highstands.isBad("table")) {
            problems.add(json.problem(
                    "sea_level.highstands",
                    "no key \"table\"",
                    "one with the id of a highstand table, since highstands come from a table"));
        }
        if (!fromTable && table.isPresent()) {
            problems.add(json.problemOfKey(
                    "sea_level.highstands.table", "this key", "\"from\": \"table\" beside it, or neither"));
        }
        if (fromTable && highstands.has("overrides")) {
            problems.add(json.problemOfKey(
                    "sea_level.highstands.overrides", "this key", "it only where highstands come from a curve"));
        }
        return new SeaLevelChoice(
                curves(keys, fromTable),
                table,
                overrides(highstands, fromTable),
                highstands
                        .flag("older_than_curve")
                        .orElseGet(() -> assumed("sea_level.highstands.older_than_curve", true)),
                keys.number("correlation_time_ka"),
                keys.setting("shared_level_1sigma_m", 3),
                keys.setting("interstadial_1sigma_m", 6),
                keys.number("curve_age_1sigma_ka"),
                keys.flag("rezero").orElseGet(() -> assumed("sea_level.rezero", false)));
    }

    private Optional<String> overrides(Keys highstands, boolean fromTable) {
        if (fromTable) {
            return Optional.empty();
        }
        String id = highstands
                .text("overrides")
                .orElseGet(() -> assumed("sea_level.highstands.overrides", "independent-highstands"));
        return Optional.of(id).filter(each -> !each.equals("none"));
    }

    private List<WeightedCurve> curves(Keys keys, boolean fromTable) {
        if (!keys.has("curves")) {
            return fromTable || keys.isBad("curves")
                    ? List.of()
                    : List.of(new WeightedCurve(assumed("sea_level.curves", "spratt-lisiecki-2016"), 1));
        }
        List<WeightedCurve> curves = new ArrayList<>();
        List<Keys> items = keys.items("curves");
        for (Keys item : items) {
            String id = item.text("id").orElse("");
            WeightedCurve read = new WeightedCurve(id, item.number("weight").orElse(1.0), item.text("overrides"));
            if (curves.stream().anyMatch(curve -> !id.isEmpty() && curve.label().equals(read.label()))) {
                problems.add(json.problem(item.path() + ".id", "\"" + id + "\" a second time", "each curve once"));
            }
            curves.add(read);
        }
        if (items.isEmpty() && !fromTable) {
            problems.add(json.problem(
                    "sea_level.curves", "an empty list", "at least one curve, since highstands come from the curve"));
        }
        return curves;
    }

    private RatePrior prior() {
        PriorKeys reader = new PriorKeys(json, root.inside("rate").inside("prior"));
        RatePrior prior = reader.read();
        problems.addAll(reader.problems());
        if (!root.inside("rate").has("prior")) {
            assumed("rate.prior", prior.describe());
        }
        return prior;
    }

    private RateChoice rate() {
        RatePrior prior = prior();
        Changes changes = changes();
        List<Double> between = root.inside("rate").numbers("change_between_ka");
        if (between.size() != 2) {
            return new RateChoice(prior, changes);
        }
        if (!(between.get(0) <= between.get(1))) {
            problems.add(json.problem(
                    "rate.change_between_ka",
                    "ages " + between.get(0) + " and " + between.get(1),
                    "two ages in ka [young, old], the young one first"));
            return new RateChoice(prior, changes);
        }
        boolean severalAtOneAge = changes == Changes.UP_TO_TWO || changes == Changes.CHOOSE;
        if (severalAtOneAge && between.get(0).equals(between.get(1))) {
            problems.add(json.problem(
                    "rate.change_between_ka",
                    "one age, " + between.get(0) + ", beside two changes",
                    "two ages in ka [young, old], or \"changes\": \"one\""));
            return new RateChoice(prior, changes);
        }
        return new RateChoice(prior, changes, new Interval(between.get(0), between.get(1)));
    }

    private Changes changes() {
        String word = root.inside("rate").text("changes").orElseGet(() -> assumed("rate.changes", "none"));
        for (Changes each : Changes.values()) {
            if (StudyJsonWriter.word(each).equals(word)) {
                return each;
            }
        }
        return Changes.NONE;
    }

    private IndicativeRule indicativeRange() {
        String word = root.text("indicative_range").orElseGet(() -> assumed("indicative_range", "quadrature"));
        return word.equals(IndicativeRule.UNIFORM.id()) ? IndicativeRule.UNIFORM : IndicativeRule.QUADRATURE;
    }

    private Matching matching(Keys keys) {
        return new Matching(
                recording(keys),
                decay(keys),
                strays(keys),
                keys.number("stray_age_maximum_ka").orElse(1000.0),
                keys.setting("wrong_date_probability", 0.05),
                keys.number("trace_probability").orElse(0.95));
    }

    private static Recording recording(Keys keys) {
        List<Double> beta = keys.inside("recording_probability").numbers("beta");
        if (beta.size() == 2) {
            return new Recording.Beta(beta.get(0), beta.get(1));
        }
        return keys.number("recording_probability")
                .<Recording>map(Recording.Fixed::new)
                .orElse(new Recording.Beta(4, 2.5));
    }

    private static Optional<Decay> decay(Keys keys) {
        Optional<Decay> word = keys.text("recording_decay_ka")
                .map(text -> text.equals("none") ? new Decay.None() : new Decay.Marginalised());
        return word.isPresent() ? word : keys.number("recording_decay_ka").map(Decay.Fixed::new);
    }

    private static Optional<Strays> strays(Keys keys) {
        Optional<Strays> mean =
                keys.inside("expected_strays").number("gamma_mean").map(Strays.GammaMean::new);
        return mean.isPresent() ? mean : keys.number("expected_strays").map(Strays.Fixed::new);
    }

    private Screening screening(Keys keys) {
        List<Double> initial = keys.numbers("initial_d234u_permil");
        boolean hasInitial = initial.size() == 2;
        if (hasInitial && !(initial.get(0) < initial.get(1))) {
            problems.add(json.problem(
                    "screening.initial_d234u_permil",
                    "limits " + initial.get(0) + " and " + initial.get(1),
                    "two numbers [low, high], the low one first, or null for no limit"));
        }
        return new Screening(
                keys.number("calcite_maximum_percent"),
                hasInitial ? Optional.of(initial.get(0)) : Optional.empty(),
                hasInitial ? Optional.of(initial.get(1)) : Optional.empty(),
                keys.number("th232_maximum_ppb"),
                keys.number("th230_th232_minimum"),
                keys.text("replicates"),
                keys.flag("stratigraphic_order"));
    }

    private ComparisonRules comparison(Keys keys) {
        ComparisonRules defaults = ComparisonRules.DEFAULT;
        List<Pair> pairs = new ArrayList<>();
        for (JsonNode pair : keys.node().path("pairs")) {
            pairs.add(new Pair(pair.path(0).stringValue(""), pair.path(1).stringValue("")));
        }
        return new ComparisonRules(
                keys.number("stable_within_m_per_kyr")
                        .orElseGet(() ->
                                assumed("comparison.stable_within_m_per_kyr", defaults.stableWithinMetresPerKyr())),
                keys.number("site_spread_m_per_kyr")
                        .orElseGet(
                                () -> assumed("comparison.site_spread_m_per_kyr", defaults.siteSpreadMetresPerKyr())),
                pairs);
    }

    private <T> T assumed(String keyPath, T value) {
        defaults.add(StatedSettings.unstated(keyPath, value));
        return value;
    }

    /** The settings of a study of this title of which nothing else is stated. */
    public static StudySettings defaults(String title) {
        Map<String, Object> stated = new LinkedHashMap<>();
        stated.put("title", title);
        TextFile text = new TextFile(NAME, StudyJsonWriter.text(stated), "");
        return parse(text)
                .value()
                .orElseThrow(() -> new IllegalArgumentException("title must not be empty"))
                .settings();
    }
}
