package stillstand.shoreline;

import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Normal;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

/** How an indicative range becomes an error of sea level. */
public enum IndicativeRule {
    /** Half the range as one standard deviation, in quadrature (the practice of Rovere et al. 2023, ESSD 15, 1-23). */
    QUADRATURE("quadrature") {
        @Override
        Uncertain spread(double rangeMetres) {
            return new Normal(0, rangeMetres / 2);
        }
    },
    /** Sea level anywhere in the range with equal probability. */
    UNIFORM("uniform") {
        @Override
        Uncertain spread(double rangeMetres) {
            return new Uniform(-rangeMetres / 2, rangeMetres / 2);
        }
    };

    private final String id;

    IndicativeRule(String id) {
        this.id = id;
    }

    /** The word in {@code study.json}. */
    public String id() {
        return id;
    }

    abstract Uncertain spread(double rangeMetres);

    /**
     * Error of sea level that a range stands for, about 0.
     *
     * @param rangeMetres indicative range, 0 or more
     */
    public Uncertain errorMetres(double rangeMetres) {
        return rangeMetres == 0 ? new Exact(0) : spread(rangeMetres);
    }
}
