package stillstand.view;

import atlantafx.base.theme.Styles;
import java.util.EnumMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import javafx.beans.property.ReadOnlyObjectWrapper;
import javafx.geometry.Insets;
import javafx.geometry.Orientation;
import javafx.geometry.Pos;
import javafx.scene.Node;
import javafx.scene.canvas.GraphicsContext;
import javafx.scene.control.ChoiceBox;
import javafx.scene.control.Label;
import javafx.scene.control.ScrollPane;
import javafx.scene.control.SplitPane;
import javafx.scene.control.ToggleButton;
import javafx.scene.control.ToggleGroup;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.FlowPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.StackPane;
import javafx.scene.layout.VBox;
import stillstand.comparison.SiteComparison;
import stillstand.comparison.SiteMotion;
import stillstand.report.ComparisonReport;
import stillstand.report.Wording;
import stillstand.uncertainty.Digits;
import stillstand.uncertainty.Interval;
import stillstand.view.ResultTable.Scale;
import stillstand.view.SitesModel.Content;
import stillstand.view.SitesModel.Part;
import stillstand.view.SitesModel.TogetherRow;

/** How sites compare: a map or a coast on one side and what the terminal says of it, one question at a time on the other. */
public final class SitesView extends BorderPane {
    private static final double LEAST_STRIP = 150;
    private static final double LEAST_SHARES = 84;

    private final SitesModel model;
    private final SitesPaper paper;
    private final ChoiceBox<String> view = new ChoiceBox<>();
    private final Label staleMark = new Label("OLDER THAN THE STUDY");
    private final Label reading = new Label();
    private final Label noPicture = new Label();
    private final VBox words = new VBox(8);
    private final ToggleGroup parts = new ToggleGroup();
    private final Label note = new Label();
    private final StackPane place = new StackPane();
    private final ReadOnlyObjectWrapper<Interval> differenceAxis = new ReadOnlyObjectWrapper<>(new Interval(-1, 1));
    private final ReadOnlyObjectWrapper<Interval> shareAxis = new ReadOnlyObjectWrapper<>(new Interval(0, 1));
    private final ResultTable<SiteComparison> differences =
            new ResultTable<>("sites-differences", "Differences between sites", "");
    private final ResultTable<SiteMotion> motions = new ResultTable<>("sites-motion", "Which way each site goes", "");
    private final ResultTable<TogetherRow> together =
            new ResultTable<>("sites-together", "What coasts and terraces say as a whole", "");
    private final Map<Part, Node> tables =
            new EnumMap<>(Map.of(Part.DIFFERENCES, differences, Part.MOTION, motions, Part.TOGETHER, together));
    private Part part = Part.DIFFERENCES;
    private boolean following;

    /** The view of a model. */
    public SitesView(SitesModel model) {
        this.model = model;
        paper = new SitesPaper(model);
        paper.setId("sites-paper");
        paper.onReading(reading::setText);
        differenceColumns();
        motionColumns();
        togetherColumns();
        SplitPane left = new SplitPane(picture(), inWords());
        left.setOrientation(Orientation.VERTICAL);
        left.setDividerPositions(0.64);
        SplitPane split = new SplitPane(left, inNumbers());
        split.setDividerPositions(0.38);
        setCenter(split);
        reading.textFillProperty()
                .addListener((property, before, now) -> paper.use(Palette.under(reading.getTextFill())));
        model.contentProperty().addListener((property, before, now) -> follow(now));
        model.pictureProperty().addListener((property, before, now) -> followPicture());
        follow(model.contentProperty().get());
    }

