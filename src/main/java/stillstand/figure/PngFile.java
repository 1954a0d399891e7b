package stillstand.figure;

import java.awt.Graphics2D;
import java.awt.image.BufferedImage;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.util.Locale;
import javax.imageio.IIOImage;
import javax.imageio.ImageIO;
import javax.imageio.ImageTypeSpecifier;
import javax.imageio.ImageWriteParam;
import javax.imageio.ImageWriter;
import javax.imageio.metadata.IIOMetadata;
import javax.imageio.metadata.IIOMetadataNode;
import javax.imageio.stream.MemoryCacheImageOutputStream;

/** A page as a picture of dots that says how large it is to be printed. */
final class PngFile {
    private static final double POINTS_PER_INCH = 72;
    private static final double INCHES_PER_METRE = 1 / 0.0254;
    private static final String METADATA = "javax_imageio_png_1.0";

    private PngFile() {}

    static byte[] bytes(Page page, int dotsPerInch) throws IOException {
        double scale = dotsPerInch / POINTS_PER_INCH;
        BufferedImage image = new BufferedImage(
                (int) Math.round(page.widthPoints() * scale),
                (int) Math.round(page.heightPoints() * scale),
                BufferedImage.TYPE_INT_RGB);
        Graphics2D graphics = image.createGraphics();
        graphics.setPaint(Style.PAPER);
        graphics.fillRect(0, 0, image.getWidth(), image.getHeight());
        graphics.scale(scale, scale);
        page.draw(graphics);
        graphics.dispose();
        return written(image, dotsPerInch);
    }

    private static byte[] written(BufferedImage image, int dotsPerInch) throws IOException {
        ImageWriter writer = ImageIO.getImageWritersByFormatName("png").next();
        ImageWriteParam settings = writer.getDefaultWriteParam();
        IIOMetadata metadata = writer.getDefaultImageMetadata(new ImageTypeSpecifier(image), settings);
        String dotsPerMetre = String.format(Locale.ROOT, "%d", Math.round(dotsPerInch * INCHES_PER_METRE));
        IIOMetadataNode physical = new IIOMetadataNode("pHYs");
        physical.setAttribute("pixelsPerUnitXAxis", dotsPerMetre);
        physical.setAttribute("pixelsPerUnitYAxis", dotsPerMetre);
        physical.setAttribute("unitSpecifier", "meter");
        IIOMetadataNode root = new IIOMetadataNode(METADATA);
        root.appendChild(physical);
        metadata.mergeTree(METADATA, root);
        ByteArrayOutputStream bytes = new ByteArrayOutputStream();
        try (MemoryCacheImageOutputStream stream = new MemoryCacheImageOutputStream(bytes)) {
            writer.setOutput(stream);
            writer.write(null, new IIOImage(image, null, metadata), settings);
        } finally {
            writer.dispose();
        }
        return bytes.toByteArray();
    }
}
