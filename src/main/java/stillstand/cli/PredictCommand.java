package stillstand.cli;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.concurrent.Callable;
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

    @Option(names = "--rate", required = true, paramLabel = "RATE", description = "m/kyr, uplift positive")
    private double rate;

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

    @Option(names = "--curve", paramLabel = "ID", description = "sea-level curve in place of the study's")
    private List<String> curves = new ArrayList<>();

    @Option(names = "--out", paramLabel = "FILE", description = "writes the staircase as a table to this new file")
    private Optional<Path> out = Optional.empty();

    PredictCommand(Workshop workshop) {
        this.workshop = workshop;
    }

    @Override
    public Integer call() throws IOException {
        UpliftHistory history = history();
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
        SeaLevelCase sea = seaLevel(loaded.value().get());
        PredictedStair stair = PredictedStair.of(sea.highstands(), history);
        if (out.isPresent()) {
            if (Files.exists(out.get())) {
                workshop.err().println("--out: " + out.get() + " is there already; nothing was written");
                return ExitCode.PROBLEMS;
            }
            StairFile.write(out.get(), stair);
        }
        workshop.out().print(StairReport.text("Staircase of " + words() + " under " + sea.id() + ":", stair));
        return ExitCode.DONE;
    }

    private UpliftHistory history() {
        TreeMap<Double, Double> changes = new TreeMap<>(before);
        List<Double> rates = new ArrayList<>(List.of(rate));
        rates.addAll(changes.values());
        try {
            return changes.isEmpty()
                    ? new UpliftHistory.ConstantRate(rate)
                    : new UpliftHistory.SteppedRate(List.copyOf(changes.keySet()), rates);
        } catch (IllegalArgumentException e) {
            throw new ParameterException(spec.commandLine(), "--rate, --before: " + e.getMessage(), e);
        }
    }

    private SeaLevelCase seaLevel(Study study) {
        if (site.isEmpty()) {
            return study.seaLevel().get(0);
        }
        for (SitePlan plan : study.sites()) {
            if (plan.site().name().equals(site.get())) {
                return plan.seaLevel().get(0);
            }
        }
        throw new ParameterException(spec.commandLine(), "--site: the study has no site \"" + site.get() + "\"");
    }

    private String words() {
        StringBuilder words = new StringBuilder(rate + " m/kyr");
        new TreeMap<>(before)
                .forEach((age, older) -> words.append(", ")
                        .append(older)
                        .append(" before ")
                        .append(age)
                        .append(" ka"));
        return words.toString();
    }
}
