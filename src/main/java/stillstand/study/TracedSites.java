package stillstand.study;

import java.util.ArrayList;
import java.util.List;
import stillstand.uplift.FlightResult;
import stillstand.uplift.Flights;
import stillstand.uplift.SeaLevelBasis;
import stillstand.uplift.TracedFlights;
import stillstand.uplift.TracedFlights.TracedSite;

/** The sites of a study whose terraces were traced to one another, once each has its flight. */
final class TracedSites {
    private TracedSites() {}

    /** Whether traces can be used: one account of sea level, one rate a site. */
    static boolean areUsed(Study study) {
        return study.settings().rate().changes() == StudySettings.Changes.NONE
                && study.sites().stream().allMatch(plan -> plan.ensemble().size() == 1);
    }

    /**
     * The flights under the traces; none where no site is traced to another.
     *
     * @param flights of the sites alone
     * @throws IllegalArgumentException if no joint correlation agrees with the traces
     */
    static List<Flights.Answered> flights(Study study, List<FlightResult> flights, TracedFlights tracing) {
        List<TracedSite> sites = new ArrayList<>();
        for (SitePlan plan : study.sites()) {
            if (areUsed(study) && TracedFlights.isTraced(plan.site())) {
                SeaLevelBasis basis = plan.ensemble().bases().get(0);
                sites.add(new TracedSite(
                        plan.site(),
                        basis,
                        plan.prior(),
                        flights.stream()
                                .filter(flight ->
                                        flight.site().equals(plan.site().name()))
                                .findFirst()));
            }
        }
        return sites.size() > 1 ? tracing.of(sites) : List.of();
    }
}
