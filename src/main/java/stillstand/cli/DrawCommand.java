package stillstand.cli;

import java.io.IOException;
import java.nio.charset.CharacterCodingException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.EnumSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.concurrent.Callable;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import stillstand.figure.Figure;
import stillstand.figure.FigureFormat;
import stillstand.figure.FigureKind;
import stillstand.figure.Figures;
import stillstand.figure.Figures.Absence;
import stillstand.figure.PageWidth;
import stillstand.files.FigureFiles;
import stillstand.files.FigureFiles.Fault;
import stillstand.files.ResultsJson;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.ledger.NearestName;
import stillstand.study.StudyResult;

/** {@code stillstand draw RESULTS}. */
@Command(
        name = "draw",
        mixinStandardHelpOptions = true,
        sortOptions = false,
        description = "Draws figures of a finished run again, from its results.json alone.")
final class DrawCommand implements Callable<Integer> {
    private final Workshop workshop;

    @Spec
    private CommandSpec spec = CommandSpec.create();

    @Parameters(paramLabel = "RESULTS", description = "folder of results, or its results.json")
    private Path results = Path.of("");

    @Option(names = "--into", paramLabel = "DIR", required = true, description = "write the figures there")
    private Path into = Path.of("");

    @Option(
            names = "--figure",
            paramLabel = "NAME",
            description =
                    "this figure alone; may be given again for several. A kind (stair, rates, budget, tornado, pairings,"
                            + " fates, residuals, history, curves, forest, map, coast, differences) or one file's name"
                            + " without its ending")
    private List<String> names = new ArrayList<>();

    @Option(
            names = "--width",
            paramLabel = "WIDTH",
            description = "one (90 mm), one-and-a-half (140 mm) or two (190 mm)")
    private String width = PageWidth.TWO.id();

    @Option(
            names = "--format",
            paramLabel = "FORMAT",
            description = "svg, pdf or png; may be given again for several (default: all)")
    private List<String> formats = new ArrayList<>();

    @Option(names = "--dpi", paramLabel = "N", description = "resolution of png, dots an inch (default: 300)")
    private int dpi = FigureFiles.DEFAULT_DPI;

    @Option(names = "--no-title", description = "without title and note, for a caption of your own")
    private boolean noTitle;

    DrawCommand(Workshop workshop) {
        this.workshop = workshop;
    }

    @Override
    public Integer call() throws IOException {
        if (!(dpi >= Figure.LEAST_DPI && dpi <= Figure.MOST_DPI)) {
            throw new ParameterException(
                    spec.commandLine(),
                    "--dpi must be " + Figure.LEAST_DPI + " to " + Figure.MOST_DPI + " but is " + dpi);
        }
        FigureFiles writer = new FigureFiles(formats(), width(), !noTitle, dpi);
        Loaded<StudyResult> loaded = read();
        if (loaded.value().isEmpty()) {
            Workshop.list(loaded.problems(), workshop.err());
            return ExitCode.PROBLEMS;
        }
        Figures all = Figures.of(loaded.value().get());
        List<Figure> chosen = chosen(all);
        List<Fault> faults = writer.write(chosen, into, Runtime.getRuntime().availableProcessors());
        tell(chosen, absent(all));
        faults.forEach(fault -> workshop.err().println(fault.sentence()));
        return faults.isEmpty() ? ExitCode.DONE : ExitCode.FAILED;
    }

    private Loaded<StudyResult> read() throws IOException {
        Path file = Files.isDirectory(results) ? results.resolve(ResultsJson.FILE) : results;
        String shown = file.toString().replace('\\', '/');
        String expected = "a folder of results, or its " + ResultsJson.FILE;
        try {
            return ResultsJson.read(Files.readString(file, StandardCharsets.UTF_8));
        } catch (NoSuchFileException e) {
            return Loaded.failed(List.of(InputProblem.ofFile(shown, "nothing there", expected)));
        } catch (CharacterCodingException e) {
            return Loaded.failed(List.of(InputProblem.ofFile(shown, "no text in UTF-8", expected)));
        }
    }

    private PageWidth width() {
        return Arrays.stream(PageWidth.values())
                .filter(each -> each.id().equals(width))
                .findFirst()
                .orElseThrow(() -> unknown("--width", width, ids(PageWidth.values())));
    }

    private List<FigureFormat> formats() {
        Set<FigureFormat> chosen = EnumSet.noneOf(FigureFormat.class);
        for (String format : formats) {
            chosen.add(Arrays.stream(FigureFormat.values())
                    .filter(each -> each.id().equals(format))
                    .findFirst()
                    .orElseThrow(() -> unknown("--format", format, ids(FigureFormat.values()))));
        }
        return formats.isEmpty() ? List.of(FigureFormat.values()) : List.copyOf(chosen);
    }

    private static List<String> ids(Object[] values) {
        return Arrays.stream(values).map(Object::toString).toList();
    }

    private List<Figure> chosen(Figures all) {
        names.forEach(name -> requireKnown(name, all));
        return all.figures().stream()
                .filter(figure -> names.isEmpty()
                        || names.contains(figure.name())
                        || names.contains(figure.kind().id()))
                .toList();
    }

    private void requireKnown(String name, Figures all) {
        List<String> known = Stream.concat(
                        Arrays.stream(FigureKind.values()).map(FigureKind::id),
                        all.figures().stream().map(Figure::name))
                .toList();
        if (!known.contains(name)) {
            throw unknown("--figure", name, known);
        }
    }

    private ParameterException unknown(String option, String value, List<String> known) {
        String nearest = NearestName.of(value, known)
                .map(near -> "did you mean \"" + near + "\"?")
                .orElse("it is one of " + String.join(", ", known));
        return new ParameterException(
                spec.commandLine(), option + ": there is no " + InputProblem.quote(value) + "; " + nearest);
    }

    /** Figures asked for by their kind that there are none of; of all kinds only what was asked for. */
    private List<Absence> absent(Figures all) {
        return all.absences().stream()
                .filter(absence -> names.contains(absence.kind().id()))
                .toList();
    }

    private void tell(List<Figure> drawn, List<Absence> absent) {
        String endings = formats().stream().map(FigureFormat::id).collect(Collectors.joining(", "));
        workshop.out()
                .println((drawn.size() == 1 ? "1 figure" : drawn.size() + " figures") + " written to " + into + " as "
                        + endings + ".");
        for (Absence absence : absent) {
            Optional<String> site = absence.site();
            workshop.out()
                    .println("No " + absence.kind().id()
                            + site.map(name -> " of " + name).orElse("") + ": " + absence.reason() + ".");
        }
    }
}
