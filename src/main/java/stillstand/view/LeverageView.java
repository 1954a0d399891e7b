package stillstand.view;

import atlantafx.base.theme.Styles;
import java.util.EnumMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.function.Function;
import javafx.beans.property.ReadOnlyObjectWrapper;
import javafx.beans.value.ObservableBooleanValue;
import javafx.geometry.Insets;
import javafx.geometry.Pos;
import javafx.scene.Node;
import javafx.scene.canvas.GraphicsContext;
import javafx.scene.control.Button;
import javafx.scene.control.CheckBox;
import javafx.scene.control.ChoiceBox;
import javafx.scene.control.Label;
import javafx.scene.control.ScrollPane;
import javafx.scene.control.SplitPane;
import javafx.scene.control.ToggleButton;
import javafx.scene.control.ToggleGroup;
import javafx.scene.control.Tooltip;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.FlowPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.StackPane;
import javafx.scene.layout.VBox;
import stillstand.report.LeverageReport;
import stillstand.report.Wording;
import stillstand.sensitivity.AssumptionSwitch;
import stillstand.sensitivity.LevelTornado;
import stillstand.sensitivity.NextMeasurement;
import stillstand.sensitivity.ShortRate;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;
import stillstand.uplift.FlightResult.Halving;
import stillstand.view.LeverageModel.Missing;
import stillstand.view.LeverageModel.Part;
import stillstand.view.LeveragePicture.CurveRow;
import stillstand.view.LeveragePicture.InputRow;
import stillstand.view.LeveragePicture.LeftOutRow;
import stillstand.view.ResultTable.Scale;

/** What the answers hang on: the sentences of the terminal on one side, one question at a time in numbers on the other. */
public final class LeverageView extends BorderPane {
    private static final double LEAST_STRIP = 150;
    private static final double HALVING_HEIGHT = 148;

    private final LeverageModel model;
    private final Ways ways;
    private final ChoiceBox<String> site = new ChoiceBox<>();
    private final ChoiceBox<String> rateOf = new ChoiceBox<>();
    private final Label staleMark = new Label("OLDER THAN THE STUDY");
    private final CheckBox ask = new CheckBox("Every run asks what to measure next");
    private final VBox words = new VBox(8);
    private final ToggleGroup parts = new ToggleGroup();
    private final Label note = new Label();
    private final StackPane place = new StackPane();
    private final ReadOnlyObjectWrapper<Interval> rateAxis = new ReadOnlyObjectWrapper<>(new Interval(-1, 1));
    private final ReadOnlyObjectWrapper<Interval> inputAxis = new ReadOnlyObjectWrapper<>(new Interval(-1, 1));
    private final ReadOnlyObjectWrapper<Interval> halvingAxis = new ReadOnlyObjectWrapper<>(new Interval(-1, 1));

    private final ResultTable<CurveRow> curves =
            new ResultTable<>("leverage-curves", "What each curve makes of each rate", "");
    private final ResultTable<Halving> halving =
            new ResultTable<>("leverage-halving", "What halving one kind of error would do to the flight", "");
    private final ResultTable<InputRow> inputs =
            new ResultTable<>("leverage-inputs", "What each input does to a rate by itself", "");
    private final ResultTable<NextMeasurement> next =
            new ResultTable<>("leverage-next", "Measurements, the most narrowing first", "");
    private final ResultTable<AssumptionSwitch> assumptions =
            new ResultTable<>("leverage-assumptions", "Assumptions switched", "");
    private final ResultTable<LeftOutRow> leftOut =
            new ResultTable<>("leverage-left-out", "Levels, samples and curves left out", "");
    private final VBox inputTables = new VBox(10, halving, inputs);
    private final Map<Part, Node> tables = new EnumMap<>(Map.of(
            Part.CURVES, curves,
            Part.INPUTS, inputTables,
            Part.NEXT, next,
            Part.ASSUMPTIONS, assumptions,
            Part.LEFT_OUT, leftOut));
    private Part part = Part.CURVES;
    private boolean following;

    /**
     * What helps where a part has nothing to show.
     *
     * @param askAndRun asks the study what to measure next and runs it
     * @param chooseCurves leads to where curves are chosen
     * @param cannotAsk true while nothing can be asked
     */
    public record Ways(Runnable askAndRun, Runnable chooseCurves, ObservableBooleanValue cannotAsk) {}

