package stillstand.view;

import javafx.collections.ListChangeListener;
import javafx.scene.Node;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.VBox;
import stillstand.view.WindowModel.Notice;

/** What has to be said, a line each, with what may be done about it; nothing here stops anybody's work. */
final class NoticesView extends VBox {
    private final WindowModel model;

    NoticesView(WindowModel model) {
        this.model = model;
        getStyleClass().add("notices");
        model.notices().addListener((ListChangeListener<Notice>) change -> show());
        model.shownProperty().addListener((source, before, after) -> {
            if (before.stale() != after.stale()) {
                show();
            }
        });
        show();
    }

    private void show() {
        getChildren().setAll(model.notices().stream().map(this::line).toList());
        if (model.shownProperty().get().stale()) {
            getChildren().add(staleLine());
        }
    }

    private Node staleLine() {
        HBox line = line("The results on screen are of earlier inputs. Run again to bring them up to date.", false);
        line.setId("stale");
        line.getStyleClass().add("stale");
        return line;
    }

    private Node line(Notice notice) {
        HBox line = line(notice.sentence(), notice.isTrouble());
        line.setId("notice-" + notice.about());
        notice.answers().forEach(answer -> {
            Button button = new Button(answer.label());
            button.setOnAction(event -> answer.action().run());
            line.getChildren().add(button);
        });
        if (notice.answers().isEmpty()) {
            Button close = new Button("Dismiss");
            close.getStyleClass().add("flat");
            close.setOnAction(event -> model.dismiss(notice));
            line.getChildren().add(close);
        }
        return line;
    }

    private static HBox line(String sentence, boolean isTrouble) {
        Label text = new Label(sentence);
        text.setWrapText(true);
        text.setMaxWidth(Double.MAX_VALUE);
        HBox.setHgrow(text, Priority.ALWAYS);
        HBox line = new HBox(text);
        line.getStyleClass().addAll("notice", isTrouble ? "trouble" : "news");
        return line;
    }
}
