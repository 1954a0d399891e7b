package stillstand.view;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.IntStream;
import javafx.beans.property.ReadOnlyStringWrapper;
import javafx.scene.control.ContextMenu;
import javafx.scene.control.Label;
import javafx.scene.control.MenuItem;
import javafx.scene.control.TableCell;
import javafx.scene.control.TableColumn;
import javafx.scene.control.TableView;
import javafx.scene.control.TextField;
import javafx.scene.control.TextInputDialog;
import javafx.scene.control.Tooltip;
import javafx.scene.control.skin.VirtualFlow;
import javafx.scene.input.Clipboard;
import javafx.scene.input.ClipboardContent;
import javafx.scene.input.KeyEvent;
import javafx.scene.layout.BorderPane;
import stillstand.files.Sheet;
import stillstand.view.CellMarks.Mark;

/**
 * A table as a grid to type in. Keys are those of a spreadsheet: arrows move, with Shift they choose, typing writes, F2 or
 * Enter edits, Delete blanks.
 */
final class GridView extends BorderPane {
    private static final double ROW_HEIGHT = 27;
    private static final int SAMPLED_ROWS = 200;
    private static final double LETTER = 7.6;

    private final GridModel model;
    private final TableView<Integer> table = new TableView<>();
    private final List<GridCell> cells = new ArrayList<>();
    private final List<LineCell> lines = new ArrayList<>();
    private final List<Label> headers = new ArrayList<>();
    private List<String> shownHeader = List.of();
    private int shownColumns = -1;
    private long[] linesInFile;
    private Optional<String> typed = Optional.empty();

    GridView(GridModel model) {
        this.model = model;
        this.linesInFile = model.sheet().linesInFile();
        getStyleClass().add("grid");
        table.setId("grid-" + model.name().replace(".csv", ""));
        table.setEditable(true);
        table.setFixedCellSize(ROW_HEIGHT);
        table.setAccessibleText("Table " + model.name());
        table.setPlaceholder(new Label("No rows yet: type or paste here"));
        table.getSelectionModel().setCellSelectionEnabled(true);
        table.addEventFilter(KeyEvent.KEY_PRESSED, this::pressed);
        table.addEventFilter(KeyEvent.KEY_TYPED, this::keyTyped);
        table.setContextMenu(contextMenu());
        setCenter(table);
        showSheet(model.sheet());
        model.sheetProperty().addListener((source, before, after) -> showSheet(after));
        model.marksProperty().addListener((source, before, after) -> showCells());
        model.chosenProperty().addListener((source, before, after) -> showCaret());
    }

    GridModel model() {
        return model;
    }

    /** What was typed to begin editing; empty where the cell's own text is edited. */
    Optional<String> typed() {
        return typed;
    }

    @Override
    public void requestFocus() {
        table.requestFocus();
    }

    private void showSheet(Sheet sheet) {
        linesInFile = sheet.linesInFile();
        if (!sheet.header().equals(shownHeader) || sheet.columnCount() != shownColumns) {
            shownHeader = sheet.header();
            shownColumns = sheet.columnCount();
            makeColumns();
        }
        if (table.getItems().size() != model.rowCount()) {
            table.getItems().setAll(IntStream.range(0, model.rowCount()).boxed().toList());
        }
        showCells();
    }

    private void showCells() {
        cells.forEach(GridCell::show);
        lines.forEach(LineCell::show);
        for (int i = 0; i < headers.size(); i++) {
            Label header = headers.get(i);
            Optional<Mark> mark = model.mark(CellMarks.HEADER, i);
            header.getStyleClass().removeAll("problem", "warning");
            mark.ifPresent(found -> header.getStyleClass().add(found.isProblem() ? "problem" : "warning"));
            header.getTooltip().setText(mark.map(Mark::sentence).orElse("Column " + (i + 1) + ": " + model.header(i)));
        }
    }

    private void showCaret() {
        CellRange at = model.chosen();
        showCells();
        if (at.column() + 1 < table.getColumns().size()) {
            table.getFocusModel().focus(at.row(), table.getColumns().get(at.column() + 1));
            table.scrollToColumnIndex(at.column() + 1);
        }
        if (table.lookup(".virtual-flow") instanceof VirtualFlow<?> flow) {
            flow.scrollTo(at.row());
        }
    }