    private Region picture() {
        view.setId("sites-view");
        view.setAccessibleText("Map or coast");
        view.setMinWidth(180);
        view.valueProperty().addListener((property, before, now) -> {
            if (now != null && !following) {
                model.choose(now);
            }
        });
        staleMark.getStyleClass().addAll(Styles.TEXT_SMALL, Styles.WARNING, Styles.TEXT_BOLD);
        staleMark.setMinWidth(USE_PREF_SIZE);
        Label label = new Label("Look at");
        label.setLabelFor(view);
        HBox bar = new HBox(10, label, view, staleMark);
        bar.setAlignment(Pos.CENTER_LEFT);
        bar.setPadding(new Insets(10, 14, 6, 14));
        reading.setId("sites-reading");
        reading.setMinHeight(22);
        reading.setPadding(new Insets(0, 14, 4, 14));
        noPicture.setWrapText(true);
        noPicture.setPadding(new Insets(18));
        noPicture.setMaxWidth(420);
        StackPane sheet = new StackPane(paper, noPicture);
        StackPane.setAlignment(noPicture, Pos.TOP_LEFT);
        VBox.setVgrow(sheet, Priority.ALWAYS);
        return new VBox(bar, sheet, reading);
    }

    private Region inWords() {
        words.setId("sites-words");
        words.setPadding(new Insets(8, 14, 12, 14));
        ScrollPane scroll = new ScrollPane(words);
        scroll.setFitToWidth(true);
        scroll.setHbarPolicy(ScrollPane.ScrollBarPolicy.NEVER);
        scroll.setAccessibleText("How sites compare, in words");
        return scroll;
    }

    private Region inNumbers() {
        FlowPane switches = new FlowPane(4, 4);
        switches.getStyleClass().add("parts");
        for (Part each : Part.values()) {
            ToggleButton button = new ToggleButton(each.title());
            button.setId("sites-" + each.name().toLowerCase(Locale.ROOT) + "-part");
            button.setToggleGroup(parts);
            button.setSelected(each == part);
            button.setOnAction(event -> {
                button.setSelected(true); // a part cannot be left without going to another
                part = each;
                showPart();
            });
            switches.getChildren().add(button);
        }
        note.setWrapText(true);
        note.setMinHeight(USE_PREF_SIZE);
        note.getStyleClass().add("quiet");
        VBox box = new VBox(8, switches, note, place);
        box.setPadding(new Insets(10, 14, 12, 12));
        VBox.setVgrow(place, Priority.ALWAYS);
        return box;
    }

    private void follow(Content now) {
        differenceAxis.set(now.differenceAxis());
        differences.getItems().setAll(now.differences());
        motions.getItems().setAll(now.motions());
        together.getItems().setAll(now.together());
        staleMark.setVisible(now.stale());
        staleMark.setManaged(now.stale());
        Label head = new Label("In words");
        head.getStyleClass().add(Styles.TITLE_4);
        words.getChildren().setAll(head);
        List<String> sentences = now.words().isEmpty() ? List.of("Nothing to say of sites together yet.") : now.words();
        for (String sentence : sentences) {
            Label line = new Label(sentence);
            line.setWrapText(true);
            line.setMinHeight(USE_PREF_SIZE);
            words.getChildren().add(line);
        }
        followPicture();
        showPart();
    }

    private void followPicture() {
        following = true;
        view.getItems().setAll(model.views());
        view.setValue(model.pictureProperty().get().name());
        view.setDisable(model.views().isEmpty());
        following = false;
        noPicture.setText(model.whyNoPicture());
        paper.setVisible(!model.views().isEmpty());
        reading.setText("");
    }

    private void showPart() {
        note.setText(model.note(part));
        place.getChildren()
                .setAll(model.missing(part).map(SitesView::absent).orElseGet(() -> tables.getOrDefault(part, motions)));
    }

    private static Node absent(String sentence) {
        Label why = new Label(sentence);
        why.setWrapText(true);
        why.setMinHeight(USE_PREF_SIZE);
        why.setMaxWidth(460);
        why.setId("sites-missing");
        VBox box = new VBox(why);
        box.setPadding(new Insets(18, 4, 4, 4));
        return box;
    }

