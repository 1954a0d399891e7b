package stillstand.figure;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Locale;
import java.util.function.Supplier;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;
import stillstand.study.StudyResult;

/**
 * The Stair of three invented coasts against the drawings in {@code src/test/resources}, byte by byte. They were looked at when
 * they were made. To make them again, look at the new ones, and commit both: {@code mvn test -Dtest=StairRegressionTest
 * -Dfigures.remake=true}.
 */
class StairRegressionTest {
    private static final Path DRAWINGS = Path.of("src", "test", "resources", "stillstand", "figure");

    /** A flight, a slow coast, a drowned flight. */
    enum Coast {
        FLIGHT(InventedCoasts::flight),
        SLOW(InventedCoasts::slow),
        DROWNED(InventedCoasts::drowned);

        @SuppressWarnings("ImmutableEnumChecker") // the suppliers hold nothing
        private final Supplier<StudyResult> result;

        Coast(Supplier<StudyResult> result) {
            this.result = result;
        }
    }

    private static String drawn(Coast coast) throws IOException {
        Figure stair = Figures.of(coast.result.get()).figures().stream()
                .filter(figure -> figure.kind() == FigureKind.STAIR)
                .findFirst()
                .orElseThrow();
        return new String(stair.bytes(FigureFormat.SVG, PageWidth.TWO, true, 300), StandardCharsets.UTF_8)
                .replace("\r\n", "\n");
    }

    @ParameterizedTest
    @EnumSource(Coast.class)
    void isDrawnAsItWasWhenLookedAt(Coast coast) throws IOException {
        Path drawing = DRAWINGS.resolve("stair-" + coast.name().toLowerCase(Locale.ROOT) + ".svg");
        if (Boolean.getBoolean("figures.remake")) {
            Files.createDirectories(DRAWINGS);
            Files.writeString(drawing, drawn(coast));
        }
        assertEquals(Files.readString(drawing).replace("\r\n", "\n"), drawn(coast));
    }

    @Test
    void doesNotDependOnWhatWasDrawnBefore() throws IOException {
        String first = drawn(Coast.SLOW);
        drawn(Coast.FLIGHT);
        assertEquals(first, drawn(Coast.SLOW));
    }
}
