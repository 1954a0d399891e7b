package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.uncertainty.Normal;

/**
 * Probabilities of pairings and fates of rows at a fixed rate, 200 cells, against an independent implementation that prints 7 to 8
 * digits; invented tables and flights. Tolerance 1e-7. Where its table is shorter than the model's, the rows it lists are
 * compared.
 */
class PairingReferenceTest {
    private static final List<FlightRow> FIVE_ROWS = List.of(
            FlightRow.plain("R1", 81.0, 1.5, -22.0, 6.0),
            FlightRow.plain("R2", 122.0, 2.0, 5.0, 2.5),
            FlightRow.plain("R3", 198.0, 3.0, -15.0, 7.0),
            FlightRow.plain("R4", 238.0, 3.0, -8.0, 7.0),
            FlightRow.plain("R5", 330.0, 4.0, 2.0, 6.0));

    @Test
    void threeLevelsOneDated() {
        double[][] pairing = {
            {0.98326155, 0, 0, 0, 0},
            {0, 0.99991065, 0, 0, 0},
            {0, 0, 0.020178996, 0.96373733, 0}
        };
        double[] unseen = {0.012905853, 8.9347449e-05, 0.81932603, 0.022766643, 0.98356301};
        double[] over = {0, 0, 0.16049497, 0.013496022, 3.1834262e-08};
        double[] outside = {0.0038325972, 0, 0, 0, 0.016436958};
        double[] absent = {0, 0, 0, 0, 0};
        FilterWorkspace w = run(
                FlightModel.complete(
                        List.of(
                                FlightLevel.undated("L", new Normal(12.0, 2.0)),
                                FlightLevel.dated("L", new Normal(52.0, 2.0), List.of(new Normal(120.0, 3.0))),
                                FlightLevel.undated("L", new Normal(86.0, 2.0))),
                        FIVE_ROWS,
                        2.0,
                        150.0),
                0.4,
                SharedNumbers.plain(0.7, 0.3));
        assertEquals(9.1967233e-07, Math.exp(w.logEvidence), 1e-7 * 9.1967233e-07);
        assertPairing(pairing, w);
        assertRow(unseen, w.unseen);
        assertRow(over, w.over);
        assertRow(outside, w.outside);
        assertRow(absent, w.absent);
    }

    @Test
    void twoLevelsAtALowRate() {
        double[][] pairing = {
            {7.3603275e-06, 0.90713369, 0.0089400677, 0.031993939, 0.00076265241},
            {1.0793666e-08, 0.037353746, 0.036826737, 0.45881249, 0.40210622}
        };
        double[] unseen = {0.0019466112, 0.055511412, 0.0093170872, 0.055043646, 0.53947364};
        double[] over = {0, 1.1549698e-06, 0.94491611, 0.45414993, 0.057657389};
        double[] outside = {0.99804602, 0, 0, 0, 1.0174199e-07};
        double[] absent = {0, 0, 0, 0, 0};
        FilterWorkspace w = run(
                FlightModel.complete(
                        List.of(
                                FlightLevel.undated("L", new Normal(14.0, 1.5)),
                                FlightLevel.undated("L", new Normal(18.0, 1.5))),
                        FIVE_ROWS,
                        0.0,
                        60.0),
                0.08,
                SharedNumbers.plain(0.6, 0.2));
        assertEquals(0.0012063887, Math.exp(w.logEvidence), 1e-7 * 0.0012063887);
        assertPairing(pairing, w);
        assertRow(unseen, w.unseen);
        assertRow(over, w.over);
        assertRow(outside, w.outside);
        assertRow(absent, w.absent);
    }

