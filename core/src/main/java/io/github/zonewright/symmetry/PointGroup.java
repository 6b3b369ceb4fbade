package io.github.zonewright.symmetry;

import java.util.Arrays;
import java.util.Collection;
import java.util.List;
import java.util.stream.IntStream;

/**
 * The 32 crystallographic point groups (crystal classes). Which one a group of rotations is follows from how many of
 * each type it holds (International Tables for Crystallography A, section 3.2.1).
 */
public enum PointGroup {
    /** 1. */
    C1("1", LaueClass.TRICLINIC, "1"),
    /** -1. */
    CI("-1", LaueClass.TRICLINIC, "1 -1"),
    /** 2. */
    C2("2", LaueClass.MONOCLINIC, "1 2"),
    /** m. */
    CS("m", LaueClass.MONOCLINIC, "1 -2"),
    /** 2/m. */
    C2H("2/m", LaueClass.MONOCLINIC, "1 2 -1 -2"),
    /** 222. */
    D2("222", LaueClass.ORTHORHOMBIC, "1 2*3"),
    /** mm2. */
    C2V("mm2", LaueClass.ORTHORHOMBIC, "1 2 -2*2"),
    /** mmm. */
    D2H("mmm", LaueClass.ORTHORHOMBIC, "1 2*3 -1 -2*3"),
    /** 4. */
    C4("4", LaueClass.TETRAGONAL_LOW, "1 2 4*2"),
    /** -4. */
    S4("-4", LaueClass.TETRAGONAL_LOW, "1 2 -4*2"),
    /** 4/m. */
    C4H("4/m", LaueClass.TETRAGONAL_LOW, "1 2 4*2 -1 -2 -4*2"),
    /** 422. */
    D4("422", LaueClass.TETRAGONAL_HIGH, "1 2*5 4*2"),
    /** 4mm. */
    C4V("4mm", LaueClass.TETRAGONAL_HIGH, "1 2 4*2 -2*4"),
    /** -42m, in any of its orientations. */
    D2D("-42m", LaueClass.TETRAGONAL_HIGH, "1 2*3 -4*2 -2*2"),
    /** 4/mmm. */
    D4H("4/mmm", LaueClass.TETRAGONAL_HIGH, "1 2*5 4*2 -1 -2*5 -4*2"),
    /** 3. */
    C3("3", LaueClass.TRIGONAL_LOW, "1 3*2"),
    /** -3. */
    C3I("-3", LaueClass.TRIGONAL_LOW, "1 3*2 -1 -3*2"),
    /** 32. */
    D3("32", LaueClass.TRIGONAL_HIGH, "1 3*2 2*3"),
    /** 3m. */
    C3V("3m", LaueClass.TRIGONAL_HIGH, "1 3*2 -2*3"),
    /** -3m. */
    D3D("-3m", LaueClass.TRIGONAL_HIGH, "1 3*2 2*3 -1 -3*2 -2*3"),
    /** 6. */
    C6("6", LaueClass.HEXAGONAL_LOW, "1 2 3*2 6*2"),
    /** -6. */
    C3H("-6", LaueClass.HEXAGONAL_LOW, "1 -2 3*2 -6*2"),
    /** 6/m. */
    C6H("6/m", LaueClass.HEXAGONAL_LOW, "1 2 3*2 6*2 -1 -2 -3*2 -6*2"),
    /** 622. */
    D6("622", LaueClass.HEXAGONAL_HIGH, "1 2*7 3*2 6*2"),
    /** 6mm. */
    C6V("6mm", LaueClass.HEXAGONAL_HIGH, "1 2 3*2 6*2 -2*6"),
    /** -62m, in any of its orientations. */
    D3H("-62m", LaueClass.HEXAGONAL_HIGH, "1 -2*4 3*2 -6*2 2*3"),
    /** 6/mmm. */
    D6H("6/mmm", LaueClass.HEXAGONAL_HIGH, "1 2*7 3*2 6*2 -1 -2*7 -3*2 -6*2"),
    /** 23. */
    T("23", LaueClass.CUBIC_LOW, "1 2*3 3*8"),
    /** m-3. */
    TH("m-3", LaueClass.CUBIC_LOW, "1 2*3 3*8 -1 -2*3 -3*8"),
    /** 432. */
    O("432", LaueClass.CUBIC_HIGH, "1 2*9 3*8 4*6"),
    /** -43m. */
    TD("-43m", LaueClass.CUBIC_HIGH, "1 2*3 3*8 -4*6 -2*6"),
    /** m-3m. */
    OH("m-3m", LaueClass.CUBIC_HIGH, "1 2*9 3*8 4*6 -1 -2*9 -3*8 -4*6");

    private static final List<PointGroup> ALL = List.of(values());

    /** The last space-group number of each point group; International Tables A numbers the types class by class. */
    private static final int[] LAST_NUMBERS = {
        1, 2, 5, 9, 15, 24, 46, 74, 80, 82, 88, 98, 110, 122, 142, 146, 148, 155, 161, 167, 173, 174, 176, 182, 186,
        190, 194, 199, 206, 214, 220, 230
    };

    private final String symbol;
    private final LaueClass laueClass;
    private final int[] types;

    /** The types are written with how often each occurs: {@code 1 2*3} is the identity and three twofold axes. */
    PointGroup(String symbol, LaueClass laueClass, String types) {
        this.symbol = symbol;
        this.laueClass = laueClass;
        this.types = Arrays.stream(types.split(" "))
                .map(counted -> counted.split("\\*"))
                .flatMapToInt(c -> IntStream.generate(() -> Integer.parseInt(c[0]))
                        .limit(c.length == 1 ? 1 : Integer.parseInt(c[1])))
                .sorted()
                .toArray();
    }

    /**
     * The point group of a set of distinct rotations.
     *
     * @param rotations every rotation of the group once
     * @return the point group
     * @throws IllegalArgumentException if the rotations make up none of the 32 groups
     */
    static PointGroup of(Collection<SymmetryOperation> rotations) {
        int[] types = rotations.stream()
                .mapToInt(SymmetryOperation::rotationType)
                .sorted()
                .toArray();
        return ALL.stream()
                .filter(group -> Arrays.equals(group.types, types))
                .findFirst()
                .orElseThrow(() -> new IllegalArgumentException("point group of " + types.length
                        + " rotations of types " + Arrays.toString(types) + ": none of the 32 is made up so"));
    }

    /** Whether the space-group type of a number has this point group. */
    boolean holdsNumber(int number) {
        return number <= LAST_NUMBERS[ordinal()] && (ordinal() == 0 || number > LAST_NUMBERS[ordinal() - 1]);
    }

    /**
     * The Hermann–Mauguin symbol.
     *
     * @return for example {@code -43m}
     */
    public String symbol() {
        return symbol;
    }

    /**
     * The number of operations.
     *
     * @return 1 to 48
     */
    public int order() {
        return types.length;
    }

    /**
     * The Laue class.
     *
     * @return the class of this group with a centre of symmetry added
     */
    public LaueClass laueClass() {
        return laueClass;
    }

    @Override
    public String toString() {
        return symbol;
    }
}
