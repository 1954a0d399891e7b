package stillstand.view;

import java.util.Optional;
import javafx.css.PseudoClass;
import javafx.scene.control.TableCell;
import javafx.scene.control.TextField;
import javafx.scene.control.Tooltip;
import javafx.scene.input.KeyEvent;
import javafx.scene.input.MouseButton;
import javafx.scene.input.MouseEvent;
import stillstand.view.CellMarks.Mark;

/** One cell of a grid on screen: shows what the model says of its place, and edits it. */
final class GridCell extends TableCell<Integer, String> {
    private static final PseudoClass CHOSEN = PseudoClass.getPseudoClass("chosen");
    private static final PseudoClass CARET = PseudoClass.getPseudoClass("caret");
    private static final PseudoClass PROBLEM = PseudoClass.getPseudoClass("problem");
    private static final PseudoClass WARNING = PseudoClass.getPseudoClass("warning");

    private final GridView grid;
    private final int column;
    private final Tooltip tooltip = new Tooltip();
    private Optional<TextField> editor = Optional.empty();

    GridCell(GridView grid, int column) {
        this.grid = grid;
        this.column = column;
        getStyleClass().add("grid-cell");
        tooltip.setWrapText(true);
        tooltip.setMaxWidth(520);
        addEventFilter(MouseEvent.MOUSE_PRESSED, this::press);
        addEventFilter(MouseEvent.MOUSE_RELEASED, event -> {
            if (editor.isEmpty()) {
                event.consume();
            }
        });
        setOnDragDetected(event -> startFullDrag());
        setOnMouseDragEntered(event -> {
            if (!isEmpty()) {
                grid.model().extendTo(getIndex(), column);
            }
        });
    }

    private void press(MouseEvent event) {
        if (editor.isPresent() || isEmpty()) {
            return;
        }
        event.consume(); // the table's own way of choosing is not ours
        grid.finishEditing();
        grid.requestFocus();
        boolean keepsChoice = event.getButton() == MouseButton.SECONDARY
                && grid.model().chosen().holds(getIndex(), column);
        if (event.isShiftDown()) {
            grid.model().extendTo(getIndex(), column);
        } else if (!keepsChoice) {
            grid.model().choose(getIndex(), column);
        }
        if (event.getButton() == MouseButton.PRIMARY && event.getClickCount() == 2) {
            grid.edit(Optional.empty());
        }
    }

    @Override
    protected void updateItem(String item, boolean isEmpty) {
        super.updateItem(item, isEmpty);
        show();
    }

    /** Shows what the model says now. */
    void show() {
        GridModel model = grid.model();
        boolean isHere = !isEmpty() && getIndex() >= 0 && getIndex() < model.rowCount();
        if (!isHere) {
            setText(null);
            setGraphic(null);
            setTooltip(null);
            pseudoClassStateChanged(CHOSEN, false);
            pseudoClassStateChanged(CARET, false);
            pseudoClassStateChanged(PROBLEM, false);
            pseudoClassStateChanged(WARNING, false);
            return;
        }
        int row = getIndex();
        String text = model.cell(row, column);
        if (editor.isEmpty()) {
            setText(text.replace('\n', ' '));
        }
        CellRange chosen = model.chosen();
        Optional<Mark> mark = model.mark(row, column);
        pseudoClassStateChanged(CHOSEN, chosen.holds(row, column));
        pseudoClassStateChanged(CARET, chosen.row() == row && chosen.column() == column);
        pseudoClassStateChanged(PROBLEM, mark.map(Mark::isProblem).orElse(false));
        pseudoClassStateChanged(WARNING, mark.map(found -> !found.isProblem()).orElse(false));
        setTooltip(mark.map(found -> {
                    tooltip.setText(found.sentence());
                    return tooltip;
                })
                .orElse(null));
        setAccessibleText(model.header(column) + ", row " + (row + 1) + ": " + (text.isEmpty() ? "blank" : text)
                + mark.map(found -> (found.isProblem() ? ". Problem: " : ". Warning: ") + found.sentence())
                        .orElse(""));
    }

    @Override
    public void startEdit() {
        super.startEdit();
        if (!isEditing()) {
            return;
        }
        String before = grid.model().cell(getIndex(), column);
        TextField field = new TextField(grid.typed().orElse(before));
        field.getStyleClass().add("grid-editor");
        field.setAccessibleText("Editing " + grid.model().header(column));
        field.addEventFilter(KeyEvent.KEY_PRESSED, this::key);
        field.focusedProperty().addListener((source, was, is) -> {
            if (was && !is) {
                finish(true);
            }
        });
        editor = Optional.of(field);
        setText(null);
        setGraphic(field);
        field.requestFocus();
        if (grid.typed().isPresent()) {
            field.end();
        } else {
            field.selectAll();
        }
    }

    boolean hasEditor() {
        return editor.isPresent();
    }

    /** Takes a letter that came before the editor had the focus. */
    void append(String letter) {
        editor.ifPresent(field -> field.appendText(letter));
    }

    /** Ends editing where the key says so. */
    void key(KeyEvent event) {
        switch (event.getCode()) {
            case ENTER -> leave(event, true, 1, 0);
            case TAB -> leave(event, true, 0, event.isShiftDown() ? -1 : 1);
            case UP -> leave(event, true, -1, 0);
            case DOWN -> leave(event, true, 1, 0);
            case ESCAPE -> leave(event, false, 0, 0);
            default -> {}
        }
    }

    private void leave(KeyEvent event, boolean keeps, int rows, int columns) {
        event.consume();
        finish(keeps);
        grid.requestFocus();
        grid.model().move(rows, columns, false);
    }

    /** Ends editing, with or without writing what was typed. */
    void finish(boolean keeps) {
        editor.ifPresent(field -> {
            editor = Optional.empty();
            setGraphic(null);
            int row = getIndex();
            String text = field.getText();
            super.cancelEdit();
            if (keeps) {
                grid.model().write(row, column, text);
            }
            show();
        });
    }

    @Override
    public void cancelEdit() {
        if (editor.isPresent()) {
            finish(false);
        } else {
            super.cancelEdit();
        }
    }
}