    @Test
    void defaultModelEverythingOn() {
        double[][] pairing = {
            {0.999952, 9.736999e-08, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0},
            {0, 0, 0.9984365, 5.336949e-05, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0},
            {0, 0, 0.000808914, 0.8903184, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0},
            {0, 0, 0, 0, 5.903976e-07, 0.8404829, 0.001150093, 1.47975e-09, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0},
            {0, 0, 0, 0, 0, 0.05637652, 0.7857519, 0.0001190206, 7.779768e-07, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0},
            {0, 0, 0, 0, 0, 5.64195e-07, 0.02142278, 0.9640723, 0.0001565562, 1.224912e-06, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0
            },
            {0, 0, 0, 0, 0, 0, 2.470094e-05, 0.02280893, 0.4742591, 0.1618231, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0}
        };
        double[] unseen = {
            4.725806e-05,
            0.0004019724,
            0.0007531041,
            0.06079542,
            0.9999993,
            0.1030387,
            0.1166528,
            0.009906351,
            0.1262237,
            0.5919453,
            0.05947896,
            0,
            0,
            0,
            0,
            0,
            0,
            0,
            0,
            0
        };
        double[] over = {
            0,
            0.6994051,
            1.504636e-06,
            0.0488328,
            1.40365e-07,
            0.000101329,
            0.01769471,
            0.003093405,
            0.1547708,
            0.01915475,
            0.0003697578,
            0,
            0,
            0,
            0,
            0,
            0,
            0,
            0,
            0
        };
        double[] outside = {
            7.176905e-07,
            4.996561e-07,
            0,
            0,
            0,
            0,
            0,
            0,
            4.421139e-08,
            0.0031371,
            0.9401513,
            1.0,
            1.0,
            0.5,
            1,
            1,
            1,
            1,
            0.7,
            1
        };
        double[] absent = {
            0, 0.3001923, 0, 0, 0, 0, 0.05730301, 0, 0.244589, 0.2239385, 0, 0, 0, 0.5, 0, 0, 0, 0, 0.3, 0
        };
        FilterWorkspace w = run(
                new FlightModel(
                        ToyFlights.datedFlight(),
                        OlderRows.after(ToyFlights.defaultRows()),
                        2.0,
                        200.0,
                        1000,
                        0.1,
                        true,
                        true),
                0.62,
                new SharedNumbers(2, -4, 1.5, 0.7, 400, 0.8));
        assertEquals(-35.373041171175, w.logEvidence, 1e-8);
        assertPairing(pairing, w);
        assertRow(unseen, w.unseen);
        assertRow(over, w.over);
        assertRow(outside, w.outside);
        assertRow(absent, w.absent);
    }

