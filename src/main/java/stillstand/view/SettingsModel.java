package stillstand.view;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Function;
import java.util.function.Predicate;
import java.util.stream.Stream;
import stillstand.files.SettingsText;
import stillstand.files.StudyDraft;
import stillstand.files.StudyJson;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputProblem;
import stillstand.study.Library;

/** The settings of a study, key by key, as a form shows them. Blank = not stated: Stillstand's default, which the ledger names. */
final class SettingsModel {
    static final String STUDY = "Study";
    static final String SEA_LEVEL = "Sea level";
    static final String PRIOR = "Prior of the rate";
    static final String MATCHING = "Matching";
    static final String LEVERAGE = "A next measurement";
    static final String SITES = "Comparing sites";

    private static final String PRIOR_KIND = "rate.prior.kind";
    private static final String CURVES = "sea_level.curves";

    private final StudyDocument document;
    private final Library library;

    /**
     * A key of {@code study.json} that the form offers.
     *
     * @param keyPath in the file
     * @param label in words
     * @param words to choose from; empty where anything may be typed
     * @param isWords whether what is typed is text and never a number
     */
    record Field(String group, String keyPath, String label, List<String> words, boolean isWords) {
        /** What should stand there, as a problem says it. */
        String expected() {
            return StudyJson.expectedAt(keyPath);
        }
    }

    SettingsModel(StudyDocument document, Library library) {
        this.document = document;
        this.library = library;
    }

    StudyDocument document() {
        return document;
    }

    /** What the study may name. */
    Library library() {
        return library;
    }

    /** All fields but the curves, in the order of the form. */
    List<Field> fields() {
        List<String> tables = library.highstandIds();
        List<String> overrides =
                Stream.concat(Stream.of("none"), tables.stream()).toList();
        List<String> flags = List.of("true", "false");
        return List.of(
                words(STUDY, "title", "Title"),
                words(STUDY, "note", "Note"),
                number(STUDY, "seed", "Seed of the draws"),
                number(STUDY, "draws.maximum", "Draws a level, at most"),
                number(STUDY, "draws.significant_digits", "Steady digits"),
                choice(SEA_LEVEL, "sea_level.highstands.from", "Highstands from", List.of("curve", "table")),
                choice(SEA_LEVEL, "sea_level.highstands.table", "Table of highstands", tables),
                choice(SEA_LEVEL, "sea_level.highstands.overrides", "Overrides of picks", overrides),
                choice(SEA_LEVEL, "sea_level.highstands.older_than_curve", "Go on beyond the curve", flags),
                number(SEA_LEVEL, "sea_level.shared_level_1sigma_m", "Shared error, 1 sigma, m"),
                number(SEA_LEVEL, "sea_level.interstadial_1sigma_m", "Interstadial error, 1 sigma, m"),
                number(SEA_LEVEL, "sea_level.curve_age_1sigma_ka", "Age scale of the curve, 1 sigma, ka"),
                number(SEA_LEVEL, "sea_level.correlation_time_ka", "Correlation time, ka"),
                choice(SEA_LEVEL, "sea_level.rezero", "Move the curve to 0 today", flags),
                choice(PRIOR, PRIOR_KIND, "Kind", List.of("cauchy", "half-cauchy", "log-uniform", "normal")),
                number(PRIOR, "rate.prior.location", "Location, m/kyr"),
                number(PRIOR, "rate.prior.scale", "Scale, m/kyr"),
                number(PRIOR, "rate.prior.mean", "Mean, m/kyr"),
                number(PRIOR, "rate.prior.sigma", "Sigma, m/kyr"),
                number(PRIOR, "rate.prior.from", "From, m/kyr"),
                number(PRIOR, "rate.prior.to", "To, m/kyr"),
                choice(
                        PRIOR,
                        "rate.changes",
                        "Changes of rate",
                        List.of("none", "one", "up-to-two", "gradual", "choose")),
                number(MATCHING, "matching.recording_probability", "Recording probability"),
                number(MATCHING, "matching.recording_decay_ka", "Recording decay, ka"),
                number(MATCHING, "matching.expected_strays", "Expected strays"),
                number(MATCHING, "matching.stray_age_maximum_ka", "Oldest stray, ka"),
                number(MATCHING, "matching.wrong_date_probability", "Wrong date probability"),
                number(MATCHING, "matching.trace_probability", "Trace probability"),
                choice(MATCHING, "indicative_range", "Indicative range", List.of("quadrature", "uniform")),
                number(SITES, "comparison.stable_within_m_per_kyr", "Stable within, m/kyr"),
                number(SITES, "comparison.site_spread_m_per_kyr", "Spread of sites, m/kyr"),
                number(SITES, "comparison.pairs", "Pairs beside those of a coast"),
                number(LEVERAGE, "leverage.date_1sigma_ka", "Date, 1 sigma, ka"),
                number(LEVERAGE, "leverage.survey_1sigma_m", "Survey, 1 sigma, m"));
    }

