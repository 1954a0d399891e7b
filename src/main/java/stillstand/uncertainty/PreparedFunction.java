package stillstand.uncertainty;

/**
 * A {@link ColumnFunction} in two steps, for those who evaluate it many times over the same columns in other combinations: what
 * depends on one input alone is worked out once.
 */
public interface PreparedFunction {
    /**
     * What one input contributes.
     *
     * @param dimension of the input, from 0
     * @param probabilities its column; not to be changed
     * @return any number of columns, as {@link #evaluate} wants them
     */
    double[][] prepare(int dimension, double[] probabilities);

    /**
     * Works out the number at every point.
     *
     * @param prepared what {@link #prepare} gave, one entry per dimension; not to be changed
     * @param out receives the values, one for each point
     */
    void evaluate(double[][][] prepared, double[] out);

    /** A function that has nothing to prepare. */
    static PreparedFunction of(ColumnFunction function) {
        return new PreparedFunction() {
            @Override
            public double[][] prepare(int dimension, double[] probabilities) {
                return new double[][] {probabilities};
            }

            @Override
            public void evaluate(double[][][] prepared, double[] out) {
                double[][] copies = new double[prepared.length][];
                for (int d = 0; d < copies.length; d++) {
                    copies[d] = prepared[d][0].clone();
                }
                function.evaluate(copies, out);
            }
        };
    }
}
