package stillstand.view;

import java.nio.file.Path;
import java.util.List;
import javafx.geometry.Pos;
import javafx.scene.control.Button;
import javafx.scene.control.Hyperlink;
import javafx.scene.control.Label;
import javafx.scene.layout.HBox;
import javafx.scene.layout.VBox;

/** What the window shows while no study is open: three ways to begin, and the studies of before. */
final class WelcomeView extends VBox {
    private final WindowModel model;
    private final VBox recent = new VBox();

    WelcomeView(WindowModel model, WindowActions actions) {
        this.model = model;
        getStyleClass().add("welcome");
        setAlignment(Pos.TOP_LEFT);
        Label name = new Label("Stillstand");
        name.getStyleClass().add("welcome-name");
        Label what =
                new Label("Vertical rates of coasts, from marine terraces, reefs and dated corals, with their errors.");
        what.getStyleClass().add("welcome-what");
        HBox ways = new HBox(
                way(
                        "welcome-demo",
                        "Try the invented island",
                        "Four coasts, ready to run. A copy to play with; nothing of it is real.",
                        actions::openDemo),
                way(
                        "welcome-new",
                        "Start a study",
                        "A small invented example in a folder of yours, to be replaced by your own numbers.",
                        actions::openTemplate),
                way(
                        "welcome-open",
                        "Open a study",
                        "A folder with study.json, sites.csv and levels.csv in it.",
                        actions::open));
        ways.getStyleClass().add("welcome-ways");
        recent.getStyleClass().add("welcome-recent");
        getChildren().addAll(name, what, ways, recent);
        showRecent(actions);
    }

    private static Button way(String id, String title, String text, Runnable action) {
        Label head = new Label(title);
        head.getStyleClass().add("way-title");
        Label body = new Label(text);
        body.setWrapText(true);
        body.getStyleClass().add("quiet");
        VBox content = new VBox(head, body);
        content.setSpacing(6);
        Button button = new Button();
        button.setId(id);
        button.setGraphic(content);
        button.getStyleClass().add("way");
        button.setAccessibleText(title + ". " + text);
        button.setOnAction(event -> action.run());
        return button;
    }

    private void showRecent(WindowActions actions) {
        List<Path> studies = model.memory().recent();
        model.memory().leftOpen().filter(WindowModel::hasUnsaved).ifPresent(left -> {
            Hyperlink link = link(left, actions);
            link.setId("welcome-recover");
            recent.getChildren()
                    .addAll(new Label("Stillstand ended before your last edits were saved. Go on with them:"), link);
        });
        if (!studies.isEmpty()) {
            Label title = new Label("Studies of before");
            title.getStyleClass().add("group-title");
            recent.getChildren().add(title);
            studies.forEach(study -> recent.getChildren().add(link(study, actions)));
        }
    }

    private static Hyperlink link(Path study, WindowActions actions) {
        Hyperlink link = new Hyperlink(study.toString());
        link.setOnAction(event -> actions.open(study));
        return link;
    }
}