    private static Field words(String group, String keyPath, String label) {
        return new Field(group, keyPath, label, List.of(), true);
    }

    private static Field number(String group, String keyPath, String label) {
        return new Field(group, keyPath, label, List.of(), false);
    }

    private static Field choice(String group, String keyPath, String label, List<String> words) {
        return new Field(group, keyPath, label, words, false);
    }

    /** Whether {@code study.json} is whole enough for the form; else it is edited as text. */
    boolean isReadable() {
        return settings(document.draft()).isPresent();
    }

    /** What is stated; "" where nothing is. */
    String value(Field field) {
        return settings(document.draft())
                .flatMap(settings -> settings.value(field.keyPath))
                .orElse("");
    }

    /** What holds where a field is blank, as far as the ledger of the study says it; "" where it does not. */
    String defaultOf(Field field) {
        return document.checked().study().stream()
                .flatMap(study -> study.ledger().stream())
                .filter(line -> line.assumption().equals(field.keyPath + " is not stated")
                        || (field.keyPath.equals(PRIOR_KIND)
                                && line.assumption().equals("rate.prior is not stated")))
                .map(Assumption::value)
                .findFirst()
                .orElse("");
    }

    void write(Field field, String typed) {
        if (!typed.strip().equals(value(field).strip())) {
            change(
                    "changing " + field.label.replaceFirst(",.*", ""),
                    settings -> field.isWords
                            ? settings.withWords(field.keyPath, typed)
                            : settings.withValue(field.keyPath, typed));
        }
    }

    /** Ids of the curves there are, those of the study itself among them where it names them. */
    List<String> curveIds() {
        Map<String, String> stated = curves();
        return Stream.concat(
                        library.curveIds().stream(),
                        stated.keySet().stream().filter(id -> library.curve(id).isEmpty()))
                .toList();
    }

    /** The curves that are stated, and their weights as typed. */
    Map<String, String> curves() {
        return settings(document.draft()).map(SettingsModel::curves).orElseGet(LinkedHashMap::new);
    }

    static Map<String, String> curves(SettingsText settings) {
        Map<String, String> curves = new LinkedHashMap<>();
        for (int i = 0; i < settings.size(CURVES); i++) {
            String item = CURVES + "[" + i + "]";
            String weight = settings.value(item + ".weight").orElse("");
            settings.value(item + ".id").ifPresent(id -> curves.put(id, weight));
        }
        return curves;
    }

    /** Takes a curve into the study, or leaves it out. */
    void use(String id, boolean isUsed) {
        Map<String, String> curves = curves();
        if (isUsed != curves.containsKey(id)) {
            if (isUsed) {
                curves.put(id, "");
            } else {
                curves.remove(id);
            }
            change("choosing curves", settings -> settings.withCurves(curves));
        }
    }

    void weigh(String id, String weight) {
        Map<String, String> curves = curves();
        if (curves.containsKey(id) && !weight.strip().equals(curves.get(id))) {
            curves.put(id, weight);
            change("weighing curves", settings -> settings.withCurves(curves));
        }
    }

    /** What is wrong under a key or below it, in the sentence of the command line. */
    Optional<String> problem(String keyPath) {
        Predicate<InputProblem> isHere = problem -> problem.file().equals(StudyJson.NAME)
                && (problem.header().equals(keyPath)
                        || problem.header().startsWith(keyPath + ".")
                        || problem.header().startsWith(keyPath + "["));
        return document.checked().problems().stream().filter(isHere).findFirst().map(InputProblem::message);
    }

    /** What is wrong with the curves. */
    Optional<String> problemOfCurves() {
        return problem(CURVES);
    }

    private void change(String what, Function<SettingsText, String> change) {
        document.edit(
                what,
                draft -> settings(draft)
                        .map(settings -> draft.withText(StudyJson.NAME, change.apply(settings)))
                        .orElse(draft));
    }

    private static Optional<SettingsText> settings(StudyDraft draft) {
        return draft.text(StudyJson.NAME).flatMap(SettingsText::parse);
    }
}