    /** The view of a model. */
    public LeverageView(LeverageModel model, Ways ways) {
        this.model = model;
        this.ways = ways;
        curveColumns();
        inputColumns();
        nextColumns();
        assumptionColumns();
        leftOutColumns();
        VBox.setVgrow(inputs, Priority.ALWAYS);
        setTop(bar());
        SplitPane split = new SplitPane(inWords(), inNumbers());
        split.setDividerPositions(0.29);
        setCenter(split);
        model.pictureProperty().addListener((property, before, now) -> follow(now));
        follow(model.pictureProperty().get());
    }

    private Region bar() {
        site.setId("leverage-site");
        site.setAccessibleText("Site");
        site.setMinWidth(190);
        rateOf.setId("leverage-rate-of");
        rateOf.setAccessibleText("Rate of");
        rateOf.setMinWidth(140);
        site.valueProperty().addListener((property, before, now) -> {
            if (now != null && !following) {
                model.choose(now, model.rateOf());
            }
        });
        rateOf.valueProperty().addListener((property, before, now) -> {
            if (now != null && !following) {
                model.choose(model.site(), now);
            }
        });
        staleMark.getStyleClass().addAll(Styles.TEXT_SMALL, Styles.WARNING, Styles.TEXT_BOLD);
        staleMark.setMinWidth(USE_PREF_SIZE);
        ask.setId("leverage-ask");
        ask.setMinWidth(USE_PREF_SIZE);
        ask.setTooltip(new Tooltip("Writes the key leverage into study.json: measurements ranked, assumptions switched,"
                + " samples left out. It takes longer than the rates themselves."));
        ask.setOnAction(event -> model.ask(ask.isSelected()));
        ask.disableProperty().bind(ways.cannotAsk());
        Region gap = new Region();
        HBox.setHgrow(gap, Priority.ALWAYS);
        HBox bar = new HBox(10, labelled("Site", site), site, labelled("Rate of", rateOf), rateOf, staleMark, gap, ask);
        bar.setAlignment(Pos.CENTER_LEFT);
        bar.setPadding(new Insets(10, 14, 10, 14));
        return bar;
    }

    private static Label labelled(String text, Node of) {
        Label label = new Label(text);
        label.setLabelFor(of);
        label.setMinWidth(USE_PREF_SIZE);
        return label;
    }

    private Region inWords() {
        words.setId("leverage-words");
        words.setPadding(new Insets(4, 12, 12, 14));
        ScrollPane scroll = new ScrollPane(words);
        scroll.setFitToWidth(true);
        scroll.setHbarPolicy(ScrollPane.ScrollBarPolicy.NEVER);
        scroll.setAccessibleText("What the answers hang on, in words");
        return scroll;
    }

    private Region inNumbers() {
        FlowPane switches = new FlowPane(4, 4);
        switches.getStyleClass().add("parts");
        for (Part each : Part.values()) {
            ToggleButton button = new ToggleButton(each.title());
            button.setId("leverage-" + each.name().toLowerCase(Locale.ROOT).replace('_', '-') + "-part");
            button.setToggleGroup(parts);
            button.setSelected(each == part);
            button.setOnAction(event -> {
                button.setSelected(true); // a part cannot be left without going to another
                part = each;
                showPart();
            });
            switches.getChildren().add(button);
        }
        note.setWrapText(true);
        note.setMinHeight(USE_PREF_SIZE);
        note.getStyleClass().add("quiet");
        note.setId("leverage-note");
        VBox box = new VBox(8, switches, note, place);
        box.setPadding(new Insets(4, 14, 12, 12));
        VBox.setVgrow(place, Priority.ALWAYS);
        return box;
    }

    private void follow(LeveragePicture now) {
        following = true;
        site.getItems().setAll(model.sites());
        site.setValue(model.site());
        rateOf.getItems().setAll(model.ratesOf());
        rateOf.setValue(model.rateOf());
        site.setDisable(model.sites().isEmpty());
        rateOf.setDisable(model.sites().isEmpty());
        ask.setSelected(now.asks());
        following = false;
        staleMark.setVisible(now.stale());
        staleMark.setManaged(now.stale());
        rateAxis.set(now.rateAxis());
        inputAxis.set(now.inputAxis());
        halvingAxis.set(now.halvingAxis());
        curves.getItems().setAll(now.curves());
        halving.getItems().setAll(now.halving());
        shown(halving, !now.halving().isEmpty());
        inputs.getItems().setAll(now.inputs());
        shown(inputs, !now.inputs().isEmpty());
        next.getItems().setAll(now.next());
        assumptions.getItems().setAll(now.assumptions());
        leftOut.getItems().setAll(now.leftOut());
        showPart();
    }

