package stillstand.view;

import java.util.function.Predicate;
import javafx.scene.control.TableRow;

/** A row that stands out where something is true of it. */
final class BoldRow<T> extends TableRow<T> {
    private static final String STANDS_OUT = "stands-out";

    private final Predicate<T> stands;

    BoldRow(Predicate<T> stands) {
        this.stands = stands;
    }

    @Override
    protected void updateItem(T row, boolean empty) {
        super.updateItem(row, empty);
        getStyleClass().remove(STANDS_OUT);
        if (!empty && row != null && stands.test(row)) {
            getStyleClass().add(STANDS_OUT);
        }
    }
}
