package stillstand.uplift;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.stream.IntStream;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.shoreline.HeightTerm;
import stillstand.shoreline.HeightTerm.Source;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;

/**
 * The rate of one level as a function of columns of probabilities: {@code U = (z - e) / t + w}, with {@code z} the height
 * of the former sea above present mean sea level (m), {@code e} where the sea stood then (m), {@code t} the age (ka) and
 * {@code w} the rate at which the surface was lowered (m/kyr). Where a curve is read at the age, {@code e} and {@code t} go
 * together.
 *
 * <p>An input without spread takes no column; normal terms of the elevation group share one, as a sum of normal numbers is
 * normal.
 */
final class RateColumns {
    /** What an input does to the rate. */
    private enum Role {
        HEIGHT,
        LOWERING,
        AGE,
        SEA_LEVEL,
        CURVE_AGE,
        CURVE_BAND
    }

    private record Input(InputGroup group, Role role, int sign, Uncertain value) {}

    private static final Normal STANDARD = new Normal(0, 1);

    private final List<Input> inputs = new ArrayList<>();
    private double exactHeightMetres;
    private double exactSeaLevelMetres;
    private double exactLoweringMetresPerKyr;
    private double exactAgeKa;
    private final List<SeaLevelCurve> curve;

    /**
     * @param height terms of the height of the former sea, without lowering
     * @param loweringMetresPerKyr rate at which the surface was lowered
     * @param sea when and where the sea stood
     */
    RateColumns(List<HeightTerm> height, Uncertain loweringMetresPerKyr, SeaAtLevel sea) {
        addHeight(height);
        if (loweringMetresPerKyr.isExact()) {
            exactLoweringMetresPerKyr = loweringMetresPerKyr.mean();
        } else {
            inputs.add(new Input(InputGroup.SURFACE_LOWERING, Role.LOWERING, 1, loweringMetresPerKyr));
        }
        if (sea.ageKa().isExact()) {
            exactAgeKa = sea.ageKa().mean();
        } else {
            inputs.add(new Input(InputGroup.AGE, Role.AGE, 1, sea.ageKa()));
        }
        if (sea instanceof SeaAtLevel.OnCurve read) {
            curve = List.of(read.curve());
            inputs.add(new Input(InputGroup.SEA_LEVEL, Role.CURVE_BAND, 1, STANDARD));
            if (read.curveAgeSigmaKa() > 0) {
                inputs.add(new Input(InputGroup.SEA_LEVEL, Role.CURVE_AGE, 1, new Normal(0, read.curveAgeSigmaKa())));
            }
            addShared(read.sharedSigmaMetres());
        } else if (sea instanceof SeaAtLevel.AtHighstand stand) {
            curve = List.of();
            addHighstand(stand);
        } else {
            throw new IllegalArgumentException("unknown explanation of a level: " + sea);
        }
    }

    /**
     * The same rate from fewer columns, for whom only rate and age matter: normal terms of height and sea level are joined into
     * one number, the uplift since. The columns of heights and sea levels then mean nothing by themselves, and no input belongs to
     * one group.
     */
    static RateColumns joined(List<HeightTerm> height, Uncertain loweringMetresPerKyr, SeaAtLevel sea) {
        RateColumns columns = new RateColumns(height, loweringMetresPerKyr, sea);
        columns.joinNormals();
        return columns;
    }

    private void joinNormals() {
        double meanMetres = 0;
        double variance = 0;
        List<Input> others = new ArrayList<>();
        for (Input input : inputs) {
            boolean isUplift = input.role() == Role.HEIGHT || input.role() == Role.SEA_LEVEL;
            if (isUplift && input.value() instanceof Normal normal) {
                int sign = input.role() == Role.SEA_LEVEL ? -1 : input.sign();
                meanMetres += sign * normal.mean();
                variance += normal.sigma() * normal.sigma();
            } else {
                others.add(input);
            }
        }
        if (variance > 0) {
            inputs.clear();
            inputs.add(new Input(InputGroup.ELEVATION, Role.HEIGHT, 1, new Normal(meanMetres, Math.sqrt(variance))));
            inputs.addAll(others);
        }
    }

    private void addHeight(List<HeightTerm> height) {
        double normalMeanMetres = 0;
        double normalVariance = 0;
        for (HeightTerm term : height) {
            InputGroup group = term.source() == Source.PALAEODEPTH ? InputGroup.PALAEODEPTH : InputGroup.ELEVATION;
            Uncertain value = term.metres();
            if (value.isExact()) {
                exactHeightMetres += term.meanMetres();
            } else if (value instanceof Normal normal && group == InputGroup.ELEVATION) {
                normalMeanMetres += term.meanMetres();
                normalVariance += normal.sigma() * normal.sigma();
            } else {
                inputs.add(new Input(group, Role.HEIGHT, term.sign(), value));
            }
        }
        if (normalVariance > 0) {
            Normal sum = new Normal(normalMeanMetres, Math.sqrt(normalVariance));
            inputs.add(new Input(InputGroup.ELEVATION, Role.HEIGHT, 1, sum));
        }
    }

    private void addHighstand(SeaAtLevel.AtHighstand stand) {
        Uncertain level = stand.seaLevelMetres();
        if (level instanceof Normal normal) {
            double sigmaMetres = Math.hypot(normal.sigma(), stand.sharedSigmaMetres());
            inputs.add(new Input(InputGroup.SEA_LEVEL, Role.SEA_LEVEL, 1, new Normal(normal.mean(), sigmaMetres)));
            return;
        }
        if (level instanceof Exact exact) {
            exactSeaLevelMetres = exact.value();
        } else {
            inputs.add(new Input(InputGroup.SEA_LEVEL, Role.SEA_LEVEL, 1, level));
        }
        addShared(stand.sharedSigmaMetres());
    }

