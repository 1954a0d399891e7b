package stillstand.uplift;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * What traces between sites make of the correlations of each. At every site the traced levels record certain highstands with certain
 * shares, were the site alone; a trace between two levels multiplies the share of a joint correlation by its probability where both
 * record the same highstand, and by one less that where they do not (or one is no shoreline). All joint correlations are summed.
 */
final class TracedShares {
    /** A level that records no highstand. */
    static final String NO_SHORELINE = "";

    private static final double MOST_JOINT = 4e6;

    private final List<List<List<String>>> stands = new ArrayList<>();
    private final List<List<Double>> shares = new ArrayList<>();
    private final List<Link> links;
    private final double probability;
    private final double[][] joint;
    private double total;
    private double left;

    /** A trace: the traced levels {@code one} at site {@code a} and {@code two} at site {@code b}, numbered from 0, a before b. */
    record Link(int a, int one, int b, int two) {}

    /**
     * What came of it.
     *
     * @param shares by site, what each correlation of its traced levels holds now; together 1
     * @param factor mean factor of all traces: how well the sites agree
     * @param leftOut share of correlations so rare that they were left out, at the worst site
     */
    record Found(List<Map<List<String>, Double>> shares, double factor, double leftOut) {}

    private TracedShares(List<Map<List<String>, Double>> alone, List<Link> links, double probability) {
        this.links = links;
        this.probability = probability;
        double product = 1;
        for (Map<List<String>, Double> site : alone) {
            product *= site.size();
        }
        // so many for each site that the joint ones can all be gone through
        double most = product > MOST_JOINT ? Math.floor(Math.pow(MOST_JOINT, 1.0 / alone.size())) : MOST_JOINT;
        for (Map<List<String>, Double> site : alone) {
            List<Map.Entry<List<String>, Double>> entries = new ArrayList<>(site.entrySet());
            entries.sort(Map.Entry.<List<String>, Double>comparingByValue().reversed());
            List<Map.Entry<List<String>, Double>> kept =
                    entries.subList(0, (int) Math.min(entries.size(), Math.max(1, most)));
            double held = kept.stream().mapToDouble(Map.Entry::getValue).sum();
            left = Math.max(left, 1 - held);
            stands.add(kept.stream().map(Map.Entry::getKey).toList());
            shares.add(kept.stream().map(entry -> entry.getValue() / held).toList());
        }
        joint = new double[alone.size()][];
        for (int s = 0; s < joint.length; s++) {
            joint[s] = new double[stands.get(s).size()];
        }
    }

    /**
     * The shares under the traces.
     *
     * @param alone by site, what each correlation of its traced levels (the highstand of each, or {@link #NO_SHORELINE}) holds alone;
     *     together 1
     * @param probability of a trace, 0 to 1
     * @throws IllegalArgumentException if the traces allow no joint correlation
     */
    static Found of(List<Map<List<String>, Double>> alone, List<Link> links, double probability) {
        TracedShares shares = new TracedShares(alone, links, probability);
        shares.go(0, new int[alone.size()], 1);
        if (!(shares.total > 0)) {
            throw new IllegalArgumentException("no correlation of all sites agrees with the traces");
        }
        List<Map<List<String>, Double>> found = new ArrayList<>();
        for (int s = 0; s < shares.joint.length; s++) {
            Map<List<String>, Double> own = new LinkedHashMap<>();
            for (int k = 0; k < shares.joint[s].length; k++) {
                own.put(shares.stands.get(s).get(k), shares.joint[s][k] / shares.total);
            }
            found.add(own);
        }
        return new Found(found, shares.total, shares.left);
    }

    private void go(int site, int[] chosen, double weight) {
        if (weight == 0) {
            return;
        }
        if (site == joint.length) {
            total += weight;
            for (int s = 0; s < site; s++) {
                joint[s][chosen[s]] += weight;
            }
            return;
        }
        for (int k = 0; k < joint[site].length; k++) {
            chosen[site] = k;
            double own = weight * shares.get(site).get(k);
            for (Link link : links) {
                if (link.b() == site) {
                    String younger = stands.get(link.a()).get(chosen[link.a()]).get(link.one());
                    String here = stands.get(site).get(k).get(link.two());
                    own *= younger.equals(here) && !here.equals(NO_SHORELINE) ? probability : 1 - probability;
                }
            }
            go(site + 1, chosen, own);
        }
    }
}
