package stillstand.study;

/** What the tool itself knows: curves, highstand tables, stages, indicators, taxa, methods. Handed in by {@code files}. */
public record Library() {}
