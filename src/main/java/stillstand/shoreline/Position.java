package stillstand.shoreline;

/**
 * A place on the earth.
 *
 * @param latitudeDegrees decimal degrees, north positive, -90 to 90
 * @param longitudeDegrees decimal degrees, east positive, -180 to 360
 */
public record Position(double latitudeDegrees, double longitudeDegrees) {
    public Position {
        if (!(latitudeDegrees >= -90 && latitudeDegrees <= 90)) {
            throw new IllegalArgumentException("latitudeDegrees must lie in -90 to 90 but is " + latitudeDegrees);
        }
        if (!(longitudeDegrees >= -180 && longitudeDegrees <= 360)) {
            throw new IllegalArgumentException("longitudeDegrees must lie in -180 to 360 but is " + longitudeDegrees);
        }
    }
}
