package stillstand.view;

import java.util.Optional;
import stillstand.study.Study;
import stillstand.study.StudyResult;

/**
 * What the areas show.
 *
 * @param study as it stands now; absent while it has problems, or where none is open
 * @param result of the last run; absent before the first
 * @param stale whether the study has changed since that run
 */
public record Shown(Optional<Study> study, Optional<StudyResult> result, boolean stale) {
    /** Nothing open. */
    public static final Shown NOTHING = new Shown(Optional.empty(), Optional.empty(), false);

    /** A study that was never run. */
    public static Shown of(Study study) {
        return new Shown(Optional.of(study), Optional.empty(), false);
    }

    /** A study and what its last run found. */
    public static Shown of(Study study, StudyResult result, boolean stale) {
        return new Shown(Optional.of(study), Optional.of(result), stale);
    }
}
