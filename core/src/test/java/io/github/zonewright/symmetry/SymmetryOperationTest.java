package io.github.zonewright.symmetry;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.reference.ReferenceCsv;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class SymmetryOperationTest {

    /** Spellings found in CIFs, with the canonical one beside each. */
    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "x,y,z | x,y,z",
                "X, Y, Z | x,y,z",
                "+x,+y,+z | x,y,z",
                "1/2+x,y,-z | x+1/2,y,-z",
                "x+1/2,y,-z | x+1/2,y,-z",
                "-x+1/2 , 1/2 - y, z | -x+1/2,-y+1/2,z",
                "y+x,x,z | x+y,x,z+0",
                "-y,x-y,z+0.3333 | -y,x-y,z+1/3",
                "-y,x-y,0.33+z | -y,x-y,z+1/3",
                "x,y,z+.5 | x,y,z+1/2",
                "x,y,z+0.66667 | x,y,z+2/3",
                "x,y,z-1/4 | x,y,z-1/4",
                "x,y,z+0.2 | x,y,z+1/5",
                "x,y,z+3/16 | x,y,z+3/16",
                "1*x,y,z | x,y,z",
                "x+1,y,z-2 | x+1,y,z-2",
                "1/2+1/4-x,y,-z | -x+3/4,y,-z"
            })
    void parse_spellingsInUse(String written, String canonical) {
        SymmetryOperation expected = SymmetryOperation.parse(canonical);
        assertEquals(expected, SymmetryOperation.parse(written));
        assertEquals(
                canonical.replace("+0", ""), SymmetryOperation.parse(written).toString());
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "",
                "x,y",
                "x,y,z,x",
                "x,,z",
                "x,y,w",
                "x,y,z+",
                "x,y,z+1/0",
                "x,y,z+1/7",
                "x,y,x",
                "x/2,y,z",
                "2*x,y,z",
                "x y,z,1",
                "x,y,z+1..5",
                "x,y,z+99999999999999999999",
                "x,y,--z",
                "0,0,0",
                "x,y,z/"
            })
    void parse_refusesWhatIsNoOperation(String text) {
        IllegalArgumentException e = assertThrows(IllegalArgumentException.class, () -> SymmetryOperation.parse(text));
        assertTrue(e.getMessage().startsWith("symmetry operation"), e.getMessage());
    }

    @Test
    void parse_refusesALongText() {
        assertThrows(IllegalArgumentException.class, () -> SymmetryOperation.parse("x".repeat(100_000)));
    }

    /** The spellings of gemmi 0.5.7, over seven thousand of them, come back as they were. */
    @Test
    void toString_equalsTheReferenceTable() {
        for (Map<String, String> row : ReferenceCsv.read("space-group-operations.csv", ';')) {
            for (String triplet : row.get("triplets").split(" ")) {
                assertEquals(triplet, SymmetryOperation.parse(triplet).toString());
            }
        }
    }

    /** Worked by hand; the threefold axis in International Tables A, P 3₁, operation 2. */
    @Test
    void apply_workedNumbers() {
        SymmetryOperation screw = SymmetryOperation.parse("-y,x-y,z+1/3");
        Vector3 p = screw.apply(new Vector3(0.1, 0.2, 0.3));
        assertEquals(-0.2, p.x(), 1e-15);
        assertEquals(-0.1, p.y(), 1e-15);
        assertEquals(0.3 + 1.0 / 3, p.z(), 1e-15);
        assertEquals(new Hkl(2, -3, 3), screw.apply(new Hkl(1, 2, 3)));
        assertEquals(new Uvw(0, 1, 0), screw.apply(new Uvw(1, 0, 0)));
        assertEquals(new Uvw(-1, -1, 0), screw.apply(new Uvw(0, 1, 0)));
        assertEquals(2 * Math.PI * 2 / 3, screw.phaseShift(new Hkl(5, -1, 2)), 1e-15);
        assertEquals(2 * Math.PI / 3, screw.phaseShift(new Hkl(0, 0, -2)), 1e-15);
    }

    @Test
    void after_appliesTheOtherFirst() {
        SymmetryOperation turn = SymmetryOperation.parse("-y,x,z");
        SymmetryOperation shift = SymmetryOperation.parse("x+1/2,y,z");
        assertEquals("-y,x+1/2,z", turn.after(shift).toString());
        assertEquals("-y+1/2,x,z", shift.after(turn).toString());
    }

    @ParameterizedTest
    @ValueSource(strings = {"-y,x-y,z+1/3", "x-y,x,z+5/6", "z+3/4,-x+1/4,y+1/2", "-x,-y,-z+1/2", "x,x-y,-z", "y,z,x"})
    void inverse_undoesTheOperation(String triplet) {
        SymmetryOperation operation = SymmetryOperation.parse(triplet);
        assertEquals(SymmetryOperation.IDENTITY, operation.after(operation.inverse()));
        assertEquals(SymmetryOperation.IDENTITY, operation.inverse().after(operation));
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "x,y,z | 1",
                "-x,-y,-z | -1",
                "-x,-y,z | 2",
                "x,-y,z+1/2 | -2",
                "-y,x-y,z | 3",
                "y,-x+y,-z | -3",
                "-y,x,z+1/4 | 4",
                "y,-x,-z | -4",
                "x-y,x,z | 6",
                "-x+y,-x,-z | -6",
                "z,x,y | 3"
            })
    void rotationType_ofEachKind(String triplet, int type) {
        assertEquals(type, SymmetryOperation.parse(triplet).rotationType());
    }

    @Test
    void rotationType_refusesARotationOfInfiniteOrder() {
        SymmetryOperation shear = SymmetryOperation.parse("x+y,y,z");
        assertThrows(IllegalArgumentException.class, shear::rotationType);
    }

    @Test
    void reduced_bringsTranslationsIntoTheCell() {
        assertEquals(
                "x+1/2,y+3/4,z",
                SymmetryOperation.parse("x-3/2,y-1/4,z+3").reduced().toString());
    }

    @Test
    void of_refusesWrongSizesAndDeterminants() {
        assertThrows(IllegalArgumentException.class, () -> SymmetryOperation.of(new int[8], new int[3]));
        assertThrows(IllegalArgumentException.class, () -> SymmetryOperation.of(new int[9], new int[3]));
        int[] huge = {1, 0, 0, 0, 1, 0, 1_000_000, 0, 1};
        assertThrows(IllegalArgumentException.class, () -> SymmetryOperation.of(huge, new int[3]));
    }

    @Test
    void of_copiesItsArrays() {
        int[] rotation = {1, 0, 0, 0, 1, 0, 0, 0, 1};
        SymmetryOperation made = SymmetryOperation.of(rotation, new int[3]);
        rotation[0] = -1;
        assertEquals(SymmetryOperation.IDENTITY, made);
    }
}
