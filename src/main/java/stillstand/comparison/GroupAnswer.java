package stillstand.comparison;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import stillstand.shoreline.Position;
import stillstand.uplift.JointRates;
import stillstand.uplift.Quantity;
import stillstand.uplift.Rate;

/** What the joint draws of a group say together: pooled, tilted, over areas. Rates are taken for jointly normal in pooling and tilts. */
final class GroupAnswer {
    private final String group;
    private final List<SiteToCompare> sites;
    private final JointRates joint;
    private final double siteSpread;
    /** Draws that count at every site of {@link #fitted}. */
    private final List<Integer> draws = new ArrayList<>();
    /** Sites whose rate has a mean: only these are pooled and tilted. */
    private final List<Integer> fitted = new ArrayList<>();

    private double[] means = {};
    private double[][] errors = {};

    /**
     * @param sites as many as the joint draws have, in their order
     * @param rates of the sites by themselves
     */
    GroupAnswer(
            String group, List<SiteToCompare> sites, List<RateByItself> rates, JointRates joint, double siteSpread) {
        this.group = group;
        this.sites = List.copyOf(sites);
        this.joint = joint;
        this.siteSpread = siteSpread;
        for (int s = 0; s < sites.size(); s++) {
            if (rates.get(s).rate().mean().isPresent()) {
                fitted.add(s);
            }
        }
        for (int k = 0; k < joint.draws(); k++) {
            int draw = k;
            if (fitted.stream().allMatch(s -> joint.counts(s, draw))) {
                draws.add(k);
            }
        }
        if (draws.size() > fitted.size()) {
            means = means();
            errors = covariance();
        } else {
            fitted.clear();
        }
    }

    private double[] means() {
        double[] out = new double[fitted.size()];
        for (int i = 0; i < out.length; i++) {
            for (int k : draws) {
                out[i] += joint.rateMetresPerKyr(fitted.get(i), k) / draws.size();
            }
        }
        return out;
    }

    private double[][] covariance() {
        int n = fitted.size();
        double[][] out = new double[n][n];
        double[] apart = new double[n];
        for (int k : draws) {
            for (int i = 0; i < n; i++) {
                apart[i] = joint.rateMetresPerKyr(fitted.get(i), k) - means[i];
            }
            for (int i = 0; i < n; i++) {
                for (int j = 0; j <= i; j++) {
                    out[i][j] += apart[i] * apart[j] / draws.size();
                }
            }
        }
        for (int i = 0; i < n; i++) {
            out[i][i] += 1e-12; // 1e-6 m/kyr: exact inputs must not make the matrix singular
            for (int j = 0; j < i; j++) {
                out[j][i] = out[i][j];
            }
        }
        return out;
    }

    SiteGroup answer() {
        return new SiteGroup(
                group,
                sites.stream().map(SiteToCompare::name).toList(),
                fitted.size() < 2
                        ? Optional.empty()
                        : Optional.of(PooledRates.of(
                                fitted.stream().map(s -> sites.get(s).name()).toList(), means, errors, siteSpread)),
                tilt(),
                plane(),
                areaMean(),
                joint.effectiveFraction());
    }

    /** Names of the sites that are left out of pooling and tilts. */
    List<String> withoutMean() {
        List<String> names = new ArrayList<>();
        for (int s = 0; s < sites.size(); s++) {
            if (!fitted.contains(s)) {
                names.add(sites.get(s).name());
            }
        }
        return names;
    }

    private Optional<Tilt> tilt() {
        List<Integer> with = new ArrayList<>();
        for (int i = 0; i < fitted.size(); i++) {
            if (site(i).distanceAlongCoastKm().isPresent()) {
                with.add(i);
            }
        }
        double[] distances = with.stream()
                .mapToDouble(i -> site(i).distanceAlongCoastKm().orElseThrow())
                .toArray();
        return Tilt.of(distances, means(with), errors(with), Rate.UNIT);
    }

    private Optional<PlanarTilt> plane() {
        List<Integer> with = new ArrayList<>();
        for (int i = 0; i < fitted.size(); i++) {
            if (site(i).position().isPresent()) {
                with.add(i);
            }
        }
        Position[] places =
                with.stream().map(i -> site(i).position().orElseThrow()).toArray(Position[]::new);
        return PlanarTilt.of(places, means(with), errors(with), Rate.UNIT);
    }

    private stillstand.shoreline.Site site(int i) {
        return sites.get(fitted.get(i)).site().site();
    }

    private double[] means(List<Integer> with) {
        return with.stream().mapToDouble(i -> means[i]).toArray();
    }

    private double[][] errors(List<Integer> with) {
        double[][] out = new double[with.size()][with.size()];
        for (int i = 0; i < out.length; i++) {
            for (int j = 0; j < out.length; j++) {
                out[i][j] = errors[with.get(i)][with.get(j)];
            }
        }
        return out;
    }

    private Optional<Quantity> areaMean() {
        List<Integer> with = new ArrayList<>();
        double whole = 0;
        for (int s : fitted) {
            if (sites.get(s).areaKm2().isPresent()) {
                with.add(s);
                whole += sites.get(s).areaKm2().orElseThrow();
            }
        }
        if (with.size() < 2) {
            return Optional.empty();
        }
        double[] means = new double[draws.size()];
        for (int k = 0; k < means.length; k++) {
            for (int s : with) {
                means[k] += sites.get(s).areaKm2().orElseThrow() / whole * joint.rateMetresPerKyr(s, draws.get(k));
            }
        }
        return Optional.of(Differences.quantity(means));
    }
}
