package stillstand.view;

import java.util.List;
import javafx.scene.paint.Color;

/**
 * Colours of what the window draws itself, as in the figures: water in blue-greens, rock in sands, correlations in brick. What
 * is tried by hand is ochre and dotted, what a slid rate predicts is violet and dashed, so that no meaning rests on colour alone.
 */
record Palette(
        boolean dark,
        Color paper,
        Color ink,
        Color muted,
        Color hair,
        Color sea,
        Color band68,
        Color band95,
        Color water,
        Color rock,
        Color rockEdge,
        Color link,
        Color tried,
        Color predicted) {
    private static final Palette LIGHT = new Palette(
            false,
            Color.web("#ffffff"),
            Color.web("#20262b"),
            Color.web("#5e6a72"),
            Color.web("#e3e7e9"),
            Color.web("#14566b"),
            Color.web("#b9d6de"),
            Color.web("#dfecef"),
            Color.web("#e6f1f3"),
            Color.web("#efe5d2"),
            Color.web("#7d6746"),
            Color.web("#9e2f1a"),
            Color.web("#8a5c00"),
            Color.web("#5a3fa6"));

    private static final Palette DARK = new Palette(
            true,
            Color.web("#12171c"),
            Color.web("#e4e9ec"),
            Color.web("#98a4ad"),
            Color.web("#2a3238"),
            Color.web("#79c4d8"),
            Color.web("#2b5663"),
            Color.web("#1d363f"),
            Color.web("#182a31"),
            Color.web("#3d3425"),
            Color.web("#c9ad78"),
            Color.web("#ff8a6a"),
            Color.web("#f0c04a"),
            Color.web("#b9a6ff"));

    /** For the second and further curves. */
    private static final List<String> OTHERS_LIGHT = List.of("#8a6d1b", "#6b4c86", "#3f7a4e", "#77797b");

    private static final List<String> OTHERS_DARK = List.of("#dcbf63", "#c3a5de", "#86c796", "#b4b8bb");

    /** The palette on whose paper text of this colour can be read. */
    static Palette under(javafx.scene.paint.Paint text) {
        return text instanceof Color colour && colour.getBrightness() > 0.55 ? DARK : LIGHT;
    }

    Color curve(int number) {
        List<String> others = dark ? OTHERS_DARK : OTHERS_LIGHT;
        return number == 0 ? sea : Color.web(others.get((number - 1) % others.size()));
    }

    /** The colour between barely there and full. */
    Color strength(Color colour, double probability) {
        return colour.deriveColor(0, 1, 1, 0.16 + 0.84 * Math.min(1, Math.max(0, probability)));
    }
}
