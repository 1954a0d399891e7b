package stillstand.view;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.function.UnaryOperator;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import stillstand.files.PastedCells;
import stillstand.files.Sheet;
import stillstand.study.TableColumns;
import stillstand.view.CellMarks.Mark;

/**
 * One table of a study as a grid: what its cells say, which are chosen, what is wrong in them, and every edit. Below the last
 * row stands a blank one, which is added to the table by writing in it.
 */
final class GridModel {
    private final StudyDocument document;
    private final String name;
    private final ReadOnlyObjectWrapper<Sheet> sheet;
    private final ReadOnlyObjectWrapper<CellRange> chosen = new ReadOnlyObjectWrapper<>(CellRange.at(0, 0));
    private final ReadOnlyObjectWrapper<CellMarks> marks;

    /** The grid of a table that the document holds. */
    GridModel(StudyDocument document, String name) {
        this.document = document;
        this.name = name;
        Sheet now = document.draft().sheet(name).orElseThrow();
        this.sheet = new ReadOnlyObjectWrapper<>(now);
        this.marks = new ReadOnlyObjectWrapper<>(marks(document.checked()));
        document.draftProperty()
                .addListener((source, before, after) -> after.sheet(name).ifPresent(this::show));
        document.checkedProperty().addListener((source, before, after) -> marks.set(marks(after)));
    }

    private void show(Sheet now) {
        sheet.set(now);
        CellRange range = chosen.get();
        CellRange inside = new CellRange(
                Math.min(range.anchorRow(), lastRow()),
                Math.min(range.anchorColumn(), lastColumn()),
                Math.min(range.row(), lastRow()),
                Math.min(range.column(), lastColumn()));
        chosen.set(inside);
    }

    private CellMarks marks(StudyDocument.Checked checked) {
        return CellMarks.of(checked.draft().sheet(name).orElseGet(sheet::get), checked.problems(), checked.warnings());
    }

    String name() {
        return name;
    }

    ReadOnlyObjectProperty<Sheet> sheetProperty() {
        return sheet.getReadOnlyProperty();
    }

    Sheet sheet() {
        return sheet.get();
    }

    ReadOnlyObjectProperty<CellMarks> marksProperty() {
        return marks.getReadOnlyProperty();
    }

    ReadOnlyObjectProperty<CellRange> chosenProperty() {
        return chosen.getReadOnlyProperty();
    }

    CellRange chosen() {
        return chosen.get();
    }

    boolean isReadOnly() {
        return document.isReadOnly();
    }

    /** Rows of the table and the blank one below. */
    int rowCount() {
        return sheet().rowCount() + (isReadOnly() ? 0 : 1);
    }

    private int lastRow() {
        return Math.max(0, rowCount() - 1);
    }

    private int lastColumn() {
        return Math.max(0, sheet().columnCount() - 1);
    }

    /** The text of a cell; blank in the row below the last. */
    String cell(int row, int column) {
        return row < sheet().rowCount() ? sheet().cell(row, column) : "";
    }

    /** The name above a column. */
    String header(int column) {
        return column < sheet().header().size() ? sheet().header().get(column) : "";
    }

    Optional<Mark> mark(int row, int column) {
        return marks.get().at(row, column);
    }

    /** The sentence about the cell of the caret, or about its row or column. */
    Optional<Mark> markAtCaret() {
        CellRange at = chosen.get();
        return mark(at.row(), at.column())
                .or(() -> mark(at.row(), CellMarks.WHOLE_ROW))
                .or(() -> mark(CellMarks.HEADER, at.column()));
    }

    void choose(int row, int column) {
        chosen.set(CellRange.at(within(row, lastRow()), within(column, lastColumn())));
    }

    void extendTo(int row, int column) {
        chosen.set(chosen.get().extendedTo(within(row, lastRow()), within(column, lastColumn())));
    }

    /** Moves the caret, or with {@code extends} the end of the choice. */
    void move(int rows, int columns, boolean isExtended) {
        CellRange at = chosen.get();
        if (isExtended) {
            extendTo(at.row() + rows, at.column() + columns);
        } else {
            choose(at.row() + rows, at.column() + columns);
        }
    }

    void chooseAll() {
        chosen.set(new CellRange(0, 0, Math.max(0, sheet().rowCount() - 1), lastColumn()));
    }

    void chooseRow(int row) {
        chosen.set(new CellRange(within(row, lastRow()), 0, within(row, lastRow()), lastColumn()));
    }

    private static int within(int place, int last) {
        return Math.max(0, Math.min(place, last));
    }

    /** Writes one cell. */
    void write(int row, int column, String text) {
        if (!cell(row, column).equals(text.strip())) {
            edit("writing " + described(column), now -> now.withCells(row, column, List.of(List.of(text))));
        }
    }

    private String described(int column) {
        return header(column).isEmpty() ? "a cell" : header(column);
    }

    /** Blanks the chosen cells. */
    void clear() {
        CellRange at = chosen.get();
        int rows = Math.min(at.lastRow(), sheet().rowCount() - 1) - at.firstRow() + 1;
        if (rows > 0) {
            List<String> blank = Collections.nCopies(at.columnCount(), "");
            edit(
                    "clearing cells",
                    now -> now.withCells(at.firstRow(), at.firstColumn(), Collections.nCopies(rows, blank)));
        }
    }

    /** The chosen cells as a spreadsheet takes them. */
    String copy() {
        return PastedCells.text(cells(chosen.get()));
    }

