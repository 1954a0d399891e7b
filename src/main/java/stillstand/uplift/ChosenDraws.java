package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.apache.commons.rng.UniformRandomProvider;
import stillstand.ledger.RunCancelledException;
import stillstand.ledger.RunMonitor;
import stillstand.uncertainty.DrawStreams;

/**
 * What equally probable draws of history and shared numbers say of the pairings: probabilities at two cell counts, extrapolated; ages;
 * where rows stand; and whole correlations, one a draw. A draw that stands several times in a row is worked out once.
 */
final class ChosenDraws {
    private static final double NEGLIGIBLE = 1e-6;

    private final ShorelineFilter coarse;
    private final ShorelineFilter fine;
    private final List<Chosen> draws;
    private final int blocks;
    private final RunMonitor monitor;

    /**
     * One draw.
     *
     * @param history how the coast has moved
     * @param shared the shared numbers
     * @param coarseShare evidence at the coarser cells over that at vanishing ones
     * @param fineShare the same at the finer cells
     * @param block which independent part of the calculation it comes from, from 0
     */
    record Chosen(UpliftHistory history, SharedNumbers shared, double coarseShare, double fineShare, int block) {}

    /** What came of it; {@code pairingError} is the largest standard error of a pairing probability, by blocks. */
    record Found(
            PairingTable table,
            List<Optional<LevelAge>> ages,
            List<RowPosition> positions,
            JointDraws joint,
            double pairingError) {}

    ChosenDraws(ShorelineFilter coarse, ShorelineFilter fine, List<Chosen> draws, int blocks, RunMonitor monitor) {
        this.coarse = coarse;
        this.fine = fine;
        this.draws = List.copyOf(draws);
        this.blocks = blocks;
        this.monitor = monitor;
    }

    /** Works all out; correlations are drawn from the stream {@code key + " correlations"}. */
    Found found(DrawStreams streams, String key, Workers workers) {
        PairingSums[] parts = new PairingSums[blocks];
        PairingSums[] sums = new PairingSums[2];
        JointDraws[] joint = new JointDraws[1];
        workers.run(List.of(
                () -> sums[0] = sums(coarse, false, parts),
                () -> sums[1] = sums(fine, true, new PairingSums[blocks]),
                () -> joint[0] = joint(streams.stream(key + " correlations", 0))));
        PairingTable table = sums[0].extrapolatedWith(sums[1]);
        return new Found(table, ages(table, sums[1]), positions(), joint[0], sums[0].largestError(parts));
    }

    private PairingSums sums(ShorelineFilter filter, boolean finer, PairingSums[] parts) {
        FilterWorkspace workspace = filter.workspace(true);
        BackwardPass pass = new BackwardPass(filter, workspace);
        PairingSums all = empty(filter);
        Arrays.setAll(parts, block -> empty(filter));
        Optional<Chosen> before = Optional.empty();
        for (Chosen draw : draws) {
            if (before.filter(other -> other.equals(draw)).isEmpty()) {
                stopIfCancelled();
                pass.run(draw.history(), draw.shared());
                before = Optional.of(draw);
            }
            double share = finer ? draw.fineShare() : draw.coarseShare();
            all.add(workspace, share);
            parts[draw.block()].add(workspace, share);
        }
        return all;
    }

    private static PairingSums empty(ShorelineFilter filter) {
        return new PairingSums(filter.model.levels().size(), filter.model.rows().size());
    }

    private static List<Optional<LevelAge>> ages(PairingTable table, PairingSums sums) {
        List<Optional<LevelAge>> ages = new ArrayList<>();
        for (int i = 0; i < table.levels(); i++) {
            List<LevelAge.Part> parts = new ArrayList<>();
            for (int j = 0; j < table.rows(); j++) {
                if (table.probability(i, j) > NEGLIGIBLE) {
                    parts.add(sums.agePart(i, j, table.probability(i, j)));
                }
            }
            ages.add(parts.isEmpty() ? Optional.empty() : Optional.of(new LevelAge(parts)));
        }
        return ages;
    }

    private List<RowPosition> positions() {
        RowCells cells = new RowCells(coarse.cells.count());
        List<RowPosition> positions = new ArrayList<>();
        for (FlightRow row : coarse.model.rows()) {
            double first = 0;
            double second = 0;
            for (Chosen draw : draws) {
                cells.moments(row, draw.history(), draw.shared());
                first += cells.meanMetres / draws.size();
                second += (cells.varianceMetres2 + cells.meanMetres * cells.meanMetres) / draws.size();
            }
            positions.add(new RowPosition(first, Math.sqrt(Math.max(0, second - first * first))));
        }
        return positions;
    }

    private JointDraws joint(UniformRandomProvider random) {
        CorrelationSampler sampler = new CorrelationSampler(coarse);
        List<FlightDraw> joint = new ArrayList<>();
        Optional<Chosen> before = Optional.empty();
        for (Chosen draw : draws) {
            if (before.filter(other -> other.equals(draw)).isEmpty()) {
                stopIfCancelled();
                sampler.prepare(draw.history(), draw.shared());
                before = Optional.of(draw);
            }
            joint.add(new FlightDraw(draw.history(), draw.shared(), sampler.draw(random)));
        }
        return new JointDraws(joint);
    }

    private void stopIfCancelled() {
        if (monitor.isCancelled()) {
            throw new RunCancelledException();
        }
    }
}
