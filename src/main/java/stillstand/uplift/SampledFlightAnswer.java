package stillstand.uplift;

/**
 * What a flight says when the shared numbers are drawn, with the error of the drawing.
 *
 * @param answer the answer
 * @param error one standard error of the numbers in it, from independent scrambles
 * @param draws joint draws
 * @param effectiveDraws to how many equally weighted draws the weighted ones amount
 */
public record SampledFlightAnswer(FlightAnswer answer, NumericalError error, JointDraws draws, double effectiveDraws) {
    /**
     * Standard errors of the calculation, not of the rate.
     *
     * @param logEvidence of the natural logarithm of the evidence
     * @param meanMetresPerKyr of the mean, m/kyr
     * @param medianMetresPerKyr of the median, m/kyr
     * @param lower68MetresPerKyr of the lower end of the 68 % interval of equal tails, m/kyr
     * @param upper68MetresPerKyr of its upper end
     * @param lower95MetresPerKyr of the lower end of the 95 % interval of equal tails, m/kyr
     * @param upper95MetresPerKyr of its upper end
     * @param pairing of the pairing probability that is known worst
     */
    public record NumericalError(
            double logEvidence,
            double meanMetresPerKyr,
            double medianMetresPerKyr,
            double lower68MetresPerKyr,
            double upper68MetresPerKyr,
            double lower95MetresPerKyr,
            double upper95MetresPerKyr,
            double pairing) {}
}
