package stillstand.uplift;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.sealevel.Highstand;
import stillstand.sealevel.SharedErrors;
import stillstand.shoreline.IndicativeRule;

/**
 * A site that takes part by its flight.
 *
 * @param site its name
 * @param coast the coast whose local sea level it shares
 * @param model levels, rows and rules of its matching
 * @param shared priors of the numbers its rows share; the offset holds the datum's error too
 * @param errors what the rows share with those of other sites
 * @param datumSigmaMetres standard deviation of the datum's error
 * @param rows what other sites know each row by
 * @param prior of the rate
 * @param alone rate of the flight by itself
 */
record ComparedFlight(
        String site,
        String coast,
        FlightModel model,
        SharedPriors shared,
        SharedErrors errors,
        double datumSigmaMetres,
        List<SharedRow> rows,
        RatePrior prior,
        Rate alone)
        implements ComparedSite {
    /**
     * What sites share of a row.
     *
     * @param key the same at all sites that read the same table
     * @param globalVarianceMetres2 variance of its level that all sites share
     * @param localVarianceMetres2 variance of its level that one coast shares
     */
    record SharedRow(String key, double globalVarianceMetres2, double localVarianceMetres2) {
        static SharedRow of(Highstand row) {
            double level = row.level().standardDeviation();
            double local = row.localOffsetSigmaMetres();
            return new SharedRow(
                    row.source() + " / " + row.stage() + " / " + row.ageKa(), level * level, local * local);
        }

        /** Variance shared with the other sites. */
        double varianceMetres2(boolean oneCoast) {
            return globalVarianceMetres2 + (oneCoast ? localVarianceMetres2 : 0);
        }
    }

    ComparedFlight {
        rows = List.copyOf(rows);
    }

    /** Under one account of sea level, for which {@link FlightSetup#whyNot} says nothing. */
    static ComparedFlight of(SiteCase site, SeaLevelBasis basis, Rate alone, MatchingRules rules, IndicativeRule rule) {
        FlightSetup setup = FlightSetup.of(site.site(), basis, rules, rule);
        List<SharedRow> rows = new ArrayList<>();
        for (Highstand row : basis.highstands().rows()) {
            rows.add(SharedRow.of(row));
        }
        return new ComparedFlight(
                site.site().name(),
                site.coast(),
                setup.model(),
                setup.shared(),
                basis.highstands().sharedErrors(),
                site.site().datumOffsetMetres().standardDeviation(),
                rows,
                site.prior(),
                alone);
    }

    @Override
    public Optional<String> level() {
        return Optional.empty();
    }
}
