package stillstand.ledger;

/**
 * One thing a result rests on: a default, a constant, a table, a dropped value.
 *
 * @param assumption what is assumed, in a few words
 * @param value the value in use, with its unit
 * @param source who says so: a citation, "the study", or "Stillstand's default"
 * @param appliesTo what it bears on: "all", a site, or "site / level"
 */
public record Assumption(String assumption, String value, String source, String appliesTo) {
    public Assumption {
        if (assumption.isBlank()) {
            throw new IllegalArgumentException("assumption must say something");
        }
    }
}
