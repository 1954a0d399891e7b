package stillstand.view;

/**
 * A line of a panel.
 *
 * @param label what it is of
 * @param text what is so
 */
public record Fact(String label, String text) {}
