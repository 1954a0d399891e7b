package stillstand.files;

import java.util.Iterator;
import java.util.Map;
import tools.jackson.core.io.JsonStringEncoder;
import tools.jackson.core.io.NumberOutput;
import tools.jackson.databind.JsonNode;

/**
 * Json as it is pleasant to read and to compare in version control: two spaces of indent, and whatever holds no other
 * container on one line.
 */
final class JsonLayout {
    private JsonLayout() {}

    /** The text, ending in a line feed. */
    static String text(JsonNode tree) {
        StringBuilder out = new StringBuilder();
        write(tree, "\n", out);
        return out.append('\n').toString();
    }

    private static void write(JsonNode node, String newLine, StringBuilder out) {
        if (!node.isContainer()) {
            writeScalar(node, out);
            return;
        }
        boolean flat = node.values().stream().noneMatch(child -> child.isContainer() && !isNumbers(child));
        boolean wide = !flat || node.values().stream().anyMatch(JsonLayout::isLong);
        String inner = newLine + "  ";
        out.append(node.isObject() ? '{' : '[');
        Iterator<Map.Entry<String, JsonNode>> properties = node.properties().iterator();
        for (int i = 0; i < node.size(); i++) {
            out.append(i == 0 ? "" : wide ? "," : ", ").append(wide ? inner : "");
            if (node.isObject()) {
                Map.Entry<String, JsonNode> property = properties.next();
                writeText(property.getKey(), out);
                out.append(": ");
                write(property.getValue(), inner, out);
            } else {
                write(node.get(i), inner, out);
            }
        }
        out.append(wide ? newLine : "").append(node.isObject() ? '}' : ']');
    }

    /** An interval or the like, short enough to stand in the line of its object. */
    private static boolean isNumbers(JsonNode node) {
        return node.isArray() && node.values().stream().allMatch(JsonNode::isNumber);
    }

    private static boolean isLong(JsonNode node) {
        return node.isArray() && node.size() > 2;
    }

    private static void writeScalar(JsonNode node, StringBuilder out) {
        if (node.isFloatingPointNumber()) {
            out.append(NumberOutput.toString(node.doubleValue(), true));
        } else if (node.isString()) {
            writeText(node.stringValue(), out);
        } else {
            out.append(node);
        }
    }

    private static void writeText(String text, StringBuilder out) {
        out.append('"');
        JsonStringEncoder.getInstance().quoteAsString(text, out);
        out.append('"');
    }
}
