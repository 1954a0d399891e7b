package stillstand.files;

/** A file that is edited as text: {@code study.json}, or a table too broken to be taken apart. */
public record PlainFile(String name, String text) implements DraftFile {}
