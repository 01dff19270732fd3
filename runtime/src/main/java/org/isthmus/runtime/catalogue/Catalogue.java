package org.isthmus.runtime.catalogue;

import java.util.Collection;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.ServiceLoader;

/** All entries, by the place where their names have a meaning. */
public final class Catalogue {
    private static final Map<String, Entry> EXPRESSION_NAMES = new LinkedHashMap<>();
    private static final Map<String, ReductionEntry> REDUCTIONS = new LinkedHashMap<>();
    private static final Map<String, DephasingKind> DEPHASING_KINDS = new LinkedHashMap<>();
    private static final Map<String, MaterialQuantity> MATERIAL_QUANTITIES = new LinkedHashMap<>();
    private static final List<SettingEntry> SETTINGS = SettingEntries.all();

    static {
        ConstantEntries.all().forEach(Catalogue::add);
        ConstantEntries.matrices().forEach(Catalogue::add);
        FunctionEntries.all().forEach(Catalogue::add);
        FunctionEntries.special().forEach(Catalogue::add);
        FunctionEntries.shapes().forEach(Catalogue::add);
        FunctionEntries.coordinates().forEach(Catalogue::add);
        for (ReductionEntry reduction : ObservableEntries.reductions()) {
            REDUCTIONS.put(reduction.name(), reduction);
            EXPRESSION_NAMES.putIfAbsent(reduction.name(), reduction);
        }
        ObservableEntries.all().forEach(Catalogue::add);
        ServiceLoader.load(ObservableEntry.class, ObservableEntry.class.getClassLoader())
                .forEach(entry -> EXPRESSION_NAMES.put(entry.name(), entry));
        SettingEntries.choices().forEach(Catalogue::add);
        SettingEntries.dephasingKinds().forEach(kind -> DEPHASING_KINDS.put(kind.name(), kind));
        SettingEntries.materialQuantities().forEach(quantity -> MATERIAL_QUANTITIES.put(quantity.name(), quantity));
    }

    private Catalogue() {}

    /** What the language says of an observable, whether or not something computes it. */
    public static ObservableEntry described(String name) {
        return ObservableEntries.all().stream()
                .filter(entry -> entry.name().equals(name))
                .findFirst()
                .orElseThrow(() -> new IllegalArgumentException("the language has no observable '" + name + "'"));
    }

    private static void add(Entry entry) {
        Entry before = EXPRESSION_NAMES.putIfAbsent(entry.name(), entry);
        if (before != null) {
            throw new IllegalStateException("the catalogue has two entries '" + entry.name() + "'");
        }
    }

    /** What a name in an expression means when no declaration has it. */
    public static Optional<Entry> expressionName(String name) {
        return Optional.ofNullable(EXPRESSION_NAMES.get(name));
    }

    /** All entries that expressions may name, in the order of the reference. */
    public static Collection<Entry> expressionNames() {
        return Collections.unmodifiableCollection(EXPRESSION_NAMES.values());
    }

    /** The reduction with this name; {@code min} and {@code max} are functions too. */
    public static Optional<ReductionEntry> reduction(String name) {
        return Optional.ofNullable(REDUCTIONS.get(name));
    }

    public static Optional<ObservableEntry> observable(String name) {
        return expressionName(name).filter(ObservableEntry.class::isInstance).map(ObservableEntry.class::cast);
    }

    /** All observables in the order of the reference. */
    public static List<ObservableEntry> observables() {
        return EXPRESSION_NAMES.values().stream()
                .filter(ObservableEntry.class::isInstance)
                .map(ObservableEntry.class::cast)
                .toList();
    }

    public static Optional<DephasingKind> dephasingKind(String name) {
        return Optional.ofNullable(DEPHASING_KINDS.get(name));
    }

    public static Collection<DephasingKind> dephasingKinds() {
        return Collections.unmodifiableCollection(DEPHASING_KINDS.values());
    }

    /** The quantity of a material whose dimension is fixed. */
    public static Optional<MaterialQuantity> materialQuantity(String name) {
        return Optional.ofNullable(MATERIAL_QUANTITIES.get(name));
    }

    public static Collection<MaterialQuantity> materialQuantities() {
        return Collections.unmodifiableCollection(MATERIAL_QUANTITIES.values());
    }

    public static Optional<SettingEntry> setting(SettingEntry.Block block, String name) {
        return SETTINGS.stream()
                .filter(setting -> setting.block() == block && setting.name().equals(name))
                .findFirst();
    }

    /** The settings of a block, in the order of the reference. */
    public static List<SettingEntry> settings(SettingEntry.Block block) {
        return SETTINGS.stream().filter(setting -> setting.block() == block).toList();
    }
}
