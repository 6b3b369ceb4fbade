package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import java.util.ArrayList;
import java.util.List;

/** The twin laws of a crystal that are tried: half turns about the normals of planes of low indices that are no symmetry. */
final class TwinLaws {
    private static final int LARGEST_INDEX = 2;

    /** A law this near an operation of the lattice's Laue class is no law. */
    private static final double SAME_CRYSTAL = Math.toRadians(2);

    private TwinLaws() {}

    /** The laws as rotations in the crystal's Cartesian frame, one of each that symmetry cannot tell apart. */
    static List<Rotation> of(Crystal crystal) {
        List<Rotation> symmetry = crystal.spaceGroup().properLaueRotations(crystal.lattice()).stream()
                .map(Rotation::ofMatrix)
                .toList();
        List<Rotation> laws = new ArrayList<>();
        for (Uvw i : Uvw.upTo(LARGEST_INDEX)) {
            Rotation half =
                    Rotation.ofAxisAngle(crystal.lattice().reciprocal().vector(new Hkl(i.u(), i.v(), i.w())), Math.PI);
            boolean known = symmetry.stream().anyMatch(s -> s.angleTo(half) < SAME_CRYSTAL)
                    || laws.stream()
                            .anyMatch(l ->
                                    symmetry.stream().anyMatch(s -> l.after(s).angleTo(half) < SAME_CRYSTAL / 10));
            if (!known) {
                laws.add(half);
            }
        }
        return laws;
    }
}
