package stillstand.figure;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.awt.image.BufferedImage;
import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.nio.ByteBuffer;
import java.nio.charset.StandardCharsets;
import java.util.Set;
import java.util.TreeSet;
import javax.imageio.ImageIO;
import org.apache.pdfbox.Loader;
import org.apache.pdfbox.cos.COSName;
import org.apache.pdfbox.pdmodel.PDDocument;
import org.apache.pdfbox.pdmodel.PDPage;
import org.apache.pdfbox.pdmodel.PDResources;
import org.apache.pdfbox.pdmodel.font.PDFont;
import org.apache.pdfbox.pdmodel.graphics.form.PDFormXObject;
import org.apache.pdfbox.text.PDFTextStripper;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.EnumSource;

/** What a journal asks of the files: faces embedded, sizes and resolution as said, the same bytes each time. */
class FigureFilesTest {
    private static final double MILLIMETRES_PER_POINT = 25.4 / 72;

    private static Figure stair() {
        return Figures.of(InventedCoasts.drowned()).figures().stream()
                .filter(figure -> figure.kind() == FigureKind.STAIR)
                .findFirst()
                .orElseThrow();
    }

    @ParameterizedTest
    @EnumSource(FigureFormat.class)
    void theSameBytesAgain(FigureFormat format) throws IOException {
        assertArrayEquals(
                stair().bytes(format, PageWidth.TWO, true, 150), stair().bytes(format, PageWidth.TWO, true, 150));
    }

    @Test
    void pdfHasItsFacesEmbeddedAsSubsetsAndItsTextAsText() throws IOException {
        try (PDDocument document = Loader.loadPDF(stair().bytes(FigureFormat.PDF, PageWidth.ONE, true, 300))) {
            PDPage page = document.getPage(0);
            assertEquals(90, page.getMediaBox().getWidth() * MILLIMETRES_PER_POINT, 0.01);
            Set<String> fonts = new TreeSet<>();
            gather(page.getResources(), fonts);
            assertEquals(2, fonts.size(), fonts.toString());
            for (String font : fonts) {
                assertTrue(font.matches("embedded [A-Z]{6}\\+OpenSans(-Semibold)?"), font);
            }
            String text = new PDFTextStripper().getText(document);
            assertTrue(text.contains("Quiet Shoals: sea level"), text);
            assertTrue(text.contains("−100"), text);
        }
    }

    private static void gather(PDResources resources, Set<String> fonts) throws IOException {
        for (COSName name : resources.getFontNames()) {
            PDFont font = resources.getFont(name);
            fonts.add((font.isEmbedded() ? "embedded " : "missing ") + font.getName());
        }
        for (COSName name : resources.getXObjectNames()) {
            if (resources.getXObject(name) instanceof PDFormXObject form) {
                gather(form.getResources(), fonts);
            }
        }
    }

    @ParameterizedTest
    @CsvSource({"ONE, 300, 1063", "ONE_AND_A_HALF, 300, 1654", "TWO, 600, 4488", "TWO, 72, 539"})
    void pngHasTheDotsOfItsWidthAndSaysSo(PageWidth width, int dpi, int dots) throws IOException {
        byte[] png = stair().bytes(FigureFormat.PNG, width, true, dpi);
        BufferedImage image = ImageIO.read(new ByteArrayInputStream(png));
        assertEquals(dots, image.getWidth());
        String bytes = new String(png, StandardCharsets.ISO_8859_1);
        int chunk = bytes.indexOf("pHYs");
        int dotsPerMetre = (int) Math.round(dpi / 0.0254);
        assertEquals(dotsPerMetre, ByteBuffer.wrap(png).getInt(chunk + 4));
        assertEquals(dotsPerMetre, ByteBuffer.wrap(png).getInt(chunk + 8));
        assertEquals(1, png[chunk + 12]);
    }

    @Test
    void svgSaysItsSizeAndNamesItsFaces() throws IOException {
        String svg = new String(
                stair().bytes(FigureFormat.SVG, PageWidth.ONE_AND_A_HALF, true, 300), StandardCharsets.UTF_8);
        assertTrue(svg.contains("width=\"140.00mm\""), svg.substring(0, 500));
        assertTrue(svg.contains("'Open Sans', 'Helvetica Neue', Helvetica, Arial, sans-serif"));
        assertTrue(svg.contains("font-weight=\"600\""));
        assertFalse(svg.contains("Open Sans Semibold"));
        assertTrue(svg.contains(">−100</text"));
        assertFalse(svg.matches("(?s).*>-\\d+</text.*"), "a hyphen stands for a minus");
    }

    @ParameterizedTest
    @CsvSource({"35", "1201", "-1"})
    void resolutionsOutOfReasonAreRefused(int dpi) {
        assertThrows(IllegalArgumentException.class, () -> stair().bytes(FigureFormat.PNG, PageWidth.ONE, true, dpi));
    }
}
