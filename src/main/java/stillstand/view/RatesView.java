package stillstand.view;

import atlantafx.base.theme.Styles;
import java.util.function.ToDoubleFunction;
import javafx.collections.ListChangeListener;
import javafx.geometry.Insets;
import javafx.geometry.Pos;
import javafx.scene.control.ChoiceBox;
import javafx.scene.control.Label;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.HBox;
import stillstand.uplift.Rate;
import stillstand.view.RatesModel.Row;

/** All rates in a table that sorts by any column, each with its density on one shared axis. */
public final class RatesView extends BorderPane {
    private static final String ALL = "all sites";
    private static final double LEAST_STRIP = 130;

    private final RatesModel model;
    private final ResultTable<Row> table =
            new ResultTable<>("rates-table", "Rates of levels and flights", "No rates yet: run the study.");
    private final ChoiceBox<String> site = new ChoiceBox<>();
    private final Label status = new Label();
    private final Label staleMark = new Label("OLDER THAN THE STUDY");
    private boolean following;

    /** The view of a model. */
    public RatesView(RatesModel model) {
        this.model = model;
        columns();
        table.setItems(model.rows());
        table.copiesAs(RatesModel::text);
        table.setRowFactory(made -> new BoldRow<>(row -> row.kind() == RatesModel.Kind.FLIGHT));
        setTop(bar());
        setCenter(table);
        BorderPane.setMargin(table, new Insets(0, 12, 12, 12));
        model.rows().addListener((ListChangeListener<Row>) change -> follow());
        model.sites().addListener((ListChangeListener<String>) change -> followSites());
        followSites();
        follow();
    }

    private HBox bar() {
        site.setId("rates-site");
        site.setAccessibleText("Site");
        site.getSelectionModel().selectedItemProperty().addListener((property, before, now) -> {
            if (now != null && !following) {
                model.choose(now.equals(ALL) ? "" : now);
            }
        });
        status.setWrapText(true);
        status.setId("rates-status");
        staleMark.getStyleClass().addAll(Styles.TEXT_SMALL, Styles.WARNING, Styles.TEXT_BOLD);
        staleMark.setMinWidth(USE_PREF_SIZE);
        Label name = new Label("Site");
        name.setLabelFor(site);
        HBox bar = new HBox(10, name, site, staleMark, status);
        bar.setAlignment(Pos.CENTER_LEFT);
        bar.setPadding(new Insets(10, 12, 10, 12));
        return bar;
    }

    private void followSites() {
        following = true;
        site.getItems().setAll(ALL);
        site.getItems().addAll(model.sites());
        site.setValue(model.chosen().orElse(ALL));
        following = false;
    }

    private void follow() {
        status.setText(model.status());
        staleMark.setVisible(model.isStale());
        staleMark.setManaged(model.isStale());
    }

    private void columns() {
        table.words("Site", Row::site, 126);
        table.words("Rate of", Row::name, 98);
        table.words("Kind", row -> row.kind().toString(), 84);
        table.wrapped("Bound, or why none", Row::says, 194);
        table.number("Median", Row::median, row -> by(row, Rate::median), 114);
        table.number(
                "68 %",
                Row::interval68, row -> by(row, rate -> rate.shortest68().low()), 114);
        table.number(
                "95 %",
                Row::interval95, row -> by(row, rate -> rate.shortest95().low()), 114);
        table.strip(
                "Density, metres per thousand years",
                LEAST_STRIP,
                model.axisProperty(),
                row -> by(row, rate -> rate.shortest95().width()),
                row -> row.rate()
                        .map(rate -> row.median() + ", 95 % " + row.interval95())
                        .orElse("no rate"),
                (g, row, scale, palette) -> row.rate().ifPresent(rate -> RateStroke.paint(g, rate, scale, palette)));
        table.words("Highstand", Row::stages, 126);
        table.number(
                "Age (ka)",
                Row::ageText,
                row -> row.age().map(age -> age.median()).orElse(Double.POSITIVE_INFINITY),
                118);
    }

    /** What has no rate comes last. */
    private static double by(Row row, ToDoubleFunction<Rate> key) {
        return row.rate().map(key::applyAsDouble).orElse(Double.POSITIVE_INFINITY);
    }
}
