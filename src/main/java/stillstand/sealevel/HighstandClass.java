package stillstand.sealevel;

import java.util.Locale;
import java.util.Optional;

/** How high a stand reached: what its errors share, and how far local sea level may have departed from global. */
public enum HighstandClass {
    /** Near or above today's sea. */
    INTERGLACIAL(2),
    /** Well below today's sea; curves from deep-sea isotopes doubt its level by up to 20 m, all with one sign. */
    INTERSTADIAL(5);

    private final double localOffsetSigmaMetres;

    HighstandClass(double localOffsetSigmaMetres) {
        this.localOffsetSigmaMetres = localOffsetSigmaMetres;
    }

    /** One standard deviation of local minus global sea level where nothing is known of it (Stillstand's default). */
    public double localOffsetSigmaMetres() {
        return localOffsetSigmaMetres;
    }

    /** The word that tables use: {@code interglacial} or {@code interstadial}. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }

    /** The class that a table's word names, if any. */
    public static Optional<HighstandClass> ofWord(String word) {
        for (HighstandClass each : values()) {
            if (each.word().equals(word)) {
                return Optional.of(each);
            }
        }
        return Optional.empty();
    }
}