    private static void shown(Node node, boolean is) {
        node.setVisible(is);
        node.setManaged(is);
    }

    private void say(List<String> sentences) {
        Label head = new Label("In words");
        head.getStyleClass().add(Styles.TITLE_4);
        words.getChildren().setAll(head);
        (sentences.isEmpty() ? List.of("Nothing to say.") : sentences)
                .forEach(line -> words.getChildren().add(sentence(line)));
    }

    private static Label sentence(String text) {
        Label line = new Label(text);
        line.setWrapText(true);
        line.setMinHeight(USE_PREF_SIZE);
        return line;
    }

    private void showPart() {
        say(model.words(part));
        note.setText(model.note(part));
        place.getChildren()
                .setAll(model.missing(part).map(this::absent).orElseGet(() -> tables.getOrDefault(part, curves)));
    }

    private Node absent(Missing missing) {
        Label why = new Label(missing.sentence());
        why.setWrapText(true);
        why.setMinHeight(USE_PREF_SIZE);
        why.setMaxWidth(460);
        why.setId("leverage-missing");
        VBox box = new VBox(12, why);
        box.setPadding(new Insets(18, 4, 4, 4));
        missing.way().ifPresent(way -> {
            boolean asks = way == LeverageModel.Way.ASK_AND_RUN;
            Button button = new Button(asks ? "Ask and run" : "Choose curves");
            button.setId(asks ? "leverage-ask-and-run" : "leverage-choose-curves");
            button.setOnAction(event -> (asks ? ways.askAndRun() : ways.chooseCurves()).run());
            if (asks) {
                button.disableProperty().bind(ways.cannotAsk());
            }
            box.getChildren().add(button);
        });
        return box;
    }

    private void curveColumns() {
        curves.words("Rate of", CurveRow::rateOf, 80);
        curves.words("Curve", CurveRow::curve, 186);
        curves.number("Weight", CurveRow::weight, row -> row.choice().weight(), 64);
        curves.number(
                "Rate (m/kyr)",
                row -> Wording.rate(row.choice().rate()),
                row -> row.choice().rate().median(),
                104);
        curves.number(
                "95 %",
                row -> Wording.interval95(row.choice().rate()),
                row -> row.choice().rate().shortest95().low(),
                104);
        curves.strip(
                "Density, metres per thousand years",
                LEAST_STRIP,
                rateAxis,
                row -> row.choice().rate().shortest95().width(),
                row -> Wording.rate(row.choice().rate()) + ", 95 % "
                        + Wording.interval95(row.choice().rate()),
                (g, row, scale, palette) -> RateStroke.paint(g, row.choice().rate(), scale, palette));
        curves.wrapped("Records", CurveRow::records, 140);
        curves.setRowFactory(made -> new BoldRow<>(row -> row.choice().mixesCurves()));
    }

    private void inputColumns() {
        halving.words("Error of the flight, halved", Halving::error, 190);
        halving.number(
                "95 % width",
                row -> Wording.number(Digits.text(row.width95ChangePercent(), 0)) + " %",
                Halving::width95ChangePercent,
                100);
        halving.strip(
                "Change of the width, percent",
                LEAST_STRIP,
                halvingAxis,
                Halving::width95ChangePercent,
                row -> Wording.number(Digits.text(row.width95ChangePercent(), 0)) + " percent",
                (g, row, scale, palette) -> {
                    g.setFill(palette.sea());
                    box(g, scale, 0, row.width95ChangePercent(), 8, 0);
                });
        halving.setMinHeight(HALVING_HEIGHT);
        halving.setMaxHeight(HALVING_HEIGHT);
        inputs.words("Rate of", InputRow::rateOf, 110);
        inputs.words("At medians", InputRow::rate, 90);
        inputs.words("Input", InputRow::input, 190);
        inputs.words("95 % of it", InputRow::range, 140);
        inputs.strip(
                "Change of the rate, metres per thousand years",
                LEAST_STRIP,
                inputAxis,
                row -> row.bar().map(LevelTornado.Bar::span95).orElse(0.0),
                row -> "rate " + row.does(),
                LeverageView::paint);
        inputs.number(
                "Rate (m/kyr)",
                InputRow::does,
                row -> row.bar().map(LevelTornado.Bar::span95).orElse(0.0),
                130);
    }

