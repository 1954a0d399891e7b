package stillstand.files;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import stillstand.comparison.ComparisonRules;
import stillstand.study.StudySettings;
import stillstand.study.StudySettings.Changes;
import stillstand.study.StudySettings.Decay;
import stillstand.study.StudySettings.Matching;
import stillstand.study.StudySettings.Recording;
import stillstand.study.StudySettings.Screening;
import stillstand.study.StudySettings.SeaLevelChoice;
import stillstand.study.StudySettings.Setting;
import stillstand.study.StudySettings.Strays;
import stillstand.uplift.CauchyPrior;
import stillstand.uplift.HalfCauchyPrior;
import stillstand.uplift.LogUniformPrior;
import stillstand.uplift.NormalPrior;
import stillstand.uplift.RatePrior;
import tools.jackson.core.util.DefaultIndenter;
import tools.jackson.core.util.DefaultPrettyPrinter;
import tools.jackson.databind.json.JsonMapper;

/** Writes settings as {@code study.json}, such that reading them gives the same settings. */
public final class StudyJsonWriter {
    private static final JsonMapper MAPPER = JsonMapper.builder().build();

    private StudyJsonWriter() {}

    /** The text of {@code study.json}, with a newline at its end. Shared errors that are defaults stay unstated. */
    public static String write(StudySettings settings) {
        Map<String, Object> root = new LinkedHashMap<>();
        root.put("title", settings.title());
        if (!settings.note().isEmpty()) {
            root.put("note", settings.note());
        }
        root.put("seed", settings.seed());
        root.put(
                "draws",
                ordered(
                        "maximum",
                        settings.draws().maximum(),
                        "significant_digits",
                        settings.draws().significantDigits()));
        root.put("sea_level", seaLevel(settings.seaLevel()));
        root.put(
                "rate",
                ordered(
                        "prior",
                        prior(settings.rate().prior()),
                        "changes",
                        word(settings.rate().changes()),
                        "change_between_ka",
                        List.of(
                                settings.rate().changeBetweenKa().low(),
                                settings.rate().changeBetweenKa().high())));
        root.put("matching", matching(settings.matching()));
        root.put("indicative_range", settings.indicativeRange().id());
        Map<String, Object> screening = screening(settings.screening());
        if (!screening.isEmpty()) {
            root.put("screening", screening);
        }
        root.put("comparison", comparison(settings.comparison()));
        settings.leverage()
                .ifPresent(plan -> root.put(
                        "leverage",
                        ordered("date_1sigma_ka", plan.dateSigmaKa(), "survey_1sigma_m", plan.surveySigmaMetres())));
        return text(root);
    }

    static String text(Map<String, Object> root) {
        DefaultIndenter indenter = new DefaultIndenter("  ", "\n");
        return MAPPER.writer()
                        .with(new DefaultPrettyPrinter().withObjectIndenter(indenter))
                        .writeValueAsString(root)
                + "\n";
    }

    static String word(Changes changes) {
        return changes.name().toLowerCase(Locale.ROOT).replace('_', '-');
    }

    private static Map<String, Object> seaLevel(SeaLevelChoice choice) {
        Map<String, Object> keys = new LinkedHashMap<>();
        List<Object> curves = new ArrayList<>();
        for (StudySettings.WeightedCurve curve : choice.curves()) {
            Map<String, Object> item = ordered("id", curve.id(), "weight", curve.weight());
            curve.overrides().ifPresent(by -> item.put("overrides", by));
            curves.add(item);
        }
        if (!curves.isEmpty()) {
            keys.put("curves", curves);
        }
        Map<String, Object> highstands = new LinkedHashMap<>();
        highstands.put("from", choice.highstandTable().isPresent() ? "table" : "curve");
        choice.highstandTable().ifPresent(id -> highstands.put("table", id));
        if (choice.highstandTable().isEmpty()) {
            highstands.put("overrides", choice.overrides().orElse("none"));
        }
        highstands.put("older_than_curve", choice.olderThanCurve());
        keys.put("highstands", highstands);
        choice.correlationTimeKa().ifPresent(value -> keys.put("correlation_time_ka", value));
        putStated(keys, "shared_level_1sigma_m", choice.sharedLevelSigmaMetres());
        putStated(keys, "interstadial_1sigma_m", choice.interstadialSigmaMetres());
        choice.curveAgeSigmaKa().ifPresent(value -> keys.put("curve_age_1sigma_ka", value));
        keys.put("rezero", choice.rezero());
        return keys;
    }

