package stillstand.uplift;

import java.util.Optional;

/** A site as joint draws of several sites take it under one account of sea level: by its whole flight, or by one level. */
public sealed interface ComparedSite permits ComparedFlight, ComparedLevel {
    /** Its name. */
    String site();

    /** The coast whose local sea level it shares. */
    String coast();

    /** The level that stands for it; absent where its whole flight does. */
    Optional<String> level();
}
