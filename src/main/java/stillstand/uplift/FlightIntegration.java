package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.function.DoubleUnaryOperator;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;

/**
 * A constant rate from a flight, by a grid over the rate: the segment recursion says where the probability may lie, the
 * shoreline filter is evaluated there at two cell counts and extrapolated to vanishing cells, and intervals that turn out
 * coarse are halved. Shared numbers are averaged over the nodes given.
 */
public final class FlightIntegration {
    private static final int MOST_PILOT_RATES = 1200;
    private static final int LAST_ROUNDS = 14;
    private static final double NEGLIGIBLE_WEIGHT = 1e-7;

    private final FlightModel model;
    private final RatePrior prior;
    private final SharedNodes shared;
    private final Effort effort;
    private final RunMonitor monitor;
    private final ShorelineFilter coarse;
    private final ShorelineFilter fine;
    private final TreeMap<Double, Evaluated> evaluated = new TreeMap<>();

    /**
     * How fine to compute.
     *
     * @param rates nodes of the rate, 20 or more
     * @param cells cells of height in the coarser of the two passes, 10 or more
     */
    public record Effort(int rates, int cells) {
        /** 600 rates, 250 and 500 cells. */
        public static final Effort FULL = new Effort(600, 250);

        /** @throws IllegalArgumentException if a number is too small */
        public Effort {
            if (!(rates >= 20 && cells >= 10)) {
                throw new IllegalArgumentException(
                        "rates must be 20 and cells 10 or more but they are " + rates + " and " + cells);
            }
        }
    }

    /** Evidence at one rate: extrapolated; and per shared node at each cell count; and of "all levels are strays". */
    private static final class Evaluated {
        final double logEvidence;
        final double logAllStray;
        final double[] logCoarse;
        final double[] logFine;

        Evaluated(double logEvidence, double logAllStray, double[] logCoarse, double[] logFine) {
            this.logEvidence = logEvidence;
            this.logAllStray = logAllStray;
            this.logCoarse = logCoarse;
            this.logFine = logFine;
        }
    }

    private FlightIntegration(
            FlightModel model, RatePrior prior, SharedNodes shared, Effort effort, RunMonitor monitor) {
        this.model = model;
        this.prior = prior;
        this.shared = shared;
        this.effort = effort;
        this.monitor = monitor;
        coarse = new ShorelineFilter(model, effort.cells());
        fine = new ShorelineFilter(model, 2 * effort.cells());
    }

    /**
     * The whole answer.
     *
     * @throws IllegalArgumentException if no rate of the prior can have left the flight
     * @throws RunCancelledException if the monitor asks to stop
     */
    public static FlightAnswer answer(
            FlightModel model, RatePrior prior, SharedNodes shared, Effort effort, RunMonitor monitor) {
        FlightIntegration integration = new FlightIntegration(model, prior, shared, effort, monitor);
        return integration.answerOf(integration.integrate());
    }

    /** The posterior of the rate alone, which costs a quarter of the whole. */
    public static RatePosterior rate(
            FlightModel model, RatePrior prior, SharedNodes shared, Effort effort, RunMonitor monitor) {
        return new FlightIntegration(model, prior, shared, effort, monitor).integrate();
    }

    /** An approximate posterior within milliseconds, from the segment recursion: for previews, never the answer. */
    public static RatePosterior preview(FlightModel model, RatePrior prior, SharedNodes shared, int rates) {
        DoubleUnaryOperator pilot = pilot(model, shared);
        double[] nodes = RateGrid.nodes(RateGrid.explored(prior, pilot, rates), prior, rates);
        return posterior(nodes, pilot, prior);
    }

    private static RatePosterior posterior(double[] candidates, DoubleUnaryOperator logEvidence, RatePrior prior) {
        TreeMap<Double, Double> logs = new TreeMap<>();
        for (double rate : candidates) {
            logs.computeIfAbsent(rate, logEvidence::applyAsDouble);
        }
        return RatePosterior.of(
                keys(logs), logs.values().stream().mapToDouble(v -> v).toArray(), prior);
    }

    private static double[] keys(Map<Double, ?> map) {
        return map.keySet().stream().mapToDouble(v -> v).toArray();
    }

    private static DoubleUnaryOperator pilot(FlightModel model, SharedNodes shared) {
        SegmentRecursion recursion = new SegmentRecursion(model);
        double[] logs = new double[shared.nodes().size()];
        return rate -> {
            UpliftHistory history = new UpliftHistory.ConstantRate(rate);
            for (int k = 0; k < logs.length; k++) {
                logs[k] = recursion.logEvidence(history, shared.nodes().get(k).shared());
            }
            return mean(logs, shared);
        };
    }

    private RatePosterior integrate() {
        Map<Double, Double> explored = RateGrid.explored(prior, pilot(model, shared), MOST_PILOT_RATES);
        double[] nodes = RateGrid.nodes(explored, prior, effort.rates());
        FilterWorkspace coarseWorkspace = coarse.workspace(false);
        FilterWorkspace fineWorkspace = fine.workspace(false);
        TreeMap<Double, Double> log = new TreeMap<>();
        DoubleUnaryOperator logDensity =
                rate -> evaluate(rate, coarseWorkspace, fineWorkspace).logEvidence + Math.log(prior.density(rate));
        for (double rate : nodes) {
            log.computeIfAbsent(rate, logDensity::applyAsDouble);
        }
        for (int round = 0; round < LAST_ROUNDS; round++) {
            if (!RateGrid.refine(log, logDensity, 12.0 / effort.rates(), 1)) {
                break;
            }
        }
        double[] logEvidences =
                evaluated.values().stream().mapToDouble(one -> one.logEvidence).toArray();
        return RatePosterior.of(keys(evaluated), logEvidences, prior);
    }

