package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;

import io.github.zonewright.imagej.workbench.Folding.Part;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;

/** Five parts, 10 px high when folded and 110 px when open: with 350 px there is room for three of them. */
class FoldingTest {
    private static Set<Integer> open(int next, int last, int height, boolean... wanted) {
        List<Part> parts = new java.util.ArrayList<>();
        for (boolean each : wanted) {
            parts.add(new Part(10, 110, each));
        }
        return Set.copyOf(new Folding(parts, next, last).open(height));
    }

    @Test
    void roomForAll_allThatAreWantedAreOpen() {
        assertEquals(Set.of(0, 2, 3), open(2, -1, 1000, true, false, true, true, false));
    }

    @Test
    void littleRoom_thoseNearestToTheNextThing() {
        assertEquals(Set.of(2, 3, 4), open(3, -1, 350, true, true, true, true, true));
        assertEquals(Set.of(0, 1, 2), open(0, -1, 350, true, true, true, true, true));
    }

    @Test
    void littleRoom_theOneOpenedLastIsOpen() {
        assertEquals(Set.of(0, 2, 3), open(3, 0, 350, true, true, true, true, true));
    }

    @Test
    void noRoom_theNextThingIsSeen() {
        assertEquals(Set.of(3), open(3, -1, 20, true, true, true, true, true));
    }

    @Test
    void foldedByAPerson_staysSo() {
        assertEquals(Set.of(2, 4), open(3, -1, 1000, false, false, true, false, true));
    }

    /** A large part that finds no room does not keep a small one beyond it from opening. */
    @Test
    void largePart_letsSmallOnesOpen() {
        List<Part> parts = List.of(new Part(10, 50, true), new Part(10, 400, true), new Part(10, 110, true));
        assertEquals(Set.of(0, 2), Set.copyOf(new Folding(parts, 2, -1).open(300)));
    }
}