    /** Low end in sand, high end in water; thick 68 %, thin 95 %. */
    private static void paint(GraphicsContext g, InputRow row, Scale scale, Palette palette) {
        row.bar().ifPresent(bar -> {
            double rate = row.atMedians();
            halves(g, scale, bar.rateAtLow95() - rate, bar.rateAtHigh95() - rate, 3, palette);
            halves(g, scale, bar.rateAtLow68() - rate, bar.rateAtHigh68() - rate, 10, palette);
        });
    }

    /** Both ends of an input; where they move the rate the same way, the low end above the high one. */
    private static void halves(GraphicsContext g, Scale scale, double low, double high, double thick, Palette palette) {
        boolean sameSide = low * high > 0;
        double shift = sameSide ? thick / 4 : 0;
        double height = sameSide ? thick / 2 : thick;
        g.setFill(palette.rockEdge());
        box(g, scale, 0, low, height, -shift);
        g.setFill(palette.sea());
        box(g, scale, 0, high, height, shift);
    }

    private static void box(GraphicsContext g, Scale scale, double from, double to, double height, double shift) {
        double left = scale.x(Math.min(from, to));
        double right = scale.x(Math.max(from, to));
        g.fillRect(left, scale.height() / 2 - height / 2 + shift, right - left, height);
    }

    private void nextColumns() {
        next.words("Rate of", row -> LeverageReport.name(row.rateOf()), 70);
        next.wrapped("Measurement", LeverageReport::named, 242);
        next.number("95 % width by", LeverageReport::change, NextMeasurement::width95ChangePercent, 116);
        next.number(
                "Width (m/kyr)",
                row -> width(row.width95(), row) + " to " + width(row.expectedWidth95(), row),
                NextMeasurement::expectedWidth95,
                104);
        next.number("Widens", row -> Digits.text(row.probabilityWider(), 2), NextMeasurement::probabilityWider, 76);
        next.number(
                "Certainty of pairings",
                LeverageModel::certainty,
                row -> row.pairing()
                        .map(gain -> gain.certainty() - gain.expectedCertainty())
                        .orElse(1.0),
                138);
        next.wrapped("But", LeverageModel::tells, 102);
    }

    private static String width(double width, NextMeasurement of) {
        return Digits.text(width, of.width95(), 2);
    }

    private void assumptionColumns() {
        assumptions.words("Rate of", row -> LeverageReport.name(row.rateOf()), 70);
        assumptions.wrapped("Assumption", AssumptionSwitch::assumption, 150);
        assumptions.wrapped("Is", AssumptionSwitch::was, 110);
        assumptions.wrapped("Would be", AssumptionSwitch::wouldBe, 146);
        assumptions.number(
                "Rate (m/kyr)",
                row -> LeverageReport.rate(row.rate(), row.rate()),
                row -> row.rate().median(),
                148);
        assumptions.number(
                "Would be (m/kyr)",
                row -> row.rateWouldBe()
                        .map(rate -> LeverageReport.rate(rate, row.rate()))
                        .orElse("no rate"),
                row -> row.rateWouldBe().map(ShortRate::median).orElse(Double.POSITIVE_INFINITY),
                148);
        moves(assumptions, row -> LeverageReport.move(row.rate(), row.rateWouldBe()));
    }

    private void leftOutColumns() {
        leftOut.words("Without", LeftOutRow::what, 76);
        leftOut.words("Name", LeftOutRow::name, 150);
        leftOut.words("Rate of", row -> LeverageReport.name(row.rateOf()), 76);
        leftOut.number(
                "Rate (m/kyr)",
                row -> LeverageReport.rate(row.rate(), row.rate()),
                row -> row.rate().median(),
                148);
        leftOut.number(
                "Without (m/kyr)",
                row -> row.without()
                        .map(rate -> LeverageReport.rate(rate, row.rate()))
                        .orElse("no rate"),
                row -> row.without().map(ShortRate::median).orElse(Double.POSITIVE_INFINITY),
                148);
        moves(leftOut, LeftOutRow::move);
        leftOut.wrapped("Also", LeftOutRow::also, 168);
    }

    /** How far a rate moves, in half widths of its 95 % interval. */
    private static <T> void moves(ResultTable<T> table, Function<T, Double> move) {
        table.number(
                "Half widths",
                row -> move.apply(row) == Double.MAX_VALUE ? "" : Digits.text(move.apply(row), 2),
                move::apply,
                88);
    }
}