    private static Map<String, Object> prior(RatePrior prior) {
        Map<String, Object> keys = new LinkedHashMap<>();
        if (prior instanceof CauchyPrior cauchy) {
            keys.put("kind", "cauchy");
            keys.put("location", cauchy.location());
            keys.put("scale", cauchy.scale());
        } else if (prior instanceof HalfCauchyPrior half) {
            keys.put("kind", "half-cauchy");
            keys.put("scale", half.scale());
        } else if (prior instanceof LogUniformPrior) {
            keys.put("kind", "log-uniform");
        } else if (prior instanceof NormalPrior normal) {
            return ordered("kind", "normal", "mean", normal.mean(), "sigma", normal.sigmaMetresPerKyr());
        }
        keys.put("from", prior.fromMetresPerKyr());
        keys.put("to", prior.toMetresPerKyr());
        return keys;
    }

    private static Map<String, Object> matching(Matching matching) {
        Map<String, Object> keys = new LinkedHashMap<>();
        if (matching.recordingProbability() instanceof Recording.Fixed fixed) {
            keys.put("recording_probability", fixed.probability());
        } else if (matching.recordingProbability() instanceof Recording.Beta beta) {
            keys.put("recording_probability", Map.of("beta", List.of(beta.alpha(), beta.beta())));
        }
        matching.recordingDecay().ifPresent(decay -> {
            if (decay instanceof Decay.Fixed fixed) {
                keys.put("recording_decay_ka", fixed.timeKa());
            } else {
                keys.put("recording_decay_ka", decay instanceof Decay.None ? "none" : "marginalised");
            }
        });
        matching.expectedStrays().ifPresent(strays -> {
            if (strays instanceof Strays.Fixed fixed) {
                keys.put("expected_strays", fixed.number());
            } else if (strays instanceof Strays.GammaMean gamma) {
                keys.put("expected_strays", Map.of("gamma_mean", gamma.mean()));
            }
        });
        keys.put("stray_age_maximum_ka", matching.strayAgeMaximumKa());
        putStated(keys, "wrong_date_probability", matching.wrongDateProbability());
        keys.put("trace_probability", matching.traceProbability());
        return keys;
    }

    private static Map<String, Object> screening(Screening screening) {
        Map<String, Object> keys = new LinkedHashMap<>();
        screening.calciteMaximumPercent().ifPresent(value -> keys.put("calcite_maximum_percent", value));
        screening
                .initialDelta234ULowPermil()
                .ifPresent(low -> screening
                        .initialDelta234UHighPermil()
                        .ifPresent(high -> keys.put("initial_d234u_permil", List.of(low, high))));
        screening.th232MaximumPpb().ifPresent(value -> keys.put("th232_maximum_ppb", value));
        screening.th230Th232Minimum().ifPresent(value -> keys.put("th230_th232_minimum", value));
        screening.replicates().ifPresent(value -> keys.put("replicates", value));
        screening.stratigraphicOrder().ifPresent(value -> keys.put("stratigraphic_order", value));
        return keys;
    }

    private static Map<String, Object> comparison(ComparisonRules rules) {
        Map<String, Object> keys = ordered(
                "stable_within_m_per_kyr",
                rules.stableWithinMetresPerKyr(),
                "site_spread_m_per_kyr",
                rules.siteSpreadMetresPerKyr());
        if (!rules.pairs().isEmpty()) {
            keys.put(
                    "pairs",
                    rules.pairs().stream()
                            .map(pair -> List.of(pair.a(), pair.b()))
                            .toList());
        }
        return keys;
    }

    private static void putStated(Map<String, Object> keys, String key, Setting setting) {
        if (setting.stated()) {
            keys.put(key, setting.value());
        }
    }

    private static Map<String, Object> ordered(Object... keysAndValues) {
        Map<String, Object> keys = new LinkedHashMap<>();
        for (int i = 0; i < keysAndValues.length; i += 2) {
            keys.put(String.valueOf(keysAndValues[i]), keysAndValues[i + 1]);
        }
        return keys;
    }
}
