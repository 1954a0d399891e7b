package stillstand.files;

import java.io.IOException;
import java.time.Duration;
import java.time.Instant;
import java.time.temporal.ChronoUnit;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.figure.Figures;
import stillstand.files.FigureFiles.Fault;
import stillstand.study.Provenance;
import stillstand.study.Study;
import stillstand.study.StudyResult;

/** A run that came to its end, and how terminal and window alike put it on disk. */
public record FinishedRun(Study study, StudyResult result) {
    /** A run of the engine, with the time it took in its provenance. */
    public static FinishedRun of(Study study, StudyResult result, Instant started, Instant ended) {
        Provenance engine = result.provenance();
        return new FinishedRun(
                study,
                result.with(new Provenance(
                        engine.version(),
                        engine.seed(),
                        engine.generator(),
                        engine.inputs(),
                        Optional.of(started.truncatedTo(ChronoUnit.SECONDS).toString()),
                        Optional.of(Duration.between(started, ended).toMillis() / 1000.0))));
    }

    /**
     * Replaces a results folder's content by this run. Chart classes are loaded by figures and not before.
     *
     * @param hasFigures whether figures are drawn too
     * @param threads at work at once
     * @return figures that could not be drawn
     * @throws IOException if something cannot be written; what was there before is then there still
     */
    public List<Fault> write(ResultsFolder results, boolean hasFigures, int threads) throws IOException {
        List<Fault> faults = new ArrayList<>();
        results.replace(fresh -> {
            ResultFiles.write(fresh, study, result);
            if (hasFigures) {
                faults.addAll(
                        FigureFiles.OF_RUN.write(Figures.of(result).figures(), fresh.resolve("figures"), threads));
            }
        });
        return faults;
    }
}
