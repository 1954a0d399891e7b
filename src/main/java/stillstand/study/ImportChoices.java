package stillstand.study;

import java.util.List;
import java.util.Optional;

/**
 * What a user says of an archived table of a curve; what is absent is to be seen in the table, or asked for.
 *
 * @param ageColumn header, or number of the column from 1
 * @param levelColumn header, or number of the column from 1
 * @param spreadColumns headers or numbers: one of a standard deviation, or two of bounds
 * @param ageUnit of the ages
 * @param levelIsUp whether the level counts upward
 * @param spread what the spread columns hold
 * @param meansOfRepeatedAges whether rows of one age are replaced by their mean
 */
public record ImportChoices(
        Optional<String> ageColumn,
        Optional<String> levelColumn,
        List<String> spreadColumns,
        Optional<AgeUnit> ageUnit,
        Optional<Boolean> levelIsUp,
        Optional<SpreadKind> spread,
        boolean meansOfRepeatedAges) {
    /** Nothing said: all to be seen in the table. */
    public static final ImportChoices NONE = new ImportChoices(
            Optional.empty(), Optional.empty(), List.of(), Optional.empty(), Optional.empty(), Optional.empty(), false);

    public ImportChoices {
        spreadColumns = List.copyOf(spreadColumns);
    }

    /** Units of age. */
    public enum AgeUnit {
        KA,
        YEARS,
        /** Thousand years, the past negative. */
        NEGATIVE_KA
    }

    /** What a spread may be. */
    public enum SpreadKind {
        ONE_SIGMA,
        TWO_SIGMA,
        /** Of the central 95 %, in metres as the level itself. */
        BOUNDS,
        /** None that can be used, whatever columns there are. */
        NONE
    }
}
