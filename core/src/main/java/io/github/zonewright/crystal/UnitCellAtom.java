package io.github.zonewright.crystal;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.symmetry.SymmetryOperation;

/**
 * One atom of the whole cell.
 *
 * @param site the site of the asymmetric unit that it belongs to
 * @param operation the operation that takes that site here
 * @param position fractional coordinates in [0, 1)
 */
public record UnitCellAtom(AtomSite site, SymmetryOperation operation, Vector3 position) {}