    private void makeColumns() {
        cells.clear();
        lines.clear();
        headers.clear();
        List<TableColumn<Integer, String>> columns = new ArrayList<>();
        columns.add(lineColumn());
        for (int i = 0; i < shownColumns; i++) {
            columns.add(column(i));
        }
        table.getColumns().setAll(columns);
    }

    private TableColumn<Integer, String> lineColumn() {
        TableColumn<Integer, String> column = new TableColumn<>("line");
        column.setPrefWidth(46);
        column.setSortable(false);
        column.setReorderable(false);
        column.setEditable(false);
        column.setCellValueFactory(row -> new ReadOnlyStringWrapper(""));
        column.setCellFactory(any -> {
            LineCell cell = new LineCell();
            lines.add(cell);
            return cell;
        });
        return column;
    }

    private TableColumn<Integer, String> column(int place) {
        TableColumn<Integer, String> column = new TableColumn<>();
        Label header = new Label(model.header(place).isEmpty() ? "(no name)" : model.header(place));
        header.setTooltip(new Tooltip());
        header.getStyleClass().add("grid-header");
        header.setMaxWidth(Double.MAX_VALUE);
        headers.add(header);
        column.setGraphic(header);
        column.setSortable(false);
        column.setReorderable(false);
        column.setPrefWidth(width(place));
        column.setContextMenu(headerMenu(place));
        column.setCellValueFactory(row -> new ReadOnlyStringWrapper(""));
        column.setCellFactory(any -> {
            GridCell cell = new GridCell(this, place);
            cells.add(cell);
            return cell;
        });
        return column;
    }

    private double width(int place) {
        int letters = model.header(place).length();
        for (int row = 0; row < Math.min(SAMPLED_ROWS, model.sheet().rowCount()); row++) {
            letters = Math.max(letters, Math.min(40, model.cell(row, place).length()));
        }
        return Math.max(64, letters * LETTER + 26);
    }

    private void pressed(KeyEvent event) {
        if (isEditing()) {
            early(event).ifPresent(cell -> cell.key(event));
            return;
        }
        boolean isShift = event.isShiftDown();
        boolean isCommand = event.isShortcutDown();
        int page = Math.max(1, (int) (table.getHeight() / ROW_HEIGHT) - 2);
        CellRange at = model.chosen();
        Optional<Runnable> action = switch (event.getCode()) {
            case UP -> Optional.of(() -> model.move(isCommand ? -at.row() : -1, 0, isShift));
            case DOWN -> Optional.of(() -> model.move(isCommand ? model.rowCount() : 1, 0, isShift));
            case LEFT -> Optional.of(() -> model.move(0, isCommand ? -at.column() : -1, isShift));
            case RIGHT -> Optional.of(() -> model.move(0, isCommand ? shownColumns : 1, isShift));
            case PAGE_UP -> Optional.of(() -> model.move(-page, 0, isShift));
            case PAGE_DOWN -> Optional.of(() -> model.move(page, 0, isShift));
            case HOME -> Optional.of(() -> model.move(isCommand ? -at.row() : 0, -at.column(), isShift));
            case END -> Optional.of(() -> model.move(isCommand ? model.rowCount() : 0, shownColumns, isShift));
            case DELETE, BACK_SPACE -> Optional.of(model::clear);
            case F2, ENTER -> isCommand ? Optional.empty() : Optional.of(() -> edit(Optional.empty()));
            case A -> isCommand ? Optional.of(model::chooseAll) : Optional.empty();
            case SPACE -> isShift ? Optional.of(() -> model.chooseRow(at.row())) : Optional.empty();
            default -> Optional.empty();
        };
        if (action.isPresent() && !event.isAltDown()) {
            event.consume();
            action.get().run();
        }
    }

    private void keyTyped(KeyEvent event) {
        String character = event.getCharacter();
        boolean isCommand = (event.isControlDown() || event.isMetaDown()) && !event.isAltDown();
        if (isCommand || character.isEmpty() || character.charAt(0) < ' ' || character.charAt(0) == 0x7F) {
            return;
        }
        if (!isEditing()) {
            event.consume();
            edit(Optional.of(character));
        } else {
            early(event).ifPresent(cell -> {
                event.consume();
                cell.append(character);
            });
        }
    }

