package stillstand.dating;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import stillstand.uncertainty.Tabulated;
import stillstand.uncertainty.Uncertain;
import stillstand.uncertainty.Uniform;

/** The age of a level from all of its dates: their product, each with its chance of being wrong, and no mean of any kind. */
public final class CombinedAge {
    /** Points to a standard deviation of a date. */
    private static final int STEPS_PER_SIGMA = 8;
    /** Standard deviations to either side of a date. */
    private static final int REACH_IN_SIGMAS = 8;
    /** Distance between points away from all dates, ka. */
    private static final double WIDEST_STEP_KA = 1;

    private CombinedAge() {}

    /**
     * The age in ka, all ages from 0 to the greatest of {@code oldestKa} and the dates equally likely before the dates are
     * seen. Where populations differ it has several peaks, and is meant to. Absent where no date is of the level itself,
     * or dates held to be surely right exclude one another.
     */
    public static Optional<Tabulated> of(List<DateLikelihood> dates) {
        if (dates.stream().noneMatch(date -> date.bearing() == DateLikelihood.Bearing.LEVEL)) {
            return Optional.empty();
        }
        double[] ages = grid(dates);
        double[] logProduct = DateLikelihood.logProduct(dates, ages);
        double greatest = Double.NEGATIVE_INFINITY;
        for (double value : logProduct) {
            greatest = Math.max(greatest, value);
        }
        if (greatest == Double.NEGATIVE_INFINITY) {
            return Optional.empty();
        }
        List<Tabulated.Point> points = new ArrayList<>();
        for (int i = 0; i < ages.length; i++) {
            points.add(new Tabulated.Point(ages[i], Math.exp(logProduct[i] - greatest)));
        }
        return Optional.of(Tabulated.of(points));
    }

    private static double[] grid(List<DateLikelihood> dates) {
        Set<Double> ages = new TreeSet<>();
        for (DateLikelihood date : dates) {
            double centre = date.ageKa().mean();
            double sigma = Math.hypot(date.ageKa().standardDeviation(), date.durationKa() / Math.sqrt(12));
            for (int i = -STEPS_PER_SIGMA * REACH_IN_SIGMAS; i <= STEPS_PER_SIGMA * REACH_IN_SIGMAS; i++) {
                ages.add(centre + sigma * i / STEPS_PER_SIGMA);
            }
            for (double corner : corners(date.ageKa())) {
                addStep(ages, corner - date.durationKa() / 2);
                addStep(ages, corner + date.durationKa() / 2);
            }
            for (double age = 0; age <= date.oldestKa() && date.wrongProbability() > 0; age += WIDEST_STEP_KA) {
                ages.add(age);
            }
        }
        return ages.stream()
                .filter(age -> age >= 0)
                .mapToDouble(Double::doubleValue)
                .toArray();
    }

    /** Ages at which a density may break. */
    private static List<Double> corners(Uncertain age) {
        if (age instanceof Uniform uniform) {
            return List.of(uniform.low(), uniform.high());
        }
        return age instanceof Tabulated tabulated
                ? tabulated.points().stream().map(Tabulated.Point::value).toList()
                : List.of();
    }

    private static void addStep(Set<Double> ages, double ageKa) {
        ages.add(Math.nextDown(ageKa));
        ages.add(ageKa);
        ages.add(Math.nextUp(ageKa));
    }
}
