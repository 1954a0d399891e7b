package stillstand.uncertainty;

/** A number that follows from uncertain inputs, for a whole column of points at once. */
@FunctionalInterface
public interface ColumnFunction {
    /**
     * Works out the number at every point.
     *
     * @param probabilities one column per dimension; may be overwritten, as by {@link Uncertain#toQuantiles}
     * @param out receives the values, one for each point
     */
    void evaluate(double[][] probabilities, double[] out);
}
