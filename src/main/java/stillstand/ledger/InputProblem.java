package stillstand.ledger;

/**
 * Something in the input that stops a run: it cannot be read, contradicts itself, or would make a number meaningless.
 *
 * @param file path relative to the study folder, with forward slashes; "" where no one file is at fault
 * @param line physical line, from 1; 0 where the problem belongs to the whole file
 * @param column place of the column in the table, or of the character in json, from 1; 0 where it belongs to the line
 * @param header the column's header or the json key path; "" where there is none
 * @param found what stands there, as {@link #quote} writes it, or a phrase such as "nothing"
 * @param expected what should stand there
 */
public record InputProblem(String file, long line, int column, String header, String found, String expected)
        implements Comparable<InputProblem> {
    private static final int LONGEST_QUOTE = 60;

    /** A problem of a whole file. */
    public static InputProblem ofFile(String file, String found, String expected) {
        return new InputProblem(file, 0, 0, "", found, expected);
    }

    /** The one sentence that terminal, window and report show: {@code file:line:column: header: found …, expected …}. */
    public String message() {
        StringBuilder text = new StringBuilder(file.isEmpty() ? "study" : file);
        if (line > 0) {
            text.append(':').append(line);
            if (column > 0) {
                text.append(':').append(column);
            }
        }
        text.append(": ");
        if (!header.isEmpty()) {
            text.append(header).append(": ");
        }
        return text.append("found ")
                .append(found)
                .append(", expected ")
                .append(expected)
                .toString();
    }

    /** The text of the input in double quotes: at most 60 characters, control characters escaped. */
    public static String quote(String text) {
        StringBuilder shown = new StringBuilder("\"");
        int taken = 0;
        for (int i = 0; i < text.length() && taken < LONGEST_QUOTE; taken++) {
            int character = text.codePointAt(i);
            i += Character.charCount(character);
            if (Character.isISOControl(character) || Character.getType(character) == Character.FORMAT) {
                String hex = "0000" + Integer.toHexString(character);
                shown.append("\\u").append(hex.substring(hex.length() - 4));
            } else {
                shown.appendCodePoint(character);
            }
        }
        boolean cut = text.codePointCount(0, text.length()) > LONGEST_QUOTE;
        return shown.append(cut ? "…\"" : "\"").toString();
    }

    /** Order of reading: by file, line, column. */
    @Override
    public int compareTo(InputProblem other) {
        int byFile = file.compareTo(other.file);
        if (byFile != 0) {
            return byFile;
        }
        int byLine = Long.compare(line, other.line);
        if (byLine != 0) {
            return byLine;
        }
        int byColumn = Integer.compare(column, other.column);
        return byColumn != 0 ? byColumn : message().compareTo(other.message());
    }
}
