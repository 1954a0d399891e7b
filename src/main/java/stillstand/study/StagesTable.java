package stillstand.study;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.ledger.Loaded;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.Stage;
import stillstand.sealevel.StageTable;

/** The check of the table of stages that ships with the tool. */
public final class StagesTable {
    private static final Columns COLUMNS = new Columns(
            List.of(
                    Column.plain("stage"),
                    Column.plain("also_called"),
                    Column.plain("from_ka"),
                    Column.plain("to_ka"),
                    Column.plain("class"),
                    Column.plain("duration_ka"),
                    Column.plain("exists_probability"),
                    Column.plain("note")),
            List.of("stage", "from_ka", "to_ka", "class", "duration_ka", "exists_probability"));

    private StagesTable() {}

    /** Reads the stages, young to old. */
    public static Loaded<StageTable> read(Table table) {
        Findings findings = new Findings();
        Map<String, HighstandClass> words = new LinkedHashMap<>();
        for (HighstandClass each : HighstandClass.values()) {
            words.put(each.word(), each);
        }
        List<Stage> stages = new ArrayList<>();
        for (RowReader reader : RowReader.rowsOf(table, COLUMNS, findings)) {
            String label = reader.requiredText("stage", "a label");
            Optional<Double> from = reader.length("from_ka");
            Optional<Double> to = reader.length("to_ka");
            Optional<Double> duration = reader.length("duration_ka");
            Optional<Double> exists = reader.number("exists_probability", Double.MIN_VALUE, 1, "above 0 and at most 1");
            HighstandClass highstandClass = reader.word("class", words, HighstandClass.INTERGLACIAL);
            if (reader.isGood() && from.isPresent() && to.isPresent() && duration.isPresent() && exists.isPresent()) {
                stages.add(new Stage(
                        label,
                        reader.optionalText("also_called"),
                        from.get(),
                        to.get(),
                        highstandClass,
                        duration.get(),
                        exists.get()));
            }
        }
        return findings.problemCount() > 0
                ? new Loaded<>(Optional.empty(), findings.problems(), findings.warnings())
                : new Loaded<>(Optional.of(new StageTable(stages)), List.of(), findings.warnings());
    }
}
