package stillstand.view;

import java.util.EnumMap;
import java.util.List;
import java.util.Map;
import java.util.concurrent.Executor;
import java.util.function.Consumer;
import javafx.beans.binding.Bindings;
import javafx.beans.value.ObservableBooleanValue;
import javafx.scene.Node;
import stillstand.study.Library;
import stillstand.view.WindowModel.Area;

/** The areas of an open study that show its sea level and its results. */
final class ResultAreas {
    private final Map<Area, Node> views = new EnumMap<>(Area.class);
    private final List<Consumer<Shown>> models;

    /**
     * Areas that show nothing yet.
     *
     * @param library what the study may name
     * @param background for previews and exports
     * @param foreground the window's own thread
     */
    ResultAreas(WindowModel model, Library library, Questions questions, Executor background, Executor foreground) {
        SeaLevelModel seaLevel = new SeaLevelModel(library, model::chooseSeaLevel);
        StairModel stair = new StairModel(background, foreground, model::pair);
        RatesModel rates = new RatesModel();
        LeverageModel leverage = new LeverageModel(model::askLeverage);
        SitesModel sites = new SitesModel();
        RecordModel record = new RecordModel(background, foreground);
        views.put(Area.SEA_LEVEL, new SeaLevelView(seaLevel));
        views.put(Area.STAIR, new StairView(stair));
        views.put(Area.RATES, new RatesView(rates));
        views.put(
                Area.LEVERAGE,
                new LeverageView(
                        leverage,
                        new LeverageView.Ways(
                                model::askLeverageAndRun,
                                () -> model.areaProperty().set(Area.SEA_LEVEL),
                                cannotAsk(model))));
        views.put(Area.SITES, new SitesView(sites));
        views.put(Area.RECORD, new RecordView(record, questions::folderToWrite));
        models = List.of(seaLevel::show, stair::show, rates::show, leverage::show, sites::show, record::show);
    }

    /** Nothing can be asked of a study that is read only, has problems, or is under way. */
    private static ObservableBooleanValue cannotAsk(WindowModel model) {
        StudyDocument opened = model.evidence()
                .map(EvidenceModel::document)
                .orElseThrow(() -> new IllegalArgumentException("a study must be open for its results to be shown"));
        return Bindings.createBooleanBinding(
                () -> opened.isReadOnly()
                        || opened.checked().study().isEmpty()
                        || model.run().state().isBusy(),
                opened.checkedProperty(),
                model.run().stateProperty());
    }

    Node view(Area area) {
        Node view = views.get(area);
        if (view == null) {
            throw new IllegalArgumentException("area must be one of results but is " + area);
        }
        return view;
    }

    void show(Shown shown) {
        models.forEach(model -> model.accept(shown));
    }
}