    private void addShared(double sigmaMetres) {
        if (sigmaMetres > 0) {
            inputs.add(new Input(InputGroup.SEA_LEVEL, Role.SEA_LEVEL, 1, new Normal(0, sigmaMetres)));
        }
    }

    /** How many columns of probabilities the rate needs; may be 0. */
    int dimensions() {
        return inputs.size();
    }

    /** The group of the input that takes this column. */
    InputGroup group(int dimension) {
        return inputs.get(dimension).group();
    }

    /** The columns of a group, in order. */
    int[] dimensionsOf(InputGroup group) {
        return IntStream.range(0, inputs.size()).filter(d -> group(d) == group).toArray();
    }

    /**
     * Rates for columns of probabilities.
     *
     * @param probabilities one column an input, strictly between 0 and 1; overwritten
     * @param out receives rates, heights and ages; its columns are as long as the probabilities'
     */
    void evaluate(double[][] probabilities, Columns out) {
        for (int d = 0; d < inputs.size(); d++) {
            toValues(d, probabilities[d]);
        }
        combine(probabilities, out);
    }

    /** Turns the probabilities of one input into its values, in place. */
    void toValues(int dimension, double[] probabilities) {
        inputs.get(dimension).value().toQuantiles(probabilities);
    }

    /**
     * Rates for columns of values.
     *
     * @param values one column an input; not changed
     * @param out receives rates, heights and ages; its columns are as long as the values'
     */
    void combine(double[][] values, Columns out) {
        Arrays.fill(out.heightMetres, exactHeightMetres);
        Arrays.fill(out.seaLevelMetres, exactSeaLevelMetres);
        Arrays.fill(out.ageKa, exactAgeKa);
        double[] lowering = new double[0];
        double[] band = new double[0];
        double[] curveAge = new double[0];
        for (int d = 0; d < inputs.size(); d++) {
            Input input = inputs.get(d);
            double[] column = values[d];
            switch (input.role()) {
                case HEIGHT -> add(input.sign(), column, out.heightMetres);
                case SEA_LEVEL -> add(1, column, out.seaLevelMetres);
                case AGE -> System.arraycopy(column, 0, out.ageKa, 0, column.length);
                case LOWERING -> lowering = column;
                case CURVE_BAND -> band = column;
                case CURVE_AGE -> curveAge = column;
            }
        }
        out.allValid = true;
        for (SeaLevelCurve read : curve) {
            addCurve(read, band, curveAge, out);
        }
        divide(out);
        addLowering(lowering, out);
    }

    private static void add(int sign, double[] column, double[] sum) {
        if (sign > 0) {
            for (int i = 0; i < sum.length; i++) {
                sum[i] += column[i];
            }
        } else {
            for (int i = 0; i < sum.length; i++) {
                sum[i] -= column[i];
            }
        }
    }

    /** Adds the curve at each age. Where the age lies beyond the curve the draw counts for nothing. */
    private static void addCurve(SeaLevelCurve curve, double[] band, double[] curveAge, Columns out) {
        double fromKa = curve.fromKa();
        double toKa = curve.toKa();
        double[] readAt = out.rateMetresPerKyr;
        for (int i = 0; i < readAt.length; i++) {
            double ageKa = out.ageKa[i] + (curveAge.length == 0 ? 0 : curveAge[i]);
            boolean inside = ageKa >= fromKa && ageKa <= toKa;
            out.valid[i] = inside ? 1 : 0;
            out.allValid &= inside;
            readAt[i] = Math.min(Math.max(ageKa, fromKa), toKa);
        }
        curve.readAt(readAt, band, readAt);
        add(1, readAt, out.seaLevelMetres);
    }

    private static void divide(Columns out) {
        double[] rate = out.rateMetresPerKyr;
        double[] height = out.heightMetres;
        double[] sea = out.seaLevelMetres;
        double[] age = out.ageKa;
        for (int i = 0; i < rate.length; i++) {
            rate[i] = (height[i] - sea[i]) / age[i];
        }
    }

    private void addLowering(double[] lowering, Columns out) {
        if (lowering.length == 0 && exactLoweringMetresPerKyr == 0) {
            return;
        }
        for (int i = 0; i < out.rateMetresPerKyr.length; i++) {
            double w = lowering.length == 0 ? exactLoweringMetresPerKyr : lowering[i];
            out.rateMetresPerKyr[i] += w;
            out.heightMetres[i] += w * out.ageKa[i];
        }
    }

    /** Columns that an evaluation fills; reused from block to block. */
    static final class Columns {
        /** Rate of vertical motion, m/kyr, uplift positive. */
        final double[] rateMetresPerKyr;
        /** Height of the former sea above present mean sea level, lowering made good, m. */
        final double[] heightMetres;
        /** Where the sea stood when the level formed, above its present mean, m. */
        final double[] seaLevelMetres;
        /** Age of the level, ka. */
        final double[] ageKa;
        /** 1 where the draw counts, 0 where its age lies beyond the curve; meaningful unless {@link #allValid}. */
        final double[] valid;
        /** Whether every draw counts. */
        boolean allValid;

        Columns(int length) {
            rateMetresPerKyr = new double[length];
            heightMetres = new double[length];
            seaLevelMetres = new double[length];
            ageKa = new double[length];
            valid = new double[length];
        }
    }
}
