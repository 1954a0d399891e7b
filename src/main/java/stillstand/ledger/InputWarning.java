package stillstand.ledger;

/**
 * Something in the input that is odd but does not stop a run; it stands in the terminal, the results and the ledger.
 *
 * @param file path relative to the study folder; "" where no one file is meant
 * @param line physical line, from 1; 0 where it belongs to the whole file
 * @param column place of the column, from 1; 0 where it belongs to the line
 * @param message what is odd and what is made of it
 */
public record InputWarning(String file, long line, int column, String message) {
    /** The sentence with its place before it. */
    public String placed() {
        if (file.isEmpty()) {
            return message;
        }
        String place = line == 0 ? "" : column == 0 ? ":" + line : ":" + line + ":" + column;
        return file + place + ": " + message;
    }
}
