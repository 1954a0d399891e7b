package stillstand.uplift;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * The filter at a fixed rate and fixed shared numbers, each addition of the default model alone and all together, against an
 * independent implementation (another language, another hand, other code for the normal distribution); invented table and
 * flights. Tolerance 1e-8 in log Z at equal cell counts.
 */
class ShorelineFilterReferenceTest {
    /**
     * Columns: case, flight, additions (a own half of the curve's age variance, g local sea level, o older rows, x existence, d
     * duration, 0 today's sea is the floor), surveyed range, rate, offset, interstadial factor, age shift, decay, wrong-date
     * probability, log Z at 100, 200, 400 cells.
     */
    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = '|', textBlock = """
            plain | DATED | - | 2.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | Infinity | 0.0 | -32.43878073753 | -32.387824575805 | -32.372693990589
            everything on | DATED | agoxd0 | 2.0 | 200.0 | 0.62 | 2.0 | -4.0 | 1.5 | 400.0 | 0.1 | -35.424408336818 | -35.373041171175 | -35.358161355763
            everything on low rate older rows several dates z lo negative | LOW_RATE | agoxd0 | -20.0 | 160.0 | 0.15 | 2.0 | -4.0 | 1.5 | 400.0 | 0.1 | -56.518556445263 | -56.577716335282 | -56.593696605358
            everything on one level three dates | THREE_DATES | agoxd0 | 2.0 | 200.0 | 0.62 | 2.0 | -4.0 | 1.5 | 400.0 | 0.1 | -47.752850716656 | -47.701335068846 | -47.686418260158
            everything on negative rate z lo negative | DATED | agoxd0 | -20.0 | 200.0 | -0.01 | 2.0 | -4.0 | 1.5 | 400.0 | 0.1 | -54.860412882884 | -55.035743331863 | -55.088280038236
            offset only | DATED | - | 2.0 | 200.0 | 0.62 | 2.0 | 0.0 | 0.0 | Infinity | 0.0 | -32.482035673869 | -32.430980599632 | -32.415823589924
            interstadial only | DATED | - | 2.0 | 200.0 | 0.62 | 0.0 | -4.0 | 0.0 | Infinity | 0.0 | -32.206707285674 | -32.153600856527 | -32.137919971441
            age shift only | DATED | - | 2.0 | 200.0 | 0.62 | 0.0 | 0.0 | 1.5 | Infinity | 0.0 | -32.873903985508 | -32.824369875462 | -32.809600193851
            own age half only | DATED | a | 2.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | Infinity | 0.0 | -32.448515306907 | -32.397745967743 | -32.382661585042
            gia spread only | DATED | g | 2.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | Infinity | 0.0 | -32.588319566696 | -32.533679660856 | -32.517590834063
            plain low rate undated | UNDATED | - | 2.0 | 200.0 | 0.15 | 0.0 | 0.0 | 0.0 | Infinity | 0.0 | -32.880674805704 | -33.002286685173 | -33.032253232327
            older rows only low rate undated | UNDATED | o | 2.0 | 200.0 | 0.15 | 0.0 | 0.0 | 0.0 | Infinity | 0.0 | -33.763868354667 | -33.884706066201 | -33.914480302036
            plain z lo negative filter edge at z lo | DATED | - | -20.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | Infinity | 0.0 | -32.478535601202 | -32.413828864545 | -32.395023939841
            todays sea edge 0 only z lo negative | DATED | 0 | -20.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | Infinity | 0.0 | -32.461462936386 | -32.409500584818 | -32.39392816953
            decay only | DATED | - | 2.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | 400.0 | 0.0 | -33.613583186573 | -33.562474701034 | -33.547309149682
            existence only | DATED | x | 2.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | Infinity | 0.0 | -32.629216448275 | -32.578355142237 | -32.563248476809
            duration in age kernel only | DATED | d | 2.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | Infinity | 0.0 | -33.11634322209 | -33.067653204447 | -33.05347948379
            date mixture only | DATED | - | 2.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | Infinity | 0.1 | -32.75041898801 | -32.699469358753 | -32.684340554992
            plain one date 60 ka too old | ONE_DATE_TOO_OLD | - | 2.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | Infinity | 0.0 | -35.581317930373 | -35.545561816948 | -35.534248822481
            date mixture only one date 60 ka too old | ONE_DATE_TOO_OLD | - | 2.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | Infinity | 0.1 | -35.820947918687 | -35.784190949562 | -35.77262456948
            several dates on one level only | THREE_AGREEING_DATES | - | 2.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | Infinity | 0.0 | -39.909258941014 | -39.858196761051 | -39.843039460601
            several dates with mixture | THREE_DATES | - | 2.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | Infinity | 0.1 | -45.039167839351 | -44.988222209586 | -44.973094507616
            several dates with mixture and duration | THREE_DATES | d | 2.0 | 200.0 | 0.62 | 0.0 | 0.0 | 0.0 | Infinity | 0.1 | -45.727055393187 | -45.678371426566 | -45.664199408786
            negative rate only | DATED | - | 2.0 | 200.0 | -0.01 | 0.0 | 0.0 | 0.0 | Infinity | 0.0 | -54.556961398282 | -54.897258095328 | -54.989959768559
            negative rate today sea edge 0 z lo negative | DATED | 0 | -20.0 | 200.0 | -0.01 | 0.0 | 0.0 | 0.0 | Infinity | 0.0 | -54.772418628647 | -54.979473245815 | -55.039087714104
            """)
    void evidenceEqualsThatOfAnIndependentImplementation(
            String name,
            String flight,
            String additions,
            double fromMetres,
            double toMetres,
            double rate,
            double offsetMetres,
            double interstadialMetres,
            double ageShiftKa,
            double decayKa,
            double wrongDates,
            double at100,
            double at200,
            double at400) {
        List<FlightRow> rows = ToyFlights.rows(
                additions.contains("a"), additions.contains("g"), additions.contains("x"), additions.contains("d"));
        FlightModel model = new FlightModel(
                flight(flight),
                additions.contains("o") ? OlderRows.after(rows) : rows,
                fromMetres,
                toMetres,
                1000,
                wrongDates,
                additions.contains("0"),
                true);
        SharedNumbers shared = new SharedNumbers(offsetMetres, interstadialMetres, ageShiftKa, 0.7, decayKa, 0.8);
        assertEquals(at100, logEvidence(model, 100, rate, shared), 1e-8);
        assertEquals(at200, logEvidence(model, 200, rate, shared), 1e-8);
        assertEquals(at400, logEvidence(model, 400, rate, shared), 1e-8);
    }

    private static double logEvidence(FlightModel model, int cells, double rate, SharedNumbers shared) {
        ShorelineFilter filter = new ShorelineFilter(model, cells);
        return filter.logEvidence(new UpliftHistory.ConstantRate(rate), shared, filter.workspace(false));
    }

    private static List<FlightLevel> flight(String name) {
        List<FlightLevel> levels = switch (name) {
            case "LOW_RATE" -> ToyFlights.undatedFlight();
            case "UNDATED" -> ToyFlights.undatedSeven();
            default -> ToyFlights.datedFlight();
        };
        switch (name) {
            case "LOW_RATE" -> ToyFlights.date(levels, 4, 580, 20, 610, 25, 700, 30);
            case "THREE_DATES" -> ToyFlights.date(levels, 5, 231.5, 4.7, 240, 6, 298, 6);
            case "THREE_AGREEING_DATES" -> ToyFlights.date(levels, 5, 231.5, 4.7, 240, 6, 226, 5);
            case "ONE_DATE_TOO_OLD" -> ToyFlights.date(levels, 5, 291.5, 4.7);
            default -> {}
        }
        return levels;
    }
}
