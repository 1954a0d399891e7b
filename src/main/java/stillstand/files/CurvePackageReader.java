package stillstand.files;

import static stillstand.ledger.InputProblem.quote;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.function.Function;
import java.util.regex.Pattern;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.sealevel.SeaLevelCurve;
import stillstand.sealevel.StageTable;
import stillstand.study.CurveTable;
import stillstand.study.HighstandRows;
import stillstand.study.HighstandsTable;
import stillstand.study.InputFile;
import stillstand.study.StagesTable;
import stillstand.study.Table;
import tools.jackson.databind.JsonNode;

/** Reads one package: its descriptor, then the table of each resource; every problem of all of them at once. */
final class CurvePackageReader {
    private static final String IN_FOLDER = "a path inside the folder, such as \"own.csv\"";
    private static final Pattern ID = Pattern.compile("[a-z0-9]+(-[a-z0-9]+)*");
    private static final Pattern URL = Pattern.compile("[a-zA-Z][a-zA-Z0-9+.-]+:.*");

    private static final String STAGES = "stages";

    private final String folder;
    private final boolean isShipped;
    private final Function<String, Loaded<TextFile>> source;
    private final Set<String> ids;
    private final Set<InputFile> inputs = new LinkedHashSet<>();
    private final List<InputProblem> problems = new ArrayList<>();
    private final List<InputWarning> warnings = new ArrayList<>();
    private final List<SeaLevelCurve> curves = new ArrayList<>();
    private final List<HighstandRows> highstands = new ArrayList<>();

    /**
     * @param folder what problems call it
     * @param source a file by its path in the folder
     * @param isShipped whether it is the tool's own, which alone says what the stages are
     * @param taken ids that others have already
     */
    CurvePackageReader(String folder, Function<String, Loaded<TextFile>> source, boolean isShipped, Set<String> taken) {
        this.folder = folder;
        this.isShipped = isShipped;
        this.source = source;
        ids = new HashSet<>(taken);
    }

    /** Whether a curve or table may be called so. */
    static boolean isId(String text) {
        return ID.matcher(text).matches();
    }

    /** All curves and highstand tables. */
    Loaded<CurvePackage> read(StageTable stages) {
        for (Resource resource : resources()) {
            if (!resource.kind.equals(STAGES)) {
                resource.table().ifPresent(table -> read(resource, table, stages));
            }
        }
        CurvePackage all = new CurvePackage(curves, highstands, List.copyOf(inputs));
        return new Loaded<>(
                problems.isEmpty() ? Optional.of(all) : Optional.empty(),
                problems.stream().sorted().toList(),
                warnings);
    }

    /** The table of stages that the tool's own package holds. */
    Loaded<StageTable> readStages() {
        return resources().stream()
                .filter(resource -> resource.kind.equals(STAGES))
                .findFirst()
                .flatMap(Resource::table)
                .map(StagesTable::read)
                .orElseGet(() ->
                        Loaded.failed(List.of(InputProblem.ofFile(descriptorName(), "no table of stages", "one"))));
    }

    private void read(Resource resource, Table table, StageTable stages) {
        ResourceFacts facts = resource.facts;
        if (resource.kind.equals("curve")) {
            Loaded<SeaLevelCurve> curve =
                    CurveTable.read(resource.id, table, facts.curve(), facts.guessedSpread(), stages);
            take(curve).ifPresent(curves::add);
        } else {
            take(HighstandsTable.read(resource.id, facts.isComplete(), table, facts.citation()))
                    .ifPresent(highstands::add);
        }
    }

    private <T> Optional<T> take(Loaded<T> loaded) {
        problems.addAll(loaded.problems());
        warnings.addAll(loaded.warnings());
        return loaded.value();
    }

    private String descriptorName() {
        return folder + "/" + CurvePackage.DESCRIPTOR;
    }

    /** The resources of the descriptor that can be read on; what is wrong with the others is among the problems. */
    private List<Resource> resources() {
        Optional<TextFile> file = take(source.apply(CurvePackage.DESCRIPTOR));
        if (file.isEmpty()) {
            return List.of();
        }
        inputs.add(file.get().inputFile());
        JsonPlaces json = JsonPlaces.parse(file.get());
        problems.addAll(json.problems());
        if (json.root().isEmpty()) {
            return List.of();
        }
        JsonNode list = json.root().get().path("resources");
        if (!list.isArray()) {
            String found = list.isMissingNode() ? "no key \"resources\"" : JsonPlaces.shown(list);
            problems.add(json.problem(list.isMissingNode() ? "" : "resources", found, "a list of resources"));
            return List.of();
        }
        List<Resource> resources = new ArrayList<>();
        for (int i = 0; i < list.size(); i++) {
            resource(json, "resources[" + i + "]", list.get(i)).ifPresent(resources::add);
        }
        return resources;
    }

    private Optional<Resource> resource(JsonPlaces json, String at, JsonNode node) {
        int before = problems.size();
        String id = text(json, at, node, "name", "a name");
        if (!id.isEmpty() && !isId(id)) {
            problems.add(json.problem(at + ".name", quote(id), "lower-case words joined by hyphens"));
        } else if (!id.isEmpty() && !ids.add(id)) {
            problems.add(json.problem(
                    at + ".name", quote(id) + ", which another curve or table has already", "a name of its own"));
        }
        String path = text(json, at, node, "path", IN_FOLDER);
        checkPath(json, at, path);
        ResourceFacts facts = new ResourceFacts(json, at, node, problems);
        String kind = facts.kind();
        if (kind.equals(STAGES) && !isShipped) {
            problems.add(json.problem(at + ".stillstand.kind", quote(kind), ResourceFacts.KINDS_OF_A_USER));
        }
        return problems.size() == before ? Optional.of(new Resource(id, path, kind, facts)) : Optional.empty();
    }

    private void checkPath(JsonPlaces json, String at, String path) {
        if (path.isEmpty()) {
            return;
        }
        String why = "";
        if (URL.matcher(path).matches()) {
            why = ", which is no path but a URL";
        } else if (path.contains("\\")) {
            why = ", which has backslashes";
        } else if (path.startsWith("/") || List.of(path.split("/")).contains("..")) {
            why = ", which leaves the folder";
        }
        if (!why.isEmpty()) {
            problems.add(json.problem(at + ".path", quote(path) + why, IN_FOLDER));
        }
    }

    private String text(JsonPlaces json, String at, JsonNode node, String key, String expected) {
        JsonNode value = node.path(key);
        if (value.isString() && !value.stringValue().isBlank()) {
            return value.stringValue();
        }
        boolean missing = value.isMissingNode();
        problems.add(
                missing
                        ? json.problem(at, "no key \"" + key + "\"", expected)
                        : json.problem(at + "." + key, JsonPlaces.shown(value), expected));
        return "";
    }

    /** A resource that passed its checks. */
    private final class Resource {
        private final String id;
        private final String path;
        private final String kind;
        private final ResourceFacts facts;

        Resource(String id, String path, String kind, ResourceFacts facts) {
            this.id = id;
            this.path = path;
            this.kind = kind;
            this.facts = facts;
        }

        /** Its table, if that can be read. */
        Optional<Table> table() {
            return take(source.apply(path)).flatMap(text -> {
                inputs.add(text.inputFile());
                return take(TableFile.parse(text)).map(TableFile::table);
            });
        }
    }
}