    /** Copies, then blanks. */
    String cut() {
        String text = copy();
        clear();
        return text;
    }

    private List<List<String>> cells(CellRange range) {
        List<List<String>> rows = new ArrayList<>();
        for (int row = range.firstRow(); row <= Math.min(range.lastRow(), Math.max(0, sheet().rowCount() - 1)); row++) {
            List<String> cells = new ArrayList<>();
            for (int column = range.firstColumn(); column <= range.lastColumn(); column++) {
                cells.add(cell(row, column));
            }
            rows.add(cells);
        }
        return rows;
    }

    /**
     * Pastes a spreadsheet's cells at the caret. Where their first line holds column names each column goes under its own name,
     * and a name the table lacks becomes a new column. One cell fills all that are chosen.
     */
    void paste(String text) {
        PastedCells pasted = PastedCells.of(text, Set.copyOf(TableColumns.known(name)));
        if (pasted.rows().isEmpty()) {
            return;
        }
        CellRange at = chosen.get();
        if (!pasted.header().isEmpty()) {
            edit("pasting a table", now -> underNames(now, pasted, at.firstRow()));
            chosen.set(new CellRange(
                    at.firstRow(), 0, within(at.firstRow() + pasted.rows().size() - 1, lastRow()), lastColumn()));
            return;
        }
        List<List<String>> block = pasted.rows();
        int widest = block.stream().mapToInt(List::size).max().orElse(1);
        boolean fills = block.size() == 1 && widest == 1;
        List<List<String>> cells = fills
                ? Collections.nCopies(
                        at.rowCount(),
                        Collections.nCopies(at.columnCount(), block.get(0).get(0)))
                : block;
        edit("pasting", now -> now.withCells(at.firstRow(), at.firstColumn(), cells));
        if (!fills) {
            chosen.set(new CellRange(
                    at.firstRow(),
                    at.firstColumn(),
                    within(at.firstRow() + block.size() - 1, lastRow()),
                    within(at.firstColumn() + widest - 1, lastColumn())));
        }
    }

    private static Sheet underNames(Sheet sheet, PastedCells pasted, int firstRow) {
        Sheet wide = sheet;
        List<Integer> places = new ArrayList<>();
        for (String header : pasted.header()) {
            if (wide.column(header).isEmpty()) {
                wide = wide.withColumn(header);
            }
            places.add(wide.column(header).orElseThrow());
        }
        List<List<String>> rows = new ArrayList<>();
        for (int i = 0; i < pasted.rows().size(); i++) {
            List<String> given = pasted.rows().get(i);
            int width = Math.max(wide.columnCount(), places.size() + given.size());
            List<String> cells = new ArrayList<>(Collections.nCopies(width, ""));
            for (int j = 0; j < wide.columnCount() && firstRow + i < wide.rowCount(); j++) {
                cells.set(j, wide.cell(firstRow + i, j));
            }
            for (int j = 0; j < given.size(); j++) {
                cells.set(j < places.size() ? places.get(j) : wide.columnCount() + j - places.size(), given.get(j));
            }
            while (cells.size() > wide.columnCount()
                    && cells.get(cells.size() - 1).isEmpty()) {
                cells.remove(cells.size() - 1);
            }
            rows.add(cells);
        }
        return wide.withCells(firstRow, 0, rows);
    }

    /** Writes the first chosen row into the chosen rows below it; of a single row, the row above into it. */
    void fillDown() {
        CellRange at = chosen.get();
        int from = at.rowCount() > 1 ? at.firstRow() : at.firstRow() - 1;
        if (from >= 0) {
            List<String> source = cells(new CellRange(from, at.firstColumn(), from, at.lastColumn()))
                    .get(0);
            int rows = at.lastRow() - from;
            edit("filling down", now -> now.withCells(from + 1, at.firstColumn(), Collections.nCopies(rows, source)));
        }
    }

    /** Blank rows above the choice, as many as are chosen. */
    void insertRows() {
        CellRange at = chosen.get();
        int before = Math.min(at.firstRow(), sheet().rowCount());
        edit("inserting rows", now -> now.withBlankRows(before, at.rowCount()));
    }

    void removeRows() {
        CellRange at = chosen.get();
        int end = Math.min(at.lastRow() + 1, sheet().rowCount());
        if (at.firstRow() < end) {
            edit("removing rows", now -> now.withoutRows(at.firstRow(), end));
        }
    }

    /** Known columns that the table does not have; the second of two spreads is not offered. */
    List<String> columnsToAdd() {
        List<String> have = sheet().header();
        return TableColumns.known(name).stream()
                .filter(column -> !have.contains(column)
                        && !have.contains(column.replace("_1sigma", "_2sigma"))
                        && !have.contains(column.replace("_2sigma", "_1sigma")))
                .toList();
    }

    void addColumn(String header) {
        edit("adding " + header, now -> now.withColumn(header));
        choose(chosen.get().row(), lastColumn());
    }

    void renameColumn(int column, String header) {
        edit("renaming a column", now -> now.withHeader(column, header));
    }

    void removeColumn(int column) {
        edit("removing " + described(column), now -> now.withoutColumn(column));
    }

    private void edit(String what, UnaryOperator<Sheet> change) {
        document.edit(
                what,
                draft -> draft.sheet(name)
                        .map(now -> draft.with(change.apply(now)))
                        .orElse(draft));
    }
}
