package io.github.zonewright.orientation;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SpaceGroup;
import java.util.OptionalDouble;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class LatticeRotationTest {

    private static Rotation turn(Vector3 axis, double degrees) {
        return Rotation.ofAxisAngle(axis, Math.toRadians(degrees));
    }

    /** The four-fold axes of a cube in pyrite's class m−3, and half a turn about c of quartz (the Dauphiné law): textbook merohedry. */
    @Test
    void strain_merohedralTwins_none() {
        SpaceGroup pyrite = SpaceGroup.ofHall("-P 2ac 2ab 3");
        assertEquals(
                0,
                LatticeRotation.strain(turn(Vector3.Z, 90), Lattice.cubic(5.42), pyrite)
                        .orElseThrow(),
                1e-9);
        SpaceGroup quartz = SpaceGroup.ofHall("P 32 2\"");
        assertEquals(
                0,
                LatticeRotation.strain(turn(Vector3.Z, 180), Lattice.hexagonal(4.91, 5.4), quartz)
                        .orElseThrow(),
                1e-9);
    }

    /** The spinel law brings one site in three into coincidence: no operation of the lattice. */
    @Test
    void strain_cubicTwin_carriesElsewhere() {
        SpaceGroup copper = SpaceGroup.ofHall("-F 4 2 3");
        assertTrue(LatticeRotation.strain(turn(new Vector3(1, 1, 1), 60), Lattice.cubic(3.61), copper)
                .isEmpty());
    }

    /** Obverse and reverse of a rhombohedral lattice: half a turn about c is an operation of its hexagonal cell, not of it. */
    @Test
    void strain_obverseAndReverse_carriesElsewhere() {
        SpaceGroup corundum = SpaceGroup.ofHall("-R 3 2\"c");
        assertTrue(LatticeRotation.strain(turn(Vector3.Z, 180), Lattice.hexagonal(4.76, 12.99), corundum)
                .isEmpty());
    }

    /** A C-centred cell with b = a√3 is hexagonal, and with b 1 % longer nearly so. */
    @ParameterizedTest
    @CsvSource({"1, 0, 1e-9", "1.01, 0.005, 0.003"})
    void strain_orthohexagonalCell_sixtyDegrees(double factor, double expected, double within) {
        Lattice lattice = Lattice.orthorhombic(3, 3 * Math.sqrt(3) * factor, 5);
        SpaceGroup centred = SpaceGroup.ofHall("-C 2 2");
        OptionalDouble strain = LatticeRotation.strain(turn(Vector3.Z, 60), lattice, centred);
        assertEquals(expected, strain.orElseThrow(), within);
        assertTrue(LatticeRotation.strain(turn(Vector3.Z, 60), lattice, SpaceGroup.ofHall("-P 2 2"))
                .isEmpty());
    }

    /** A rotation as it is measured, two degrees off, is taken for the operation; ten degrees off it is not. */
    @Test
    void strain_measuredRotation_withinTolerance() {
        SpaceGroup copper = SpaceGroup.ofHall("-F 4 2 3");
        Lattice lattice = Lattice.cubic(3.61);
        assertTrue(
                LatticeRotation.strain(turn(Vector3.Z, 91.5), lattice, copper).isPresent());
        assertTrue(LatticeRotation.strain(turn(Vector3.Z, 100), lattice, copper).isEmpty());
    }
}
