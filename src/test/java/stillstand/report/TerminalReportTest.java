package stillstand.report;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import stillstand.SampleStudy;
import stillstand.uplift.LevelAnswer.Bound;
import stillstand.uplift.LevelAnswer.StageProbability;

class TerminalReportTest {
    private static final String TEXT = TerminalReport.text("An invented coast", SampleStudy.result(), "mine/results");

    @Test
    void theWholeSummaryReadsWell() {
        assertEquals("""
                An invented coast
                This is not a hazard assessment: rates over thousands of years are no forecast of the next ones. For
                building or planning, local codes and licensed practice decide.
                Rates are in m/kyr (the same as mm/yr), uplift positive: median ± one standard deviation, and the
                shortest interval that holds 95 %.

                North cliff: 2 levels, 1 with a rate
                  Flight of 2 levels: 0.44 ± 0.02 m/kyr, 95 % 0.40 to 0.47.
                  2 correlations remain possible: 0.300 to 0.320 with probability 0.15; 0.400 to 0.470 with
                  probability 0.80.
                  Level  Stage                Age (ka)     RSL (m)         Rate          95 %  First order
                  T4     5e 75 %, 5a 25 %  122.5 ± 3.3  60.9 ± 1.8  0.44 ± 0.02  0.40 to 0.47  0.44 ± 0.02
                    C-1  at its own age    122.5 ± 3.3              0.41 ± 0.03  0.35 to 0.47
                  Level  No shoreline  Age (ka)     Records
                  T1     5 %           82.0 ± 4.0   5a 80 %, 5c 15 %
                  T4     2 %           122.0 ± 3.0  5e 98 %
                  Stands of the sea without a level (recorded / unseen / re-occupied / outside the survey / absent):
                  5c at 33 ± 6 m: 0.16 / 0.60 / 0.15 / 0.10 / 0
                  The rate hangs most on: without T4 it would be 0.41 ± 0.06.
                  Halving one kind of error would change the width of the 95 % interval by: highstand levels −40 %,
                  elevation −4 %.
                  Sliding the rate by hand would have given 0.71 (heights missed by 0.8 m, R squared 0.999); a rate
                  at least as far off has probability <0.01.
                  The flight by curve: 0.40 ± 0.05 with made-up-curve (weight 0.75), 0.40 ± 0.05 with other-curve
                  (weight 0.25); weighed by evidence 0.40 ± 0.05, all alike 0.40 ± 0.05.
                  T4, C-2: the curve is too steep at this age to give a rate.
                  T2 waits: it is tied to no single highstand.
                  Between T1 and T4: 0.40 ± 0.05 m/kyr, 95 % 0.30 to 0.50.
                  What to measure next: mean change of the width of the 95 % interval (what it costs is for you to
                  say).
                  Flight: a date of T1 to 3 ka −39 ± 2 %.
                  T4: the taxon of C-1 −5.0 ± 0.3 %.
                  Pairings: a date of T1 to 3 ka would raise their mean certainty from 0.88 to 0.94.
                  If otherwise: an indicative range means, uniform in place of quadrature: T4 would have no rate of
                  its own, not 0.44 (0.40 to 0.48).
                  If otherwise: recording falls with age, no in place of yes: the flight would be 0.43 (0.39 to
                  0.47), not 0.44 (0.40 to 0.48).
                  Without sample C-1 T4 would have no rate of its own, not 0.44 (0.40 to 0.48); the flight would be
                  0.41 (0.37 to 0.45), not 0.44 (0.40 to 0.48).
                  Without curve made-up-curve the flight would be 0.45 (0.41 to 0.49), not 0.44 (0.40 to 0.48).

                Old shore: 1 level, 1 with a rate
                  S1 moves slower than 0.024 m/kyr up and 0.032 m/kyr down, at 95 %.
                  Level  Stage     Age (ka)    RSL (m)         Rate           95 %  First order
                  S1     5e     122.5 ± 3.3  7.0 ± 1.0  0.00 ± 0.01  −0.03 to 0.02  0.00 ± 0.01
                  S1: 4096 draws did not settle the digits asked for; its last digit may move with the seed.

                The 2 flights of the study together weigh the curves: made-up-curve 0.88 (as if the sites shared no
                error of a curve, which makes it look surer than it is).

                Sites together
                  North cliff: up (>99 %), 0.430 ± 0.020 m/kyr, by level T4.
                  South cliff: stable (75 %), 0.030 ± 0.020 m/kyr, by level S1.
                  North cliff less South cliff: 0.40 ± 0.02 m/kyr, 95 % 0.36 to 0.44; North cliff is faster with
                  probability >99 % (were their errors not shared, 95 % 0.34 to 0.46 and 97 %).
                  east, 2 sites pooled: their mean is 0.20 ± 0.10 m/kyr, and they differ by 0.100 ± 0.030.
                  east, mean over areas: 0.200 ± 0.020 m/kyr.
                  east, tilt along the coast: −0.0130 ± 0.0010 m/kyr per km (± 0.0010 were the errors not shared).
                  east, tilt over the map: 0.0100 ± 0.0010 m/kyr per km toward 090 degrees (± 0.0010 were the errors
                  not shared).
                  North cliff / T4, tilt by 6 points: −0.50 ± 0.13 m per km (± 0.13 were the errors not shared).
                  Over its age: −0.0040 ± 0.0010 m/kyr per km.

                Not done:
                  East bay: its curve ends at 20 ka

                Odd in the input:
                  levels.csv:3:4: elevation_m: 1200 looks like feet

                What it rests on:
                  =prior of the rate: cauchy 0 0.5 from -10 to 15 (the study)
                  datum offset: 0 m, exact (Stillstand's default) [North cliff]

                In mine/results: table1.csv for a paper, rates.csv with all digits, budget.csv with what each input
                does, ledger.csv with every assumption, results.json with all of it.
                Stillstand 0.1.0, seed 20261201.
                """, TEXT);
    }

    @Test
    void noLineIsWiderThanATerminal() {
        String longName = "a".repeat(300);
        TerminalReport.text(longName, SampleStudy.result(), longName + " " + longName)
                .lines()
                .filter(line -> !line.contains(longName))
                .forEach(line -> assertTrue(line.length() <= TerminalReport.WIDTH, line));
    }

    @Test
    void boundsAreRoundedUp() {
        assertEquals(
                "slower than 0.024 m/kyr up and 0.032 m/kyr down, at 95 %",
                Wording.bound(new Bound(0.0234, 0.0311, 0.95), SampleStudy.rate(-0.004, 0.014)));
    }

    @Test
    void stagesAreListedByProbability() {
        assertEquals("5e", Wording.stages(List.of(new StageProbability("5e", 1))));
        assertEquals(
                "5c 60 %, 5a 30 %, …",
                Wording.stages(List.of(
                        new StageProbability("5a", 0.3),
                        new StageProbability("5c", 0.6),
                        new StageProbability("5e", 0.1))));
        assertEquals("", Wording.stages(List.of()));
    }
}
