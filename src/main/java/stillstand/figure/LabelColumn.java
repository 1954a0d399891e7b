package stillstand.figure;

import java.util.ArrayList;
import java.util.List;

/** Labels that want to stand at their own heights and must not overlap. */
public final class LabelColumn {
    private LabelColumn() {}

    /**
     * Where they stand: in the same order, {@code gap} apart at least, within the limits, and as near to where they want to be
     * as that allows (least squares; neighbours that would overlap move together, as pooled adjacent violators).
     *
     * @param wanted ascending
     * @param gap between neighbours
     * @param low least position
     * @param high greatest position; exceeded where there is not room enough
     */
    public static double[] places(double[] wanted, double gap, double low, double high) {
        List<double[]> pools = new ArrayList<>();
        for (int i = 0; i < wanted.length; i++) {
            pools.add(new double[] {wanted[i] - i * gap, 1});
            while (pools.size() > 1 && pools.get(pools.size() - 2)[0] > pools.get(pools.size() - 1)[0]) {
                double[] upper = pools.remove(pools.size() - 1);
                double[] lower = pools.get(pools.size() - 1);
                lower[0] = (lower[0] * lower[1] + upper[0] * upper[1]) / (lower[1] + upper[1]);
                lower[1] += upper[1];
            }
        }
        double most = Math.max(low, high - (wanted.length - 1) * gap);
        double[] places = new double[wanted.length];
        int i = 0;
        for (double[] pool : pools) {
            for (int k = 0; k < pool[1]; k++, i++) {
                places[i] = Math.min(Math.max(pool[0], low), most) + i * gap;
            }
        }
        return places;
    }
}
