package stillstand.files;

/** A file of a study as someone edits it: a table taken apart into its cells, or plain text. */
public sealed interface DraftFile permits Sheet, PlainFile {
    /** Path relative to the study, with forward slashes. */
    String name();

    /** What would stand in the file. */
    String text();
}
