package stillstand.view;

import atlantafx.base.theme.Styles;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import java.util.function.Supplier;
import javafx.beans.property.ReadOnlyStringWrapper;
import javafx.collections.ListChangeListener;
import javafx.geometry.Insets;
import javafx.geometry.Pos;
import javafx.geometry.VPos;
import javafx.scene.control.Button;
import javafx.scene.control.CheckBox;
import javafx.scene.control.ChoiceBox;
import javafx.scene.control.Label;
import javafx.scene.control.ListView;
import javafx.scene.control.ScrollPane;
import javafx.scene.control.SelectionMode;
import javafx.scene.control.Spinner;
import javafx.scene.control.SplitPane;
import javafx.scene.control.TableColumn;
import javafx.scene.control.TableView;
import javafx.scene.control.TextField;
import javafx.scene.control.Tooltip;
import javafx.scene.input.Clipboard;
import javafx.scene.input.ClipboardContent;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.FlowPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import javafx.util.StringConverter;
import stillstand.figure.Figure;
import stillstand.figure.FigureFormat;
import stillstand.figure.PageWidth;
import stillstand.files.FigureFiles;
import stillstand.ledger.Assumption;
import stillstand.view.RecordModel.FigureWish;

/** The ledger to search, what was odd, how to get it all again, and what to take away. */
public final class RecordView extends BorderPane {
    private static final int LONGEST = 48;

    private final RecordModel model;
    private final Supplier<Optional<Path>> askFolder;
    private final TableView<Assumption> ledger = new TableView<>();
    private final ListView<Figure> figures = new ListView<>();
    private final Label found = new Label();
    private final Label figureStatus = new Label();
    private final VBox notes = new VBox(6);
    private final List<CheckBox> formats = new ArrayList<>();
    private final ChoiceBox<PageWidth> width = new ChoiceBox<>();
    private final CheckBox titled = new CheckBox("Title and note");
    private final Spinner<Integer> dpi = new Spinner<>(Figure.LEAST_DPI, Figure.MOST_DPI, FigureFiles.DEFAULT_DPI, 50);

    /**
     * The view of a model.
     *
     * @param askFolder asks the user where to write; empty where the user gives up
     */
    public RecordView(RecordModel model, Supplier<Optional<Path>> askFolder) {
        this.model = model;
        this.askFolder = askFolder;
        Label caution = new Label(RecordModel.caution());
        caution.setWrapText(true);
        caution.setMinHeight(USE_PREF_SIZE);
        caution.setId("record-caution");
        caution.setPadding(new Insets(10, 14, 8, 14));
        caution.getStyleClass().add(Styles.TEXT_BOLD);
        setTop(caution);
        SplitPane split = new SplitPane(ledgerSide(), takeAway());
        split.setDividerPositions(0.64);
        setCenter(split);
        model.ledger().addListener((ListChangeListener<Assumption>) change -> found.setText(model.found()));
        model.figures().addListener((ListChangeListener<Figure>) change -> follow());
        follow();
    }

    private Region ledgerSide() {
        column("What is assumed", Assumption::assumption, 238);
        column("Value", Assumption::value, 222);
        column("Says who", Assumption::source, 200);
        column("For", Assumption::appliesTo, 100);
        ledger.setItems(model.ledger());
        ledger.setId("record-ledger");
        ledger.setAccessibleText("Ledger: everything the result rests on");
        ledger.getStyleClass().addAll(Styles.DENSE, Styles.STRIPED);
        ledger.setPlaceholder(new Label("No line holds these words."));
        TextField search = new TextField();
        search.setId("record-search");
        search.setPromptText("Find in the ledger");
        search.setAccessibleText("Find in the ledger");
        search.textProperty().addListener((property, before, now) -> model.search(now));
        HBox.setHgrow(search, Priority.ALWAYS);
        Label head = head("Ledger");
        HBox bar = new HBox(10, head, search, found);
        bar.setAlignment(Pos.CENTER_LEFT);
        VBox box = new VBox(8, bar, ledger);
        box.setPadding(new Insets(8, 10, 12, 14));
        VBox.setVgrow(ledger, Priority.ALWAYS);
        return box;
    }

    private void column(String name, Function<Assumption, String> words, double wide) {
        TableColumn<Assumption, String> column = new TableColumn<>(name);
        column.setCellValueFactory(cell -> new ReadOnlyStringWrapper(words.apply(cell.getValue())));
        column.setCellFactory(made -> new WrappedCell<>());
        column.setPrefWidth(wide);
        ledger.getColumns().add(column);
    }

    private Region takeAway() {
        VBox box = new VBox(
                10, head("Figures"), figureStatus, figureList(), figureChoice(), resultsRow(), message(), notes);
        box.setPadding(new Insets(8, 14, 12, 12));
        ScrollPane scroll = new ScrollPane(box);
        scroll.setFitToWidth(true);
        scroll.setHbarPolicy(ScrollPane.ScrollBarPolicy.NEVER);
        return scroll;
    }

