package stillstand.study;

import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import stillstand.dating.DatingMethodTable;
import stillstand.sealevel.HighstandTable;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.StageTable;
import stillstand.shoreline.HabitatTable;
import stillstand.shoreline.IndicatorTable;

/**
 * What a study may name: the tool's own curves and tables, and after reading a study the user's beside them. Handed in by
 * {@code files}.
 *
 * @param stages that curves are searched for
 * @param curves each id once
 * @param highstands tables of highstands, each id once
 * @param indicators landforms and deposits, and their usual meaning
 * @param habitats taxa, and their depths of growth
 * @param methods of dating
 */
public record Library(
        StageTable stages,
        List<SeaLevelCurve> curves,
        List<HighstandRows> highstands,
        IndicatorTable indicators,
        HabitatTable habitats,
        DatingMethodTable methods) {
    public Library {
        curves = List.copyOf(curves);
        highstands = List.copyOf(highstands);
    }

    /** The curve of an id. */
    public Optional<SeaLevelCurve> curve(String id) {
        return curves.stream().filter(curve -> curve.id().equals(id)).findFirst();
    }

    /** The highstand table of an id. */
    public Optional<HighstandRows> highstands(String id) {
        return highstands.stream().filter(table -> table.id().equals(id)).findFirst();
    }

    /** The same with a user's own curves and tables beside its own. */
    public Library with(List<SeaLevelCurve> moreCurves, List<HighstandRows> moreHighstands) {
        return new Library(
                stages,
                Stream.concat(curves.stream(), moreCurves.stream()).toList(),
                Stream.concat(highstands.stream(), moreHighstands.stream()).toList(),
                indicators,
                habitats,
                methods);
    }

    /**
     * Every curve that shows highstands, twice: its picks replaced as the study says, and its own picks alone.
     */
    public List<StudySettings.WeightedCurve> everyCurve() {
        return curves.stream()
                .filter(curve -> HighstandTable.canComeFrom(curve, stages))
                .flatMap(curve -> Stream.of(
                        new StudySettings.WeightedCurve(curve.id(), 1),
                        new StudySettings.WeightedCurve(
                                curve.id(), 1, Optional.of(StudySettings.WeightedCurve.NO_OVERRIDES))))
                .toList();
    }

    /** Ids of all curves. */
    public List<String> curveIds() {
        return curves.stream().map(SeaLevelCurve::id).toList();
    }

    /** Ids of all highstand tables. */
    public List<String> highstandIds() {
        return highstands.stream().map(HighstandRows::id).toList();
    }
}
