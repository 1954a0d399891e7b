package stillstand.view;

/**
 * A pairing that the user wants: what the {@code highstand} cell of a level should say.
 *
 * @param site of the level
 * @param level its name
 * @param highstand {@code 5e}, {@code 5a|5c} or {@code !5e}; blank = any
 */
public record PairingEdit(String site, String level, String highstand) {}
