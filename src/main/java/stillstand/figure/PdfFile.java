package stillstand.figure;

import de.rototor.pdfbox.graphics2d.PdfBoxGraphics2D;
import de.rototor.pdfbox.graphics2d.PdfBoxGraphics2DFontTextDrawer;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.util.zip.CRC32;
import org.apache.pdfbox.pdmodel.PDDocument;
import org.apache.pdfbox.pdmodel.PDPage;
import org.apache.pdfbox.pdmodel.PDPageContentStream;
import org.apache.pdfbox.pdmodel.common.PDRectangle;
import org.apache.pdfbox.pdmodel.font.PDType0Font;

/** A page as PDF, its faces embedded as far as it uses them; the same page gives the same bytes, so no date stands in it. */
final class PdfFile {
    private PdfFile() {}

    static byte[] bytes(Page page) throws IOException {
        float width = (float) page.widthPoints();
        float height = (float) page.heightPoints();
        try (PDDocument document = new PDDocument();
                PdfBoxGraphics2DFontTextDrawer text = new PdfBoxGraphics2DFontTextDrawer()) {
            document.getDocumentInformation().setTitle(page.name());
            document.getDocumentInformation().setProducer("Stillstand");
            document.setDocumentId(checksum(page.name()));
            PDPage sheet = new PDPage(new PDRectangle(width, height));
            document.addPage(sheet);
            for (Face face : Face.values()) {
                try (InputStream stream = face.open()) {
                    text.registerFont(face.javaName(), PDType0Font.load(document, stream, true));
                }
            }
            PdfBoxGraphics2D graphics = new PdfBoxGraphics2D(document, width, height);
            graphics.setFontTextDrawer(text);
            page.draw(graphics);
            graphics.dispose();
            try (PDPageContentStream content = new PDPageContentStream(document, sheet)) {
                content.drawForm(graphics.getXFormObject());
            }
            ByteArrayOutputStream bytes = new ByteArrayOutputStream();
            document.save(bytes);
            return bytes.toByteArray();
        }
    }

    private static long checksum(String name) {
        CRC32 sum = new CRC32();
        sum.update(name.getBytes(StandardCharsets.UTF_8));
        return sum.getValue();
    }
}