    @Test
    void defaultModelAtALowRateWithSeveralDates() {
        double[][] pairing = {
            {
                0.864026,
                1.304362e-07,
                0.05205262,
                0.03748035,
                2.125836e-06,
                1.597626e-08,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0
            },
            {
                0.0009444246,
                1.493615e-07,
                0.2148075,
                0.282318,
                0.005060741,
                0.000131193,
                2.520332e-05,
                3.200598e-06,
                1.277361e-07,
                1.971244e-07,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0
            },
            {
                0,
                0,
                0,
                0,
                6.068067e-07,
                0.0007549543,
                0.01973675,
                0.1453176,
                0.0007332985,
                0.07338671,
                0.4459,
                7.371212e-05,
                3.917422e-07,
                1.177581e-08,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0
            },
            {
                0,
                0,
                0,
                0,
                0,
                3.348768e-08,
                5.161913e-06,
                0.0001436694,
                1.996599e-06,
                0.0008094021,
                0.349539,
                0.3090774,
                0.02377702,
                0.002700534,
                0.0002775847,
                1.471653e-08,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0
            },
            {
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                6.028223e-09,
                2.2162e-07,
                1.302323e-06,
                0.2660794,
                0.6957452,
                0.005174617,
                1.19655e-05,
                4.34723e-08,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0
            },
            {
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                1.129435e-09,
                3.096231e-09,
                9.619535e-06,
                0.001521896,
                0.02865282,
                0.3646531,
                0.1566129,
                0.01795692,
                0.0005572101,
                1.585221e-05,
                1.833745e-07,
                0,
                0,
                0,
                0,
                0,
                0
            },
            {
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                2.173343e-08,
                0.0001301581,
                0.002288686,
                0.158427,
                0.1267117,
                0.08181841,
                0.03584978,
                0.009879776,
                0.001569361,
                0.0001302768,
                5.079891e-06,
                8.329374e-08,
                0
            },
            {
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                0,
                1.350587e-09,
                1.602705e-05,
                0.0004384998,
                0.06345453,
                0.101091,
                0.1088906,
                0.08136044,
                0.0381985,
                0.01021523,
                0.001410918,
                9.128066e-05,
                2.509648e-06,
                2.659677e-08
            }
        };
        double[] unseen = {
            0.1227712,
            6.32316e-08,
            0.02848787,
            0.02685502,
            0.9948646,
            0.09269944,
            0.2490506,
            0.4293807,
            0.006078207,
            0.1231824,
            0.1846001,
            0.6742722,
            0.4140856,
            0.06486133,
            0.608876,
            0.08688091,
            0.367042,
            0.5313728,
            0.316767,
            0.6939604,
            0.3007296,
            0.2130033,
            0.1559994,
            0.09336513,
            0.03681462,
            0.008201896,
            0.0009126462,
            4.519342e-05,
            8.842777e-07
        };
        double[] over = {
            0,
            0.6914189,
            0.6986921,
            0.6518747,
            7.193035e-05,
            0.9064144,
            0.5113105,
            0.4251547,
            0.5923206,
            0.6047596,
            0.01996094,
            0.01657672,
            0.5621368,
            0.4268774,
            0.1247574,
            0.2158519,
            0.5991305,
            0.103816,
            0.2613,
            0.06115782,
            0.4118478,
            0.4101797,
            0.3190818,
            0.1841511,
            0.07150246,
            0.0165904,
            0.002024143,
            0.0001135441,
            2.546427e-06
        };
        double[] outside = {
            0.01225837,
            0.008580845,
            0.005959978,
            0.00147195,
            0,
            0,
            0,
            0,
            0,
            0,
            0,
            0,
            0,
            0,
            0,
            0,
            0,
            2.236929e-08,
            3.420975e-06,
            0.00504335,
            0.05906264,
            0.1860921,
            0.4077084,
            0.6744054,
            0.8798983,
            0.9736665,
            0.9969669,
            0.9998387,
            0.9999965
        };
        double[] absent = {
            0, 0.2999999, 0, 0, 0, 0, 0.2198719, 0, 0.4008658, 0.1978617, 0, 0, 0, 0.5055595, 0, 0, 0, 0, 0.2625894, 0,
            0, 0, 0, 0, 0, 0, 0, 0, 0
        };
        FilterWorkspace w = run(
                new FlightModel(
                        severalDates(), OlderRows.after(ToyFlights.defaultRows()), -20.0, 160.0, 1000, 0.1, true, true),
                0.15,
                new SharedNumbers(2, -4, 1.5, 0.7, 400, 0.8));
        assertEquals(-56.577716335282, w.logEvidence, 1e-8);
        assertPairing(pairing, w);
        assertRow(unseen, w.unseen);
        assertRow(over, w.over);
        assertRow(outside, w.outside);
        assertRow(absent, w.absent);
    }

    private static List<FlightLevel> severalDates() {
        List<FlightLevel> levels = ToyFlights.undatedFlight();
        ToyFlights.date(levels, 4, 580, 20, 610, 25, 700, 30);
        return levels;
    }

    private static FilterWorkspace run(FlightModel model, double rate, SharedNumbers shared) {
        ShorelineFilter filter = new ShorelineFilter(model, 200);
        FilterWorkspace w = filter.workspace(true);
        new BackwardPass(filter, w).run(new UpliftHistory.ConstantRate(rate), shared);
        return w;
    }

    private static void assertPairing(double[][] expected, FilterWorkspace w) {
        for (int i = 0; i < expected.length; i++) {
            for (int j = 0; j < expected[i].length; j++) {
                assertEquals(expected[i][j], w.pair[i * w.rows + j], 1e-7, "level " + i + ", row " + j);
            }
        }
    }

    private static void assertRow(double[] expected, double[] found) {
        for (int j = 0; j < expected.length; j++) {
            assertEquals(expected[j], found[j], 1e-7, "row " + j);
        }
    }
}
