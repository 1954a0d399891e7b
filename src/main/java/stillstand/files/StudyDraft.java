package stillstand.files;

import java.util.Collections;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.SortedMap;
import java.util.TreeMap;

/**
 * The files of a study that can be edited, as they would be saved now. Files that are not there or cannot be read are not
 * in it, nor are {@code ages/} and {@code curves/}, which stay on disk.
 *
 * @param files by name
 */
public record StudyDraft(SortedMap<String, DraftFile> files) {
    /** The names that may be in it, in the order in which to look at them. */
    public static final List<String> NAMES =
            List.of(StudyJson.NAME, "sites.csv", "levels.csv", "samples.csv", "points.csv", "gia.csv");

    public StudyDraft {
        files = Collections.unmodifiableSortedMap(new TreeMap<>(files));
    }

    /** A draft of these texts; a table that cannot be taken apart stays plain text. */
    public static StudyDraft of(Map<String, String> texts) {
        SortedMap<String, DraftFile> files = new TreeMap<>();
        texts.forEach((name, text) -> files.put(name, file(name, text)));
        return new StudyDraft(files);
    }

    private static DraftFile file(String name, String text) {
        return name.endsWith(".csv")
                ? Sheet.parse(name, text).<DraftFile>map(sheet -> sheet).orElse(new PlainFile(name, text))
                : new PlainFile(name, text);
    }

    /** A table, where there is one of that name that can be taken apart. */
    public Optional<Sheet> sheet(String name) {
        return Optional.ofNullable(files.get(name))
                .filter(Sheet.class::isInstance)
                .map(Sheet.class::cast);
    }

    /** The text of a file, where there is one of that name. */
    public Optional<String> text(String name) {
        return Optional.ofNullable(files.get(name)).map(DraftFile::text);
    }

    /** All texts by name. */
    public Map<String, String> texts() {
        Map<String, String> texts = new TreeMap<>();
        files.forEach((name, file) -> texts.put(name, file.text()));
        return texts;
    }

    /** The same with this file in place of the one of its name. */
    public StudyDraft with(DraftFile file) {
        SortedMap<String, DraftFile> changed = new TreeMap<>(files);
        changed.put(file.name(), file);
        return new StudyDraft(changed);
    }

    /** The same with a file as text, taken apart again where it can be. */
    public StudyDraft withText(String name, String text) {
        return with(file(name, text));
    }
}
