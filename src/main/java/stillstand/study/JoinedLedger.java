package stillstand.study;

import java.util.ArrayList;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import stillstand.ledger.Assumption;

/** A ledger in which what is assumed of many levels alike stands once. */
final class JoinedLedger {
    private static final int PLACES_NAMED = 4;

    private JoinedLedger() {}

    /** The same assumptions in the order of their first mention, each with all the places it applies to. */
    static List<Assumption> of(Collection<Assumption> ledger) {
        Map<Assumption, Set<String>> places = new LinkedHashMap<>();
        for (Assumption each : ledger) {
            Assumption anywhere = new Assumption(each.assumption(), each.value(), each.source(), "");
            places.computeIfAbsent(anywhere, key -> new LinkedHashSet<>()).add(each.appliesTo());
        }
        List<Assumption> joined = new ArrayList<>();
        places.forEach((each, where) ->
                joined.add(new Assumption(each.assumption(), each.value(), each.source(), named(where))));
        return joined;
    }

    private static String named(Set<String> places) {
        List<String> first = places.stream().limit(PLACES_NAMED).toList();
        int more = places.size() - first.size();
        return String.join("; ", first) + (more > 0 ? "; and " + more + " more" : "");
    }
}
