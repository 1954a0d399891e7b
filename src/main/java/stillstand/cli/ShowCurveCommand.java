package stillstand.cli;

import java.util.Optional;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;
import stillstand.ledger.Loaded;
import stillstand.ledger.NearestName;
import stillstand.report.CurveReport;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.study.Library;

/** {@code stillstand curves show ID}. */
@Command(
        name = "show",
        mixinStandardHelpOptions = true,
        description = "Shows one curve: source, caveats, and its highstands with their errors, as picked and as used.")
final class ShowCurveCommand implements Callable<Integer> {
    private final Workshop workshop;

    @Spec
    private CommandSpec spec = CommandSpec.create();

    @Parameters(paramLabel = "ID", description = "of the curve, as \"stillstand curves\" lists it")
    private String id = "";

    @Mixin
    private CurvesCommand.OfStudy ofStudy = new CurvesCommand.OfStudy();

    ShowCurveCommand(Workshop workshop) {
        this.workshop = workshop;
    }

    @Override
    public Integer call() {
        Loaded<Library> loaded = ofStudy.library();
        if (loaded.value().isEmpty()) {
            Workshop.list(loaded.problems(), workshop.err());
            return ExitCode.PROBLEMS;
        }
        Library library = loaded.value().get();
        Optional<SeaLevelCurve> curve = library.curve(id);
        if (curve.isEmpty()) {
            String nearest = NearestName.of(id, library.curveIds())
                    .map(near -> "did you mean \"" + near + "\"?")
                    .orElse("the curves are " + String.join(", ", library.curveIds()));
            throw new ParameterException(
                    spec.commandLine(),
                    "there is no curve \"" + id + "\"; " + nearest + " (a study's own need --in STUDY)");
        }
        workshop.out().print(CurveReport.show(curve.get(), library));
        return ExitCode.DONE;
    }
}
