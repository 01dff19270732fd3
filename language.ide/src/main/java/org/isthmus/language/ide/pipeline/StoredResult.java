package org.isthmus.language.ide.pipeline;

import com.google.gson.JsonElement;
import com.google.gson.JsonObject;
import com.google.gson.JsonParseException;
import com.google.gson.JsonParser;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * A result of an earlier run that is still that of its files.
 *
 * @param held number of expectations that held
 * @param broken number of expectations that did not
 */
public record StoredResult(Path folder, int held, int broken) {
    /** The result of a job, where it is complete and was reached by the same tool from the same files and settings. */
    static Optional<StoredResult> of(Path out, Job job, String tool) {
        Path folder = out.resolve(job.folder());
        try {
            JsonObject root = JsonParser.parseString(
                            Files.readString(folder.resolve("result.json"), StandardCharsets.UTF_8))
                    .getAsJsonObject();
            boolean same = tool.equals(root.get("tool").getAsString())
                    && contents(root.getAsJsonObject("inputs")).equals(sorted(job.inputs()))
                    && texts(root.getAsJsonObject("settings")).equals(job.given());
            for (JsonElement table : root.getAsJsonArray("tables")) {
                same &= Files.isRegularFile(folder.resolve(table.getAsString()));
            }
            if (!same) {
                return Optional.empty();
            }
            int held = 0;
            int broken = 0;
            for (JsonElement verdict : root.getAsJsonArray("expectations")) {
                if (verdict.getAsJsonObject().get("verdict").getAsString().equals("held")) {
                    held++;
                } else {
                    broken++;
                }
            }
            return Optional.of(new StoredResult(folder, held, broken));
        } catch (IOException | JsonParseException | IllegalStateException | NullPointerException e) {
            // nothing there, or nothing that this tool wrote: the measurement is run
            return Optional.empty();
        }
    }

    /** What is in the files, whatever they are called from here. */
    private static List<String> contents(JsonObject inputs) {
        return sorted(texts(inputs));
    }

    private static List<String> sorted(Map<String, String> inputs) {
        List<String> contents = new ArrayList<>(inputs.values());
        contents.sort(String::compareTo);
        return contents;
    }

    private static Map<String, String> texts(JsonObject object) {
        Map<String, String> texts = new java.util.LinkedHashMap<>();
        object.entrySet()
                .forEach(entry -> texts.put(entry.getKey(), entry.getValue().getAsString()));
        return texts;
    }
}
