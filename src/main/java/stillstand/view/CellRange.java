package stillstand.view;

/**
 * The cells chosen in a grid: from the one where the choice began to the one where the caret stands. Rows count from 0 below
 * the header, columns from 0.
 */
record CellRange(int anchorRow, int anchorColumn, int row, int column) {
    static CellRange at(int row, int column) {
        return new CellRange(row, column, row, column);
    }

    CellRange extendedTo(int newRow, int newColumn) {
        return new CellRange(anchorRow, anchorColumn, newRow, newColumn);
    }

    int firstRow() {
        return Math.min(anchorRow, row);
    }

    int lastRow() {
        return Math.max(anchorRow, row);
    }

    int firstColumn() {
        return Math.min(anchorColumn, column);
    }

    int lastColumn() {
        return Math.max(anchorColumn, column);
    }

    int rowCount() {
        return lastRow() - firstRow() + 1;
    }

    int columnCount() {
        return lastColumn() - firstColumn() + 1;
    }

    boolean holds(int someRow, int someColumn) {
        return someRow >= firstRow()
                && someRow <= lastRow()
                && someColumn >= firstColumn()
                && someColumn <= lastColumn();
    }
}
