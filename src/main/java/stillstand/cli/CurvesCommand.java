package stillstand.cli;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Option;
import stillstand.files.CurvePackage;
import stillstand.files.ShippedLibrary;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.report.CurveReport;
import stillstand.study.Library;

/** {@code stillstand curves}. */
@Command(
        name = "curves",
        mixinStandardHelpOptions = true,
        description = "Lists the sea-level curves that a study may name: span, spread, zero, age scale, usable from.")
final class CurvesCommand implements Callable<Integer> {
    private final Workshop workshop;

    @Mixin
    private OfStudy ofStudy = new OfStudy();

    CurvesCommand(Workshop workshop) {
        this.workshop = workshop;
    }

    @Override
    public Integer call() {
        Loaded<Library> library = ofStudy.library();
        if (library.value().isEmpty()) {
            Workshop.list(library.problems(), workshop.err());
            return ExitCode.PROBLEMS;
        }
        workshop.out().print(CurveReport.list(library.value().get()));
        return ExitCode.DONE;
    }

    /** The tool's curves, and those of a study beside them. */
    static final class OfStudy {
        @Option(names = "--in", paramLabel = "STUDY", description = "the study's own curves too")
        private Optional<Path> study = Optional.empty();

        /** What there is to choose from. */
        Loaded<Library> library() {
            Library shipped = ShippedLibrary.load();
            if (study.isEmpty()) {
                return Loaded.of(shipped);
            }
            if (!Files.isDirectory(study.get())) {
                return Loaded.failed(List.of(InputProblem.ofFile(
                        study.get().toString().replace('\\', '/'), "no such folder", "the folder of a study")));
            }
            Set<String> taken = new HashSet<>(shipped.curveIds());
            taken.addAll(shipped.highstandIds());
            Loaded<CurvePackage> own =
                    CurvePackage.read(study.get().resolve("curves"), "curves", shipped.stages(), taken);
            return own.value().isEmpty()
                    ? Loaded.failed(own.problems())
                    : Loaded.of(shipped.with(
                            own.value().get().curves(), own.value().get().highstands()));
        }
    }
}
