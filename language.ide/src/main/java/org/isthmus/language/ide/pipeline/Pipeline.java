package org.isthmus.language.ide.pipeline;

import com.google.inject.Injector;
import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.eclipse.emf.ecore.resource.Resource;
import org.eclipse.emf.ecore.util.EcoreUtil;
import org.eclipse.xtext.EcoreUtil2;
import org.eclipse.xtext.resource.XtextResource;
import org.eclipse.xtext.resource.XtextSyntaxDiagnostic;
import org.eclipse.xtext.util.CancelIndicator;
import org.isthmus.language.IsthmusStandaloneSetup;
import org.isthmus.language.elaboration.Elaborator;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.formatting.FileLayout;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.runtime.description.DeviceDescription;
import org.isthmus.runtime.device.Device;
import org.isthmus.runtime.device.DeviceFamily;
import org.isthmus.runtime.device.DeviceText;
import org.isthmus.runtime.device.Finding;
import org.isthmus.runtime.device.Measurement;
import org.isthmus.runtime.device.Severity;
import org.isthmus.runtime.device.SourceRef;
import org.isthmus.runtime.kernel.ComplexBackend;
import org.isthmus.runtime.kernel.selection.Backends;
import org.isthmus.runtime.measure.MeasurementRunner;
import org.isthmus.runtime.measure.RunFailure;
import org.isthmus.runtime.plan.Planner;
import org.isthmus.runtime.report.ResultReport;
import org.isthmus.runtime.result.MeasurementResult;
import org.isthmus.runtime.result.Provenance;
import org.isthmus.runtime.result.ResultFolder;
import org.isthmus.runtime.result.Verdict;

/** The stages from files to results, in order. One instance serves one request at a time. */
public final class Pipeline {
    private final Injector injector;
    private final String tool;

    /**
     * Makes a pipeline.
     *
     * @param tool name and version, for the record
     */
    public Pipeline(String tool) {
        this.tool = tool;
        injector = new IsthmusStandaloneSetup().createInjectorAndDoEMFRegistration();
    }

    /**
     * Finds and parses files.
     *
     * @param paths files and folders
     * @throws MissingInput where one of them is not there
     */
    public Project load(List<Path> paths) throws MissingInput {
        return new ProjectLoader(injector).load(paths);
    }

    /**
     * Everything that the language has to say about the files asked for, in the order of files and lines; and errors of
     * the files that they refer to.
     */
    public List<Finding> check(Project project, CancelIndicator cancel) {
        return new ProjectCheck(project, injector, cancel).run();
    }

    /**
     * What is to be run.
     *
     * @param findings what was found wrong beyond the check, with the parameters given
     * @param notes sentences about what of the selection has no effect
     */
    public record Prepared(List<Job> jobs, List<Finding> findings, List<String> notes) {
        public Prepared {
            jobs = List.copyOf(jobs);
            findings = List.copyOf(findings);
            notes = List.copyOf(notes);
        }
    }

    /**
     * Makes the measurements of files ready to run. Only for files whose check has no error.
     *
     * @param known findings of the check, kept with the results
     * @throws BadRequest where the files have no such measurement or parameter
     */
    public Prepared prepare(Project project, Selection selection, List<Finding> known) throws BadRequest {
        return new JobPreparation(project, selection, injector).run(known);
    }

    /**
     * Runs a measurement.
     *
     * @throws RunFailure where a point has no device or a solve failed
     * @throws InterruptedException where the calling thread is interrupted: the run is then cancelled
     */
    public MeasurementResult run(Job job, int threads, Progress progress) throws RunFailure, InterruptedException {
        try {
            MeasurementResult result = new MeasurementRunner(backend(), threads)
                    .run(
                            job.family(),
                            job.measurement(),
                            job.findings(),
                            (done, total) -> progress.advanced(job.title(), done, total));
            return shown(result, job.project());
        } catch (RunFailure e) {
            throw new RunFailure(
                    e.getMessage(),
                    e.findings().stream().map(job.project()::shown).toList(),
                    e.getCause());
        }
    }

    /** The same result with its files named as the user gave them. */
    private static MeasurementResult shown(MeasurementResult result, Project project) {
        return new MeasurementResult(
                result.device(),
                result.measurement(),
                result.tables(),
                result.verdicts().stream()
                        .map(v -> new Verdict(
                                v.text(),
                                v.held(),
                                v.measured(),
                                v.expected(),
                                v.difference(),
                                v.at(),
                                v.unit(),
                                project.shown(v.place())))
                        .toList(),
                result.findings().stream().map(project::shown).distinct().toList(),
                result.residual(),
                result.equationResidual(),
                result.deviceDigest(),
                result.solves(),
                result.seconds());
    }

