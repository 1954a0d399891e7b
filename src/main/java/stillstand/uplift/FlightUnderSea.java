package stillstand.uplift;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.apache.commons.rng.UniformRandomProvider;
import stillstand.uncertainty.StandardNormal;
import stillstand.uncertainty.Uncertain;

/**
 * One flight under the sea of one draw after another: how well it fits, a rate, and what the draw then knows of the sea. Not for
 * two threads at once.
 */
final class FlightUnderSea {
    /** What all draws use of a flight; for any number of threads. */
    static final class Prepared {
        private static final int LEAST_CELLS = 40;

        final ComparedFlight flight;
        final boolean oneCoast;
        final int points;
        final int cells;
        final RateProposal proposal;
        /** Recording probabilities and expected strays at the middles of as many equal shares of their priors as points. */
        final double[] recording;

        final double[] strays;
        private final ShorelineFilter untaught;

        Prepared(ComparedFlight flight, SitesTogether.Effort effort, boolean oneCoast) {
            this.flight = flight;
            this.oneCoast = oneCoast;
            points = effort.points();
            cells = cells(flight.model(), effort.cells());
            proposal = RateProposal.about(flight.alone(), flight.prior());
            recording = new double[points];
            strays = new double[points];
            for (int m = 0; m < points; m++) {
                double middle = (m + 0.5) / points;
                recording[m] = flight.shared().recording().quantile(middle);
                strays[m] = flight.shared().strays().quantile(middle);
            }
            untaught = new ShorelineFilter(flight.model(), cells);
        }

        /** Cells half as wide as the best known height is uncertain, within limits: their width acts as an error of its own. */
        private static int cells(FlightModel model, int most) {
            double least = model.levels().stream()
                    .mapToDouble(level -> level.shorelineMetres().standardDeviation())
                    .min()
                    .orElseThrow();
            double needed = 2 * (model.surveyedToMetres() - model.lowestRecordedMetres()) / least;
            return (int) Math.min(most, Math.max(LEAST_CELLS, Math.ceil(needed)));
        }
    }

    private final Prepared ready;
    private final ComparedFlight flight;
    private final UniformRandomProvider random;
    private final FilterWorkspace workspace;
    private final double[] rates;
    private final double[] logs;
    private final SharedNumbers[] numbers;

    private SharedSea sea = SharedSea.before(0, 0, 0);
    private ShorelineFilter filter;
    private int chosen;

    FlightUnderSea(Prepared ready, UniformRandomProvider random) {
        this.ready = ready;
        this.random = random;
        flight = ready.flight;
        filter = ready.untaught;
        workspace = filter.workspace(false);
        rates = new double[ready.points];
        logs = new double[ready.points];
        numbers = new SharedNumbers[ready.points];
    }

    /** A number uniform strictly between 0 and 1. */
    static double uniform(UniformRandomProvider random) {
        return ((random.nextLong() >>> 12) + 0.5) * 0x1p-52;
    }

    static double normal(double probability) {
        return StandardNormal.quantile(probability);
    }

    /** Logarithm of the evidence of the flight under a sea, estimated without bias; draws a rate. */
    double weigh(SharedSea under) {
        sea = under;
        boolean taught = flight.rows().stream().anyMatch(row -> sea.knows(row.key()));
        filter = taught ? ready.untaught.withRows(rows()) : ready.untaught;
        int points = ready.points;
        int[] recorded = SitesTogether.shuffled(points, random);
        int[] strays = SitesTogether.shuffled(points, random);
        int[] decays = SitesTogether.shuffled(points, random);
        List<Double> decaysKa = flight.shared().decaysKa();
        double offset = sea.offsetMetres(flight.errors()) + flight.datumSigmaMetres() * normal(uniform(random));
        double highest = Double.NEGATIVE_INFINITY;
        for (int m = 0; m < points; m++) {
            rates[m] = ready.proposal.quantile((m + uniform(random)) / points);
            numbers[m] = new SharedNumbers(
                    offset,
                    sea.interstadialMetres(flight.errors()),
                    sea.ageShiftKa(flight.errors()),
                    ready.recording[recorded[m]],
                    decaysKa.get(decays[m] % decaysKa.size()),
                    ready.strays[strays[m]]);
            double prior = flight.prior().density(rates[m]);
            logs[m] = prior > 0
                    ? Math.log(prior / ready.proposal.density(rates[m]))
                            + filter.logEvidence(new UpliftHistory.ConstantRate(rates[m]), numbers[m], workspace)
                    : Double.NEGATIVE_INFINITY;
            highest = Math.max(highest, logs[m]);
        }
        if (!(highest > Double.NEGATIVE_INFINITY)) {
            return highest;
        }
        double sum = 0;
        for (int m = 0; m < points; m++) {
            sum += Math.exp(logs[m] - highest);
        }
        double left = uniform(random) * sum;
        chosen = 0;
        while (chosen < points - 1 && left >= Math.exp(logs[chosen] - highest)) {
            left -= Math.exp(logs[chosen++] - highest);
        }
        return highest + Math.log(sum / points);
    }

