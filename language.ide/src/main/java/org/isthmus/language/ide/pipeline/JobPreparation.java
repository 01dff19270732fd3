package org.isthmus.language.ide.pipeline;

import com.google.inject.Injector;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Collectors;
import org.eclipse.emf.ecore.util.EcoreUtil;
import org.eclipse.xtext.EcoreUtil2;
import org.isthmus.language.elaboration.Elaborator;
import org.isthmus.language.isthmus.MeasurementDeclaration;
import org.isthmus.language.isthmus.Parameter;
import org.isthmus.language.isthmus.SweepAxis;
import org.isthmus.language.measurement.MeasurementLowering;
import org.isthmus.language.structure.DeviceStructure;
import org.isthmus.runtime.device.Finding;

/** Turns the measurements of checked files into jobs. */
final class JobPreparation {
    private final Project project;
    private final Selection selection;
    private final Map<String, SettingText> settings = new LinkedHashMap<>();
    private final List<String> notes = new ArrayList<>();

    JobPreparation(Project project, Selection selection, Injector injector) throws BadRequest {
        this.project = project;
        this.selection = selection;
        for (Map.Entry<String, String> setting : selection.settings().entrySet()) {
            settings.put(setting.getKey(), SettingText.read(injector, setting.getKey(), setting.getValue()));
        }
    }

    /** Jobs in the order of the text, with what is still found wrong with them. */
    Pipeline.Prepared run(List<Finding> known) throws BadRequest {
        List<Job> jobs = new ArrayList<>();
        Set<Finding> findings = new LinkedHashSet<>();
        Set<String> seen = new LinkedHashSet<>();
        Set<String> unused = new LinkedHashSet<>(settings.keySet());
        Set<String> parameters = new LinkedHashSet<>();
        for (Project.Part part : project.parts()) {
            Map<String, String> inputs = null;
            for (SourceFile file : part.asked().keySet()) {
                for (MeasurementDeclaration declaration : measurements(part, file)) {
                    String device = declaration.getDevice().getName();
                    seen.add(device + "." + declaration.getName());
                    if (!selection.wants(device, declaration.getName())) {
                        continue;
                    }
                    inputs = inputs == null ? InputFiles.of(project, part) : inputs;
                    Map<String, Double> given = given(declaration, unused, parameters);
                    MeasurementLowering.Lowered lowered = MeasurementLowering.lower(declaration, given);
                    lowered.findings().stream().map(project::shown).forEach(findings::add);
                    if (lowered.measurement() != null) {
                        jobs.add(new Job(
                                file,
                                Elaborator.of(declaration.getDevice()),
                                lowered.measurement(),
                                inputs,
                                texts(given),
                                known.stream()
                                        .filter(f -> f.place().file().equals(file.shown()))
                                        .toList(),
                                project));
                        if (!given.isEmpty()) {
                            // the check has looked at the values of the text only
                            jobs
                                    .get(jobs.size() - 1)
                                    .family()
                                    .elaborate(lowered.measurement().settings())
                                    .findings()
                                    .stream()
                                    .map(project::shown)
                                    .filter(f -> !known.contains(f))
                                    .forEach(findings::add);
                        }
                    }
                }
            }
        }
        refuseWhatIsMissing(seen, unused, parameters);
        refuseSameFolder(jobs);
        return new Pipeline.Prepared(jobs, List.copyOf(findings), notes);
    }

    private static List<MeasurementDeclaration> measurements(Project.Part part, SourceFile file) {
        EcoreUtil.resolveAll(part.asked().get(file));
        return part.asked().get(file).getContents().stream()
                .flatMap(root -> EcoreUtil2.getAllContentsOfType(root, MeasurementDeclaration.class).stream())
                .toList();
    }

    private Map<String, Double> given(MeasurementDeclaration declaration, Set<String> unused, Set<String> parameters)
            throws BadRequest {
        Map<String, Double> given = new LinkedHashMap<>();
        Set<String> swept = declaration.getStatements().stream()
                .filter(SweepAxis.class::isInstance)
                .map(statement -> ((SweepAxis) statement).getParameter().getName())
                .collect(Collectors.toSet());
        for (Parameter parameter : DeviceStructure.of(declaration.getDevice()).parameters()) {
            parameters.add(parameter.getName());
            SettingText setting = settings.get(parameter.getName());
            if (setting != null && swept.contains(parameter.getName())) {
                unused.remove(parameter.getName());
                notes.add("--set " + parameter.getName() + " has no effect on " + declaration.getName() + " of "
                        + declaration.getDevice().getName() + ", which sweeps it.");
            } else if (setting != null) {
                given.put(parameter.getName(), setting.valueFor(parameter));
                unused.remove(parameter.getName());
            }
        }
        return given;
    }

    private Map<String, String> texts(Map<String, Double> given) {
        Map<String, String> texts = new LinkedHashMap<>();
        given.keySet().forEach(name -> texts.put(name, settings.get(name).text()));
        return texts;
    }

    private void refuseWhatIsMissing(Set<String> seen, Set<String> unused, Set<String> parameters) throws BadRequest {
        if (seen.isEmpty()) {
            throw new BadRequest("nothing to run: no measurement is declared in "
                    + String.join(
                            ", ",
                            project.parsed().stream().map(SourceFile::shown).toList())
                    + ".");
        }
        for (String wanted : selection.measurements()) {
            if (seen.stream().noneMatch(name -> name.equals(wanted) || name.endsWith("." + wanted))) {
                throw new BadRequest(
                        "there is no measurement '" + wanted + "'; there are " + String.join(", ", seen) + ".");
            }
        }
        Optional<String> first = unused.stream().findFirst();
        if (first.isPresent()) {
            throw new BadRequest("--set " + first.get() + ": no measured device has a parameter '" + first.get() + "'; "
                    + (parameters.isEmpty() ? "there is none." : "there are " + String.join(", ", parameters) + "."));
        }
    }

    private static void refuseSameFolder(List<Job> jobs) throws BadRequest {
        Map<String, Job> folders = new LinkedHashMap<>();
        for (Job job : jobs) {
            Job other = folders.put(job.folder(), job);
            if (other != null) {
                throw new BadRequest("measurement " + job.title() + " is declared in "
                        + other.file().shown() + " and in " + job.file().shown()
                        + "; run the files one after the other, each with its own --out.");
            }
        }
    }
}
