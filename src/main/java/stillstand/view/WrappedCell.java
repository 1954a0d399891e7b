package stillstand.view;

import javafx.geometry.Insets;
import javafx.geometry.Pos;
import javafx.scene.control.TableCell;
import javafx.scene.text.Text;

/** A cell that shows its whole text, on as many lines as that takes. */
final class WrappedCell<T> extends TableCell<T, String> {
    private final Text words = new Text();

    WrappedCell() {
        tableColumnProperty().addListener((property, before, column) -> {
            words.wrappingWidthProperty().unbind();
            if (column != null) {
                words.wrappingWidthProperty()
                        .bind(column.widthProperty().subtract(18)); // known before the first layout
            }
        });
        words.fillProperty().bind(textFillProperty());
        setAlignment(Pos.CENTER_LEFT);
        setPadding(new Insets(6.5, 8, 3.5, 8)); // so that one line stands level with the cells beside it
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
