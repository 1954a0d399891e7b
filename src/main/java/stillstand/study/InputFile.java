package stillstand.study;

/** A file a study was read from: its path relative to the study, and the SHA-256 of its bytes in hexadecimal. */
public record InputFile(String file, String sha256) {}
