package stillstand.view;

import java.util.EnumMap;
import java.util.Map;
import javafx.scene.Node;
import stillstand.view.WindowModel.Area;

/** The areas that show results, made of their models and told what to show. */
final class ResultAreas {
    private ResultAreas() {}

    static Map<Area, Node> of(WindowModel model) {
        return new EnumMap<>(Area.class);
    }
}
