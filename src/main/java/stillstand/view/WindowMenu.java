package stillstand.view;

import java.util.Optional;
import java.util.function.Consumer;
import java.util.function.Supplier;
import javafx.scene.control.CheckMenuItem;
import javafx.scene.control.Menu;
import javafx.scene.control.MenuBar;
import javafx.scene.control.MenuItem;
import javafx.scene.control.SeparatorMenuItem;
import javafx.scene.input.KeyCombination;
import stillstand.view.WindowModel.Area;

/** Everything the window does, in words and with its keys. */
final class WindowMenu extends MenuBar {
    private final WindowModel model;
    private final Supplier<Optional<EvidenceView>> evidence;
    private final MenuItem undo;
    private final MenuItem redo;

    WindowMenu(
            WindowModel model,
            WindowActions actions,
            Supplier<Optional<EvidenceView>> evidence,
            Consumer<Boolean> darkens,
            Runnable quits) {
        this.model = model;
        this.evidence = evidence;
        undo = item("Undo", "Shortcut+Z", () -> model.document().ifPresent(StudyDocument::undo));
        redo = item("Redo", "Shortcut+Shift+Z", () -> model.document().ifPresent(StudyDocument::redo));
        getMenus().addAll(study(actions, quits), edit(), run(), look(darkens));
        model.documentProperty().addListener((source, before, after) -> {
            after.ifPresent(document -> {
                document.undoableProperty().addListener((property, was, is) -> nameUndo());
                document.redoableProperty().addListener((property, was, is) -> nameUndo());
            });
            nameUndo();
        });
        nameUndo();
    }

    private Menu study(WindowActions actions, Runnable quits) {
        return new Menu(
                "_Study",
                null,
                item("_New…", "Shortcut+N", actions::openTemplate),
                item("_Open…", "Shortcut+O", actions::open),
                item("Open the _invented island", "Shortcut+Shift+D", actions::openDemo),
                new SeparatorMenuItem(),
                item("_Save", "Shortcut+S", model::save),
                item("_Keep a copy…", "Shortcut+Shift+S", () -> model.document().ifPresent(open -> actions.keepCopy())),
                item("_Close", "Shortcut+W", actions::closeStudy),
                new SeparatorMenuItem(),
                item("_Quit", "Shortcut+Q", quits));
    }

    private Menu edit() {
        return new Menu(
                "_Edit",
                null,
                undo,
                redo,
                new SeparatorMenuItem(),
                item("Cu_t", "Shortcut+X", inGrid(GridView::cut)),
                item("_Copy", "Shortcut+C", inGrid(GridView::copy)),
                item("_Paste", "Shortcut+V", inGrid(GridView::paste)),
                item("_Fill down", "Shortcut+D", inGrid(grid -> grid.model().fillDown())),
                item(
                        "_Insert rows above",
                        "Shortcut+I",
                        inGrid(grid -> grid.model().insertRows())),
                item(
                        "Remo_ve rows",
                        "Shortcut+Minus",
                        inGrid(grid -> grid.model().removeRows())),
                new SeparatorMenuItem(),
                item(
                        "Rename colu_mn…",
                        "Shortcut+F2",
                        inGrid(grid -> grid.renameColumn(grid.model().chosen().column()))),
                item(
                        "Remove column",
                        "Shortcut+Shift+Minus",
                        inGrid(grid ->
                                grid.model().removeColumn(grid.model().chosen().column()))),
                new SeparatorMenuItem(),
                item("_Next problem", "F8", () -> goToNext(false)),
                item("Previous problem", "Shift+F8", () -> goToNext(true)));
    }

    private void goToNext(boolean isBackwards) {
        model.areaProperty().set(Area.EVIDENCE);
        evidence.get().ifPresent(view -> view.goToNext(isBackwards));
    }

    private Runnable inGrid(Consumer<GridView> action) {
        return () -> {
            if (model.areaProperty().get() == Area.EVIDENCE) {
                evidence.get().flatMap(EvidenceView::grid).ifPresent(grid -> {
                    grid.finishEditing();
                    action.accept(grid);
                });
            }
        };
    }

    private Menu run() {
        return new Menu(
                "_Run",
                null,
                item("_Run", "Shortcut+R", model::startRun),
                item("_Cancel the run", "Shortcut+Period", () -> model.run().cancel()));
    }

    private Menu look(Consumer<Boolean> darkens) {
        Menu look = new Menu("_Look");
        for (Area area : Area.values()) {
            look.getItems()
                    .add(item(
                            area.title(),
                            "Shortcut+" + area.number(),
                            () -> model.areaProperty().set(area)));
        }
        CheckMenuItem dark = new CheckMenuItem("_Dark");
        dark.setAccelerator(KeyCombination.valueOf("Shortcut+Shift+L"));
        dark.setSelected(model.memory().isDark());
        dark.selectedProperty().addListener((source, before, after) -> darkens.accept(after));
        look.getItems().addAll(new SeparatorMenuItem(), dark);
        return look;
    }

    private static MenuItem item(String label, String keys, Runnable action) {
        MenuItem item = new MenuItem(label);
        item.setMnemonicParsing(true);
        item.setAccelerator(KeyCombination.valueOf(keys));
        item.setOnAction(event -> action.run());
        return item;
    }

    private void nameUndo() {
        name(
                undo,
                "Undo",
                model.document().flatMap(document -> document.undoableProperty().get()));
        name(
                redo,
                "Redo",
                model.document().flatMap(document -> document.redoableProperty().get()));
    }

    private static void name(MenuItem item, String verb, Optional<String> what) {
        item.setMnemonicParsing(false);
        item.setText(verb + what.map(edit -> " " + edit).orElse(""));
        item.setDisable(what.isEmpty());
    }
}
