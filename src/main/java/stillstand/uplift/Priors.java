package stillstand.uplift;

/** What the priors of a rate check and print alike. */
final class Priors {
    private Priors() {}

    static void requireFinite(String name, double value) {
        if (!Double.isFinite(value)) {
            throw new IllegalArgumentException(name + " must be finite but is " + value);
        }
    }

    static void requireAboveZero(String name, double value) {
        if (!(value > 0 && value < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(name + " must be above 0 but is " + value);
        }
    }

    static void requireRange(double from, double to) {
        requireFinite("fromMetresPerKyr", from);
        requireFinite("toMetresPerKyr", to);
        if (!(to > from)) {
            throw new IllegalArgumentException("toMetresPerKyr must be above " + from + " but is " + to);
        }
    }

    /** A number as a user would write it: no trailing ".0". */
    static String text(double value) {
        return value == Math.rint(value) && Math.abs(value) < 1e9
                ? Long.toString((long) value)
                : Double.toString(value);
    }
}
