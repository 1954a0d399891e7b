package stillstand.sensitivity;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import stillstand.shoreline.HeightTerm;
import stillstand.shoreline.HeightTerm.Source;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;
import stillstand.uplift.SeaAtLevel;

/**
 * The uncertain inputs of one level's rate under one explanation, none lumped with another, and the rate as a function of them:
 * {@code U = (z - e) / t + w} as in {@link stillstand.uplift.LevelRates}.
 */
final class LevelInputs {
    /** Name of the input that is the level's age. */
    static final String AGE = "age";

    private static final Normal STANDARD = new Normal(0, 1);

    /** What an input does to the rate. */
    private enum Role {
        HEIGHT,
        DEPTH_OF_SEA,
        SEA_LEVEL,
        LOWERING,
        AGE,
        CURVE_AGE,
        CURVE_BAND
    }

    /**
     * One input.
     *
     * @param name in plain words
     * @param unit of its values
     * @param value its distribution
     */
    record Input(String name, String unit, Uncertain value) {}

    private record Term(Role role, Uncertain value, int input) {}

    private final SeaAtLevel sea;
    private final List<Input> inputs = new ArrayList<>();
    private final List<Term> terms = new ArrayList<>();

    /**
     * @param height terms of the height of the former sea, without lowering
     * @param loweringMetresPerKyr rate at which the surface was lowered
     * @param sea when and where the sea stood
     */
    LevelInputs(List<HeightTerm> height, Uncertain loweringMetresPerKyr, SeaAtLevel sea) {
        this.sea = sea;
        for (HeightTerm term : height) {
            add(term.sign() > 0 ? Role.HEIGHT : Role.DEPTH_OF_SEA, name(term.source()), "m", term.metres());
        }
        add(Role.AGE, AGE, "ka", sea.ageKa());
        if (sea instanceof SeaAtLevel.AtHighstand stand) {
            add(Role.SEA_LEVEL, "highstand level", "m", stand.seaLevelMetres());
            addSpread(
                    "shared offset",
                    stand.highstand().takesOffset() ? stand.shared().offsetSigmaMetres() : 0);
            addSpread(
                    "interstadial factor",
                    stand.highstand().takesInterstadialFactor() ? stand.shared().interstadialSigmaMetres() : 0);
            addSpread("local sea level", stand.highstand().localOffsetSigmaMetres());
        } else if (sea instanceof SeaAtLevel.OnCurve read) {
            add(Role.CURVE_BAND, "curve band", "sigma", STANDARD);
            if (read.curveAgeSigmaKa() > 0) {
                add(Role.CURVE_AGE, "curve ages", "ka", new Normal(0, read.curveAgeSigmaKa()));
            }
            addSpread("curve offset", read.sharedSigmaMetres());
        }
        add(Role.LOWERING, "surface lowering", "m/kyr", loweringMetresPerKyr);
    }

    private void addSpread(String name, double sigmaMetres) {
        if (sigmaMetres > 0) {
            add(Role.SEA_LEVEL, name, "m", new Normal(0, sigmaMetres));
        }
    }

    private void add(Role role, String name, String unit, Uncertain value) {
        boolean exact = value.isExact();
        terms.add(new Term(role, value, exact ? -1 : inputs.size()));
        if (!exact) {
            inputs.add(new Input(name, unit, value));
        }
    }

    /** What a term of a height is called. */
    static String name(Source source) {
        return switch (source) {
            case SURVEY -> "survey";
            case PALAEODEPTH -> "depth of growth";
            case COSEISMIC_STEP -> "co-seismic step";
            default -> source.name().toLowerCase(Locale.ROOT).replace('_', ' ');
        };
    }

    /** The inputs that have a spread. */
    List<Input> inputs() {
        return List.copyOf(inputs);
    }

    /** Place of an input among them by its name; -1 where it has no spread. */
    int place(String name) {
        for (int i = 0; i < inputs.size(); i++) {
            if (inputs.get(i).name().equals(name)) {
                return i;
            }
        }
        return -1;
    }

    /** Median of every input. */
    double[] medians() {
        return inputs.stream().mapToDouble(input -> input.value().quantile(0.5)).toArray();
    }

    /**
     * The rate, m/kyr.
     *
     * @param values one for each input
     * @return NaN where the age lies beyond the curve, for whoever draws to leave out; a curve is never extrapolated
     */
    double rateMetresPerKyr(double[] values) {
        double height = 0;
        double seaLevel = 0;
        double ageKa = 0;
        double lowering = 0;
        double curveAgeKa = 0;
        double band = 0;
        for (Term term : terms) {
            double value = term.input() < 0 ? term.value().mean() : values[term.input()];
            switch (term.role()) {
                case HEIGHT -> height += value;
                case DEPTH_OF_SEA -> height -= value;
                case SEA_LEVEL -> seaLevel += value;
                case AGE -> ageKa = value;
                case LOWERING -> lowering = value;
                case CURVE_AGE -> curveAgeKa = value;
                case CURVE_BAND -> band = value;
            }
        }
        if (sea instanceof SeaAtLevel.OnCurve read) {
            double readAtKa = ageKa + curveAgeKa;
            if (!read.curve().covers(readAtKa)) {
                return Double.NaN;
            }
            double sigma = band < 0
                    ? read.curve().sigmaLowMetresAt(readAtKa)
                    : read.curve().sigmaHighMetresAt(readAtKa);
            seaLevel += read.curve().levelMetresAt(readAtKa) + band * sigma;
        }
        return (height - seaLevel) / ageKa + lowering;
    }
}
