package stillstand.shoreline;

import java.util.Locale;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import stillstand.uncertainty.LogNormal;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

/**
 * What a cell {@code depth_habitat} says: {@code 1-6} (every depth from 1 to 6 m equally likely), {@code lognormal 3 0.6}
 * (median in metres, standard deviation of the natural logarithm), or the id of a taxon.
 */
public sealed interface DepthText {
    /** Digits with a decimal point, without a sign. */
    String NUMBER = "[0-9]+(?:\\.[0-9]*)?|\\.[0-9]+";

    /**
     * A depth that was understood.
     *
     * @param depthMetres below mean sea level, down positive
     * @param source citation, or "the study"
     */
    record Understood(Uncertain depthMetres, String source) implements DepthText {}

    /**
     * A text that was not.
     *
     * @param expected what should stand there, to follow the word "expected"
     */
    record Refused(String expected) implements DepthText {}

    /** Reads a cell that is not blank. */
    static DepthText read(String text, HabitatTable habitats) {
        String trimmed = text.trim();
        Matcher range = Pattern.compile("(NUMBER)\\s*[-\u2013]\\s*(NUMBER)".replace("NUMBER", NUMBER))
                .matcher(trimmed);
        if (range.matches()) {
            return range(Double.parseDouble(range.group(1)), Double.parseDouble(range.group(2)));
        }
        String[] words = trimmed.split("\\s+");
        if (words[0].toLowerCase(Locale.ROOT).equals("lognormal")) {
            return logNormal(words);
        }
        return taxon(trimmed, habitats);
    }

    private static DepthText range(double shallowMetres, double deepMetres) {
        return shallowMetres < deepMetres && deepMetres < Double.POSITIVE_INFINITY
                ? new Understood(new Uniform(shallowMetres, deepMetres), "the study")
                : new Refused("the lesser depth first, such as \"1-6\"");
    }

    private static DepthText logNormal(String[] words) {
        if (words.length == 3 && words[1].matches(NUMBER) && words[2].matches(NUMBER)) {
            double median = Double.parseDouble(words[1]);
            double sigmaLog = Double.parseDouble(words[2]);
            if (median > 0 && sigmaLog > 0 && median * sigmaLog < Double.POSITIVE_INFINITY) {
                return new Understood(new LogNormal(0, median, sigmaLog), "the study");
            }
        }
        return new Refused(
                "\"lognormal\", a median in metres and a standard deviation of the logarithm, both above 0, such as \"lognormal 3 0.6\"");
    }

    private static DepthText taxon(String text, HabitatTable habitats) {
        Optional<DepthHabitat> habitat = habitats.find(text);
        if (habitat.isEmpty()) {
            String nearest = habitats.nearestId(text)
                    .map(id -> " (the nearest known is \"" + id + "\")")
                    .orElse("");
            return new Refused("a range such as \"1-6\", \"lognormal 3 0.6\", or a known taxon" + nearest);
        }
        return habitat.get()
                .depthMetres()
                .<DepthText>map(depth -> new Understood(depth, habitat.get().source()))
                .orElseGet(() -> new Refused(
                        "a range such as \"1-6\" or \"lognormal 3 0.6\", since no depths are known of this taxon: "
                                + habitat.get().note()));
    }
}
