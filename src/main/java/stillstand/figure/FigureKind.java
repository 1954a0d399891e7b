package stillstand.figure;

/** What a figure shows. Its id begins the names of its files. */
public enum FigureKind {
    /** Sea level through time, the levels of a site, and the lines between them whose slope is the rate. */
    STAIR("stair"),
    /** Densities of the rates of a site. */
    RATES("rates"),
    /** Probability of each level and highstand of a flight. */
    PAIRINGS("pairings"),
    /** What became of the shoreline of each highstand. */
    FATES("fates"),
    /** Measured against predicted heights of a flight. */
    RESIDUALS("residuals"),
    /** The rate through time, where it changes. */
    HISTORY("history"),
    /** Which input the spread of each rate comes from. */
    BUDGET("budget"),
    /** What each input by itself does to the rate of each level. */
    TORNADO("tornado"),
    /** Sea-level curves and the highstands in use. */
    CURVES("curves"),
    /** All rates of all sites on one axis. */
    FOREST("forest"),
    /** Sites where they lie, and whether they go up or down. */
    MAP("map"),
    /** Levels of all sites of a coast, by distance along it. */
    COAST("coast"),
    /** Differences between the rates of sites. */
    DIFFERENCES("differences");

    private final String id;

    FigureKind(String id) {
        this.id = id;
    }

    /** Its name on the command line. */
    public String id() {
        return id;
    }

    /** Whether the whole study has one, and not each site. */
    public boolean isOfStudy() {
        return switch (this) {
            case CURVES, FOREST, MAP, COAST, DIFFERENCES -> true;
            default -> false;
        };
    }

    @Override
    public String toString() {
        return id;
    }
}
