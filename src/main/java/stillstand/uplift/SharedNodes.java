package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import org.apache.commons.math3.analysis.integration.gauss.GaussIntegrator;
import org.apache.commons.math3.analysis.integration.gauss.GaussIntegratorFactory;
import org.apache.commons.math3.special.Beta;

/**
 * Weighted values of the shared numbers over which an evidence is averaged; the weights sum to 1.
 *
 * @param nodes one or more
 */
public record SharedNodes(List<Node> nodes) {
    /**
     * One value of the shared numbers.
     *
     * @param shared the numbers
     * @param weight above 0
     */
    public record Node(SharedNumbers shared, double weight) {
        /** @throws IllegalArgumentException if the weight is not above 0 */
        public Node {
            if (!(weight > 0)) {
                throw new IllegalArgumentException("weight must be above 0 but is " + weight);
            }
        }
    }

    /** @throws IllegalArgumentException if the weights do not sum to 1 */
    public SharedNodes {
        nodes = List.copyOf(nodes);
        double sum = nodes.stream().mapToDouble(Node::weight).sum();
        if (!(Math.abs(sum - 1) < 1e-9)) {
            throw new IllegalArgumentException("weights must sum to 1 but sum to " + sum);
        }
    }

    /** The numbers as given, without doubt. */
    public static SharedNodes fixed(SharedNumbers shared) {
        return new SharedNodes(List.of(new Node(shared, 1)));
    }

    /** The recording probability under a Beta(a, b) prior, by Gauss-Legendre nodes. */
    public SharedNodes withBetaRecording(double a, double b, int count) {
        GaussIntegrator rule = new GaussIntegratorFactory().legendre(count, 0, 1);
        List<Node> all = new ArrayList<>();
        for (Node node : nodes) {
            for (int i = 0; i < count; i++) {
                double q = rule.getPoint(i);
                double logDensity = (a - 1) * Math.log(q) + (b - 1) * Math.log1p(-q) - Beta.logBeta(a, b);
                all.add(new Node(
                        node.shared.withRecordingProbability(q),
                        node.weight * rule.getWeight(i) * Math.exp(logDensity)));
            }
        }
        return normalised(all);
    }

    /** The offset that all rows share, normal about 0 with the given standard deviation, by Gauss-Hermite nodes. */
    public SharedNodes withNormalOffset(double sigmaMetres, int count) {
        GaussIntegrator rule = new GaussIntegratorFactory().hermite(count);
        List<Node> all = new ArrayList<>();
        for (Node node : nodes) {
            for (int i = 0; i < count; i++) {
                all.add(new Node(
                        node.shared.withOffset(Math.sqrt(2) * sigmaMetres * rule.getPoint(i)),
                        node.weight * rule.getWeight(i) / Math.sqrt(Math.PI)));
            }
        }
        return normalised(all);
    }

    private static SharedNodes normalised(List<Node> nodes) {
        double sum = nodes.stream().mapToDouble(Node::weight).sum();
        return new SharedNodes(nodes.stream()
                .map(node -> new Node(node.shared, node.weight / sum))
                .toList());
    }
}