    private void differenceColumns() {
        differences.wrapped("Sites", pair -> pair.a() + " less " + pair.b(), 128);
        differences.number(
                "Rate (m/kyr)",
                pair -> Wording.rate(pair.difference()),
                pair -> pair.difference().median(),
                104);
        differences.number(
                "95 %",
                pair -> Wording.interval95(pair.difference()),
                pair -> pair.difference().shortest95().low(),
                110);
        differences.number(
                "First faster",
                pair -> ComparisonReport.percent(pair.probabilityAFaster()),
                SiteComparison::probabilityAFaster,
                86);
        differences.strip(
                "Difference, metres per thousand years",
                LEAST_STRIP,
                differenceAxis,
                pair -> pair.difference().shortest95().width(),
                pair -> Wording.rate(pair.difference()) + ", 95 % " + Wording.interval95(pair.difference()),
                SitesView::paint);
        differences.number(
                "Wrong, unshared",
                pair -> ComparisonReport.interval(pair.independent().difference()) + ", "
                        + ComparisonReport.percent(pair.independent().probabilityAFaster()),
                pair -> pair.independent().probabilityAFaster(),
                150);
        differences.number(
                "Correlation",
                pair -> pair.correlation()
                        .map(of -> Wording.number(Digits.text(of, 2)))
                        .orElse(""),
                pair -> pair.correlation().orElse(Double.NEGATIVE_INFINITY),
                90);
        differences.wrapped(
                "Shared",
                pair -> pair.sharedErrors()
                        + pair.effectiveFraction()
                                .map(part -> ComparisonReport.rough(Optional.of(part)))
                                .filter(words -> !words.isEmpty())
                                .map(words -> "." + words)
                                .orElse(""),
                170);
    }

    private static void paint(GraphicsContext g, SiteComparison pair, Scale scale, Palette palette) {
        double middle = scale.height() / 2;
        g.setFill(palette.strength(palette.sea(), 0.6));
        RateStroke.bar(g, pair.independent().difference().interval95(), scale, middle + 5, 2);
        RateStroke.bar(g, pair.independent().difference().interval68(), scale, middle + 3, 6);
        g.setFill(palette.link());
        RateStroke.bar(g, pair.difference().shortest95(), scale, middle - 6, 2);
        RateStroke.bar(g, pair.difference().shortest68(), scale, middle - 8, 6);
        g.setStroke(palette.ink());
        g.setLineWidth(1.6);
        double at = scale.x(pair.difference().median());
        g.strokeLine(at, middle - 10, at, middle);
    }

    private void motionColumns() {
        motions.words("Site", SiteMotion::site, 106);
        motions.words("Coast", site -> site.coast().orElse(""), 60);
        motions.words("By", SitesModel::standsBy, 56);
        motions.number(
                "Rate (m/kyr)",
                site -> Wording.quantity(site.rate()),
                site -> site.rate().median(),
                108);
        motions.number(
                "95 %",
                site -> ComparisonReport.interval(site.rate()),
                site -> site.rate().interval95().low(),
                104);
        motions.words("Goes", SiteMotion::motion, 54);
        motions.strip(
                "Probability of down, stable and up",
                LEAST_SHARES,
                shareAxis,
                SiteMotion::up,
                site -> "down " + ComparisonReport.percent(site.down()) + ", stable "
                        + ComparisonReport.percent(site.stable()) + ", up " + ComparisonReport.percent(site.up()),
                SitesView::paint);
        motions.number("Down", site -> ComparisonReport.percent(site.down()), SiteMotion::down, 54);
        motions.number("Stable", site -> ComparisonReport.percent(site.stable()), SiteMotion::stable, 60);
        motions.number("Up", site -> ComparisonReport.percent(site.up()), SiteMotion::up, 54);
    }

    private static void paint(GraphicsContext g, SiteMotion site, Scale scale, Palette palette) {
        double top = 7;
        double high = scale.height() - 14;
        double down = scale.x(site.down());
        double stable = scale.x(site.down() + site.stable());
        g.setFill(palette.sea());
        g.fillRect(scale.x(0), top, down - scale.x(0), high);
        g.setFill(palette.strength(palette.muted(), 0.5));
        g.fillRect(down, top, stable - down, high);
        g.setFill(palette.link());
        g.fillRect(stable, top, scale.x(1) - stable, high);
    }

    private void togetherColumns() {
        together.wrapped("Of", TogetherRow::of, 104);
        together.wrapped("What", TogetherRow::what, 140);
        together.wrapped("Answer", TogetherRow::answer, 200);
        together.wrapped("Beside it", TogetherRow::beside, 200);
        together.wrapped("But", TogetherRow::warning, 100);
    }
}
