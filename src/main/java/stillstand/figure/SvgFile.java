package stillstand.figure;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.OutputStreamWriter;
import java.io.Writer;
import java.nio.charset.StandardCharsets;
import java.util.Locale;
import javax.xml.parsers.DocumentBuilderFactory;
import javax.xml.parsers.ParserConfigurationException;
import org.apache.batik.svggen.SVGGeneratorContext;
import org.apache.batik.svggen.SVGGraphics2D;
import org.w3c.dom.Document;
import org.w3c.dom.Element;
import org.w3c.dom.Node;

/** A page as SVG: text stays text, in the bundled face or what a reader's machine has in its place. */
final class SvgFile {
    private static final String NAMESPACE = "http://www.w3.org/2000/svg";
    private static final String FAMILIES = "'Open Sans', 'Helvetica Neue', Helvetica, Arial, sans-serif";
    private static final int DECIMALS = 3;

    private SvgFile() {}

    static byte[] bytes(Page page) throws IOException {
        SVGGeneratorContext context = SVGGeneratorContext.createDefault(document());
        context.setComment("Stillstand");
        context.setPrecision(DECIMALS);
        SVGGraphics2D graphics = new SVGGraphics2D(context, false);
        page.draw(graphics);
        Element root = graphics.getRoot();
        root.setAttribute("width", millimetres(page.widthPoints()));
        root.setAttribute("height", millimetres(page.heightPoints()));
        root.setAttribute(
                "viewBox", String.format(Locale.ROOT, "0 0 %.3f %.3f", page.widthPoints(), page.heightPoints()));
        nameFaces(root);
        ByteArrayOutputStream bytes = new ByteArrayOutputStream();
        try (Writer writer = new OutputStreamWriter(bytes, StandardCharsets.UTF_8)) {
            graphics.stream(root, writer, false, false);
        }
        return bytes.toByteArray();
    }

    private static Document document() {
        try {
            return DocumentBuilderFactory.newInstance()
                    .newDocumentBuilder()
                    .getDOMImplementation()
                    .createDocument(NAMESPACE, "svg", null);
        } catch (ParserConfigurationException e) {
            throw new IllegalStateException("Java's own XML parser is missing", e);
        }
    }

    private static String millimetres(double points) {
        return String.format(Locale.ROOT, "%.2fmm", PageWidth.millimetres(points));
    }

    /** Java's name of a face becomes family, weight and what may stand in for it. */
    private static void nameFaces(Element element) {
        String family = element.getAttribute("font-family");
        if (family.contains(Face.FAMILY)) {
            element.setAttribute("font-family", FAMILIES);
            element.setAttribute("font-weight", family.contains("Semibold") ? "600" : "normal");
        } else if (!family.isEmpty()) {
            element.setAttribute("font-family", "sans-serif");
        }
        for (Node child = element.getFirstChild(); child != null; child = child.getNextSibling()) {
            if (child instanceof Element below) {
                nameFaces(below);
            }
        }
    }
}
