package stillstand.sealevel;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import org.apache.commons.csv.CSVRecord;
import org.junit.jupiter.api.Test;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;

/**
 * The shipped package against the Data Package and Table Schema specifications (specs.frictionlessdata.io), whose rules for what
 * the package uses are written out here.
 */
class TableSchemaTest {
    private static final Set<String> FIELD_TYPES = Set.of("string", "number", "integer", "boolean");
    private static final Set<String> CONSTRAINTS =
            Set.of("required", "unique", "minimum", "maximum", "enum", "pattern");

    @Test
    void descriptorIsADataPackage() {
        JsonNode descriptor = ShippedPackage.DESCRIPTOR;
        assertTrue(descriptor.get("name").asString().matches("[-a-z0-9._/]+"));
        assertFalse(descriptor.get("title").asString().isBlank());
        assertTrue(descriptor.get("licenses").size() > 0);
        Set<String> names = new HashSet<>();
        for (JsonNode resource : descriptor.get("resources")) {
            String name = resource.get("name").asString();
            assertTrue(name.matches("[-a-z0-9._]+") && names.add(name), name);
            String path = resource.get("path").asString();
            assertTrue(path.matches("[-a-z0-9]+\\.csv"), path);
            assertEquals("utf-8", resource.get("encoding").asString());
            assertTrue(resource.get("sources").size() > 0, name);
            for (JsonNode source : resource.get("sources")) {
                assertFalse(source.get("title").asString().isBlank());
            }
            assertTrue(Set.of("curve", "highstands", "stages")
                    .contains(resource.get("stillstand").get("kind").asString()));
        }
        assertEquals(6, names.size());
    }

    @Test
    void everyTableKeepsItsSchema() {
        for (JsonNode resource : ShippedPackage.DESCRIPTOR.get("resources")) {
            String name = resource.get("name").asString();
            List<CSVRecord> rows = ShippedPackage.rows(name);
            assertFalse(rows.isEmpty(), name);
            List<String> header = ShippedPackage.header(name);
            List<List<String>> cells = rows.stream().map(CSVRecord::toList).toList();
            assertEquals(List.of(), faults(resource.get("schema"), header, cells), name);
        }
    }

    @Test
    void everyCurveAscendsAndHasItsFacts() {
        for (JsonNode resource : ShippedPackage.DESCRIPTOR.get("resources")) {
            JsonNode ours = resource.get("stillstand");
            if (ours.get("kind").asString().equals("curve")) {
                for (String fact : List.of("citation", "terms", "zero", "age_scale", "spread")) {
                    assertFalse(ours.get(fact).asString().isBlank());
                }
                JsonNode condensed = ours.get("condensed");
                double[] ages = ShippedPackage.column(resource.get("name").asString(), "age_ka");
                assertEquals(condensed.get("rows").asInt(), ages.length);
                assertTrue(ages.length < condensed.get("of").asInt());
                for (int i = 1; i < ages.length; i++) {
                    assertTrue(ages[i] > ages[i - 1]);
                }
            }
        }
    }

