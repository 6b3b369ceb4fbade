package io.github.zonewright.symmetry;

import java.util.ArrayDeque;
import java.util.ArrayList;
import java.util.Collection;
import java.util.Comparator;
import java.util.Deque;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;

/** Makes the whole group, modulo lattice translations, out of generators. */
final class GroupClosure {

    /** 48 rotations with 32 translations: more than any cell in use holds. */
    static final int LARGEST_ORDER = 1536;

    private GroupClosure() {}

    static List<SymmetryOperation> of(Collection<SymmetryOperation> operations) {
        List<SymmetryOperation> generators = new ArrayList<>();
        Set<SymmetryOperation> group = new LinkedHashSet<>(List.of(SymmetryOperation.IDENTITY));
        for (SymmetryOperation operation : operations) {
            operation.rotationType();
            SymmetryOperation candidate = operation.reduced();
            if (!group.contains(candidate)) {
                generators.add(candidate);
                group = generatedBy(generators);
            }
        }
        List<SymmetryOperation> sorted = new ArrayList<>(group);
        sorted.sort(Comparator.comparing((SymmetryOperation o) -> !o.isTranslation())
                .thenComparing(Comparator.naturalOrder()));
        return List.copyOf(sorted);
    }

    private static Set<SymmetryOperation> generatedBy(List<SymmetryOperation> generators) {
        Set<SymmetryOperation> group = new LinkedHashSet<>(List.of(SymmetryOperation.IDENTITY));
        Deque<SymmetryOperation> open = new ArrayDeque<>(group);
        while (!open.isEmpty()) {
            SymmetryOperation next = open.remove();
            for (SymmetryOperation generator : generators) {
                SymmetryOperation product = generator.after(next).reduced();
                if (group.add(product)) {
                    product.rotationType();
                    open.add(product);
                    if (group.size() > LARGEST_ORDER) {
                        throw new IllegalArgumentException("symmetry operations: they generate more than "
                                + LARGEST_ORDER + " operations, expected those of a space group");
                    }
                }
            }
        }
        return group;
    }
}