    /**
     * The cell that is edited, where a key came before its editor could hear it, which is when it has the focus and, from the
     * next frame on, a skin: a quick hand loses no letter.
     */
    private Optional<GridCell> early(KeyEvent event) {
        return event.getTarget() instanceof TextField field && field.getSkin() != null
                ? Optional.empty()
                : cells.stream().filter(GridCell::hasEditor).findFirst();
    }

    private boolean isEditing() {
        return table.getEditingCell() != null;
    }

    /** Begins to edit the cell of the caret. */
    void edit(Optional<String> firstTyped) {
        if (model.isReadOnly() || shownColumns == 0) {
            return;
        }
        CellRange at = model.chosen();
        model.choose(at.row(), at.column());
        table.layout();
        typed = firstTyped;
        table.edit(at.row(), table.getColumns().get(at.column() + 1));
        typed = Optional.empty();
    }

    /** Ends editing and keeps what was typed. */
    void finishEditing() {
        cells.forEach(cell -> cell.finish(true));
    }

    void copy() {
        put(model.copy());
    }

    void cut() {
        put(model.cut());
    }

    private static void put(String text) {
        ClipboardContent content = new ClipboardContent();
        content.putString(text);
        Clipboard.getSystemClipboard().setContent(content);
    }

    void paste() {
        Optional.ofNullable(Clipboard.getSystemClipboard().getString()).ifPresent(model::paste);
    }

    void renameColumn(int place) {
        askName("Rename a column", "Name of column " + (place + 1), model.header(place))
                .ifPresent(name -> model.renameColumn(place, name));
    }

    /** A column that Stillstand carries along and never reads. */
    void addOwnColumn() {
        askName("A column of your own", "Its name; x_ at its start says that it is yours", "x_")
                .ifPresent(model::addColumn);
    }

    private Optional<String> askName(String title, String question, String first) {
        TextInputDialog dialog = new TextInputDialog(first);
        dialog.initOwner(getScene().getWindow());
        dialog.setTitle(title);
        dialog.setHeaderText(null);
        dialog.setContentText(question);
        return dialog.showAndWait();
    }

    private ContextMenu contextMenu() {
        return new ContextMenu(
                item("Cut", this::cut),
                item("Copy", this::copy),
                item("Paste", this::paste),
                item("Fill down", model::fillDown),
                item("Insert rows above", model::insertRows),
                item("Remove rows", model::removeRows));
    }

    private ContextMenu headerMenu(int place) {
        return new ContextMenu(
                item("Rename column…", () -> renameColumn(place)),
                item("Remove column", () -> model.removeColumn(place)));
    }

    private MenuItem item(String label, Runnable action) {
        MenuItem item = new MenuItem(label);
        item.setOnAction(event -> action.run());
        item.setDisable(model.isReadOnly() && !label.equals("Copy"));
        return item;
    }

    /** The number of a row's line in the file, by which the command line names it. */
    private final class LineCell extends TableCell<Integer, String> {
        LineCell() {
            getStyleClass().add("line-cell");
            setOnMouseClicked(event -> {
                if (!isEmpty()) {
                    GridView.this.requestFocus();
                    model.chooseRow(getIndex());
                }
            });
        }

        @Override
        protected void updateItem(String item, boolean isEmpty) {
            super.updateItem(item, isEmpty);
            show();
        }

        void show() {
            int row = getIndex();
            boolean isRow = !isEmpty() && row >= 0 && row < model.sheet().rowCount();
            Optional<Mark> mark = isRow ? model.mark(row, CellMarks.WHOLE_ROW) : Optional.empty();
            String number = isRow && row + 1 < linesInFile.length ? String.valueOf(linesInFile[row + 1]) : "";
            setText(isRow ? number + (mark.isPresent() ? " !" : "") : isEmpty() ? null : "+");
            setTooltip(mark.map(found -> new Tooltip(found.sentence())).orElse(null));
        }
    }
}