    @Test
    void theValidatorSeesEachKindOfFault() {
        JsonNode schema = JsonMapper.shared().readTree("""
                {"fields": [
                  {"name": "stage", "type": "string", "constraints": {"required": true, "enum": ["a", "b"]}},
                  {"name": "age", "type": "number", "constraints": {"required": true, "minimum": 0, "maximum": 9}},
                  {"name": "label", "type": "string", "constraints": {"unique": true, "pattern": "[a-z]+"}}],
                 "missingValues": [""], "primaryKey": "stage"}
                """);
        List<String> header = List.of("stage", "age", "label");
        assertEquals(List.of(), faults(schema, header, List.of(List.of("a", "1", "x"), List.of("b", "2", ""))));
        assertEquals(List.of("header"), faults(schema, List.of("stage", "age"), List.of()));
        assertEquals(List.of("row 1: cells"), faults(schema, header, List.of(List.of("a", "1"))));
        assertEquals(List.of("row 1: age required"), faults(schema, header, List.of(List.of("a", "", "x"))));
        assertEquals(List.of("row 1: age number"), faults(schema, header, List.of(List.of("a", "1,5", "x"))));
        assertEquals(List.of("row 1: age minimum"), faults(schema, header, List.of(List.of("a", "-1", "x"))));
        assertEquals(List.of("row 1: age maximum"), faults(schema, header, List.of(List.of("a", "10", "x"))));
        assertEquals(List.of("row 1: stage enum"), faults(schema, header, List.of(List.of("c", "1", "x"))));
        assertEquals(List.of("row 1: label pattern"), faults(schema, header, List.of(List.of("a", "1", "X"))));
        assertEquals(
                List.of("row 2: label unique"),
                faults(schema, header, List.of(List.of("a", "1", "x"), List.of("b", "1", "x"))));
        assertEquals(
                List.of("row 2: primary key"),
                faults(schema, header, List.of(List.of("a", "1", "x"), List.of("a", "1", "y"))));
    }

    private static List<String> faults(JsonNode schema, List<String> header, List<List<String>> rows) {
        List<String> names = new ArrayList<>();
        for (JsonNode field : schema.get("fields")) {
            names.add(field.get("name").asString());
            assertTrue(FIELD_TYPES.contains(field.get("type").asString()));
            if (field.has("constraints")) {
                assertTrue(CONSTRAINTS.containsAll(field.get("constraints").propertyNames()));
            }
        }
        if (!names.equals(header)) {
            return List.of("header");
        }
        List<String> faults = new ArrayList<>();
        List<Set<String>> seen =
                names.stream().<Set<String>>map(each -> new HashSet<>()).toList();
        Set<String> keys = new HashSet<>();
        int key = names.indexOf(schema.get("primaryKey").asString());
        for (int row = 0; row < rows.size(); row++) {
            String place = "row " + (row + 1) + ": ";
            List<String> cells = rows.get(row);
            if (cells.size() != names.size()) {
                faults.add(place + "cells");
                continue;
            }
            for (int i = 0; i < cells.size(); i++) {
                for (String fault : faults(schema.get("fields").get(i), cells.get(i), seen.get(i))) {
                    faults.add(place + names.get(i) + " " + fault);
                }
            }
            if (!keys.add(cells.get(key))) {
                faults.add(place + "primary key");
            }
        }
        return faults;
    }

    private static List<String> faults(JsonNode field, String cell, Set<String> seen) {
        JsonNode constraints = field.path("constraints");
        if (cell.isEmpty()) {
            return constraints.path("required").asBoolean(false) ? List.of("required") : List.of();
        }
        String type = field.get("type").asString();
        if ((type.equals("number") && !cell.matches("[-+]?(\\d+(\\.\\d*)?|\\.\\d+)([eE][-+]?\\d+)?"))
                || (type.equals("integer") && !cell.matches("[-+]?\\d+"))
                || (type.equals("boolean") && !cell.matches("true|false"))) {
            return List.of(type);
        }
        List<String> faults = new ArrayList<>();
        if (constraints.has("minimum")
                && Double.parseDouble(cell) < constraints.get("minimum").asDouble()) {
            faults.add("minimum");
        }
        if (constraints.has("maximum")
                && Double.parseDouble(cell) > constraints.get("maximum").asDouble()) {
            faults.add("maximum");
        }
        if (constraints.has("pattern")
                && !cell.matches(constraints.get("pattern").asString())) {
            faults.add("pattern");
        }
        if (constraints.has("enum")) {
            List<String> allowed = new ArrayList<>();
            constraints.get("enum").forEach(each -> allowed.add(each.asString()));
            if (!allowed.contains(cell)) {
                faults.add("enum");
            }
        }
        if (constraints.path("unique").asBoolean(false) && !seen.add(cell)) {
            faults.add("unique");
        }
        return faults;
    }
}
