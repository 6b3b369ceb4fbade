package io.github.zonewright.imagej.bridge;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.gui.Line;
import ij.gui.OvalRoi;
import ij.gui.Roi;
import io.github.zonewright.image.Mask;
import org.junit.jupiter.api.Test;

class MaskSelectionTest {
    private static final int SIDE = 60;

    /** A bar with a hole and a part of its own, as a stop and a gap would be. */
    private static boolean isHidden(int x, int y) {
        boolean hole = x > 20 && x < 24 && y > 12 && y < 15;
        return x >= 10 && x < 40 && y >= 10 && y < 18 && !hole || y == 50;
    }

    @Test
    void thereAndBack_isTheSame() {
        Mask mask = Mask.of(SIDE, SIDE, i -> isHidden(i % SIDE, i / SIDE));
        Mask back = MaskSelection.of(MaskSelection.of(mask).orElseThrow(), SIDE, SIDE);
        for (int y = 0; y < SIDE; y++) {
            for (int x = 0; x < SIDE; x++) {
                assertEquals(isHidden(x, y), back.contains(x, y), x + ", " + y);
            }
        }
    }

    @Test
    void rectangle_partlyOutside_isClipped() {
        Mask mask = MaskSelection.of(new Roi(-5, 50, 10, 40), SIDE, SIDE);
        assertEquals(5 * 10, mask.count());
    }

    @Test
    void oval_holdsWhatImageJSays() {
        Roi oval = new OvalRoi(12, 7, 31, 22);
        assertEquals(
                oval.getContainedPoints().length,
                MaskSelection.of(oval, SIDE, SIDE).count());
    }

    @Test
    void nothing_isNoSelection() {
        assertTrue(MaskSelection.of(Mask.none(SIDE, SIDE)).isEmpty());
    }

    @Test
    void noArea_isRefused() {
        for (Roi roi : new Roi[] {null, new Line(1, 2, 30, 40)}) {
            String message = assertThrows(IllegalArgumentException.class, () -> MaskSelection.of(roi, SIDE, SIDE))
                    .getMessage();
            assertTrue(message.startsWith("selection: "), message);
        }
    }
}
