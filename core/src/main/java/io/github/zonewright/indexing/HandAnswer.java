package io.github.zonewright.indexing;

import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.pattern.Placement;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * A zone and rotation that clicked spots may belong to.
 *
 * @param placement crystal, zone, rotation; on zone, with the camera as it was given
 * @param indices the reflection of each clicked spot, in their order
 * @param spacingResiduals measured less tabulated d of each spot, in % of the latter
 * @param angleResiduals measured less computed angle from the first spot to each other one, in degrees
 * @param misfit root of the mean squared residual, each over what is allowed of it; 0 is exact, 1 the limit
 * @param halfTurn the orientation half a turn about the zone axis away, which the spots cannot tell from it, where symmetry
 *     does not make it the same
 */
public record HandAnswer(
        Placement placement,
        List<Hkl> indices,
        List<Double> spacingResiduals,
        List<Double> angleResiduals,
        double misfit,
        Optional<Orientation> halfTurn) {

    /** Copies the lists. */
    public HandAnswer {
        indices = List.copyOf(indices);
        spacingResiduals = List.copyOf(spacingResiduals);
        angleResiduals = List.copyOf(angleResiduals);
    }

    /**
     * One line for a person.
     *
     * @return crystal, zone, indices, and the largest residuals
     */
    public String sentence() {
        double d = spacingResiduals.stream().mapToDouble(Math::abs).max().orElse(0);
        double angle = angleResiduals.stream().mapToDouble(Math::abs).max().orElse(0);
        return String.format(
                Locale.ROOT,
                "%s, [%s] with %s: d within %.1f %%, angles within %.1f°",
                placement.crystal().name(),
                placement.setting().zone(),
                String.join(", ", indices.stream().map(Hkl::toString).toList()),
                d,
                angle);
    }
}
