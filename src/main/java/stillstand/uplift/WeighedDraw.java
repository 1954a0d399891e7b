package stillstand.uplift;

/**
 * A joint draw of a flight and how much it weighs.
 *
 * @param draw rate, shared numbers, correlation, true heights and ages
 * @param weight above 0, relative to the others
 * @param block number of its independent scramble, from 0
 */
public record WeighedDraw(FlightDraw draw, double weight, int block) {
    /** @throws IllegalArgumentException if the weight is not a finite number above 0, or the block negative */
    public WeighedDraw {
        if (!(weight > 0 && weight < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException("weight must be above 0 but is " + weight);
        }
        if (block < 0) {
            throw new IllegalArgumentException("block must be 0 or more but is " + block);
        }
    }
}
