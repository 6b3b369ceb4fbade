package io.github.zonewright.symmetry;

/** The eleven Laue classes: the point groups with a centre of symmetry. */
public enum LaueClass {
    /** Triclinic. */
    TRICLINIC("-1", 1),
    /** Monoclinic. */
    MONOCLINIC("2/m", 2),
    /** Orthorhombic. */
    ORTHORHOMBIC("mmm", 4),
    /** Tetragonal, without mirrors along the fourfold axis. */
    TETRAGONAL_LOW("4/m", 4),
    /** Tetragonal, with mirrors along the fourfold axis. */
    TETRAGONAL_HIGH("4/mmm", 8),
    /** Trigonal, without mirrors. */
    TRIGONAL_LOW("-3", 3),
    /** Trigonal, with mirrors. */
    TRIGONAL_HIGH("-3m", 6),
    /** Hexagonal, without mirrors along the sixfold axis. */
    HEXAGONAL_LOW("6/m", 6),
    /** Hexagonal, with mirrors along the sixfold axis. */
    HEXAGONAL_HIGH("6/mmm", 12),
    /** Cubic, without fourfold axes. */
    CUBIC_LOW("m-3", 12),
    /** Cubic, with fourfold axes. */
    CUBIC_HIGH("m-3m", 24);

    private final String symbol;
    private final int properOrder;

    LaueClass(String symbol, int properOrder) {
        this.symbol = symbol;
        this.properOrder = properOrder;
    }

    /**
     * The Hermann–Mauguin symbol.
     *
     * @return for example {@code 4/mmm}
     */
    public String symbol() {
        return symbol;
    }

    /**
     * The number of proper rotations, half the order of the class.
     *
     * @return 1 to 24
     */
    public int properOrder() {
        return properOrder;
    }

    @Override
    public String toString() {
        return symbol;
    }
}
