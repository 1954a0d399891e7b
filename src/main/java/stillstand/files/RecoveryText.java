package stillstand.files;

import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Optional;
import tools.jackson.core.JacksonException;
import tools.jackson.databind.JsonNode;
import tools.jackson.databind.json.JsonMapper;

/** A draft in one text: a json object of file names and their texts. */
final class RecoveryText {
    private static final JsonMapper MAPPER = JsonMapper.builder().build();

    private RecoveryText() {}

    static String write(StudyDraft draft) {
        return MAPPER.writeValueAsString(draft.texts());
    }

    /** Empty where the text is broken. */
    static Optional<StudyDraft> read(String text) {
        try {
            Map<String, String> texts = new LinkedHashMap<>();
            for (Map.Entry<String, JsonNode> each : MAPPER.readTree(text).properties()) {
                if (StudyDraft.NAMES.contains(each.getKey()) && each.getValue().isString()) {
                    texts.put(each.getKey(), each.getValue().stringValue());
                }
            }
            return texts.isEmpty() ? Optional.empty() : Optional.of(StudyDraft.of(texts));
        } catch (JacksonException e) {
            return Optional.empty();
        }
    }
}
