package stillstand.files;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.Optional;
import stillstand.uplift.PredictedStair;
import stillstand.uplift.PredictedStair.Step;

/** A predicted staircase as a table. */
public final class StairFile {
    private StairFile() {}

    /**
     * Writes it.
     *
     * @param file that does not exist yet
     * @throws IOException if it exists or cannot be written
     */
    public static void write(Path file, PredictedStair stair) throws IOException {
        Files.writeString(file, text(stair), StandardCharsets.UTF_8, StandardOpenOption.CREATE_NEW);
    }

    static String text(PredictedStair stair) {
        return new CsvTable<>(stair.steps())
                .text("highstand", Step::stage)
                .number("age_ka", step -> Optional.of(step.ageKa()))
                .number("sea_level_m", step -> Optional.of(step.seaLevelMetres()))
                .number("height_m", step -> Optional.of(step.heightMetres()))
                .number("height_1sigma_m", step -> Optional.of(step.heightSigmaMetres()))
                .text("survives", step -> step.overrunBy().isEmpty() ? "yes" : "no")
                .text("overrun_by", step -> step.overrunBy().orElse(""))
                .write();
    }
}
