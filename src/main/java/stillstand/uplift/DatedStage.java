package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import stillstand.dating.DateLikelihood;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Tabulated;
import stillstand.uncertainty.TruncatedNormal;
import stillstand.uncertainty.Uncertain;

/**
 * A highstand seen through the dates of a level: how well they fit it, and its age given them. With prior
 * {@code N(T, tau^2)} of its age the fit is {@code integral of N(t; T, tau^2) prod_k L_k(t) dt}.
 *
 * @param likelihood of the dates under the highstand; 1 where there are none
 * @param ageKa of the highstand given the dates, above 0
 */
record DatedStage(double likelihood, Uncertain ageKa) {
    /** No level is younger than this; what is cut off is reported. */
    static final double YOUNGEST_KA = 0.01;

    private static final double REACH_IN_SIGMAS = 6;
    private static final int NODES = 601;
    /** Below this probability of an age under {@link #YOUNGEST_KA} the cut changes nothing that is ever printed. */
    private static final double NEGLIGIBLE = 1e-12;

    /**
     * @param ageKa of the highstand before its dates are looked at
     * @param sigmaKa its standard deviation, 0 or more
     * @param dates of the level, each spread over the duration of this highstand
     */
    static DatedStage of(double ageKa, double sigmaKa, List<DateLikelihood> dates) {
        if (sigmaKa == 0) {
            return new DatedStage(DateLikelihood.product(dates, new double[] {ageKa})[0], new Exact(ageKa));
        }
        Normal prior = new Normal(ageKa, sigmaKa);
        if (dates.isEmpty()) {
            return new DatedStage(1, positive(prior));
        }
        double fromKa = Math.max(YOUNGEST_KA, ageKa - REACH_IN_SIGMAS * sigmaKa);
        double stepKa = (ageKa + REACH_IN_SIGMAS * sigmaKa - fromKa) / (NODES - 1);
        double[] nodesKa = new double[NODES];
        for (int i = 0; i < NODES; i++) {
            nodesKa[i] = fromKa + i * stepKa;
        }
        double[] product = DateLikelihood.product(dates, nodesKa);
        List<Tabulated.Point> points = new ArrayList<>();
        double sum = 0;
        for (int i = 0; i < NODES; i++) {
            double density = prior.density(nodesKa[i]) * product[i];
            points.add(new Tabulated.Point(nodesKa[i], density));
            sum += i == 0 || i == NODES - 1 ? density / 2 : density;
        }
        return sum > 0 ? new DatedStage(sum * stepKa, Tabulated.of(points)) : new DatedStage(0, positive(prior));
    }

    /** The age cut off at the youngest that a level can have. */
    static Uncertain positive(Uncertain ageKa) {
        if (ageKa instanceof Normal normal && normal.cumulativeProbability(YOUNGEST_KA) > NEGLIGIBLE) {
            return new TruncatedNormal(normal.mean(), normal.sigma(), YOUNGEST_KA, Double.POSITIVE_INFINITY);
        }
        return ageKa;
    }
}
