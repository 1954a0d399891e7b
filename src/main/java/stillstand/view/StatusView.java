package stillstand.view;

import java.util.List;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.control.OverrunStyle;
import javafx.scene.control.ProgressBar;
import javafx.scene.control.Tooltip;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import stillstand.view.EvidenceModel.Finding;
import stillstand.view.RunModel.State;

/** The line at the foot: what is wrong, what is running, and what these numbers are not. */
final class StatusView extends HBox {
    /** What every screen of results has to say. */
    static final String CAUTION = "Not a hazard assessment: local codes and licensed practice decide.";

    private final WindowModel model;
    private final Button problems = new Button();
    private final ProgressBar bar = new ProgressBar(0);
    private final Label work = new Label();
    private final Button cancel = new Button("Cancel");

    StatusView(WindowModel model, Runnable showsProblems) {
        this.model = model;
        getStyleClass().add("status");
        problems.setId("problems");
        problems.getStyleClass().add("status-problems");
        problems.setOnAction(event -> showsProblems.run());
        bar.setId("progress");
        bar.setAccessibleText("Progress of the run");
        work.setId("work");
        work.setTextOverrun(OverrunStyle.CENTER_ELLIPSIS);
        work.setMaxWidth(Double.MAX_VALUE);
        HBox.setHgrow(work, Priority.ALWAYS);
        cancel.setId("cancel");
        cancel.setTooltip(new Tooltip("Stop the run; earlier results stay (Ctrl+Full stop)"));
        cancel.setOnAction(event -> model.run().cancel());
        Label caution = new Label(CAUTION);
        caution.getStyleClass().add("quiet");
        caution.setMinWidth(USE_PREF_SIZE);
        getChildren().addAll(problems, bar, cancel, work, caution);

        RunModel run = model.run();
        run.stateProperty().addListener((source, before, after) -> showRun());
        run.whatProperty().addListener((source, before, after) -> showRun());
        run.remainingProperty().addListener((source, before, after) -> showRun());
        run.outcomeProperty().addListener((source, before, after) -> showRun());
        run.fractionProperty().addListener((source, before, after) -> showRun());
        model.evidenceProperty().addListener((source, before, after) -> {
            after.ifPresent(evidence -> evidence.findingsProperty().addListener((list, was, is) -> showProblems()));
            showProblems();
        });
        showProblems();
        showRun();
    }

    private void showProblems() {
        List<Finding> findings = model.evidence().map(EvidenceModel::findings).orElse(List.of());
        long wrong = findings.stream().filter(Finding::isProblem).count();
        long odd = findings.size() - wrong;
        String text =
                (wrong == 0 ? "No problems" : count(wrong, "problem")) + (odd == 0 ? "" : ", " + count(odd, "warning"));
        problems.setText(text);
        problems.setAccessibleText(text + ". Press to see them.");
        problems.setVisible(model.evidence().isPresent());
        problems.getStyleClass().remove("wrong");
        if (wrong > 0) {
            problems.getStyleClass().add("wrong");
        }
    }

    private static String count(long number, String what) {
        return number + " " + what + (number == 1 ? "" : "s");
    }

    private void showRun() {
        RunModel run = model.run();
        boolean isBusy = run.state().isBusy();
        bar.setVisible(isBusy);
        bar.setManaged(isBusy);
        cancel.setVisible(isBusy);
        cancel.setManaged(isBusy);
        cancel.setDisable(run.state() == State.CANCELLING);
        bar.setProgress(run.state() == State.RUNNING ? run.fractionProperty().get() : -1);
        String left = run.remainingProperty().get();
        work.setText(
                run.state() == State.CANCELLING
                        ? "Cancelling"
                        : isBusy
                                ? Math.round(100 * run.fractionProperty().get()) + " %  "
                                        + run.whatProperty().get() + (left.isEmpty() ? "" : ", " + left)
                                : run.outcomeProperty().get());
        work.getStyleClass().remove("wrong-text");
        if (run.state() == State.FAILED) {
            work.getStyleClass().add("wrong-text");
        }
        work.setTooltip(work.getText().isEmpty() ? null : new Tooltip(work.getText()));
    }
}
