package stillstand.uplift;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import stillstand.uncertainty.DensityBins;
import stillstand.uncertainty.Interval;

/**
 * Turns the answer of a flight that was matched upside down the right way up. Reefs that drowned on a sinking coast are the mirror
 * image of terraces on a rising one: deeper is older, and a reef survives only if no later lowstand reached it. So their heights, the
 * lowstands and the prior of the rate are mirrored about 0, matched as a flight, and every rate and height of the answer mirrored back.
 */
final class FlightMirror {
    private FlightMirror() {}

    static Flights.Answered of(Flights.Answered mirrored) {
        return new Flights.Answered(
                of(mirrored.flight()),
                mirrored.residuals().stream()
                        .map(one -> new LevelResidual(
                                one.site(),
                                one.level(),
                                -one.predictedMetres(),
                                -one.measuredMetres(),
                                one.sigmaMetres()))
                        .toList(),
                mirrored.assumptions());
    }

    private static FlightResult of(FlightResult flight) {
        return new FlightResult(
                flight.site(),
                flight.model(),
                of(flight.rate()),
                flight.probabilityUplift().map(up -> 1 - up),
                flight.bound().map(FlightMirror::of),
                reversed(flight.regions68().stream().map(FlightMirror::of).toList()),
                reversed(flight.regions95().stream().map(FlightMirror::of).toList()),
                reversed(flight.weights68()),
                reversed(flight.weights95()),
                flight.segments().stream().map(FlightMirror::of).toList(),
                flight.pairings(),
                flight.unmatched(),
                flight.probabilityAllStray(),
                flight.mostProbable(),
                flight.predictedAges(),
                flight.logEvidence(),
                flight.numericalError(),
                flight.missing().stream().map(FlightMirror::of).toList(),
                flight.leaveOneOut().stream()
                        .map(out -> new FlightResult.LeftOut(out.level(), out.logPredictive(), of(out.rate())))
                        .toList(),
                flight.halving(),
                flight.slidingFits().stream()
                        .map(fit -> new FlightResult.HandFit(
                                fit.criterion(), -fit.rate(), fit.rmsMetres(), fit.rSquared(), fit.probabilityAsFar()))
                        .toList(),
                flight.modelChoice(),
                flight.history()
                        .map(history -> new RateHistory(
                                history.changes().stream().map(FlightMirror::of).toList(),
                                history.bins().stream().map(FlightMirror::of).toList())));
    }

    static Rate of(Rate rate) {
        return new Rate(
                -rate.median(),
                rate.mean().map(mean -> -mean),
                rate.sd(),
                of(rate.interval68()),
                of(rate.interval95()),
                of(rate.shortest68()),
                of(rate.shortest95()),
                rate.density().map(bins -> new DensityBins(-bins.to(), -bins.from(), reversed(bins.values()))),
                rate.unit());
    }

    private static Interval of(Interval interval) {
        return new Interval(-interval.high(), -interval.low());
    }

    private static LevelAnswer.Bound of(LevelAnswer.Bound bound) {
        return new LevelAnswer.Bound(bound.downSlowerThan(), bound.upSlowerThan(), bound.probability());
    }

    private static FlightResult.Segment of(FlightResult.Segment segment) {
        return new FlightResult.Segment(segment.fromKa(), segment.toKa(), of(segment.rate()));
    }

    private static FlightResult.Fate of(FlightResult.Fate fate) {
        return new FlightResult.Fate(
                fate.highstand(),
                fate.ageKa(),
                -fate.heightMetres(),
                fate.heightSigmaMetres(),
                fate.recorded(),
                fate.unseen(),
                fate.reoccupied(),
                fate.outside(),
                fate.absent());
    }

    private static RateHistory.Change of(RateHistory.Change change) {
        return new RateHistory.Change(
                change.model(),
                change.age(),
                1 - change.probabilityFasterBefore(),
                change.datedYounger(),
                change.datedOlder());
    }

    private static <T> List<T> reversed(List<T> values) {
        List<T> others = new ArrayList<>(values);
        Collections.reverse(others);
        return others;
    }

    /** What a prior of a rate is in the mirror. */
    static RatePrior of(RatePrior prior, boolean mirrored) {
        return mirrored ? new MirroredPrior(prior) : prior;
    }
}
