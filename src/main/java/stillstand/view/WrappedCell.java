package stillstand.view;

import javafx.scene.control.TableCell;
import javafx.scene.text.Text;
import stillstand.ledger.Assumption;

/** A cell of the ledger that shows its whole text, on as many lines as that takes. */
final class WrappedCell extends TableCell<Assumption, String> {
    private final Text words = new Text();

    WrappedCell() {
        words.wrappingWidthProperty().bind(widthProperty().subtract(18));
        words.fillProperty().bind(textFillProperty());
        setPrefHeight(USE_COMPUTED_SIZE);
    }

    @Override
    protected void updateItem(String text, boolean empty) {
        super.updateItem(text, empty);
        words.setText(empty || text == null ? "" : text);
        setGraphic(empty ? null : words);
        setAccessibleText(words.getText());
    }
}
