package org.isthmus.language.typing;

import org.eclipse.emf.ecore.EObject;
import org.eclipse.xtext.EcoreUtil2;
import org.isthmus.language.isthmus.BiasAxis;
import org.isthmus.language.isthmus.CatalogueEntry;
import org.isthmus.language.isthmus.MeasurementDeclaration;
import org.isthmus.language.isthmus.MeasurementSetting;
import org.isthmus.language.isthmus.MeasurementStatement;
import org.isthmus.language.isthmus.SweepAxis;
import org.isthmus.runtime.units.Dimension;

/** What axes a measurement has, as far as types depend on it. */
public final class MeasurementAxes {
    private MeasurementAxes() {}

    /** True where the measurement around an object has an {@code energy} axis. */
    public static boolean hasEnergyAxis(EObject inside) {
        MeasurementDeclaration measurement = EcoreUtil2.getContainerOfType(inside, MeasurementDeclaration.class);
        return measurement != null && measurement.getStatements().stream().anyMatch(MeasurementAxes::isEnergyAxis);
    }

    /** True for {@code energy = …}. */
    public static boolean isEnergyAxis(MeasurementStatement statement) {
        return statement instanceof MeasurementSetting setting
                && setting.getTarget() instanceof CatalogueEntry entry
                && "energy".equals(entry.getName());
    }

    /** Dimension of the first axis: the energy axis, else the first bias, else the first sweep; null without an axis. */
    static Dimension firstAxis(EObject inside, Inference inference) {
        if (hasEnergyAxis(inside)) {
            return Dimension.ENERGY;
        }
        MeasurementDeclaration measurement = EcoreUtil2.getContainerOfType(inside, MeasurementDeclaration.class);
        if (measurement.getStatements().stream().anyMatch(BiasAxis.class::isInstance)) {
            return Dimension.VOLTAGE;
        }
        return measurement.getStatements().stream()
                .filter(SweepAxis.class::isInstance)
                .map(SweepAxis.class::cast)
                .filter(sweep ->
                        sweep.getParameter() != null && !sweep.getParameter().eIsProxy())
                .map(sweep -> Inference.dimension(inference.typeOf(sweep.getParameter())))
                .findFirst()
                .orElse(null);
    }
}
