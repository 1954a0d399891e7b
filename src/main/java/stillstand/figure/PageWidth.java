package stillstand.figure;

/** How wide a figure is printed: the columns of a journal. */
public enum PageWidth {
    /** One column, 90 mm. */
    ONE("one", 90),
    /** One column and a half, 140 mm. */
    ONE_AND_A_HALF("one-and-a-half", 140),
    /** Both columns, 190 mm. */
    TWO("two", 190);

    private static final double POINTS_PER_MILLIMETRE = 72 / 25.4;

    private final String id;
    private final double millimetres;

    PageWidth(String id, double millimetres) {
        this.id = id;
        this.millimetres = millimetres;
    }

    /** Its name on the command line. */
    public String id() {
        return id;
    }

    /** Its width in millimetres. */
    public double millimetres() {
        return millimetres;
    }

    /** Its width in points of 1/72 inch, in which everything is drawn. */
    double points() {
        return millimetres * POINTS_PER_MILLIMETRE;
    }

    static double millimetres(double points) {
        return points / POINTS_PER_MILLIMETRE;
    }

    @Override
    public String toString() {
        return id;
    }
}
