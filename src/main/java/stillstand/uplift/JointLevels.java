package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import stillstand.sealevel.CurveErrorPath;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.StandardNormal;
import stillstand.uncertainty.Uncertain;

/**
 * Joint draws of the levels of a site: what they share is drawn once. Shared are the offset of sea level, the factor of interstadials, the
 * curve's ages, the level and age of each highstand, its local departure on one coast, the site's datum, and the error of
 * a curve through time (read at several ages: an offset plus an Ornstein-Uhlenbeck path). The keys of shared inputs name no
 * level, and those of the sea no site either, so that draws of two sites belong together too.
 *
 * <p>Each level keeps the marginal distribution it has by itself ({@link LevelRates}).
 */
final class JointLevels {
    /**
     * A level to draw.
     *
     * @param name of the level
     * @param height terms of the height of its former sea, without lowering
     * @param loweringMetresPerKyr rate at which its surface was lowered
     * @param explanations with probabilities that sum to 1
     */
    record Entry(String name, List<HeightTerm> height, Uncertain loweringMetresPerKyr, List<SeaAtLevel> explanations) {
        Entry {
            height = List.copyOf(height);
            explanations = List.copyOf(explanations);
        }
    }

    /** Columns of one level in one block; heights above present mean sea level, m, ages ka. */
    static final class Drawn {
        final double[] heightMetres = new double[DrawStreams.BLOCK_DRAWS];
        final double[] seaLevelMetres = new double[DrawStreams.BLOCK_DRAWS];
        final double[] ageKa = new double[DrawStreams.BLOCK_DRAWS];
        /** False where the age lies beyond the curve and the draw counts for nothing. */
        final boolean[] valid = new boolean[DrawStreams.BLOCK_DRAWS];

        /** Uplift since the level formed, m. */
        double upliftMetres(int draw) {
            return heightMetres[draw] - seaLevelMetres[draw];
        }
    }

    private static final int N = DrawStreams.BLOCK_DRAWS;

    private final String site;
    private final String coast;
    private final List<Entry> entries;
    private final DrawStreams streams;

    /**
     * @param site its name
     * @param coast the coast that shares local sea level with it; its own name where it has none
     * @param entries levels to draw
     * @param streams all randomness
     */
    JointLevels(String site, String coast, List<Entry> entries, DrawStreams streams) {
        this.site = site;
        this.coast = coast;
        this.entries = List.copyOf(entries);
        this.streams = streams;
    }

    /** One block of joint draws, a set of columns a level, in the order of the entries. */
    List<Drawn> draw(int block) {
        Shared shared = new Shared(block);
        List<Drawn> all = new ArrayList<>();
        List<CurveRead> reads = new ArrayList<>();
        for (Entry entry : entries) {
            Drawn drawn = new Drawn();
            drawHeight(entry, block, drawn);
            int[] chosen = chosen(entry, block);
            for (int e = 0; e < entry.explanations().size(); e++) {
                SeaAtLevel sea = entry.explanations().get(e);
                if (sea instanceof SeaAtLevel.AtHighstand stand) {
                    drawHighstand(stand, shared, chosen, e, drawn);
                } else if (sea instanceof SeaAtLevel.OnCurve read) {
                    reads.add(new CurveRead(read, drawn, column(own(entry, "age"), block)));
                }
            }
            addLowering(entry, block, drawn);
            all.add(drawn);
        }
        readCurves(reads, shared, block);
        return all;
    }

    private String own(Entry entry, String input) {
        return site + " / " + entry.name() + " / " + input;
    }

    private double[] column(String key, int block) {
        double[] probabilities = new double[N];
        streams.probabilities(key, block, probabilities);
        return probabilities;
    }

    private void drawHeight(Entry entry, int block, Drawn drawn) {
        int number = 0;
        for (HeightTerm term : entry.height()) {
            number++;
            if (term.metres().isExact()) {
                add(term.meanMetres(), drawn.heightMetres);
                continue;
            }
            String key = term.source() == HeightTerm.Source.DATUM
                    ? "site / " + site + " / datum"
                    : own(entry, term.source().name() + " " + number);
            double[] values = column(key, block);
            term.metres().toQuantiles(values);
            for (int i = 0; i < N; i++) {
                drawn.heightMetres[i] += term.sign() * values[i];
            }
        }
    }

    private static void add(double value, double[] column) {
        for (int i = 0; i < N; i++) {
            column[i] += value;
        }
    }

    /** Which explanation each draw takes. */
    private int[] chosen(Entry entry, int block) {
        int[] chosen = new int[N];
        if (entry.explanations().size() > 1) {
            double[] probabilities = column(own(entry, "highstand"), block);
            for (int i = 0; i < N; i++) {
                double left = probabilities[i];
                int last = entry.explanations().size() - 1;
                while (chosen[i] < last
                        && left > entry.explanations().get(chosen[i]).probability()) {
                    left -= entry.explanations().get(chosen[i]).probability();
                    chosen[i]++;
                }
            }
        }
        return chosen;
    }

