package stillstand.study;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.ledger.InputProblem;
import stillstand.ledger.Loaded;
import stillstand.uncertainty.Tabulated;
import stillstand.uncertainty.Uncertain;

/** A calibrated age: {@code age_ka} and {@code density} on any scale, linear between rows and 0 outside them. */
public final class AgeTable {
    private static final Columns COLUMNS =
            new Columns(List.of(Column.plain("age_ka"), Column.plain("density")), List.of("age_ka", "density"));

    private AgeTable() {}

    /** The age of a table, in the table's own count of years. */
    public static Loaded<Uncertain> read(Table table) {
        Findings findings = new Findings();
        List<Tabulated.Point> points = new ArrayList<>();
        boolean anyDensity = false;
        String last = "";
        for (RowReader row : RowReader.rowsOf(table, COLUMNS, findings)) {
            row.requiredText("age_ka", "an age");
            row.requiredText("density", "a density");
            Optional<Double> age = row.length("age_ka");
            Optional<Double> density = row.length("density");
            if (age.isEmpty() || density.isEmpty()) {
                continue;
            }
            if (!points.isEmpty() && !(age.get() > points.get(points.size() - 1).value())) {
                row.problem("age_ka", quote(row.text("age_ka")) + " after " + quote(last), "ages that increase");
            }
            anyDensity |= density.get() > 0;
            last = row.text("age_ka");
            points.add(new Tabulated.Point(age.get(), density.get()));
        }
        if (table.rows().size() < 2) {
            int rows = table.rows().size();
            findings.add(new InputProblem(
                    table.name(), 0, 0, "", rows == 1 ? "1 row" : "no row", "an age of at least 2 rows"));
        } else if (findings.problemCount() == 0 && !anyDensity) {
            findings.add(InputProblem.ofFile(table.name(), "no density above 0", "one somewhere"));
        }
        return findings.problemCount() > 0 ? Loaded.failed(findings.problems()) : Loaded.of(Tabulated.of(points));
    }
}