    /** The rate drawn, m/kyr. */
    double rateMetresPerKyr() {
        return rates[chosen];
    }

    /** The sea of the draw, after a correlation was drawn and the highstands it records were read. */
    SharedSea learned() {
        double rate = rates[chosen];
        SharedNumbers shared = numbers[chosen];
        CorrelationSampler sampler = new CorrelationSampler(filter);
        sampler.prepare(new UpliftHistory.ConstantRate(rate), shared);
        List<Optional<FlightDraw.Match>> matches = sampler.draw(random);
        Map<String, SharedSea.Departure> read = new HashMap<>();
        for (int i = 0; i < matches.size(); i++) {
            if (matches.get(i).isPresent()) {
                int j = matches.get(i).get().row();
                read.put(flight.rows().get(j).key(), read(i, j, rate, shared));
            }
        }
        return sea.with(read);
    }

    /** What is held of row j after level i has recorded it. */
    private SharedSea.Departure read(int i, int j, double rate, SharedNumbers shared) {
        FlightRow row = flight.model().rows().get(j);
        Uncertain height = flight.model().levels().get(i).shorelineMetres();
        double ageKa = row.ageKa() + (row.takesCurveAge() ? shared.ageShiftKa() : 0);
        double residual = height.mean()
                - row.levelMetres()
                - (row.takesOffset() ? shared.offsetMetres() : 0)
                - (row.takesInterstadial() ? shared.interstadialMetres() : 0)
                - rate * ageKa;
        double sigma = height.standardDeviation();
        SharedSea.Departure after = departure(j).given(residual, rate, sigma * sigma + privateVariance(j));
        if (!filter.isDated(i)) {
            return after;
        }
        double[] moments = new double[2];
        filter.dates(i, j).ageMoments(ageKa + after.ageKa(), after.ageVariance(), moments);
        return after.withAge(moments[0] - ageKa, Math.max(0, moments[1] - moments[0] * moments[0]));
    }

    private SharedSea.Departure departure(int j) {
        double ageSigma = flight.model().rows().get(j).ageSigmaKa();
        ComparedFlight.SharedRow row = flight.rows().get(j);
        return sea.departure(row.key(), row.varianceMetres2(ready.oneCoast), ageSigma * ageSigma);
    }

    /** Variance of a row's level that is this site's alone: local sea level of another coast, and the datum where it rides on no offset. */
    private double privateVariance(int j) {
        double sigma = flight.model().rows().get(j).levelSigmaMetres();
        return Math.max(0, sigma * sigma - flight.rows().get(j).varianceMetres2(ready.oneCoast));
    }

    /** The rows as the sea of the draw has them. */
    private List<FlightRow> rows() {
        List<FlightRow> rows = new ArrayList<>();
        for (int j = 0; j < flight.rows().size(); j++) {
            FlightRow row = flight.model().rows().get(j);
            rows.add(sea.knows(flight.rows().get(j).key()) ? row(row, departure(j), privateVariance(j)) : row);
        }
        return rows;
    }

    private static FlightRow row(FlightRow row, SharedSea.Departure known, double privateVariance) {
        double ageSigma = Math.sqrt(known.ageVariance());
        double levelSigma = Math.sqrt(known.levelVariance() + privateVariance);
        double most = ageSigma * levelSigma;
        return new FlightRow(
                row.stage(),
                Math.max(0, row.ageKa() + known.ageKa()),
                ageSigma,
                row.levelMetres() + known.levelMetres(),
                levelSigma,
                Math.min(most, Math.max(-most, known.covariance())),
                row.durationKa(),
                row.existence(),
                row.takesOffset(),
                row.takesInterstadial(),
                row.takesCurveAge());
    }
}
