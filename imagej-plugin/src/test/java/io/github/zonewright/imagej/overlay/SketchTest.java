package io.github.zonewright.imagej.overlay;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.gui.ImageCanvas;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.pattern.Placement;
import java.awt.Graphics;
import java.awt.Image;
import java.awt.Rectangle;
import java.awt.image.BufferedImage;
import java.util.Arrays;
import java.util.EnumSet;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** What is drawn during a drag against what ImageJ paints of the same marks as an overlay. */
class SketchTest {
    private static final int SIDE = 400;
    private static final int BLOCK = 8;

    private final BufferedImage screen = new BufferedImage(SIDE, SIDE, BufferedImage.TYPE_INT_RGB);
    private final ViewMaker views = new ViewMaker(TestPatterns.SIDE, TestPatterns.SIDE);
    private ImagePlus image;
    private ImageCanvas canvas;

    @BeforeEach
    void canvas() {
        ImagePlus user = TestPatterns.imageOfUser();
        image = new ImagePlus(user.getTitle(), user.getProcessor()) {
            @Override
            public ImageCanvas getCanvas() {
                return canvas;
            }
        };
        canvas = new OnPicture();
        canvas.setSize(SIDE, SIDE);
        image.setOverlay(user.getOverlay());
        image.setRoi(user.getRoi());
        see(0, 0, TestPatterns.SIDE);
    }

    private void see(int x, int y, int side) {
        canvas.setSourceRect(new Rectangle(x, y, side, side));
    }

    private PatternView view(double turn, boolean labelled) {
        Placement laid = TestPatterns.copper110().turnedBy(turn);
        return views.withShown(
                views.ofPlacement(laid, Optional.empty(), 500, labelled),
                EnumSet.of(ShownMarks.SCALE_BAR),
                false,
                List.of());
    }

    private int[] seen() {
        return screen.getRGB(0, 0, SIDE, SIDE, null, 0, SIDE).clone();
    }

    private int[] sketched(PatternView view) {
        PatternOverlay.sketch(image, view, "state");
        return seen();
    }

    private int[] shown(PatternView view) {
        PatternOverlay.show(image, view, "state");
        canvas.paint(screen.createGraphics());
        return seen();
    }

    /** In grey values of 255, of the green channel, between means over squares of 8 px: ImageJ rounds some marks to whole px. */
    private static double difference(int[] a, int[] b) {
        double[] means = new double[SIDE / BLOCK * (SIDE / BLOCK)];
        for (int i = 0; i < a.length; i++) {
            int block = i / SIDE / BLOCK * (SIDE / BLOCK) + i % SIDE / BLOCK;
            means[block] += (double) ((a[i] >> 8 & 255) - (b[i] >> 8 & 255)) / (BLOCK * BLOCK);
        }
        return Arrays.stream(means).map(Math::abs).average().orElseThrow();
    }

    /** Sketched polygons are up to a quarter brighter: ImageJ snaps theirs to whole px. */
    @ParameterizedTest
    @CsvSource({"0, 0, 256, false", "0, 0, 256, true", "60, 50, 100, true", "110, 100, 40, false"})
    void sketch_looksAsTheOverlayWill(int x, int y, int side, boolean labelled) {
        see(x, y, side);
        canvas.paint(screen.createGraphics());
        int[] bare = seen();
        PatternView view = view(0.1, labelled);
        int[] sketched = sketched(view);
        int[] shown = shown(view);
        assertTrue(
                difference(sketched, shown) < 0.25 * difference(bare, shown),
                difference(sketched, shown) + " of " + difference(bare, shown));
    }

    @Test
    void legend_staysDuringTheDrag() {
        PatternView view = view(0.1, false);
        int[] without = sketched(view);
        image.setOverlay(null);
        int[] with = sketched(view.withExtras(new PatternExtras(
                EnumSet.of(ShownMarks.LEGEND, ShownMarks.SCALE_BAR), false, List.of(), Optional.empty())));
        assertTrue(difference(without, with) > 0.5, difference(without, with) + "");
    }

    @Test
    void nextStep_leavesNothingOfTheOneBefore() {
        int[] once = sketched(view(0.3, true));
        sketched(view(0.1, true));
        sketched(view(-0.4, true));
        assertArrayEquals(once, sketched(view(0.3, true)));
    }

    /** But for the selection, which ImageJ draws once more. */
    @Test
    void repaint_showsTheSketch() {
        int[] sketched = sketched(view(0.2, true));
        screen.createGraphics().fillRect(0, 0, SIDE, SIDE);
        canvas.paint(screen.createGraphics());
        assertTrue(difference(sketched, seen()) < 0.15, difference(sketched, seen()) + "");
    }

    /** The wheel zooms in the midst of a drag. */
    @Test
    void otherZoom_isDrawnAnew() {
        sketched(view(0.2, false));
        see(60, 50, 100);
        int[] after = sketched(view(0.2, false));
        int[] shown = shown(view(0.2, false));
        assertTrue(difference(after, shown) < 0.5, difference(after, shown) + "");
    }

    @Test
    void show_putsTheMarksInPlaceOfTheSketch_andTheUsersStay() {
        Fingerprint user = Fingerprint.of(image);
        sketched(view(0.2, true));
        assertEquals(3, image.getOverlay().size());
        assertEquals(Optional.of("state"), PatternOverlay.state(image));
        user.assertSame(image);
        shown(view(0.2, true));
        assertTrue(PatternOverlay.isLabelled(image));
        assertTrue(Arrays.stream(image.getOverlay().toArray()).noneMatch(SketchRoi.class::isInstance));
        user.assertSame(image);
    }

    @Test
    void hiddenOverlay_staysHidden() {
        canvas.paint(screen.createGraphics());
        image.setHideOverlay(true);
        canvas.paint(screen.createGraphics());
        int[] before = seen();
        sketched(view(0.2, true));
        canvas.paint(screen.createGraphics());
        assertArrayEquals(before, seen());
    }

    /** A canvas that shows itself on a picture. */
    private final class OnPicture extends ImageCanvas {
        private static final long serialVersionUID = 1L;

        OnPicture() {
            super(image);
        }

        @Override
        public Graphics getGraphics() {
            return screen.createGraphics();
        }

        @Override
        public Image createImage(int width, int height) {
            return new BufferedImage(width, height, BufferedImage.TYPE_INT_RGB);
        }
    }
}
