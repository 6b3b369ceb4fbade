package io.github.zonewright.imagej.session;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.ImageStack;
import ij.gui.Overlay;
import ij.gui.Roi;
import ij.process.ByteProcessor;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import java.util.Set;
import java.util.TreeSet;
import org.junit.jupiter.api.Test;

/** Many slices with an answer each, with no display: the follower is told of slices as ImageJ would. */
class SliceMarksTest {
    private static final int SLICES = 205;

    private final ImagePlus image = stack();
    private final SliceMarks marks = SliceMarks.of(image);

    private static ImagePlus stack() {
        ImageStack stack = new ImageStack(TestPatterns.SIDE, TestPatterns.SIDE);
        ByteProcessor pixels = new ByteProcessor(TestPatterns.SIDE, TestPatterns.SIDE);
        for (int i = 0; i < SLICES; i++) {
            stack.addSlice("", pixels);
        }
        return new ImagePlus("many", stack);
    }

    private static Sitting sitting(int slice) {
        return Sitting.EMPTY.withPlacement(TestPatterns.copper110().turnedBy(0.001 * slice));
    }

    private void see(int slice) {
        image.setSlice(slice);
        marks.imageUpdated(image);
    }

    private Set<Integer> marked() {
        Set<Integer> slices = new TreeSet<>();
        Overlay overlay = image.getOverlay();
        for (int i = 0; overlay != null && i < overlay.size(); i++) {
            if (PatternOverlay.isOurs(overlay.get(i))) {
                slices.add(overlay.get(i).getPosition());
            }
        }
        return slices;
    }

    @Test
    void slices_areDrawnWhenSeen_andNoMoreThanAFewHundred() {
        Overlay own = new Overlay(new Roi(3, 3, 9, 9));
        image.setOverlay(own);
        for (int slice = 1; slice <= SLICES; slice++) {
            marks.keep(slice, sitting(slice));
        }
        assertEquals(Set.of(1), marked());
        for (int slice = 2; slice <= SLICES; slice++) {
            see(slice);
        }
        assertEquals(200, marked().size());
        assertTrue(!marked().contains(5) && marked().contains(6));
        for (int slice = 1; slice <= SLICES; slice++) {
            image.setSlice(slice);
            assertEquals(sitting(slice), Sitting.of(image), "slice " + slice);
        }
        see(5);
        assertEquals(200, marked().size());
        assertTrue(marked().contains(5));
        assertEquals(1, own.size() - PatternOverlay.count(image));
    }

    @Test
    void slice_changedByHand_keepsTheChange() {
        marks.keep(1, sitting(1));
        Sitting changed = sitting(77);
        changed.show(image);
        for (int slice = 2; slice <= SLICES; slice++) {
            marks.keep(slice, sitting(slice));
            see(slice);
        }
        see(1);
        assertEquals(changed, Sitting.of(image));
    }

    @Test
    void keep_againForASlice_takesTheNewOne() {
        marks.keep(1, sitting(1));
        marks.keep(1, sitting(2));
        assertEquals(sitting(2), Sitting.of(image));
        image.setSlice(3);
        sitting(9).show(image);
        image.setSlice(1);
        marks.keep(3, sitting(4));
        see(3);
        assertEquals(sitting(4), Sitting.of(image));
    }
}