    private Evaluated evaluate(double rate, FilterWorkspace coarseWorkspace, FilterWorkspace fineWorkspace) {
        if (monitor.isCancelled()) {
            throw new RunCancelledException();
        }
        UpliftHistory history = new UpliftHistory.ConstantRate(rate);
        int count = shared.nodes().size();
        double[] logCoarse = new double[count];
        double[] logFine = new double[count];
        double[] logStray = new double[count];
        for (int k = 0; k < count; k++) {
            SharedNumbers numbers = shared.nodes().get(k).shared();
            logCoarse[k] = coarse.logEvidence(history, numbers, coarseWorkspace);
            logFine[k] = fine.logEvidence(history, numbers, fineWorkspace);
            logStray[k] = fineWorkspace.logNothingRecorded + fine.logUnit(numbers.expectedStrays());
        }
        double log = ShorelineFilter.richardson(mean(logCoarse, shared), mean(logFine, shared));
        Evaluated result = new Evaluated(log, mean(logStray, shared), logCoarse, logFine);
        evaluated.put(rate, result);
        return result;
    }

    /** Logarithm of the weighted mean of exponentials. */
    private static double mean(double[] logs, SharedNodes shared) {
        double highest = Double.NEGATIVE_INFINITY;
        for (double log : logs) {
            highest = Math.max(highest, log);
        }
        if (highest == Double.NEGATIVE_INFINITY) {
            return highest;
        }
        double sum = 0;
        for (int k = 0; k < logs.length; k++) {
            sum += shared.nodes().get(k).weight() * Math.exp(logs[k] - highest);
        }
        return highest + Math.log(sum);
    }

    private FlightAnswer answerOf(RatePosterior posterior) {
        double[] weights = posterior.nodeWeights();
        PairingSums coarseSums = sums(coarse, weights, false);
        PairingSums fineSums = sums(fine, weights, true);
        PairingTable table = coarseSums.extrapolatedWith(fineSums);
        List<Optional<LevelAge>> ages = new ArrayList<>();
        for (int i = 0; i < table.levels(); i++) {
            List<LevelAge.Part> parts = new ArrayList<>();
            for (int j = 0; j < table.rows(); j++) {
                if (table.probability(i, j) > NEGLIGIBLE_WEIGHT) {
                    parts.add(fineSums.agePart(i, j, table.probability(i, j)));
                }
            }
            ages.add(parts.isEmpty() ? Optional.empty() : Optional.of(new LevelAge(parts)));
        }
        return new FlightAnswer(posterior, table, ages, positions(weights), allStray(posterior));
    }

    private PairingSums sums(ShorelineFilter filter, double[] weights, boolean finer) {
        PairingSums sums = new PairingSums(model.levels().size(), model.rows().size());
        FilterWorkspace workspace = filter.workspace(true);
        BackwardPass pass = new BackwardPass(filter, workspace);
        int at = 0;
        for (Map.Entry<Double, Evaluated> entry : evaluated.entrySet()) {
            double weight = weights[at++];
            double[] logs = finer ? entry.getValue().logFine : entry.getValue().logCoarse;
            double mean = mean(logs, shared);
            for (int k = 0; k < logs.length; k++) {
                double share = weight * shared.nodes().get(k).weight() * Math.exp(logs[k] - mean);
                if (share > NEGLIGIBLE_WEIGHT) {
                    if (monitor.isCancelled()) {
                        throw new RunCancelledException();
                    }
                    pass.run(
                            new UpliftHistory.ConstantRate(entry.getKey()),
                            shared.nodes().get(k).shared());
                    sums.add(workspace, share);
                }
            }
        }
        return sums;
    }

    private List<RowPosition> positions(double[] weights) {
        RowCells cells = new RowCells(fine.cells.count());
        List<RowPosition> positions = new ArrayList<>();
        for (FlightRow row : model.rows()) {
            double first = 0;
            double second = 0;
            double all = 0;
            int at = 0;
            for (Map.Entry<Double, Evaluated> entry : evaluated.entrySet()) {
                double[] logs = entry.getValue().logFine;
                double weight = weights[at++];
                double mean = mean(logs, shared);
                for (int k = 0; k < logs.length && weight > NEGLIGIBLE_WEIGHT; k++) {
                    SharedNodes.Node node = shared.nodes().get(k);
                    double share = weight * node.weight() * Math.exp(logs[k] - mean);
                    cells.moments(row, new UpliftHistory.ConstantRate(entry.getKey()), node.shared());
                    all += share;
                    first += share * cells.meanMetres;
                    second += share * (cells.varianceMetres2 + cells.meanMetres * cells.meanMetres);
                }
            }
            double centre = first / all;
            positions.add(new RowPosition(centre, Math.sqrt(Math.max(0, second / all - centre * centre))));
        }
        return positions;
    }

    private double allStray(RatePosterior posterior) {
        double[] logs =
                evaluated.values().stream().mapToDouble(one -> one.logAllStray).toArray();
        double log = RatePosterior.of(keys(evaluated), logs, prior).logEvidence() - posterior.logEvidence();
        double ratio = Math.exp(log);
        return model.countsAllStray() ? Math.min(1, ratio) : ratio / (1 + ratio);
    }
}
