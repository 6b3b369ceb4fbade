package io.github.zonewright.imagej.session;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.ImageStack;
import ij.gui.Overlay;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.SpotFinder;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class SittingTest {
    private final ImagePlus image = TestPatterns.imageOfUser();
    private final Placement placement = TestPatterns.copper110();
    private final Sitting laid = Sitting.EMPTY.withPlacement(placement);

    @Test
    void of_newImage_isEmpty() {
        assertEquals(Sitting.EMPTY, Sitting.of(image));
    }

    /** The record takes longer to write than the marks to draw: while a drag goes on there is none. */
    @Test
    void sketch_isFoundAgain_withoutRecord() {
        laid.sketch(image);
        assertEquals(laid, Sitting.of(image));
        assertTrue(PatternOverlay.record(image).isEmpty());
        laid.show(image);
        assertTrue(PatternOverlay.record(image).isPresent());
    }

    @Test
    void show_isFoundAgain() {
        laid.show(image);
        assertEquals(laid, Sitting.of(image));
    }

    /** ImageJ's undo puts a copy of the overlay of before in place of the present one. */
    @Test
    void of_overlayOfBefore_isTheSittingOfBefore() {
        laid.show(image);
        Overlay before = image.getOverlay().duplicate();
        laid.withPlacement(placement.turnedBy(0.3)).show(image);
        image.setOverlay(before);
        assertEquals(laid, Sitting.of(image));
    }

    @Test
    void of_marksTakenAway_isEmpty() {
        laid.show(image);
        image.setOverlay(null);
        assertEquals(Sitting.EMPTY, Sitting.of(image));
    }

    @Test
    void of_nothingWasDrawn_isStillKnown() {
        ImagePlus blank = new ImagePlus("blank", new ij.process.ByteProcessor(64, 64));
        Sitting none = Sitting.EMPTY.withMeasured(SpotFinder.measure(ImagePixels.of(blank)));
        none.show(blank);
        assertEquals(0, PatternOverlay.count(blank));
        assertEquals(none, Sitting.of(blank));
    }

    @Test
    void of_croppedImage_isEmpty() {
        laid.show(image);
        image.setRoi(20, 20, 100, 100);
        ImagePlus cropped = image.crop();
        image.setImage(cropped);
        assertEquals(Sitting.EMPTY, Sitting.of(image));
    }

    @Test
    void of_slices_areApart() {
        ImageStack stack = new ImageStack(TestPatterns.SIDE, TestPatterns.SIDE);
        stack.addSlice(TestPatterns.image().getProcessor());
        stack.addSlice(TestPatterns.image().getProcessor());
        ImagePlus two = new ImagePlus("two", stack);
        two.setSlice(1);
        laid.show(two);
        two.setSlice(2);
        assertEquals(Sitting.EMPTY, Sitting.of(two));
        Sitting other = laid.withPlacement(placement.turnedBy(1));
        other.show(two);
        two.setSlice(1);
        assertEquals(laid, Sitting.of(two));
    }

    @Test
    void withPlacement_movedByHand_isNoLongerTheSolution() {
        Sitting moved = laid.withPlacement(placement.turnedBy(0.1));
        assertTrue(moved.chosen().isEmpty());
        assertEquals(Optional.of(placement.turnedBy(0.1)), moved.placement());
    }

    @Test
    void listeners_areTold() {
        int[] told = new int[1];
        java.util.function.Consumer<ImagePlus> listener = shown -> told[0]++;
        Sitting.addListener(listener);
        laid.show(image);
        Sitting.removeListener(listener);
        laid.show(image);
        assertEquals(1, told[0]);
    }
}
