package stillstand.sensitivity;

import stillstand.uplift.SeaLevelBasis;

/**
 * Another account of sea level that a study could have chosen.
 *
 * @param assumption what is switched
 * @param was what the study supposes
 * @param wouldBe what this account supposes
 * @param basis the account
 */
public record OtherSeaLevel(String assumption, String was, String wouldBe, SeaLevelBasis basis) {}
