package stillstand.cli;

import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import stillstand.files.CurveImport;
import stillstand.files.ShippedLibrary;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.study.ImportChoices;
import stillstand.study.ImportChoices.AgeUnit;
import stillstand.study.ImportChoices.SpreadKind;
import stillstand.uncertainty.Digits;

/** {@code stillstand curves import FILE --into STUDY --id ID}. */
@Command(
        name = "import",
        mixinStandardHelpOptions = true,
        sortOptions = false,
        description = {
            "Reads an archived table of a sea-level curve into a study's curves/.",
            "What the table shows need not be said; what it leaves open is asked for, and nothing is written then."
        })
final class ImportCurveCommand implements Callable<Integer> {
    private static final Map<String, AgeUnit> AGE_UNITS =
            words("ka", AgeUnit.KA, "years", AgeUnit.YEARS, "negative-ka", AgeUnit.NEGATIVE_KA);
    private static final Map<String, SpreadKind> SPREADS = spreads();
    private static final Map<String, Boolean> DIRECTIONS = words("up", true, "down", false);
    private static final Map<String, Boolean> REPEATED = Map.of("mean", true);

    private final Workshop workshop;

    @Spec
    private CommandSpec spec = CommandSpec.create();

    @Parameters(paramLabel = "FILE", description = "table: cells between commas, semicolons, tabs or blanks")
    private Path file = Path.of("");

    @Option(names = "--into", paramLabel = "STUDY", required = true, description = "folder of the study")
    private Path study = Path.of("");

    @Option(
            names = "--id",
            paramLabel = "ID",
            required = true,
            description = "of the curve: lower-case words joined by -")
    private String id = "";

    @Option(names = "--age-column", paramLabel = "NAME", description = "header of the ages, or number from 1")
    private Optional<String> ageColumn = Optional.empty();

    @Option(names = "--level-column", paramLabel = "NAME", description = "header of the levels, or number from 1")
    private Optional<String> levelColumn = Optional.empty();

    @Option(
            names = "--spread-column",
            paramLabel = "NAME",
            description = "header of the spread, or number from 1; given twice for two bounds")
    private List<String> spreadColumns = new ArrayList<>();

    @Option(names = "--age-unit", paramLabel = "UNIT", description = "ka, years or negative-ka")
    private Optional<String> ageUnit = Optional.empty();

    @Option(names = "--level-positive", paramLabel = "WAY", description = "up or down")
    private Optional<String> levelPositive = Optional.empty();

    @Option(
            names = "--spread",
            paramLabel = "KIND",
            description = "1sigma, 2sigma, bounds (of 95 %%), or none to use Stillstand's default")
    private Optional<String> spread = Optional.empty();

    @Option(names = "--repeated-ages", paramLabel = "WHAT", description = "mean: rows of one age become their mean")
    private Optional<String> repeatedAges = Optional.empty();

    @Option(names = "--citation", paramLabel = "TEXT", description = "authors, year, title, journal")
    private Optional<String> citation = Optional.empty();

    ImportCurveCommand(Workshop workshop) {
        this.workshop = workshop;
    }

    @Override
    public Integer call() throws IOException {
        ImportChoices choices = new ImportChoices(
                ageColumn,
                levelColumn,
                spreadColumns,
                word("--age-unit", ageUnit, AGE_UNITS),
                word("--level-positive", levelPositive, DIRECTIONS),
                word("--spread", spread, SPREADS),
                word("--repeated-ages", repeatedAges, REPEATED).orElse(false));
        Loaded<CurveImport.Imported> loaded = CurveImport.into(
                file, study, id, choices, citation.filter(text -> !text.isBlank()), ShippedLibrary.load());
        if (loaded.value().isEmpty()) {
            Workshop.list(loaded.problems(), workshop.err());
            return ExitCode.PROBLEMS;
        }
        tell(loaded.value().get(), loaded.warnings());
        return ExitCode.DONE;
    }

    private void tell(CurveImport.Imported imported, List<InputWarning> warnings) {
        imported.remarks().forEach(workshop.out()::println);
        warnings.forEach(warning -> workshop.out().println("Odd: " + warning.placed()));
        workshop.out()
                .println("Written to " + study + ": " + imported.file() + " ("
                        + imported.curve().knots().size() + " rows, "
                        + Digits.text(imported.curve().fromKa()) + " to "
                        + Digits.text(imported.curve().toKa()) + " ka) and its entry in curves/datapackage.json.");
        if (citation.isEmpty()) {
            workshop.out()
                    .println("Its source is not stated: add \"citation\" to that entry. There, too, belong zero,"
                            + " age_scale, usable_from_ka and caveats.");
        } else {
            workshop.out().println("To that entry belong, too: zero, age_scale, usable_from_ka and caveats.");
        }
        workshop.out().println("Look at it: stillstand curves show " + id + " --in " + study);
        workshop.out().println("Use it: stillstand run " + study + " --curve " + id);
    }

    private <T> Optional<T> word(String option, Optional<String> text, Map<String, T> words) {
        if (text.isEmpty()) {
            return Optional.empty();
        }
        T meant = words.get(text.get());
        if (meant == null) {
            throw new ParameterException(
                    spec.commandLine(),
                    option + " must be " + String.join(" or ", words.keySet()) + " but is \"" + text.get() + "\"");
        }
        return Optional.of(meant);
    }

    private static Map<String, SpreadKind> spreads() {
        Map<String, SpreadKind> words =
                words("1sigma", SpreadKind.ONE_SIGMA, "2sigma", SpreadKind.TWO_SIGMA, "bounds", SpreadKind.BOUNDS);
        words.put("none", SpreadKind.NONE);
        return words;
    }

    private static <T> Map<String, T> words(String first, T one, String second, T two) {
        Map<String, T> words = new LinkedHashMap<>();
        words.put(first, one);
        words.put(second, two);
        return words;
    }

    private static <T> Map<String, T> words(String first, T one, String second, T two, String third, T three) {
        Map<String, T> words = words(first, one, second, two);
        words.put(third, three);
        return words;
    }
}
