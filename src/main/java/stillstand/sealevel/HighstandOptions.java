package stillstand.sealevel;

/**
 * What a highstand table gets beside its own rows, unless it is complete.
 *
 * @param olderRows whether generic rows go on where the table ends, to 2600 ka
 * @param defaultLocalOffset whether rows get the default spread of local minus global sea level; false where a study measures it
 */
public record HighstandOptions(boolean olderRows, boolean defaultLocalOffset) {
    /** Both. */
    public static final HighstandOptions DEFAULT = new HighstandOptions(true, true);
}
