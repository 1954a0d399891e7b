package stillstand.view;

import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import stillstand.files.Sheet;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;

/** What is wrong or odd in the cells of one table, in the sentences of the command line. */
final class CellMarks {
    /** The row of column names. */
    static final int HEADER = -1;

    /** The column that stands for the whole row. */
    static final int WHOLE_ROW = -1;

    private final Map<Place, Mark> marks = new HashMap<>();
    private final Map<Long, Integer> rowOfLine = new HashMap<>();

    /** A mark on a cell. */
    record Mark(boolean isProblem, String sentence) {}

    private record Place(int row, int column) {}

    private CellMarks(Sheet sheet) {
        long[] lines = sheet.linesInFile();
        for (int i = lines.length - 1; i >= 0; i--) {
            rowOfLine.put(lines[i], i - 1); // a blank row shares the line of the one before it, which counts
        }
    }

    /** The marks of a table; of several on a cell the first problem wins. */
    static CellMarks of(Sheet sheet, List<InputProblem> problems, List<InputWarning> warnings) {
        CellMarks marks = new CellMarks(sheet);
        for (InputProblem problem : problems) {
            if (problem.file().equals(sheet.name())) {
                marks.add(problem.line(), problem.column(), new Mark(true, problem.message()));
            }
        }
        for (InputWarning warning : warnings) {
            if (warning.file().equals(sheet.name())) {
                marks.add(warning.line(), warning.column(), new Mark(false, warning.placed()));
            }
        }
        return marks;
    }

    private void add(long line, int column, Mark mark) {
        marks.putIfAbsent(new Place(row(line), column - 1), mark);
    }

    /** Row that stands on a line of the file; the header's where the line is 0 or unknown. */
    int row(long line) {
        return rowOfLine.getOrDefault(line, HEADER);
    }

    Optional<Mark> at(int row, int column) {
        return Optional.ofNullable(marks.get(new Place(row, column)));
    }
}
