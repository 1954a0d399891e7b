package stillstand.figure;

import java.io.IOException;
import java.util.Locale;

/** How a figure is written. */
public enum FigureFormat {
    /** Scalable Vector Graphics, text as text. */
    SVG {
        @Override
        byte[] bytes(Page page, int dotsPerInch) throws IOException {
            return SvgFile.bytes(page);
        }
    },
    /** Portable Document Format with its faces embedded. */
    PDF {
        @Override
        byte[] bytes(Page page, int dotsPerInch) throws IOException {
            return PdfFile.bytes(page);
        }
    },
    /** Portable Network Graphics that says its resolution. */
    PNG {
        @Override
        byte[] bytes(Page page, int dotsPerInch) throws IOException {
            return PngFile.bytes(page, dotsPerInch);
        }
    };

    /** Its name on the command line and the extension of its files. */
    public String id() {
        return name().toLowerCase(Locale.ROOT);
    }

    /**
     * A page's bytes.
     *
     * @param dotsPerInch resolution, where the format has one
     */
    abstract byte[] bytes(Page page, int dotsPerInch) throws IOException;

    @Override
    public String toString() {
        return id();
    }
}
