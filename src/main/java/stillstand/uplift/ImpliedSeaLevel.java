package stillstand.uplift;

/**
 * Sea level that a dated level implies, given the uplift of another level of its site: {@code e = z - U t}.
 *
 * @param site its name
 * @param level the dated level
 * @param age its own dated age, ka
 * @param seaLevelMetres implied height of the sea above its present mean level
 * @param upliftFrom the level whose rate was used
 * @param circular whether that rate rests on the very sea level it is to imply
 */
public record ImpliedSeaLevel(
        String site, String level, Quantity age, Quantity seaLevelMetres, String upliftFrom, boolean circular) {}