    private void drawHighstand(SeaAtLevel.AtHighstand stand, Shared shared, int[] chosen, int index, Drawn drawn) {
        Highstand row = stand.highstand();
        String key = "highstand / " + row.source() + " / " + row.stage() + " / " + row.ageKa();
        double[] rowLevel = shared.values(key + " / level", row.level());
        double offsetMetres = row.takesOffset() ? stand.shared().offsetSigmaMetres() : 0;
        double factorMetres = row.takesInterstadialFactor() ? stand.shared().interstadialSigmaMetres() : 0;
        double sharedAgeKa = row.takesCurveAgeError() ? stand.shared().sharedAgeSigmaKa() : 0;
        double ownAgeKa = row.ownAgeSigmaKa(stand.shared());
        double allAgeKa = Math.hypot(sharedAgeKa, ownAgeKa);
        double[] local = shared.deviates("local / " + coast + " / " + row.stage(), row.localOffsetSigmaMetres());
        double[] offset = shared.deviates("sea level / offset", offsetMetres);
        double[] factor = shared.deviates("sea level / interstadials", factorMetres);
        double[] curveAge = shared.deviates("sea level / curve age", sharedAgeKa);
        double[] ownAge = shared.deviates(key + " / age", ownAgeKa);
        double[] ageDeviates = new double[N];
        for (int i = 0; i < N; i++) {
            if (chosen[i] == index) {
                drawn.valid[i] = true;
                drawn.seaLevelMetres[i] = rowLevel[i]
                        + row.localOffsetSigmaMetres() * local[i]
                        + offsetMetres * offset[i]
                        + factorMetres * factor[i];
                ageDeviates[i] = allAgeKa == 0 ? 0 : (sharedAgeKa * curveAge[i] + ownAgeKa * ownAge[i]) / allAgeKa;
            }
        }
        toValues(stand.ageKa(), ageDeviates);
        for (int i = 0; i < N; i++) {
            if (chosen[i] == index) {
                drawn.ageKa[i] = ageDeviates[i];
            }
        }
    }

    /** From standard normal deviates to values of a number, in place: its own marginal, another's dependence. */
    private static void toValues(Uncertain number, double[] column) {
        if (number instanceof Normal normal) {
            for (int i = 0; i < N; i++) {
                column[i] = normal.mean() + normal.sigma() * column[i];
            }
        } else if (number.isExact()) {
            Arrays.fill(column, number.mean());
        } else {
            for (int i = 0; i < N; i++) {
                double probability = StandardNormal.quickCumulativeProbability(column[i]);
                column[i] = Math.min(Math.max(probability, Double.MIN_NORMAL), 1 - 0x1p-53);
            }
            number.toQuantiles(column);
        }
    }

    private void addLowering(Entry entry, int block, Drawn drawn) {
        Uncertain lowering = entry.loweringMetresPerKyr();
        if (lowering.isExact() && lowering.mean() == 0) {
            return;
        }
        double[] rates = column(own(entry, "lowering"), block);
        lowering.toQuantiles(rates);
        for (int i = 0; i < N; i++) {
            drawn.heightMetres[i] += rates[i] * drawn.ageKa[i];
        }
    }

    /** A curve to be read at the drawn ages of one level. */
    private static final class CurveRead {
        final SeaAtLevel.OnCurve sea;
        final Drawn drawn;
        final double[] agesKa;

        CurveRead(SeaAtLevel.OnCurve sea, Drawn drawn, double[] ageProbabilities) {
            this.sea = sea;
            this.drawn = drawn;
            this.agesKa = ageProbabilities;
            sea.ageKa().toQuantiles(agesKa);
        }
    }

    private void readCurves(List<CurveRead> reads, Shared shared, int block) {
        Map<String, List<CurveRead>> byCurve = new LinkedHashMap<>();
        for (CurveRead read : reads) {
            byCurve.computeIfAbsent(read.sea.curve().id(), id -> new ArrayList<>())
                    .add(read);
        }
        byCurve.forEach((id, ofCurve) -> readCurve(ofCurve, shared, block));
    }

    private void readCurve(List<CurveRead> reads, Shared shared, int block) {
        SeaLevelCurve curve = reads.get(0).sea.curve();
        double[] curveAge = shared.deviates("sea level / curve age");
        double[] offset = shared.deviates("sea level / offset");
        CurveErrorPath path = new CurveErrorPath(
                curve.facts().correlationTimeKa(), streams.stream("curve / " + curve.id() + " / error", block));
        double[] readAt = new double[reads.size()];
        double[] deviates = new double[reads.size()];
        double[] levels = new double[reads.size()];
        for (int i = 0; i < N; i++) {
            for (int r = 0; r < readAt.length; r++) {
                CurveRead read = reads.get(r);
                double ageKa = read.agesKa[i] + read.sea.curveAgeSigmaKa() * curveAge[i];
                read.drawn.valid[i] = ageKa >= curve.fromKa() && ageKa <= curve.toKa();
                readAt[r] = Math.min(Math.max(ageKa, curve.fromKa()), curve.toKa());
            }
            path.drawAt(readAt, deviates);
            curve.readAt(readAt, deviates, levels);
            for (int r = 0; r < readAt.length; r++) {
                CurveRead read = reads.get(r);
                read.drawn.ageKa[i] = read.agesKa[i];
                read.drawn.seaLevelMetres[i] = levels[r] + read.sea.sharedSigmaMetres() * offset[i];
            }
        }
    }

    /** Columns of one block that more than one level may ask for: each is drawn once. */
    private final class Shared {
        private final int block;
        private final double[] zeros = new double[N];
        private final Map<String, double[]> values = new HashMap<>();
        private final Map<String, double[]> deviates = new HashMap<>();

        Shared(int block) {
            this.block = block;
        }

        double[] values(String key, Uncertain number) {
            return values.computeIfAbsent(key, k -> {
                double[] drawn = column(k, block);
                number.toQuantiles(drawn);
                return drawn;
            });
        }

        /** Standard normal numbers, or zeros where they would be multiplied by 0 anyway. */
        double[] deviates(String key, double sigma) {
            return sigma == 0 ? zeros : deviates(key);
        }

        double[] deviates(String key) {
            return deviates.computeIfAbsent(key, k -> {
                double[] values = column(k, block);
                StandardNormal.toQuantiles(values);
                return values;
            });
        }
    }
}
