package io.github.zonewright.imagej.overlay;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.ImagePlus;
import ij.ImageStack;
import ij.gui.Overlay;
import ij.gui.Roi;
import ij.io.FileSaver;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class PatternOverlayTest {
    private final ImagePlus image = TestPatterns.imageOfUser();
    private final ViewMaker views = new ViewMaker(TestPatterns.SIDE, TestPatterns.SIDE);
    private final PatternView view = views.ofPlacement(TestPatterns.copper110(), Optional.empty(), 500, true);

    @Test
    void show_leavesWhatIsTheUsers() {
        Fingerprint before = Fingerprint.of(image);
        PatternOverlay.show(image, view, "state");
        before.assertSame(image);
        assertTrue(PatternOverlay.count(image) > 20);
    }

    @Test
    void show_userElementsStayBelowAndInOrder() {
        PatternOverlay.show(image, view, "state");
        assertEquals("mine", image.getOverlay().get(0).getName());
        assertFalse(PatternOverlay.isOurs(image.getOverlay().get(1)));
        assertTrue(PatternOverlay.isOurs(image.getOverlay().get(2)));
    }

    @Test
    void show_twice_replaces() {
        PatternOverlay.show(image, view, "state");
        int once = image.getOverlay().size();
        PatternOverlay.show(image, view, "state");
        assertEquals(once, image.getOverlay().size());
    }

    @Test
    void show_keepsTheOverlayObject() {
        Overlay before = image.getOverlay();
        PatternOverlay.show(image, view, "state");
        assertEquals(before, image.getOverlay());
    }

    @Test
    void clear_leavesTheUsersElements() {
        Fingerprint before = Fingerprint.of(image);
        PatternOverlay.show(image, view, "state");
        PatternOverlay.clear(image);
        before.assertSame(image);
        assertEquals(2, image.getOverlay().size());
    }

    @Test
    void clear_nothingOfTheUsers_leavesNoOverlay() {
        ImagePlus plain = TestPatterns.image();
        PatternOverlay.show(plain, view, "state");
        PatternOverlay.clear(plain);
        assertNull(plain.getOverlay());
    }

    @Test
    void marks_haveNamesAndKinds() {
        PatternOverlay.show(image, view, "state");
        List<String> names = new ArrayList<>();
        for (Roi roi : image.getOverlay()) {
            names.add(roi.getName());
        }
        assertTrue(names.contains(IndexLabel.of(new io.github.zonewright.lattice.Hkl(1, -1, 1))), names.toString());
        assertTrue(names.contains("centre") && names.contains("rotation"), names.toString());
    }

    /** A ring is centred on its spot: an area ROI counts from pixel corners, as the library does. */
    @Test
    void ring_isCentredOnTheSpot() {
        PatternOverlay.show(image, view, "state");
        var spot = view.computed().get(0);
        Roi ring = image.getOverlay().get(IndexLabel.of(spot.spot().hkl()));
        var bounds = ring.getFloatBounds();
        assertEquals(spot.position().x(), bounds.getCenterX(), 1e-3);
        assertEquals(spot.position().y(), bounds.getCenterY(), 1e-3);
    }

    @Test
    void tiff_bringsTheMarksBack(@TempDir Path folder) {
        PatternOverlay.show(image, view, "state");
        String file = folder.resolve("kept.tif").toString();
        assertTrue(new FileSaver(image).saveAsTiff(file));
        ImagePlus reopened = IJ.openImage(file);
        assertEquals(PatternOverlay.count(image), PatternOverlay.count(reopened));
        for (int i = 0; i < image.getOverlay().size(); i++) {
            Roi kept = image.getOverlay().get(i);
            Roi read = reopened.getOverlay().get(i);
            assertEquals(kept.getName(), read.getName());
            assertEquals(kept.getProperty(PatternOverlay.PROPERTY), read.getProperty(PatternOverlay.PROPERTY));
            assertEquals(kept.getStrokeColor(), read.getStrokeColor(), kept.getName());
            assertEquals(kept.getFillColor(), read.getFillColor(), kept.getName());
            assertEquals(kept.getStrokeWidth(), read.getStrokeWidth(), 0.01, kept.getName());
            assertEquals(kept.getFloatBounds().getX(), read.getFloatBounds().getX(), 0.01, kept.getName());
            assertEquals(kept.getFloatBounds().getWidth(), read.getFloatBounds().getWidth(), 0.01, kept.getName());
        }
        PatternOverlay.clear(reopened);
        assertEquals(2, reopened.getOverlay().size());
    }

    @Test
    void show_stack_marksTheCurrentSliceAlone() {
        ImageStack stack = new ImageStack(TestPatterns.SIDE, TestPatterns.SIDE);
        stack.addSlice(TestPatterns.image().getProcessor());
        stack.addSlice(TestPatterns.image().getProcessor());
        ImagePlus two = new ImagePlus("two", stack);
        two.setSlice(1);
        PatternOverlay.show(two, view, "state");
        int first = PatternOverlay.count(two);
        two.setSlice(2);
        PatternOverlay.show(two, view, "state");
        assertEquals(2 * first, PatternOverlay.count(two));
        assertEquals(1, two.getOverlay().get(0).getPosition());
        PatternOverlay.clear(two);
        assertNull(two.getOverlay());
    }
}
