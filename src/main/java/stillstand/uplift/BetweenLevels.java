package stillstand.uplift;

/**
 * Rate of motion in the time between two levels of a site, {@code [(z2 - e2) - (z1 - e1)] / (t2 - t1)}, with what the two share
 * cancelled.
 *
 * @param site its name
 * @param fromLevel the younger level
 * @param toLevel the older level
 * @param rate between the two
 */
public record BetweenLevels(String site, String fromLevel, String toLevel, Rate rate) {}