    /**
     * Writes a result, whole or not at all.
     *
     * @param out folder of all results
     * @return the folder written
     */
    public Path write(Path out, Job job, MeasurementResult result, int threads) throws IOException {
        Optional<Device> device = deviceOf(job);
        Provenance provenance = provenance(job, device, threads);
        return ResultFolder.write(
                out, result, provenance, Map.of("report.html", ResultReport.html(result, provenance, device)));
    }

    /** The result of an earlier run, where it is still that of the job. */
    public Optional<StoredResult> stored(Path out, Job job) {
        return StoredResult.of(out, job, tool);
    }

    /** The device at the first point of its sweeps. */
    private static Optional<Device> deviceOf(Job job) {
        Map<String, Double> values = new LinkedHashMap<>(job.measurement().settings());
        for (Measurement.Axis axis : job.measurement().axes()) {
            if (axis instanceof Measurement.SweepAxis sweep && !sweep.values().isEmpty()) {
                values.put(sweep.parameter(), sweep.values().get(0));
            }
        }
        return Optional.ofNullable(job.family().elaborate(values).device());
    }

    private Provenance provenance(Job job, Optional<Device> device, int threads) {
        return new Provenance(
                tool,
                device.map(DeviceText::of).orElse(""),
                job.inputs(),
                job.given(),
                backend().description(),
                threads);
    }

    private static ComplexBackend backend() {
        return Backends.standard();
    }

    /**
     * A device as understood, or what stands in its way.
     *
     * @param description empty where findings of severity error stand in its way
     */
    public record Described(String name, Optional<DeviceDescription> description, List<Finding> findings) {
        public Described {
            findings = List.copyOf(findings);
        }
    }

    /**
     * Describes the devices of files at the values of their text. Only for files whose check has no error.
     *
     * @param names devices that are wanted; empty for all
     * @throws BadRequest where there is no such device
     */
    public List<Described> describe(Project project, Set<String> names) throws BadRequest {
        List<Described> described = new ArrayList<>();
        Set<String> seen = new LinkedHashSet<>();
        for (Project.Part part : project.parts()) {
            for (XtextResource resource : part.asked().values()) {
                EcoreUtil.resolveAll(resource);
                for (DeviceDeclaration declaration :
                        EcoreUtil2.getAllContentsOfType(resource.getContents().get(0), DeviceDeclaration.class)) {
                    seen.add(declaration.getName());
                    if (names.isEmpty() || names.contains(declaration.getName())) {
                        described.add(describe(project, declaration));
                    }
                }
            }
        }
        for (String name : names) {
            if (!seen.contains(name)) {
                throw new BadRequest("there is no device '" + name + "'"
                        + (seen.isEmpty() ? "." : "; there are " + String.join(", ", seen) + "."));
            }
        }
        if (seen.isEmpty()) {
            throw new BadRequest("nothing to describe: no device is declared in "
                    + String.join(
                            ", ",
                            project.parsed().stream().map(SourceFile::shown).toList())
                    + ".");
        }
        return described;
    }

    private static Described describe(Project project, DeviceDeclaration declaration) {
        DeviceFamily.Elaborated elaborated = Elaborator.of(declaration).elaborate(Map.of());
        List<Finding> findings =
                elaborated.findings().stream().map(project::shown).toList();
        return new Described(
                declaration.getName(),
                elaborated.ok() ? Optional.of(describe(elaborated.device())) : Optional.empty(),
                findings);
    }

    private static DeviceDescription describe(Device device) {
        return DeviceDescription.of(device, Planner.plan(device), backend());
    }

    /** What keeps a file from being parsed, in the order of lines. */
    public List<Finding> syntaxErrors(Project project, SourceFile file) {
        List<Finding> findings = new ArrayList<>();
        for (Resource.Diagnostic error : project.resource(file).getErrors()) {
            if (error instanceof XtextSyntaxDiagnostic syntax) {
                SourceRef place = new SourceRef(
                        file.shown(), syntax.getLine(), syntax.getColumn(), syntax.getOffset(), syntax.getLength());
                findings.add(new Finding(IssueCode.SYNTAX.id(), Severity.ERROR, syntax.getMessage(), place));
            }
        }
        return findings;
    }

    /**
     * A file's text in the canonical layout, where it is laid out otherwise.
     *
     * @throws IllegalArgumentException for a file with syntax errors
     */
    public Optional<String> relaidOut(Project project, SourceFile file) {
        XtextResource resource = project.resource(file);
        String text = injector.getInstance(FileLayout.class).format(resource);
        return text.equals(resource.getParseResult().getRootNode().getText()) ? Optional.empty() : Optional.of(text);
    }
}
