package stillstand.figure;

import java.awt.Color;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.jfree.chart.plot.XYPlot;
import stillstand.sensitivity.CurveChoice;
import stillstand.study.StudyResult;
import stillstand.uncertainty.Interval;
import stillstand.uplift.Rate;

/** All rates of all sites on one axis; where there are several curves, each flight under each of them too. */
final class ForestFigure {
    private static final double ROW = 11.5;

    private ForestFigure() {}

    /** A row: a heading, a flight, a flight under one curve, or a level. */
    private record Row(String name, Optional<Rate> rate, List<Interval> inner, List<Interval> outer, Color colour) {
        static Row of(String name, Rate rate, Color colour) {
            return new Row(name, Optional.of(rate), List.of(rate.shortest68()), List.of(rate.shortest95()), colour);
        }
    }

    static boolean has(StudyResult result) {
        return rows(result, SiteView.all(result)).stream()
                .anyMatch(row -> row.rate().isPresent());
    }

    private static List<Row> rows(StudyResult result, List<SiteView> sites) {
        List<Row> rows = new ArrayList<>();
        for (SiteView site : sites) {
            List<Row> below = new ArrayList<>();
            site.flight()
                    .ifPresent(flight -> below.add(new Row(
                            "whole flight",
                            Optional.of(flight.rate()),
                            flight.regions68(),
                            flight.regions95(),
                            Style.LINK)));
            result.curveChoice().stream()
                    .filter(choice -> choice.site().equals(site.site())
                            && choice.level().isEmpty()
                            && !choice.curve().equals(CurveChoice.EVIDENCE_WEIGHTED))
                    .forEach(choice -> below.add(Row.of(
                            choice.mixesCurves() ? "all curves alike" : choice.curve(), choice.rate(), Style.MUTED)));
            site.levels()
                    .forEach(level ->
                            level.answer().rate().ifPresent(rate -> below.add(Row.of(level.name(), rate, Style.SEA))));
            if (!below.isEmpty()) {
                rows.add(new Row("", Optional.empty(), List.of(), List.of(), Style.INK));
                rows.addAll(below);
            }
        }
        return rows;
    }

    static Page page(String name, StudyResult result, double widthPoints) {
        List<SiteView> sites = SiteView.all(result);
        List<Row> rows = rows(result, sites);
        List<Rate> rates = rows.stream().flatMap(row -> row.rate().stream()).toList();
        XYPlot plot = Rows.plot(
                RateMarks.axis(rates),
                rows.stream().map(Row::name).toList(),
                rows.stream()
                        .map(row -> row.rate().map(Numbers::rate).orElse(""))
                        .toList(),
                widthPoints);
        Rows.grid(plot);
        List<String> headings =
                sites.stream().filter(RatesFigure::has).map(SiteView::site).toList();
        Layer.add(plot, pen -> paint(pen, rows, headings));
        return new Page(
                name,
                "Rates of all sites",
                RateMarks.key(),
                Style.chart(plot),
                "To the right: median and shortest 95 % interval, m/kyr. An arrow head: the interval goes on.",
                widthPoints,
                Rows.height(rows.size(), ROW));
    }

    private static void paint(Pen pen, List<Row> rows, List<String> headings) {
        int site = 0;
        for (int i = 0; i < rows.size(); i++) {
            Row row = rows.get(i);
            double y = pen.y(i);
            if (row.rate().isEmpty()) {
                heading(pen, y, headings.get(site++));
            } else {
                RateMarks.bars(pen, y, row.outer(), row.inner(), row.colour());
                pen.dot(pen.x(row.rate().get().median()), y, 2, Style.INK);
            }
        }
    }

    private static void heading(Pen pen, double y, String site) {
        String text = Face.fitted(site, Face.SEMIBOLD.at(Style.TEXT, List.of(site)), pen.right() - pen.left() - 4);
        pen.box(pen.left(), y - ROW / 2 - 1, pen.right(), y + ROW / 2, Style.PAPER);
        pen.text(text, pen.left() + 2, y, Pen.Anchor.START, Face.SEMIBOLD, Style.TEXT, Style.INK);
        pen.line(pen.left(), y + ROW / 2, pen.right(), y + ROW / 2, Style.HAIR, Style.line(0.6));
    }
}
