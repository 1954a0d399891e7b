package stillstand.cli;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.concurrent.Callable;
import java.util.stream.Collectors;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import stillstand.files.StairFile;
import stillstand.ledger.Loaded;
import stillstand.report.StairReport;
import stillstand.study.SeaLevelCase;
import stillstand.study.SitePlan;
import stillstand.study.Study;
import stillstand.study.StudySettings.WeightedCurve;
import stillstand.uplift.PredictedStair;
import stillstand.uplift.SeaLevelBasis;
import stillstand.uplift.UpliftHistory;

/** {@code stillstand predict STUDY --rate …}. */
@Command(
        name = "predict",
        mixinStandardHelpOptions = true,
        description =
                "Tells which highstands a rate leaves as a staircase under the study's sea level, at what height, and"
                        + " which are overrun and by whom: on central values, without any level of the study.")
final class PredictCommand implements Callable<Integer> {
    private final Workshop workshop;

    @Spec
    private CommandSpec spec = CommandSpec.create();

    @Parameters(paramLabel = "STUDY", description = "folder of the study")
    private Path folder = Path.of("");

    @Option(names = "--rate", paramLabel = "RATE", description = "m/kyr, uplift positive")
    private Optional<Double> rate = Optional.empty();

    @Option(
            names = "--before",
            paramLabel = "AGE=RATE",
            description = "another rate before this age in ka; may be given again for an older change")
    private Map<Double, Double> before = new TreeMap<>();

    @Option(
            names = "--site",
            paramLabel = "SITE",
            description = "under the sea level of this site (default: the study's)")
    private Optional<String> site = Optional.empty();

    @Option(
            names = "--at",
            paramLabel = "SITE=RATE[,AGE:RATE...]",
            description = "instead of --rate: the rate at a site, and other rates before ages in ka, such as"
                    + " North=0.4,150:0.9; given again, several sites stand side by side")
    private Map<String, String> at = new LinkedHashMap<>();

    @Option(
            names = "--drowned",
            description = "the reefs that lowstands leave on a sinking coast instead of the terraces of highstands")
    private boolean drowned;

    @Option(names = "--curve", paramLabel = "ID", description = "sea-level curve in place of the study's")
    private List<String> curves = new ArrayList<>();

    @Option(names = "--out", paramLabel = "FILE", description = "writes the staircase as a table to this new file")
    private Optional<Path> out = Optional.empty();

    PredictCommand(Workshop workshop) {
        this.workshop = workshop;
    }

    @Override
    public Integer call() throws IOException {
        if (rate.isPresent() != at.isEmpty() || (!at.isEmpty() && (!before.isEmpty() || site.isPresent()))) {
            throw new ParameterException(
                    spec.commandLine(), "give --rate (with --before and --site) or --at for each site, not both");
        }
        Map<String, UpliftHistory> histories = new LinkedHashMap<>();
        at.forEach((name, text) -> histories.put(name, history(text)));
        rate.ifPresent(first -> histories.put(site.orElse(""), history(first, before, "--rate, --before")));
        Loaded<Study> loaded = workshop.reader()
                .read(
                        folder,
                        new SettingsChanges(
                                Optional.empty(),
                                Optional.empty(),
                                curves.stream()
                                        .map(id -> new WeightedCurve(id, 1))
                                        .toList(),
                                false));
        if (!loaded.problems().isEmpty() || loaded.value().isEmpty()) {
            Workshop.list(loaded.problems(), workshop.err());
            return ExitCode.PROBLEMS;
        }
        Map<String, PredictedStair> stairs = new LinkedHashMap<>();
        Map<String, String> seas = new LinkedHashMap<>();
        histories.forEach((name, history) -> {
            SeaLevelCase sea = seaLevel(loaded.value().orElseThrow(), name);
            stairs.put(name, stair(sea, history));
            seas.put(name, sea.id());
        });
        return tell(stairs, String.join(", ", new LinkedHashSet<>(seas.values())));
    }

    private PredictedStair stair(SeaLevelCase sea, UpliftHistory history) {
        return drowned
                ? PredictedStair.ofDrownedReefs(new SeaLevelBasis(sea.id(), sea.curve(), sea.highstands()), history)
                : PredictedStair.of(sea.highstands(), history);
    }

    private int tell(Map<String, PredictedStair> stairs, String sea) throws IOException {
        if (out.isPresent()) {
            if (Files.exists(out.get())) {
                workshop.err().println("--out: " + out.get() + " is there already; nothing was written");
                return ExitCode.PROBLEMS;
            }
            if (at.isEmpty()) {
                StairFile.write(out.get(), stairs.values().iterator().next());
            } else {
                StairFile.write(out.get(), stairs);
            }
        }
        String of = drowned ? "Drowned reefs of " : "Staircase of ";
        workshop.out()
                .print(
                        at.isEmpty()
                                ? StairReport.text(
                                        of + words() + " under " + sea + ":",
                                        stairs.values().iterator().next())
                                : StairReport.sideBySide(
                                        of
                                                + at.entrySet().stream()
                                                        .map(entry -> entry.getKey() + " " + entry.getValue())
                                                        .collect(Collectors.joining("; "))
                                                + " (m/kyr) under " + sea + ", in brackets what a later sea overran:",
                                        stairs));
        return ExitCode.DONE;
    }

    private UpliftHistory history(String text) {
        String[] parts = text.split(",", -1);
        Map<Double, Double> older = new TreeMap<>();
        try {
            for (int i = 1; i < parts.length; i++) {
                String[] change = parts[i].split(":", 2);
                if (change.length < 2) {
                    throw new NumberFormatException();
                }
                older.put(Double.valueOf(change[0].strip()), Double.valueOf(change[1].strip()));
            }
            return history(Double.parseDouble(parts[0].strip()), older, "--at");
        } catch (NumberFormatException e) {
            throw new ParameterException(
                    spec.commandLine(), "--at: \"" + text + "\" is no RATE[,AGE:RATE...] such as 0.4,150:0.9", e);
        }
    }

    private UpliftHistory history(double first, Map<Double, Double> older, String option) {
        TreeMap<Double, Double> changes = new TreeMap<>(older);
        List<Double> rates = new ArrayList<>(List.of(first));
        rates.addAll(changes.values());
        try {
            return changes.isEmpty()
                    ? new UpliftHistory.ConstantRate(first)
                    : new UpliftHistory.SteppedRate(List.copyOf(changes.keySet()), rates);
        } catch (IllegalArgumentException e) {
            throw new ParameterException(spec.commandLine(), option + ": " + e.getMessage(), e);
        }
    }

    private SeaLevelCase seaLevel(Study study, String name) {
        if (name.isEmpty()) {
            return study.seaLevel().get(0);
        }
        for (SitePlan plan : study.sites()) {
            if (plan.site().name().equals(name)) {
                return plan.seaLevel().get(0);
            }
        }
        throw new ParameterException(
                spec.commandLine(), (at.isEmpty() ? "--site" : "--at") + ": the study has no site \"" + name + "\"");
    }

    private String words() {
        StringBuilder words = new StringBuilder(rate.orElseThrow() + " m/kyr");
        new TreeMap<>(before)
                .forEach((age, older) -> words.append(", ")
                        .append(older)
                        .append(" before ")
                        .append(age)
                        .append(" ka"));
        return words.toString();
    }
}
