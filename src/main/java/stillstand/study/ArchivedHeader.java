package stillstand.study;

import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import stillstand.study.ImportChoices.AgeUnit;

/**
 * What the header of an archived column lets one see, read word by word: authors write {@code age_calkaBP},
 * {@code Age(ka)}, {@code SeaLev_longPC1_err_lo}, {@code RSL-}, {@code 97.50%}.
 *
 * @param text as the table has it
 * @param words of it, in lower case
 */
record ArchivedHeader(String text, List<String> words) {
    private static final Pattern BETWEEN_WORDS =
            Pattern.compile("[^a-z0-9.%+\\u03c3\\u00b1-]+|(?<![0-9])\\.|\\.(?![0-9])|-(?=.)");
    private static final Pattern AGE = Pattern.compile("ages?[0-9]*|time|date");
    private static final Pattern THOUSAND_YEARS =
            Pattern.compile("(cal)?(ka|kyrs?|ky)(bp)?|agekyr|ageka|kiloyears?|thousand");
    private static final Pattern YEARS = Pattern.compile("(cal)?(yrs?|years?|a)(bp)?");
    private static final Pattern OTHER_TIMES = Pattern.compile("ma|myrs?|million|centuries|decades|ce|ad|bc|bce");
    private static final Pattern LEVEL =
            Pattern.compile("[reg]?sls?|[reg]sl|gms?l|gmgsl|msl|sealev(els?)?|levels?|depth|lowering");
    private static final Set<String> DOWNWARD = Set.of("depth", "lowering", "below");
    private static final Set<String> NOT_METRES = Set.of("mm", "cm", "dm", "km", "ft", "feet", "foot", "inch");
    private static final Pattern LOW = Pattern.compile("(lo|low|lower|min|minimum|minus)(95)?|2\\.50*%?|q?0?025");
    private static final Pattern HIGH =
            Pattern.compile("(up|upper|hi|high|higher|max|maximum|plus)(95)?|97\\.50*%?|q?975");
    private static final Pattern OF_95 = Pattern.compile("[a-z]*95%?|2\\.50*%?|97\\.50*%?|q?0?025|q?975");
    private static final Pattern SIGMA = Pattern.compile(
            "[12]?(sigma|sig|sd|\\u03c3)|[12]s|stdevs?|std(dev)?|err(or)?s?|se|unc(ert(ainty)?)?|spread|\\u00b1|\\+-");
    private static final Pattern ONE_SIGMA = Pattern.compile("1(sigma|sig|sd|s|\\u03c3)|sd|std(dev)?|stdevs?");
    private static final Pattern TWO_SIGMA = Pattern.compile("2(sigma|sig|sd|s|\\u03c3)");
    private static final Set<String> SIGMA_WORDS = Set.of("sigma", "sig", "sd", "s", "\u03c3");

    private static final Map<String, Integer> NUMBER_WORDS = Map.of("1", 1, "one", 1, "2", 2, "two", 2);

    static ArchivedHeader of(String text) {
        String lower = text.toLowerCase(Locale.ROOT);
        return new ArchivedHeader(
                text,
                Stream.of(BETWEEN_WORDS.split(lower, -1))
                        .filter(word -> !word.isEmpty())
                        .toList());
    }

    /** Whether it may be the age itself. */
    boolean isAge() {
        return !isSpread() && (has(AGE) || (has(THOUSAND_YEARS) && !isLevel()));
    }

    /** Whether it may be the level itself. */
    boolean isLevel() {
        return !isSpread() && namesALevel();
    }

    boolean isSpread() {
        return isLow() || isHigh() || has(SIGMA);
    }

    /** Whether it may be a lower bound, or the half of a band that its author calls minus. */
    boolean isLow() {
        return has(LOW) || text.endsWith("-");
    }

    /** Whether it may be an upper bound, or the half of a band that its author calls plus. */
    boolean isHigh() {
        return !isLow() && (has(HIGH) || text.endsWith("+"));
    }

    boolean isSigma() {
        return isSpread() && !isLow() && !isHigh();
    }

    /** Whether it says that a bound is one of the central 95 %. */
    boolean saysOf95() {
        return has(OF_95);
    }

    /** How many standard deviations it says a spread is; absent where it does not say. */
    Optional<Integer> sigmas() {
        for (int i = 1; i < words.size(); i++) {
            Optional<Integer> number = Optional.ofNullable(NUMBER_WORDS.get(words.get(i - 1)));
            if (SIGMA_WORDS.contains(words.get(i)) && number.isPresent()) {
                return number;
            }
        }
        if (has(TWO_SIGMA)) {
            return Optional.of(2);
        }
        return has(ONE_SIGMA) ? Optional.of(1) : Optional.empty();
    }

    /** The unit of age it states, if it is one we know. */
    Optional<AgeUnit> ageUnit() {
        if (has(OTHER_TIMES)) {
            return Optional.empty();
        }
        if (has(THOUSAND_YEARS)) {
            return Optional.of(AgeUnit.KA);
        }
        return has(YEARS) ? Optional.of(AgeUnit.YEARS) : Optional.empty();
    }

    /** Whether it counts metres downward. */
    boolean isDownward() {
        return words.stream().anyMatch(DOWNWARD::contains);
    }

    /** A unit of length that is not the metre, if it states one. */
    Optional<String> otherLength() {
        return words.stream().filter(NOT_METRES::contains).findFirst();
    }

    /** Whether it goes on where the other ends, as the spread of a column often does. */
    boolean extendsHeader(ArchivedHeader other) {
        return !other.text.isEmpty() && !text.equals(other.text) && text.startsWith(other.text);
    }

    private boolean namesALevel() {
        return has(LEVEL) || (words.contains("sea") && words.contains("level"));
    }

    private boolean has(Pattern pattern) {
        return words.stream().anyMatch(word -> pattern.matcher(word).matches());
    }
}
