package stillstand.figure;

import java.io.IOException;
import java.util.Locale;
import java.util.Optional;
import org.jfree.chart.JFreeChart;

/** One figure of a result: drawn anew, and to measure, for each width it is printed in. */
public final class Figure {
    /** The least resolution of a picture. */
    public static final int LEAST_DPI = 36;

    /** The greatest resolution of a picture; a page of two columns then has some hundred million dots. */
    public static final int MOST_DPI = 1200;

    private final FigureKind kind;
    private final Optional<String> site;
    private final String name;
    private final Draft draft;

    Figure(FigureKind kind, Optional<String> site, String name, Draft draft) {
        this.kind = kind;
        this.site = site;
        this.name = name;
        this.draft = draft;
    }

    /** Lays a figure out in a width. */
    @FunctionalInterface
    interface Draft {
        /** The page, {@code widthPoints} wide and as high as it needs. */
        Page page(double widthPoints);
    }

    /** What it shows. */
    public FigureKind kind() {
        return kind;
    }

    /** The site it belongs to; absent for figures of the study. */
    public Optional<String> site() {
        return site;
    }

    /** Stem of its files: the kind and the site, unique in a result. */
    public String name() {
        return name;
    }

    /** Name of its file in a format. */
    public String fileName(FigureFormat format) {
        return name + "." + format.id();
    }

    /** The bare chart, for a window that puts title and key beside it. */
    public JFreeChart chart(PageWidth width) {
        return page(width, true).chart();
    }

    /**
     * The content of its file.
     *
     * @param titled whether title and note are printed with it; the key always is
     * @param dotsPerInch resolution of a PNG, {@link #LEAST_DPI} to {@link #MOST_DPI}
     * @throws IllegalArgumentException if it is not
     * @throws IOException if the format cannot be written
     */
    public byte[] bytes(FigureFormat format, PageWidth width, boolean titled, int dotsPerInch) throws IOException {
        if (!(dotsPerInch >= LEAST_DPI && dotsPerInch <= MOST_DPI)) {
            throw new IllegalArgumentException(String.format(
                    Locale.ROOT, "dotsPerInch must be %d to %d but is %d", LEAST_DPI, MOST_DPI, dotsPerInch));
        }
        return format.bytes(page(width, titled), dotsPerInch);
    }

    Page page(PageWidth width, boolean titled) {
        Page page = draft.page(width.points());
        return titled ? page : page.untitled();
    }

    @Override
    public String toString() {
        return name;
    }
}
