package stillstand.view;

import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.prefs.BackingStoreException;
import java.util.prefs.Preferences;

/** What the window remembers from one day to the next: where it stood, light or dark, and the studies it had open. */
final class WindowMemory {
    private static final int MOST_RECENT = 8;
    private static final String RECENT = "recent-";
    private static final String OPEN = "open";

    private final Preferences node;

    WindowMemory(Preferences node) {
        this.node = node;
    }

    /** The user's own. */
    static WindowMemory ofUser() {
        return new WindowMemory(Preferences.userRoot().node("stillstand/window"));
    }

    /** Place and size of the window on the screens, in their pixels. */
    record Place(double left, double top, double width, double height, boolean isMaximised) {
        /** Whether it is large enough to be one. */
        boolean isUsable() {
            return width >= 200 && height >= 200 && Math.abs(left) < 100_000 && Math.abs(top) < 100_000;
        }
    }

    Optional<Place> place() {
        Place place = new Place(
                node.getDouble("left", 0),
                node.getDouble("top", 0),
                node.getDouble("width", 0),
                node.getDouble("height", 0),
                node.getBoolean("maximised", false));
        return Optional.of(place).filter(Place::isUsable);
    }

    void keep(Place place) {
        node.putDouble("left", place.left());
        node.putDouble("top", place.top());
        node.putDouble("width", place.width());
        node.putDouble("height", place.height());
        node.putBoolean("maximised", place.isMaximised());
    }

    boolean isDark() {
        return node.getBoolean("dark", false);
    }

    void keepDark(boolean isDark) {
        node.putBoolean("dark", isDark);
    }

    /** The studies that were open, newest first, and are still there. */
    List<Path> recent() {
        List<Path> recent = new ArrayList<>();
        for (int i = 0; i < MOST_RECENT; i++) {
            path(RECENT + i).filter(Files::isDirectory).ifPresent(recent::add);
        }
        return recent;
    }

    void keepRecent(Path study) {
        List<Path> recent = new ArrayList<>(recent());
        recent.remove(study);
        recent.add(0, study);
        for (int i = 0; i < MOST_RECENT; i++) {
            if (i < recent.size()) {
                put(RECENT + i, recent.get(i));
            } else {
                node.remove(RECENT + i);
            }
        }
    }

    /** The study that was open when the program ended without closing it. */
    Optional<Path> leftOpen() {
        return path(OPEN).filter(Files::isDirectory);
    }

    /** Keeps which study is open; written at once, since the next thing may be a crash. */
    void keepOpen(Optional<Path> study) {
        study.ifPresentOrElse(path -> put(OPEN, path), () -> node.remove(OPEN));
        flush();
    }

    void flush() {
        try {
            node.flush();
        } catch (BackingStoreException e) {
            return; // a window that forgets where it stood is no reason to disturb anybody
        }
    }

    private void put(String key, Path path) {
        String text = path.toString();
        if (text.length() <= Preferences.MAX_VALUE_LENGTH && text.indexOf('\0') < 0) {
            node.put(key, text);
        }
    }

    private Optional<Path> path(String key) {
        try {
            return Optional.of(node.get(key, ""))
                    .filter(text -> !text.isEmpty())
                    .map(Path::of);
        } catch (InvalidPathException e) {
            return Optional.empty();
        }
    }
}
