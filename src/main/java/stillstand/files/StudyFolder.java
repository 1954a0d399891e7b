package stillstand.files;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeMap;
import java.util.function.UnaryOperator;
import java.util.stream.Stream;
import stillstand.ledger.Assumption;
import stillstand.ledger.InputProblem;
import stillstand.ledger.InputWarning;
import stillstand.ledger.Loaded;
import stillstand.study.AgeTable;
import stillstand.study.InputFile;
import stillstand.study.Library;
import stillstand.study.StatedSettings;
import stillstand.study.Study;
import stillstand.study.StudyCheck;
import stillstand.study.StudyInput;
import stillstand.study.StudySettings;
import stillstand.study.Table;
import stillstand.uncertainty.Uncertain;

/** A study on disk: {@code study.json}, its tables, its own curves and calibrated ages. */
public final class StudyFolder {
    private static final String CURVES = "curves";
    private static final String AGES = "ages";

    private final Path folder;
    private final Map<String, String> edited;
    private final List<InputProblem> problems = new ArrayList<>();
    private final List<InputWarning> warnings = new ArrayList<>();
    private final List<Assumption> ledger = new ArrayList<>();
    private final List<InputFile> inputs = new ArrayList<>();

    private StudyFolder(Path folder, Map<String, String> edited) {
        this.folder = folder;
        this.edited = edited;
    }

    /**
     * Reads and checks a whole study; all its problems come at once.
     *
     * @param folder the study
     * @param library what the tool itself knows
     * @param changes to the settings from the command line, made before anything is checked against them
     */
    public static Loaded<Study> read(Path folder, Library library, UnaryOperator<StudySettings> changes) {
        if (!Files.isDirectory(folder)) {
            String found = Files.exists(folder) ? "a file" : "no such folder";
            return Loaded.failed(List.of(InputProblem.ofFile(
                    String.valueOf(folder), found, "the folder of a study, with study.json in it")));
        }
        return new StudyFolder(folder, Map.of()).read(library, changes);
    }

    /**
     * Reads and checks a study of which some files are being edited: what will be found once they are saved.
     *
     * @param edited texts by file name, in place of what the disk holds
     */
    public static Loaded<Study> read(Path folder, Map<String, String> edited, Library library) {
        return new StudyFolder(folder, edited).read(library, UnaryOperator.identity());
    }

    /** What the tool knows, with the study's own curves and tables beside it as far as they can be read. */
    public static Library library(Path folder, Library shipped) {
        return new StudyFolder(folder, Map.of()).withOwnCurves(shipped);
    }

    /** Reads and checks a whole study as it stands. */
    public static Loaded<Study> read(Path folder, Library library) {
        return read(folder, library, UnaryOperator.identity());
    }

    private Loaded<Study> read(Library library, UnaryOperator<StudySettings> changes) {
        Optional<StatedSettings> settings = keep(text(StudyJson.NAME)).flatMap(file -> keep(StudyJson.parse(file)));
        Library whole = withOwnCurves(library);
        Optional<Table> sites = table("sites.csv");
        Optional<Table> levels = table("levels.csv");
        Optional<Table> samples = exists("samples.csv") ? table("samples.csv") : Optional.empty();
        Optional<Table> gia = exists("gia.csv") ? table("gia.csv") : Optional.empty();
        Optional<Table> points = exists("points.csv") ? table("points.csv") : Optional.empty();
        Map<String, Uncertain> ages = ages();
        inputs.sort(Comparator.comparing(InputFile::file));
        StudyInput input = new StudyInput(
                settings.map(stated -> stated.with(changes)),
                sites,
                levels,
                samples,
                gia,
                points,
                ages,
                problems,
                warnings,
                ledger,
                inputs);
        return StudyCheck.check(input, whole);
    }

    private boolean exists(String name) {
        return edited.containsKey(name) || Files.exists(folder.resolve(name));
    }

    /** The text of a file in the study, which counts among its inputs. */
    private Loaded<TextFile> text(String name) {
        Loaded<TextFile> file = Optional.ofNullable(edited.get(name))
                .map(text -> TextFile.decode(name, text.getBytes(StandardCharsets.UTF_8)))
                .orElseGet(() -> TextFile.read(folder.resolve(name), name));
        file.value().ifPresent(read -> inputs.add(read.inputFile()));
        return file;
    }

    private Optional<Table> table(String name) {
        return keep(text(name)).flatMap(file -> keep(TableFile.parse(file))).map(file -> {
            ledger.add(new Assumption(
                    "cells of " + name + " stand between", file.separator().plural(), "found in its header", "all"));
            return file.table();
        });
    }

    private Library withOwnCurves(Library library) {
        Set<String> taken = new HashSet<>(library.curveIds());
        taken.addAll(library.highstandIds());
        Optional<CurvePackage> own = keep(CurvePackage.read(folder.resolve(CURVES), CURVES, library.stages(), taken));
        own.ifPresent(read -> inputs.addAll(read.inputs()));
        return own.map(read -> library.with(read.curves(), read.highstands())).orElse(library);
    }

    /** Calibrated ages by the name of their file. */
    private Map<String, Uncertain> ages() {
        Map<String, Uncertain> ages = new TreeMap<>();
        Path place = folder.resolve(AGES);
        if (!Files.isDirectory(place)) {
            return ages;
        }
        List<String> names;
        try (Stream<Path> files = Files.list(place)) {
            names = files.map(file -> String.valueOf(file.getFileName()))
                    .filter(name -> name.endsWith(".csv"))
                    .sorted()
                    .toList();
        } catch (IOException e) {
            problems.add(InputProblem.ofFile(AGES, "a folder that cannot be read", "permission to read it"));
            return ages;
        }
        for (String name : names) {
            keep(text(AGES + "/" + name))
                    .flatMap(file -> keep(TableFile.parse(file)))
                    .flatMap(file -> keep(AgeTable.read(file.table())))
                    .ifPresent(age -> ages.put(name.substring(0, name.length() - ".csv".length()), age));
        }
        return ages;
    }

    private <T> Optional<T> keep(Loaded<T> loaded) {
        problems.addAll(loaded.problems());
        warnings.addAll(loaded.warnings());
        return loaded.value();
    }
}
