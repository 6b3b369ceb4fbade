package io.github.zonewright.crystal;

import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SpaceGroupSetting;
import io.github.zonewright.symmetry.SpaceGroups;
import java.util.Arrays;
import java.util.List;

/** What a group asks of its cell, in words for people, and the cell of the edges that it leaves free. */
enum CellShape {
    TRICLINIC("any edges and angles", List.of("a", "b", "c", "alpha", "beta", "gamma")),
    MONOCLINIC("two right angles", List.of("a", "b", "c", "angle")),
    ORTHORHOMBIC("three right angles", List.of("a", "b", "c")),
    TETRAGONAL("two equal edges and three right angles", List.of("a", "c")),
    HEXAGONAL("a = b, α = β = 90° and γ = 120°", List.of("a", "c")),
    RHOMBOHEDRAL("a = b = c and α = β = γ", List.of("a", "angle")),
    CUBIC("a = b = c and three right angles", List.of("a"));

    private final String demand;
    private final List<String> edges;

    CellShape(String demand, List<String> edges) {
        this.demand = demand;
        this.edges = edges;
    }

    static CellShape of(SpaceGroupSetting setting) {
        int n = setting.number();
        if (n >= 143 && n <= 194) {
            return setting.qualifier().equals("R") ? RHOMBOHEDRAL : HEXAGONAL;
        }
        return n <= 2 ? TRICLINIC : n <= 15 ? MONOCLINIC : n <= 74 ? ORTHORHOMBIC : n <= 142 ? TETRAGONAL : CUBIC;
    }

    static CellShape ofGroup(String symbol) {
        return of(SpaceGroups.find(symbol).orElseThrow());
    }

    /** In words, what edges and angles must be. */
    String demand() {
        return demand;
    }

    /** The names of the edges, and angles, that are free. */
    List<String> edges() {
        return edges;
    }

    /** The cell of edges alone, in the standard axes. */
    Lattice cell(double... free) {
        boolean angles = this == TRICLINIC || this == MONOCLINIC || this == RHOMBOHEDRAL;
        if (angles || free.length != edges.size()) {
            throw new IllegalArgumentException("edges " + Arrays.toString(free) + ": expected "
                    + (angles
                            ? "the whole cell with its angles, as the group has "
                            : String.join(", ", edges) + " for ")
                    + demand);
        }
        return switch (this) {
            case ORTHORHOMBIC -> Lattice.orthorhombic(free[0], free[1], free[2]);
            case TETRAGONAL -> Lattice.tetragonal(free[0], free[1]);
            case HEXAGONAL -> Lattice.hexagonal(free[0], free[1]);
            default -> Lattice.cubic(free[0]);
        };
    }
}
