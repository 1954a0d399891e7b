package stillstand.study;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.uplift.CauchyPrior;
import stillstand.uplift.HalfCauchyPrior;
import stillstand.uplift.LogUniformPrior;
import stillstand.uplift.NormalPrior;
import stillstand.uplift.RatePrior;

/** The prior of a rate as a cell of {@code sites.csv} writes it. */
final class RatePriorText {
    /** What to write, for problems. */
    static final String EXPECTED =
            "a prior such as \"cauchy 0 0.5 from -10 to 15\", \"half-cauchy 1 from 0.005 to 5\", "
                    + "\"log-uniform 0.01 15\" or \"normal 0 2\"";

    private RatePriorText() {}

    /** The prior, absent where the text is none or its numbers make none. */
    static Optional<RatePrior> parse(String text) {
        List<String> words = List.of(text.strip().split("\\s+", -1));
        List<Double> numbers = new ArrayList<>();
        StringBuilder form = new StringBuilder();
        for (String word : words) {
            Optional<Double> number = NumberForm.parse(word);
            number.ifPresent(numbers::add);
            form.append(form.isEmpty() ? "" : " ").append(number.isPresent() ? "#" : word);
        }
        try {
            return switch (form.toString()) {
                case "cauchy # # from # to #" ->
                    Optional.of(new CauchyPrior(numbers.get(0), numbers.get(1), numbers.get(2), numbers.get(3)));
                case "half-cauchy # from # to #" ->
                    Optional.of(new HalfCauchyPrior(numbers.get(0), numbers.get(1), numbers.get(2)));
                case "log-uniform # #" -> Optional.of(new LogUniformPrior(numbers.get(0), numbers.get(1)));
                case "normal # #" -> Optional.of(new NormalPrior(numbers.get(0), numbers.get(1)));
                default -> Optional.empty();
            };
        } catch (IllegalArgumentException e) {
            return Optional.empty();
        }
    }
}
