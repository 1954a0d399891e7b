package stillstand.view;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import stillstand.view.WindowMemory.Place;

/** What the window remembers. */
class WindowMemoryTest {
    @TempDir
    private Path folder;

    private final WindowMemory memory = OpenStudies.memory();

    @Test
    void placeIsKept() {
        assertEquals(Optional.empty(), memory.place());
        Place place = new Place(10, 20, 900, 700, true);
        memory.keep(place);
        assertEquals(Optional.of(place), memory.place());
        memory.keep(new Place(0, 0, 3, 700, false));
        assertEquals(Optional.empty(), memory.place());
        memory.keep(new Place(Double.NaN, 0, 900, 700, false));
        assertEquals(Optional.empty(), memory.place());
    }

    @Test
    void newestStudyComesFirstAndEachOnce() throws IOException {
        List<Path> studies = new ArrayList<>();
        for (int i = 0; i < 10; i++) {
            studies.add(Files.createDirectory(folder.resolve("study-" + i)));
            memory.keepRecent(studies.get(i));
        }
        memory.keepRecent(studies.get(5));
        assertEquals(8, memory.recent().size());
        assertEquals(studies.get(5), memory.recent().get(0));
        assertEquals(studies.get(9), memory.recent().get(1));
        Files.delete(studies.get(9));
        assertEquals(studies.get(8), memory.recent().get(1));
    }

    @Test
    void pathTooLongForPreferencesIsForgotten() {
        memory.keepRecent(Path.of("x".repeat(9000)));
        assertEquals(List.of(), memory.recent());
    }
}
