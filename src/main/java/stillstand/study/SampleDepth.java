package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.List;
import java.util.Optional;
import stillstand.shoreline.DepthHabitat;
import stillstand.shoreline.DepthText;
import stillstand.shoreline.FaciesCap;
import stillstand.shoreline.HabitatTable;
import stillstand.uncertainty.Uncertain;

/** The columns that give the depth in which a sample grew: its taxon, an override, and a cap by the facies round it. */
final class SampleDepth {
    static final List<Column> COLUMNS =
            List.of(Column.plain("taxon"), Column.plain("depth_habitat"), Column.plain("depth_max_m"));

    private SampleDepth() {}

    /** Depth below mean sea level, down positive; absent where nothing is known of it. */
    static Optional<Uncertain> read(RowReader row, String where, HabitatTable habitats) {
        Optional<DepthHabitat> taxon =
                row.known("taxon", habitats::ids, "the id of a taxon").flatMap(habitats::find);
        Optional<Uncertain> depth =
                row.text("depth_habitat").isEmpty() ? usual(row, taxon) : stated(row, where, habitats);
        Optional<Double> cap = row.number("depth_max_m").filter(metres -> {
            if (!(metres > 0)) {
                row.problem("depth_max_m", quote(row.text("depth_max_m")), "a depth above 0");
            }
            return metres > 0;
        });
        if (cap.isEmpty()) {
            return depth;
        }
        if (depth.isEmpty()) {
            if (row.isGood()) {
                row.problem(
                        "depth_max_m",
                        quote(row.text("depth_max_m")) + " without a depth of growth",
                        "a taxon whose depths are known, or depth_habitat, beside it");
            }
            return depth;
        }
        Optional<Uncertain> capped = FaciesCap.apply(depth.get(), cap.get());
        if (capped.isEmpty()) {
            row.problem(
                    "depth_max_m",
                    quote(row.text("depth_max_m")) + ", where next to none of its kind grow",
                    "a cap that leaves some of the depths of growth");
        }
        return capped;
    }

    private static Optional<Uncertain> usual(RowReader row, Optional<DepthHabitat> taxon) {
        Optional<Uncertain> depth = taxon.flatMap(DepthHabitat::depthMetres);
        if (depth.isPresent()) {
            row.assume(
                    "depth of growth of " + row.text("taxon"),
                    "as compiled",
                    taxon.map(DepthHabitat::source).orElse(""),
                    "all");
        }
        return depth;
    }

    private static Optional<Uncertain> stated(RowReader row, String where, HabitatTable habitats) {
        String text = row.text("depth_habitat");
        DepthText read = DepthText.read(text, habitats);
        if (read instanceof DepthText.Understood understood) {
            row.assume("depth of growth", text, understood.source(), where);
            return Optional.of(understood.depthMetres());
        }
        if (read instanceof DepthText.Refused refused) {
            row.problem("depth_habitat", quote(text), refused.expected());
        }
        return Optional.empty();
    }
}
