package stillstand.figure;

import java.awt.Font;
import java.awt.geom.AffineTransform;
import java.awt.geom.Rectangle2D;
import java.io.ByteArrayInputStream;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import javax.xml.parsers.DocumentBuilderFactory;
import org.w3c.dom.Element;
import org.w3c.dom.Node;

/** Every text of an SVG file and the box it takes, read from the file as a viewer reads it. */
record SvgTexts(Rectangle2D page, List<Placed> texts) {
    /** Real letters reach from about here above the base line to there below it, as parts of the size. */
    private static final double ASCENT = 0.74;

    private static final double DESCENT = 0.2;

    private static final Pattern OPERATION = Pattern.compile("(translate|matrix|rotate|scale)\\(([^)]*)\\)");

    /** A text and its box in points. */
    record Placed(String text, Rectangle2D box) {}

    static SvgTexts of(byte[] svg) {
        try {
            DocumentBuilderFactory factory = DocumentBuilderFactory.newInstance();
            factory.setFeature("http://apache.org/xml/features/nonvalidating/load-external-dtd", false);
            Element root = factory.newDocumentBuilder()
                    .parse(new ByteArrayInputStream(svg))
                    .getDocumentElement();
            String[] box = root.getAttribute("viewBox").split(" ", -1);
            List<Placed> texts = new ArrayList<>();
            gather(root, new AffineTransform(), 0, "", texts);
            return new SvgTexts(
                    new Rectangle2D.Double(0, 0, Double.parseDouble(box[2]), Double.parseDouble(box[3])), texts);
        } catch (Exception e) {
            throw new AssertionError(e);
        }
    }

    private static void gather(
            Element element, AffineTransform outer, double outerSize, String outerWeight, List<Placed> texts) {
        AffineTransform place = new AffineTransform(outer);
        place.concatenate(transform(element.getAttribute("transform")));
        String sizeHere = element.getAttribute("font-size");
        double size = sizeHere.isEmpty() ? outerSize : Double.parseDouble(sizeHere.replace("px", ""));
        String weightHere = element.getAttribute("font-weight");
        String weight = weightHere.isEmpty() ? outerWeight : weightHere;
        if (element.getTagName().equals("text")) {
            Font font = (weight.equals("600") ? Face.SEMIBOLD : Face.REGULAR).at(size);
            double x = Double.parseDouble(element.getAttribute("x"));
            double y = Double.parseDouble(element.getAttribute("y"));
            Rectangle2D flat = new Rectangle2D.Double(
                    x, y - ASCENT * size, Face.width(element.getTextContent(), font), (ASCENT + DESCENT) * size);
            texts.add(new Placed(
                    element.getTextContent(), place.createTransformedShape(flat).getBounds2D()));
        }
        for (Node child = element.getFirstChild(); child != null; child = child.getNextSibling()) {
            if (child instanceof Element below) {
                gather(below, place, size, weight, texts);
            }
        }
    }

    private static AffineTransform transform(String attribute) {
        AffineTransform all = new AffineTransform();
        Matcher operations = OPERATION.matcher(attribute);
        while (operations.find()) {
            double[] n = Arrays.stream(operations.group(2).trim().split("[ ,]+", -1))
                    .mapToDouble(Double::parseDouble)
                    .toArray();
            switch (operations.group(1)) {
                case "translate" -> all.translate(n[0], n.length > 1 ? n[1] : 0);
                case "scale" -> all.scale(n[0], n.length > 1 ? n[1] : n[0]);
                case "rotate" -> {
                    if (n.length > 1) {
                        all.rotate(Math.toRadians(n[0]), n[1], n[2]);
                    } else {
                        all.rotate(Math.toRadians(n[0]));
                    }
                }
                default -> all.concatenate(new AffineTransform(n));
            }
        }
        return all;
    }

    List<String> words() {
        return texts.stream().map(Placed::text).toList();
    }

    /** What leaves the page or lies on another text, in words; empty = nothing. */
    List<String> faults() {
        List<String> faults = new ArrayList<>();
        for (int i = 0; i < texts.size(); i++) {
            Placed one = texts.get(i);
            if (!page.contains(one.box())) {
                faults.add("\"" + one.text() + "\" leaves the page: " + one.box());
            }
            for (Placed other : texts.subList(i + 1, texts.size())) {
                Rectangle2D both = one.box().createIntersection(other.box());
                if (both.getWidth() > 0.3 && both.getHeight() > 0.3) {
                    faults.add("\"" + one.text() + "\" lies on \"" + other.text() + "\": " + both);
                }
            }
        }
        return faults;
    }
}
