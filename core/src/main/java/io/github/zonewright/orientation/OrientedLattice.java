package io.github.zonewright.orientation;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SpaceGroup;
import java.util.List;

/**
 * A crystal's lattice as it stands in the microscope: what is needed of a crystal to compare its orientation with another's.
 *
 * @param lattice the cell
 * @param spaceGroup the group in the setting of that cell
 * @param orientation how it stands
 */
public record OrientedLattice(Lattice lattice, SpaceGroup spaceGroup, Orientation orientation) {

    /**
     * The rotations that the crystal's Laue class does not notice.
     *
     * @return the proper rotations in the crystal's Cartesian frame, the identity first
     */
    List<Rotation> symmetry() {
        return spaceGroup.properLaueRotations(lattice).stream()
                .map(Rotation::ofMatrix)
                .toList();
    }

    /** Whether the cell is another's to within some share of its edges, with the same Laue class. */
    boolean isAlike(OrientedLattice other, double share) {
        return spaceGroup.laueClass() == other.spaceGroup.laueClass()
                && lattice.basis().times(other.lattice.basis().inverse()).distanceTo(Matrix3.IDENTITY) < share;
    }
}
