package stillstand.view;

import java.io.IOException;
import java.nio.file.Path;
import java.time.Clock;
import java.time.Instant;
import java.time.ZoneOffset;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.prefs.AbstractPreferences;
import java.util.prefs.Preferences;
import org.jspecify.annotations.Nullable;
import stillstand.files.StudyStore;
import stillstand.files.StudyTemplate;
import stillstand.study.StudyRunner;

/** Studies open without a toolkit: everything happens at once, on the thread of the test. */
final class OpenStudies {
    static final StudyReader READER = new StudyReader();
    static final Clock NOON = Clock.fixed(Instant.parse("2026-12-01T12:00:00Z"), ZoneOffset.UTC);

    private OpenStudies() {}

    /** The small study to start from, written into a folder. */
    static Path template(Path into) throws IOException {
        Path study = into.resolve("study");
        StudyTemplate.write(study);
        return study;
    }

    static StudyDocument document(Path study) throws IOException {
        StudyStore store = StudyStore.open(study).value().orElseThrow();
        boolean isRecoveryOpen = store.recovery().isPresent();
        return new StudyDocument(store, store.read(), READER, Runnable::run, Runnable::run, isRecoveryOpen);
    }

    static EvidenceModel evidence(StudyDocument document) {
        return new EvidenceModel(document, new SettingsModel(document, READER.shipped()));
    }

    static RunModel runs(RunModel.Engine engine) {
        return new RunModel(Runnable::run, Runnable::run, NOON, engine);
    }

    static WindowModel window(WindowMemory memory) {
        return new WindowModel(READER, runs(StudyRunner::run), memory, Runnable::run, Runnable::run);
    }

    static WindowMemory memory() {
        return new WindowMemory(new InMemory(Optional.empty(), ""));
    }

    /** Preferences that are nobody's. */
    private static final class InMemory extends AbstractPreferences {
        private final Map<String, String> values = new TreeMap<>();

        InMemory(Optional<AbstractPreferences> parent, String name) {
            super(parent.orElse(null), name);
        }

        @Override
        protected void putSpi(String key, String value) {
            values.put(key, value);
        }

        @Override
        protected @Nullable String getSpi(String key) {
            return values.get(key);
        }

        @Override
        protected void removeSpi(String key) {
            values.remove(key);
        }

        @Override
        protected void removeNodeSpi() {
            values.clear();
        }

        @Override
        protected String[] keysSpi() {
            return values.keySet().toArray(new String[0]);
        }

        @Override
        protected String[] childrenNamesSpi() {
            return new String[0];
        }

        @Override
        protected AbstractPreferences childSpi(String name) {
            return new InMemory(Optional.of(this), name);
        }

        @Override
        protected void syncSpi() {}

        @Override
        protected void flushSpi() {}
    }

    /** Preferences for a window that a robot works in. */
    static Preferences preferences() {
        return new InMemory(Optional.empty(), "");
    }
}
