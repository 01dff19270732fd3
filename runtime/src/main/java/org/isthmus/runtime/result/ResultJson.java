package org.isthmus.runtime.result;

import com.google.gson.Gson;
import com.google.gson.GsonBuilder;
import com.google.gson.JsonArray;
import com.google.gson.JsonElement;
import com.google.gson.JsonNull;
import com.google.gson.JsonObject;
import com.google.gson.JsonPrimitive;
import java.util.Map;
import org.isthmus.runtime.device.Finding;

/** {@code result.json}: what was measured, how it was judged, and where it comes from. */
public final class ResultJson {
    private static final Gson GSON = new GsonBuilder()
            .setPrettyPrinting()
            .serializeNulls()
            .disableHtmlEscaping()
            .create();

    private ResultJson() {}

    /** The text of the file. Times and machine differ from run to run; all else is the same for equal inputs. */
    public static String text(MeasurementResult result, Provenance provenance) {
        JsonObject root = new JsonObject();
        root.addProperty("tool", provenance.tool());
        root.addProperty("device", result.device());
        root.addProperty("measurement", result.measurement());
        root.addProperty("deviceText", provenance.device());
        root.addProperty("deviceSha256", result.deviceDigest());
        root.add("inputs", texts(provenance.inputs()));
        root.add("settings", texts(provenance.settings()));
        root.add("findings", findings(result));
        root.add("expectations", verdicts(result));
        root.add("residual", number(result.residual()));
        root.add("equationResidual", number(result.equationResidual()));
        JsonArray files = new JsonArray();
        result.tables().forEach(table -> files.add(table.name() + ".csv"));
        root.add("tables", files);
        root.addProperty("solves", result.solves());
        JsonObject seconds = new JsonObject();
        result.seconds().forEach((stage, time) -> seconds.add(stage, number(time)));
        root.add("seconds", seconds);
        root.add("machine", machine(provenance));
        JsonArray cautions = new JsonArray();
        Provenance.CAUTIONS.forEach(cautions::add);
        root.add("cautions", cautions);
        return GSON.toJson(root) + "\n";
    }

    private static JsonObject texts(Map<String, String> map) {
        JsonObject object = new JsonObject();
        map.forEach(object::addProperty);
        return object;
    }

    private static JsonArray findings(MeasurementResult result) {
        JsonArray array = new JsonArray();
        for (Finding finding : result.findings()) {
            JsonObject object = new JsonObject();
            object.addProperty("severity", finding.severity().word());
            object.addProperty("code", finding.code());
            object.addProperty("text", finding.text());
            object.addProperty("place", finding.place().toString());
            array.add(object);
        }
        return array;
    }

    private static JsonArray verdicts(MeasurementResult result) {
        JsonArray array = new JsonArray();
        for (Verdict verdict : result.verdicts()) {
            JsonObject object = new JsonObject();
            object.addProperty("text", verdict.text());
            object.addProperty("verdict", verdict.held() ? "held" : "broken");
            object.add("measured", number(verdict.measured()));
            object.add("wanted", number(verdict.expected()));
            object.add("difference", number(verdict.difference()));
            object.addProperty("unit", verdict.unit());
            object.addProperty("at", verdict.at());
            object.addProperty("place", verdict.place().toString());
            array.add(object);
        }
        return array;
    }

    private static JsonObject machine(Provenance provenance) {
        JsonObject machine = new JsonObject();
        machine.addProperty("cores", Runtime.getRuntime().availableProcessors());
        machine.addProperty("threads", provenance.threads());
        machine.addProperty("memoryMiB", Runtime.getRuntime().maxMemory() >> 20);
        machine.addProperty("system", System.getProperty("os.name") + " " + System.getProperty("os.arch"));
        machine.addProperty("java", System.getProperty("java.runtime.version"));
        machine.addProperty("linearAlgebra", provenance.backend());
        return machine;
    }

    /** JSON has no infinities and no "not a number". */
    private static JsonElement number(double value) {
        return Double.isFinite(value) ? new JsonPrimitive(value) : JsonNull.INSTANCE;
    }
}
