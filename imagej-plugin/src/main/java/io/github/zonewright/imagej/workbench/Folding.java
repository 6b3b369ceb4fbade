package io.github.zonewright.imagej.workbench;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;

/**
 * Decides which parts of the window are open, so that all of it can be seen at once: the part with the next thing to do, then
 * the one that was opened last, then those nearest to the next thing, as far as there is room.
 *
 * @param parts the parts from top to bottom
 * @param next which of them has the next thing to do; if it is wanted it is open in any case
 * @param last which of them goes with it, or was opened last by a person; so is that one; −1 for none
 */
record Folding(List<Part> parts, int next, int last) {
    /**
     * A part.
     *
     * @param folded its height when it is folded, in px
     * @param open its height when it is open
     * @param wanted whether it is to be open, if there is room
     */
    record Part(int folded, int open, boolean wanted) {}

    /** Which parts are open within a height in px. */
    List<Integer> open(int height) {
        List<Integer> order = new ArrayList<>();
        for (int i = 0; i < parts.size(); i++) {
            if (parts.get(i).wanted()) {
                order.add(i);
            }
        }
        order.sort(Comparator.comparingInt(i -> i == next ? -2 : i == last ? -1 : Math.abs(i - next)));
        int room = height - parts.stream().mapToInt(Part::folded).sum();
        List<Integer> open = new ArrayList<>();
        for (int i : order) {
            int needed = parts.get(i).open() - parts.get(i).folded();
            if (i == next || i == last || needed <= room) {
                open.add(i);
                room -= needed;
            }
        }
        return open;
    }
}
