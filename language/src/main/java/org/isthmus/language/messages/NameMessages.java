package org.isthmus.language.messages;

import com.google.inject.Inject;
import com.google.inject.Provider;
import java.util.ArrayList;
import java.util.List;
import org.eclipse.emf.ecore.EClass;
import org.eclipse.emf.ecore.EObject;
import org.eclipse.xtext.EcoreUtil2;
import org.eclipse.xtext.diagnostics.DiagnosticMessage;
import org.eclipse.xtext.diagnostics.Severity;
import org.eclipse.xtext.linking.impl.LinkingDiagnosticMessageProvider;
import org.eclipse.xtext.resource.IEObjectDescription;
import org.eclipse.xtext.scoping.IScope;
import org.eclipse.xtext.scoping.IScopeProvider;
import org.isthmus.language.findings.IssueCode;
import org.isthmus.language.isthmus.DeviceDeclaration;
import org.isthmus.language.isthmus.IsthmusPackage;
import org.isthmus.language.isthmus.MeasurementDeclaration;
import org.isthmus.language.typing.Suggestion;

/** Says which name is not known, and which known one was probably meant. */
public class NameMessages extends LinkingDiagnosticMessageProvider {
    private static final int MOST_NAMES = 5000;

    @Inject
    private Provider<IScopeProvider> scopes;

    @Override
    public DiagnosticMessage getUnresolvedProxyMessage(ILinkingDiagnosticContext context) {
        String name = context.getLinkText();
        String text = "Unknown " + noun(context.getReference().getEReferenceType()) + " '" + name + "'" + owner(context)
                + Suggestion.phrase(name, known(context).stream()) + ".";
        return new DiagnosticMessage(text, Severity.ERROR, IssueCode.UNKNOWN_NAME.id());
    }

    private static String noun(EClass type) {
        if (type == IsthmusPackage.Literals.LEAD_DECLARATION) {
            return "lead";
        }
        if (type == IsthmusPackage.Literals.PARAMETER || type == IsthmusPackage.Literals.HEADER_PARAMETER) {
            return "parameter";
        }
        if (type == IsthmusPackage.Literals.LATTICE_DECLARATION) {
            return "lattice";
        }
        if (type == IsthmusPackage.Literals.DEVICE_DECLARATION) {
            return "device";
        }
        return type == IsthmusPackage.Literals.SITE_DECLARATION ? "site" : "name";
    }

    private static String owner(ILinkingDiagnosticContext context) {
        EClass type = context.getReference().getEReferenceType();
        if (type != IsthmusPackage.Literals.LEAD_DECLARATION && type != IsthmusPackage.Literals.PARAMETER) {
            return "";
        }
        MeasurementDeclaration measurement =
                EcoreUtil2.getContainerOfType(context.getContext(), MeasurementDeclaration.class);
        DeviceDeclaration device = measurement != null
                ? measurement.getDevice()
                : EcoreUtil2.getContainerOfType(context.getContext(), DeviceDeclaration.class);
        return device == null || device.eIsProxy() ? "" : " of device '" + device.getName() + "'";
    }

    private List<String> known(ILinkingDiagnosticContext context) {
        List<String> names = new ArrayList<>();
        EObject object = context.getContext();
        if (object == null || object.eResource() == null) {
            return names;
        }
        IScope scope = scopes.get().getScope(object, context.getReference());
        for (IEObjectDescription description : scope.getAllElements()) {
            if (names.size() >= MOST_NAMES) {
                break;
            }
            names.add(description.getName().toString());
        }
        return names;
    }
}