    private Region figureList() {
        figures.setItems(model.figures());
        figures.setId("record-figures");
        figures.setAccessibleText("Figures to export");
        figures.getSelectionModel().setSelectionMode(SelectionMode.MULTIPLE);
        figures.getStyleClass().add(Styles.DENSE);
        figures.setPrefHeight(190);
        figures.setMinHeight(120);
        return figures;
    }

    private Region figureChoice() {
        HBox row = new HBox(12);
        row.setAlignment(Pos.CENTER_LEFT);
        for (FigureFormat format : FigureFormat.values()) {
            CheckBox box = new CheckBox(format.name());
            box.setId("record-" + format.id());
            box.setUserData(format);
            box.setSelected(true);
            formats.add(box);
            row.getChildren().add(box);
        }
        width.getItems().setAll(RecordModel.widths());
        width.setValue(PageWidth.TWO);
        width.setAccessibleText("Width of figures");
        width.setConverter(new StringConverter<>() {
            @Override
            public String toString(PageWidth of) {
                return of == null ? "" : Math.round(of.millimetres()) + " mm";
            }

            @Override
            public PageWidth fromString(String text) {
                throw new IllegalArgumentException("widths are chosen, not typed, but \"" + text + "\" was");
            }
        });
        titled.setSelected(true);
        dpi.setEditable(true);
        dpi.setPrefWidth(120);
        dpi.setAccessibleText("Dots an inch, of PNG");
        Label dots = new Label("PNG dots an inch");
        dots.setLabelFor(dpi);
        FlowPane second = new FlowPane(10, 8, width, titled, dots, dpi);
        second.setRowValignment(VPos.CENTER);
        Button all = new Button("Export all figures …");
        Button chosen = new Button("Export chosen …");
        all.setId("record-export-all");
        chosen.setId("record-export-chosen");
        all.setOnAction(event -> export(model.figures()));
        chosen.setOnAction(event -> export(figures.getSelectionModel().getSelectedItems()));
        all.disableProperty().bind(model.exportingProperty());
        chosen.disableProperty().bind(model.exportingProperty());
        return new VBox(9, row, second, new HBox(8, chosen, all));
    }

    private Region resultsRow() {
        Button results = new Button("Export the results folder …");
        results.setId("record-export-results");
        results.setTooltip(
                new Tooltip("Tables, ledger, figures and results.json, just as the command line writes them"));
        results.setOnAction(event -> askFolder.get().ifPresent(model::exportResults));
        results.disableProperty().bind(model.exportingProperty());
        return results;
    }

    private Region message() {
        Label message = new Label();
        message.setId("record-message");
        message.setWrapText(true);
        message.setMinHeight(USE_PREF_SIZE);
        message.textProperty().bind(model.messageProperty());
        return message;
    }

    private void export(List<Figure> which) {
        List<FigureFormat> into = formats.stream()
                .filter(CheckBox::isSelected)
                .map(box -> (FigureFormat) box.getUserData())
                .toList();
        FigureWish wish = new FigureWish(which, into, width.getValue(), titled.isSelected(), dpi.getValue());
        if (which.isEmpty() || into.isEmpty()) {
            model.exportFigures(wish, Path.of("")); // says what is missing, writes nothing
        } else {
            askFolder.get().ifPresent(folder -> model.exportFigures(wish, folder));
        }
    }

    private void follow() {
        found.setText(model.found());
        figureStatus.setText(model.figureStatus() + (model.isStale() ? " Older than the study." : ""));
        notes.getChildren().clear();
        list("Not done", model.failures(), "");
        list("Odd in the input", model.warnings(), "Nothing.");
        List<Fact> provenance = model.provenance();
        if (!provenance.isEmpty()) {
            Button copy = new Button("Copy");
            copy.getStyleClass().addAll(Styles.SMALL, Styles.BUTTON_OUTLINED);
            copy.setAccessibleText("Copy the provenance");
            copy.setOnAction(event -> {
                ClipboardContent content = new ClipboardContent();
                content.putString(model.provenanceText());
                Clipboard.getSystemClipboard().setContent(content);
            });
            HBox bar = new HBox(10, head("How to get it again"), copy);
            bar.setAlignment(Pos.CENTER_LEFT);
            notes.getChildren().add(bar);
            provenance.forEach(fact -> notes.getChildren().add(line(fact.label() + ": " + cut(fact.text()))));
        }
    }

    private void list(String title, List<String> lines, String none) {
        if (!lines.isEmpty() || !none.isEmpty()) {
            notes.getChildren().add(head(title));
            (lines.isEmpty() ? List.of(none) : lines)
                    .forEach(text -> notes.getChildren().add(line(text)));
        }
    }

    /** A checksum cut to what an eye compares; the copy has all of it. */
    private static String cut(String text) {
        return text.length() > LONGEST ? text.substring(0, LONGEST) + "…" : text;
    }

    private static Label head(String text) {
        Label label = new Label(text);
        label.getStyleClass().add(Styles.TITLE_4);
        label.setMinWidth(USE_PREF_SIZE);
        return label;
    }

    private static Label line(String text) {
        Label label = new Label(text);
        label.setWrapText(true);
        label.setMinHeight(USE_PREF_SIZE);
        return label;
    }
}
