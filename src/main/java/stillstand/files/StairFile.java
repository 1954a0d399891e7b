package stillstand.files;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
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

    /**
     * Writes several, site by site.
     *
     * @param file that does not exist yet
     * @param stairs by the name of the site
     * @throws IOException if it exists or cannot be written
     */
    public static void write(Path file, Map<String, PredictedStair> stairs) throws IOException {
        List<SiteStep> steps = new ArrayList<>();
        stairs.forEach((site, stair) -> stair.steps().forEach(step -> steps.add(new SiteStep(site, step))));
        String text = new CsvTable<>(steps)
                .text("site", SiteStep::site)
                .text("highstand", each -> each.step.stage())
                .number("age_ka", each -> Optional.of(each.step.ageKa()))
                .number("sea_level_m", each -> Optional.of(each.step.seaLevelMetres()))
                .number("height_m", each -> Optional.of(each.step.heightMetres()))
                .number("height_1sigma_m", each -> Optional.of(each.step.heightSigmaMetres()))
                .text("survives", each -> each.step.overrunBy().isEmpty() ? "yes" : "no")
                .text("overrun_by", each -> each.step.overrunBy().orElse(""))
                .write();
        Files.writeString(file, text, StandardCharsets.UTF_8, StandardOpenOption.CREATE_NEW);
    }

    private record SiteStep(String site, Step step) {}

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
