package stillstand.sealevel;

import java.util.List;

/**
 * Highstands that replace a curve's own picks of the same stages.
 *
 * @param id of the table, such as {@code independent-highstands}
 * @param entries one a stage
 */
public record HighstandOverrides(String id, List<HighstandEntry> entries) {
    /** No overrides: every row as the curve has it. */
    public static final HighstandOverrides NONE = new HighstandOverrides("none", List.of());

    public HighstandOverrides {
        entries = List.copyOf(entries);
        if (entries.stream().map(HighstandEntry::stage).distinct().count() < entries.size()) {
            throw new IllegalArgumentException("a stage stands twice in overrides '" + id + "'");
        }
    }
}
