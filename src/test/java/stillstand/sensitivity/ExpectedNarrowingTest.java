package stillstand.sensitivity;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import stillstand.ledger.RunMonitor;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.HighstandClass;
import stillstand.sealevel.SharedErrors;
import stillstand.shoreline.HeightTerm;
import stillstand.uncertainty.DrawStreams;
import stillstand.uncertainty.Exact;
import stillstand.uncertainty.Normal;
import stillstand.uplift.FlightIntegration;
import stillstand.uplift.FlightLevel;
import stillstand.uplift.FlightModel;
import stillstand.uplift.FlightRow;
import stillstand.uplift.NormalPrior;
import stillstand.uplift.RatePosterior;
import stillstand.uplift.SeaAtLevel;
import stillstand.uplift.SharedNodes;
import stillstand.uplift.SharedNumbers;
import stillstand.uplift.SharedPriors;

/**
 * One level, normal errors, an age known exactly: the rate is normal, and the variance left by a second survey does not depend on
 * what it finds, so that the expected width of the interval is known in closed form.
 */
class ExpectedNarrowingTest {
    private static final DrawStreams STREAMS = new DrawStreams(11);
    private static final double AGE_KA = 125;
    private static final double SURVEY = 4;
    private static final double REST = 2;
    private static final double SEA = 3;
    /** 2 x 1.959964 */
    private static final double WIDTH = 3.919928;

    @Test
    void aSecondSurveyOfALoneLevel() {
        for (double again : new double[] {3, 1}) {
            Optional<NextMeasurement> found = level(new Exact(AGE_KA)).of(NextMeasurement.Kind.SURVEY, "survey", again);
            checkSurvey(found.orElseThrow(), again, 0);
        }
    }

    @Test
    void aSecondSurveyInAFlightOfOneLevel() {
        for (double again : new double[] {3, 1}) {
            checkSurvey(flight().survey(0, again), again, 5);
        }
    }

    private static void checkSurvey(NextMeasurement found, double again, double priorSigma) {
        double now = rateSigma(SURVEY, priorSigma);
        double then = rateSigma(1 / Math.sqrt(1 / (SURVEY * SURVEY) + 1 / (again * again)), priorSigma);
        assertEquals(WIDTH * now, found.width95(), 0.02 * WIDTH * now);
        double change = 100 * (then / now - 1);
        assertEquals(change, found.width95ChangePercent(), 4 * found.width95ChangePercentError() + 0.3);
        assertTrue(found.width95ChangePercentError() < 1.5, "error " + found.width95ChangePercentError() + " per cent");
        assertTrue(found.effectiveDraws() > 300, "draws " + found.effectiveDraws());
    }

    private static double rateSigma(double survey, double priorSigma) {
        double sigma = Math.sqrt(survey * survey + REST * REST + SEA * SEA) / AGE_KA;
        return priorSigma > 0 ? 1 / Math.sqrt(1 / (sigma * sigma) + 1 / (priorSigma * priorSigma)) : sigma;
    }

    @Test
    void aDateOfALoneLevelByItsFirstOrderVariance() {
        // U = x / t with x = 60 +- sqrt(29) m, t = 125 +- 12 ka: the terms left out are of relative size (12 / 125)^2
        double ageSigma = 12;
        double again = 4;
        NextMeasurement found = level(new Normal(AGE_KA, ageSigma))
                .of(NextMeasurement.Kind.DATE, LevelInputs.AGE, again)
                .orElseThrow();
        double x = SURVEY * SURVEY + REST * REST + SEA * SEA;
        double rate = 60 / AGE_KA;
        double left = 1 / (1 / (ageSigma * ageSigma) + 1 / (again * again));
        double now = Math.sqrt(x + rate * rate * ageSigma * ageSigma);
        double then = Math.sqrt(x + rate * rate * left);
        assertEquals(100 * (then / now - 1), found.width95ChangePercent(), 1.0);
    }

    @Test
    void aSurveyWorseByFarThanTheFirstChangesNothing() {
        NextMeasurement found = flight().survey(0, 400);
        assertEquals(0, found.width95ChangePercent(), 0.5);
    }

    private static LevelMeasurements level(stillstand.uncertainty.Uncertain ageKa) {
        Highstand stand = new Highstand(
                "5e",
                HighstandClass.INTERGLACIAL,
                AGE_KA,
                0,
                new Normal(5, SEA),
                0,
                1,
                false,
                false,
                false,
                0,
                "invented");
        List<HeightTerm> height = List.of(
                new HeightTerm(HeightTerm.Source.SURVEY, 1, new Normal(65, SURVEY)),
                new HeightTerm(HeightTerm.Source.INDICATIVE_RANGE, 1, new Normal(0, REST)));
        return new LevelMeasurements(
                "site",
                "T1",
                Optional.empty(),
                height,
                new Exact(0),
                List.of(new SeaAtLevel.AtHighstand(stand, SharedErrors.NONE, 1, ageKa)),
                STREAMS,
                RunMonitor.SILENT);
    }

    private static FlightMeasurements flight() {
        FlightModel model = FlightModel.complete(
                List.of(FlightLevel.undated("T1", new Normal(65, Math.hypot(SURVEY, REST)))
                        .neverStray()),
                List.of(FlightRow.plain("5e", AGE_KA, 0, 5, SEA)),
                5,
                125);
        NormalPrior prior = new NormalPrior(0, 5);
        RatePosterior whole = FlightIntegration.rate(
                model,
                prior,
                SharedNodes.fixed(SharedNumbers.plain(1, 0.1)),
                new FlightIntegration.Effort(300, 125),
                RunMonitor.SILENT);
        SharedPriors shared = new SharedPriors(
                0,
                0,
                0,
                new SharedPriors.Recording.Known(1),
                List.of(Double.POSITIVE_INFINITY),
                new SharedPriors.Strays.Known(0.1));
        return new FlightMeasurements("site", model, List.of(SURVEY), whole, prior, shared, STREAMS, RunMonitor.SILENT);
    }
}
