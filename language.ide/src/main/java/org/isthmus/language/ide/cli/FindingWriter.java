package org.isthmus.language.ide.cli;

import com.google.gson.Gson;
import com.google.gson.GsonBuilder;
import com.google.gson.JsonArray;
import com.google.gson.JsonObject;
import java.io.PrintWriter;
import java.util.List;
import java.util.TreeSet;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.Severity;
import org.isthmus.runtime.device.SourceRef;

/** Writes findings in the formats of {@link FindingFormat}. */
final class FindingWriter {
    private static final Gson GSON =
            new GsonBuilder().setPrettyPrinting().disableHtmlEscaping().create();

    private static final int LONGEST_LINE = 2000;

    private FindingWriter() {}

    static void write(List<Finding> findings, FindingFormat format, PrintWriter out) {
        switch (format) {
            case text -> findings.forEach(f -> out.println(line(f)));
            case json -> out.println(GSON.toJson(json(findings)));
            case sarif -> out.println(GSON.toJson(sarif(findings)));
        }
    }

    /** {@code file:line:column: error CODE: text}, safe for a terminal whatever the file holds. */
    static String line(Finding finding) {
        String text = finding.toString();
        StringBuilder safe = new StringBuilder();
        for (int i = 0; i < text.length() && safe.length() < LONGEST_LINE; i++) {
            char c = text.charAt(i);
            if (c == '\n' || c == '\r' || c == '\t') {
                safe.append(' ');
            } else if (Character.isISOControl(c)) {
                safe.append(String.format("\\u%04x", (int) c));
            } else {
                safe.append(c);
            }
        }
        return safe.length() < LONGEST_LINE
                ? safe.toString()
                : safe.append(" …").toString();
    }

    static long count(List<Finding> findings, Severity severity) {
        return findings.stream().filter(f -> f.severity() == severity).count();
    }

    /** Such as {@code 2 errors, 1 warning}. */
    static String summary(List<Finding> findings) {
        StringBuilder text = new StringBuilder();
        for (Severity severity : Severity.values()) {
            long count = count(findings, severity);
            if (count > 0) {
                text.append(text.isEmpty() ? "" : ", ").append(count).append(' ');
                text.append(
                        severity == Severity.INFORMATION
                                ? count == 1 ? "piece of information" : "pieces of information"
                                : severity.word() + (count == 1 ? "" : "s"));
            }
        }
        return text.isEmpty() ? "nothing found" : text.toString();
    }

    private static JsonObject json(List<Finding> findings) {
        JsonArray list = new JsonArray();
        for (Finding finding : findings) {
            SourceRef place = finding.place();
            JsonObject entry = new JsonObject();
            entry.addProperty("file", place.file());
            entry.addProperty("line", place.line());
            entry.addProperty("column", place.column());
            entry.addProperty("offset", place.offset());
            entry.addProperty("length", place.length());
            entry.addProperty("severity", finding.severity().word());
            entry.addProperty("code", finding.code());
            entry.addProperty("text", finding.text());
            list.add(entry);
        }
        JsonObject root = new JsonObject();
        root.addProperty("tool", "isthmus " + VersionText.number());
        root.addProperty("errors", count(findings, Severity.ERROR));
        root.addProperty("warnings", count(findings, Severity.WARNING));
        root.add("findings", list);
        return root;
    }

    /** Static Analysis Results Interchange Format 2.1.0 (OASIS standard, 2020), the properties that it requires. */
    private static JsonObject sarif(List<Finding> findings) {
        JsonArray rules = new JsonArray();
        List<String> codes =
                List.copyOf(new TreeSet<>(findings.stream().map(Finding::code).toList()));
        for (String code : codes) {
            JsonObject rule = new JsonObject();
            rule.addProperty("id", code);
            rules.add(rule);
        }
        JsonArray results = new JsonArray();
        for (Finding finding : findings) {
            JsonObject message = new JsonObject();
            message.addProperty("text", finding.text());
            JsonObject result = new JsonObject();
            result.addProperty("ruleId", finding.code());
            result.addProperty("ruleIndex", codes.indexOf(finding.code()));
            result.addProperty("level", level(finding.severity()));
            result.add("message", message);
            result.add("locations", locations(finding.place()));
            results.add(result);
        }
        JsonObject driver = new JsonObject();
        driver.addProperty("name", "isthmus");
        driver.addProperty("version", VersionText.number());
        driver.add("rules", rules);
        JsonObject tool = new JsonObject();
        tool.add("driver", driver);
        JsonObject run = new JsonObject();
        run.add("tool", tool);
        run.addProperty("columnKind", "utf16CodeUnits");
        run.add("results", results);
        JsonArray runs = new JsonArray();
        runs.add(run);
        JsonObject root = new JsonObject();
        root.addProperty("$schema", "https://json.schemastore.org/sarif-2.1.0.json");
        root.addProperty("version", "2.1.0");
        root.add("runs", runs);
        return root;
    }

    private static JsonArray locations(SourceRef place) {
        JsonArray locations = new JsonArray();
        if (place.file().isEmpty()) {
            return locations;
        }
        JsonObject artifact = new JsonObject();
        artifact.addProperty("uri", uri(place.file()));
        JsonObject physical = new JsonObject();
        physical.add("artifactLocation", artifact);
        if (place.line() > 0) {
            JsonObject region = new JsonObject();
            region.addProperty("startLine", place.line());
            region.addProperty("startColumn", Math.max(1, place.column()));
            region.addProperty("charOffset", place.offset());
            region.addProperty("charLength", place.length());
            physical.add("region", region);
        }
        JsonObject location = new JsonObject();
        location.add("physicalLocation", physical);
        locations.add(location);
        return locations;
    }

    /** A relative reference or a file URI: reserved characters escaped. */
    private static String uri(String file) {
        try {
            String path = file.replace('\\', '/');
            return new java.net.URI(path.startsWith("/") ? "file" : null, path.startsWith("/") ? "" : null, path, null)
                    .toASCIIString();
        } catch (java.net.URISyntaxException e) {
            throw new IllegalArgumentException(file, e);
        }
    }

    private static String level(Severity severity) {
        return switch (severity) {
            case ERROR -> "error";
            case WARNING -> "warning";
            case INFORMATION -> "note";
        };
    }
}
