package stillstand.figure;

import java.awt.Font;
import java.awt.FontFormatException;
import java.awt.font.FontRenderContext;
import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.util.ArrayList;
import java.util.List;

/**
 * The type all figures are set in, bundled so that every machine measures alike: Open Sans, regular and semibold. Text in
 * scripts it lacks is set in what the machine has.
 */
enum Face {
    /** For all but headings. */
    REGULAR("OpenSans-Regular.ttf"),
    /** For titles and what matters most. */
    SEMIBOLD("OpenSans-Semibold.ttf");

    /** Family of both, as other programs know it. */
    static final String FAMILY = "Open Sans";

    /** Text is measured as it is printed: whole outlines, no hinting to dots. */
    static final FontRenderContext MEASURE = new FontRenderContext(null, true, true);

    private final String file;

    @SuppressWarnings("ImmutableEnumChecker") // nobody can change a font
    private final Font font;

    Face(String file) {
        this.file = file;
        try (InputStream stream = open()) {
            this.font = Font.createFont(Font.TRUETYPE_FONT, stream);
        } catch (IOException e) {
            throw new UncheckedIOException("the bundled face " + file + " cannot be read", e);
        } catch (FontFormatException e) {
            throw new IllegalStateException("the bundled face " + file + " is broken", e);
        }
    }

    /** The file of the face. */
    InputStream open() throws IOException {
        InputStream stream = Face.class.getResourceAsStream(file);
        if (stream == null) {
            throw new IOException(file + " is missing");
        }
        return stream;
    }

    /** The name by which Java knows the face. */
    String javaName() {
        return font.getFontName();
    }

    Font at(double points) {
        return font.deriveFont((float) points);
    }

    /** The face itself, or what the machine has where the face lacks a letter of one of the texts. */
    Font at(double points, List<String> texts) {
        boolean complete = texts.stream().allMatch(text -> font.canDisplayUpTo(text) < 0);
        return complete ? at(points) : new Font(Font.SANS_SERIF, Font.PLAIN, 1).deriveFont((float) points);
    }

    static double width(String text, Font font) {
        return text.isEmpty() ? 0 : font.getStringBounds(text, MEASURE).getWidth();
    }

    /** The text, or its beginning and its end with an ellipsis between, so that it is no wider than that. */
    static String fitted(String text, Font font, double widthPoints) {
        if (width(text, font) <= widthPoints) {
            return text;
        }
        int[] letters = text.codePoints().toArray();
        for (int kept = letters.length - 1; kept > 1; kept--) {
            int head = (kept + 1) / 2;
            int tail = kept - head;
            String cut = new String(letters, 0, head).stripTrailing() + "…"
                    + new String(letters, letters.length - tail, tail).stripLeading();
            if (width(cut, font) <= widthPoints) {
                return cut;
            }
        }
        return new String(letters, 0, 1) + "…";
    }

    /** The text in lines no wider than that; a longer word is cut. */
    static List<String> wrapped(String text, Font font, double widthPoints) {
        List<String> lines = new ArrayList<>();
        String line = "";
        for (String word : text.strip().split("\\s+", -1)) {
            String longer = line.isEmpty() ? word : line + " " + word;
            if (!line.isEmpty() && width(longer, font) > widthPoints) {
                lines.add(fitted(line, font, widthPoints));
                line = word;
            } else {
                line = longer;
            }
        }
        if (!line.isEmpty()) {
            lines.add(fitted(line, font, widthPoints));
        }
        return lines;
    }
}
