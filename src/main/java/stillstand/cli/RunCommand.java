package stillstand.cli;

import java.io.IOException;
import java.nio.file.Path;
import java.time.Duration;
import java.time.Instant;
import java.time.temporal.ChronoUnit;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import stillstand.files.FigureFiles;
import stillstand.files.FigureFiles.Fault;
import stillstand.files.ResultFiles;
import stillstand.files.ResultsFolder;
import stillstand.files.ResultsJson;
import stillstand.files.ShippedLibrary;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.ledger.NearestName;
import stillstand.ledger.RunCancelledException;
import stillstand.report.TerminalReport;
import stillstand.study.Provenance;
import stillstand.study.Study;
import stillstand.study.StudyResult;
import stillstand.study.StudySettings.WeightedCurve;

/** {@code stillstand run STUDY}. */
@Command(
        name = "run",
        mixinStandardHelpOptions = true,
        sortOptions = false,
        description = "Reads a study, finds the rates of its levels, and writes them to its results.")
final class RunCommand implements Callable<Integer> {
    private static final String ALL_FIGURES = "all";
    private static final String NO_FIGURES = "none";

    private final Workshop workshop;

    @Spec
    private CommandSpec spec = CommandSpec.create();

    @Parameters(paramLabel = "STUDY", description = "folder of the study")
    private Path folder = Path.of("");

    @Option(names = "--out", paramLabel = "DIR", description = "write the results there (default: STUDY/results)")
    private Optional<Path> out = Optional.empty();

    @Option(names = "--seed", paramLabel = "N", description = "seed of the draws, in place of the study's")
    private Optional<Long> seed = Optional.empty();

    @Option(
            names = "--draws",
            paramLabel = "N",
            description = "N draws a level, rounded up to whole blocks, in place of as many as the digits need")
    private Optional<Integer> draws = Optional.empty();

    @Option(
            names = "--curve",
            paramLabel = "ID",
            description = "sea-level curve in place of the study's; may be given again for several")
    private List<String> curves = new ArrayList<>();

    @Option(
            names = "--every-curve",
            description = "every shipped curve that shows highstands, each with the independent levels and with its own"
                    + " picks alone")
    private boolean everyCurve;

    @Option(names = "--only", paramLabel = "SITE", description = "this site alone; may be given again for several")
    private List<String> only = new ArrayList<>();

    @Option(names = "--threads", paramLabel = "N", description = "at work at once (default: all cores)")
    private Optional<Integer> threads = Optional.empty();

    @Option(names = "--figures", paramLabel = "WHICH", description = "all (default) or none")
    private String figures = ALL_FIGURES;

    @Option(
            names = "--leverage",
            description = "say also what to measure next, and what other assumptions and each sample do")
    private boolean leverage;

    @Option(names = "--json", description = "print results.json in place of the summary")
    private boolean json;

    @Option(names = "--quiet", description = "no progress and no summary; problems are still told")
    private boolean quiet;

    RunCommand(Workshop workshop) {
        this.workshop = workshop;
    }

    @Override
    public Integer call() throws IOException {
        atLeastOne("--draws", draws);
        atLeastOne("--threads", threads);
        if (!List.of(ALL_FIGURES, NO_FIGURES).contains(figures)) {
            throw new ParameterException(
                    spec.commandLine(), "--figures must be all or none but is " + InputProblem.quote(figures));
        }
        if (everyCurve && !curves.isEmpty()) {
            throw new ParameterException(spec.commandLine(), "--every-curve goes without --curve");
        }
        Instant started = workshop.clock().instant();
        Loaded<Study> loaded =
                workshop.reader().read(folder, new SettingsChanges(seed, draws, namedCurves(), leverage));
        if (!loaded.problems().isEmpty() || loaded.value().isEmpty()) {
            Workshop.list(loaded.problems(), workshop.err());
            return ExitCode.PROBLEMS;
        }
        Study study = chosen(loaded.value().get());
        Path place = out.orElse(folder.resolve("results"));
        try (Interruption interruption = new Interruption()) {
            Loaded<ResultsFolder> opened = ResultsFolder.open(place);
            if (opened.value().isEmpty()) {
                Workshop.list(opened.problems(), workshop.err());
                return ExitCode.PROBLEMS;
            }
            try (ResultsFolder results = opened.value().get()) {
                StudyResult result = run(study, started, interruption);
                List<Fault> faults = new ArrayList<>();
                results.replace(fresh -> {
                    faults.addAll(write(study, result, fresh));
                });
                tell(study, result, place);
                faults.forEach(fault -> workshop.err().println(fault.sentence()));
                return result.failures().isEmpty() && faults.isEmpty() ? ExitCode.DONE : ExitCode.FAILED;
            } catch (RunCancelledException e) {
                workshop.err().println("Interrupted. Earlier results are as they were.");
                return ExitCode.INTERRUPTED;
            }
        }
    }

    private List<WeightedCurve> namedCurves() {
        return everyCurve
                ? ShippedLibrary.load().everyCurve()
                : curves.stream().map(id -> new WeightedCurve(id, 1)).toList();
    }

    private StudyResult run(Study study, Instant started, Interruption interruption) {
        ExecutorService executor = Executors.newFixedThreadPool(workers());
        Progress progress = new Progress(workshop, quiet, interruption::isAsked);
        try {
            StudyResult result = workshop.engine().run(study, executor, progress);
            if (interruption.isAsked()) {
                throw new RunCancelledException();
            }
            return result.with(timed(result.provenance(), started));
        } finally {
            executor.shutdownNow();
        }
    }

    /** Chart classes are loaded here and not before: a run without figures starts without them. */
    private List<Fault> write(Study study, StudyResult result, Path fresh) throws IOException {
        if (figures.equals(NO_FIGURES)) {
            ResultFiles.write(fresh, study, result);
            return List.of();
        }
        return ResultFiles.write(fresh, study, result, FigureFiles.OF_RUN, workers());
    }

    private int workers() {
        return threads.orElse(Runtime.getRuntime().availableProcessors());
    }

    private Provenance timed(Provenance engine, Instant started) {
        double seconds = Duration.between(started, workshop.clock().instant()).toMillis() / 1000.0;
        return new Provenance(
                engine.version(),
                engine.seed(),
                engine.generator(),
                engine.inputs(),
                Optional.of(started.truncatedTo(ChronoUnit.SECONDS).toString()),
                Optional.of(seconds));
    }

    private void tell(Study study, StudyResult result, Path place) {
        if (json) {
            workshop.out().print(ResultsJson.text(result));
        } else if (!quiet) {
            String shown = place.toString().replace('\\', '/');
            workshop.out().print(TerminalReport.text(study.settings().title(), result, shown));
        }
    }

    private Study chosen(Study study) {
        if (only.isEmpty()) {
            return study;
        }
        List<String> known =
                study.sites().stream().map(plan -> plan.site().name()).toList();
        for (String name : only) {
            if (!known.contains(name)) {
                String nearest = NearestName.of(name, known)
                        .map(near -> "did you mean \"" + near + "\"?")
                        .orElse("its sites are " + String.join(", ", known));
                throw new ParameterException(
                        spec.commandLine(), "--only: the study has no site \"" + name + "\"; " + nearest);
            }
        }
        return study.only(only);
    }

    private void atLeastOne(String option, Optional<Integer> number) {
        if (number.isPresent() && number.get() < 1) {
            throw new ParameterException(spec.commandLine(), option + " must be 1 or more but is " + number.get());
        }
    }
}
