package stillstand.shoreline;

/** When, in the swings of the sea, a level formed. */
public enum FormsAt {
    /** At the top of a highstand: a terrace, a reef crest. */
    HIGHSTAND("highstand"),
    /** In the rise that drowned a reef. */
    DROWNING("drowning"),
    /** At any time: at its dated age. */
    ANY("any"),
    /** Somewhere below the sea: the former sea level stood above it. */
    MARINE_LIMITING("marine-limiting"),
    /** Somewhere above the sea: the former sea level stood below it. */
    TERRESTRIAL_LIMITING("terrestrial-limiting"),
    /** In one earthquake: a co-seismic step, kept out of any matching. */
    EVENT("event");

    private final String id;

    FormsAt(String id) {
        this.id = id;
    }

    /** The word in {@code levels.csv}. */
    public String id() {
        return id;
    }
}
