package stillstand.view;

import java.util.EnumMap;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import javafx.geometry.Pos;
import javafx.scene.control.ToggleButton;
import javafx.scene.control.ToggleGroup;
import javafx.scene.control.Tooltip;
import javafx.scene.layout.HBox;
import stillstand.view.WindowModel.Area;

/** The switch between the areas: a flight of steps, each a little higher than the one before. */
final class AreaSwitch extends HBox {
    private static final double LOWEST = 28;
    private static final double RISE = 5;

    AreaSwitch(WindowModel model) {
        getStyleClass().add("area-switch");
        setAlignment(Pos.BOTTOM_LEFT);
        ToggleGroup group = new ToggleGroup();
        Map<Area, ToggleButton> steps = new EnumMap<>(Area.class);
        for (Area area : Area.values()) {
            ToggleButton step = new ToggleButton(area.title());
            step.setId("area-" + area.name().toLowerCase(Locale.ROOT).replace('_', '-'));
            step.setToggleGroup(group);
            double height = LOWEST + RISE * (area.number() - 1);
            step.setMinHeight(height);
            step.setPrefHeight(height);
            step.setTooltip(new Tooltip(area.title() + " (Ctrl+" + area.number() + ")"));
            step.setOnAction(event -> {
                model.areaProperty().set(area);
                step.setSelected(true); // a step cannot be left without going to another
            });
            steps.put(area, step);
            getChildren().add(step);
        }
        Runnable show = () ->
                Optional.ofNullable(steps.get(model.areaProperty().get())).ifPresent(step -> step.setSelected(true));
        model.areaProperty().addListener((source, before, after) -> show.run());
        show.run();
    }
}
