package stillstand.files;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import stillstand.uncertainty.Uncertain;

/** The shipped tables against the published figures. */
class ShippedEvidenceReferenceTest {
    private static final ShippedEvidence EVIDENCE = ShippedEvidence.load();

    /**
     * Limits of the central 95 % and central values, Hibbert et al. 2016 (Quaternary Science Reviews 145, 1) as applied in
     * WALIS v1.0 (Rovere et al. 2023, Earth System Science Data 15, 1-23). Met as quantiles to 1e-6 m.
     */
    @ParameterizedTest
    @CsvSource({
        "acropora-palmata, 0.4, 1.5, 9.4",
        "acropora-cervicornis, 0.5, 4.6, 16.4",
        "orbicella-annularis, 1.1, 9.7, 17",
        "montastraea-cavernosa, 1.8, 10, 23",
        "diploria, 0.6, 7.3, 23.4",
        "siderastrea-siderea, 1.2, 10, 23",
        "siderastrea-w-atlantic, 1.2, 10, 32",
        "porites-astreoides, 0.7, 6.8, 20.5",
        "porites, 0, 4, 66",
        "porites-lutea, 0, 0, 45",
        "porites-lobata, 0, 0, 67",
        "acropora-indo-pacific, 0, 2.4, 18",
        "faviidae, 0.8, 7.6, 37",
        "goniastrea, 0, 5, 46",
        "favites, 0, 4, 17.6",
        "dipsastraea-pallida, 0, 8, 46.2",
        "pocillopora-meandrina, 0, 0, 56",
        "platygyra-sinensis, 0, 5, 12.3",
        "cyphastrea-serailia, 1, 5, 11.48",
        "diploastrea-heliopora, 0, 6, 12"
    })
    void limitsOfTaxaAreQuantiles(String taxon, double upper, double central, double lower) {
        Uncertain depth =
                EVIDENCE.habitats().find(taxon).orElseThrow().depthMetres().orElseThrow();
        assertEquals(upper, depth.quantile(0.025), 1e-6);
        assertEquals(central, depth.quantile(0.5), 1e-6);
        assertEquals(lower, depth.quantile(0.975), 1e-6);
    }

    /** The two deep limits of the central 68 % in the same source: 7 m for Acropora of the Indo-Pacific, 0 for P. lutea. */
    @ParameterizedTest
    @CsvSource({"acropora-indo-pacific, 7", "porites-lutea, 0"})
    void deepLimitsOfTwoThirds(String taxon, double lower68) {
        Uncertain depth =
                EVIDENCE.habitats().find(taxon).orElseThrow().depthMetres().orElseThrow();
        assertEquals(lower68, depth.quantile(0.84), 1e-6);
    }
}
