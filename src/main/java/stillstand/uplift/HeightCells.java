package stillstand.uplift;

import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;

/**
 * Equal cells of height between the lowest height at which a shoreline can be recorded and the top of the surveyed range.
 *
 * @param lowestMetres lower edge of the first cell
 * @param highestMetres upper edge of the last cell
 * @param count how many
 */
record HeightCells(double lowestMetres, double highestMetres, int count) {
    HeightCells {
        if (!(count >= 4)) {
            throw new IllegalArgumentException("cells must be four or more but are " + count);
        }
    }

    double widthMetres() {
        return (highestMetres - lowestMetres) / count;
    }

    double edgeMetres(int cell) {
        return lowestMetres + cell * widthMetres();
    }

    double middleMetres(int cell) {
        return lowestMetres + (cell + 0.5) * widthMetres();
    }

    /** Writes the probability of each cell divided by the cell's width, 1/m, into {@code out} from {@code at} on. */
    void writeDensity(Uncertain heightMetres, double[] out, int at) {
        double width = widthMetres();
        for (int c = 0; c < count; c++) {
            double low = edgeMetres(c);
            double high = edgeMetres(c + 1);
            double mass = heightMetres instanceof Normal normal
                    ? NormalTail.between(
                            (low - normal.mean()) / normal.sigma(), (high - normal.mean()) / normal.sigma())
                    : heightMetres.cumulativeProbability(high) - heightMetres.cumulativeProbability(low);
            out[at + c] = Math.max(0, mass) / width;
        }
    }
}
