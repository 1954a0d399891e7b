package stillstand.study;

import java.util.List;
import stillstand.sealevel.HighstandEntry;

/**
 * A table of highstands as its author wrote it, before a study says what it is for: the highstands themselves, or what
 * overrides a curve's own.
 *
 * @param id lower-case words joined by hyphens
 * @param complete whether it is taken as it stands, without any default row or error
 * @param entries in the order of the table, each stage once
 */
public record HighstandRows(String id, boolean complete, List<HighstandEntry> entries) {
    public HighstandRows {
        entries = List.copyOf(entries);
        if (entries.stream().map(HighstandEntry::stage).distinct().count() < entries.size()) {
            throw new IllegalArgumentException("a stage stands twice in highstand table '" + id + "'");
        }
    }
}
