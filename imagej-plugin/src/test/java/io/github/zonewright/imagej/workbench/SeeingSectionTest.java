package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import ij.io.FileSaver;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.session.ImageView;
import io.github.zonewright.imagej.session.Sitting;
import java.util.Arrays;
import javax.swing.JComboBox;
import javax.swing.JFrame;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

/** What is seen about a pattern, chosen in the workbench. */
@Tag("window")
class SeeingSectionTest {
    private ImagePlus image;
    private JFrame frame;

    @BeforeEach
    void open() {
        Screen.start();
        image = Screen.show(TestPatterns.imageOfUser());
        frame = Screen.workbench();
        Screen.select(image);
        Sitting.EMPTY.withPlacement(TestPatterns.copper110()).show(image);
        Screen.settle();
    }

    @AfterEach
    void close() {
        ij.Prefs.set("zonewright.shown", "");
        Screen.clear();
    }

    private boolean isDrawn(String name) {
        return Arrays.stream(image.getOverlay().toArray()).anyMatch(roi -> name.equals(roi.getName()));
    }

    private void look(ImageView view) {
        Screen.onEventThread(() -> {
            Screen.find(frame, "view", JComboBox.class).setSelectedItem(view.label());
            return null;
        });
        Screen.settle();
    }

    @Test
    void checkBoxes_drawAndTakeAway() {
        Fingerprint user = Fingerprint.of(image);
        Screen.click(frame, "Scale bar");
        assertTrue(isDrawn("scale bar"));
        Screen.click(frame, "Legend");
        assertTrue(isDrawn("legend"));
        Screen.click(frame, "Scale bar");
        assertFalse(isDrawn("scale bar"));
        user.assertSame(image);
    }

    @Test
    void view_isPutBack() {
        byte[] before = new FileSaver(image).serialize();
        look(ImageView.LOGARITHMIC);
        assertEquals(ImageView.LOGARITHMIC, ImageView.of(image));
        look(ImageView.AS_IT_IS);
        assertArrayEquals(before, new FileSaver(image).serialize());
    }

    /** A copy or a file made by ImageJ's commands does not get the view. */
    @Test
    void duplicate_endsTheView() {
        byte[] before = new FileSaver(image).serialize();
        look(ImageView.LOGARITHMIC_INVERTED);
        IJ.run(image, "Duplicate...", "title=copy");
        assertEquals(ImageView.AS_IT_IS, ImageView.of(image));
        assertArrayEquals(before, new FileSaver(image).serialize());
        assertEquals(image.getDisplayRangeMax(), WindowManager.getImage("copy").getDisplayRangeMax());
    }

    /** Blinking hides the marks and leaves ImageJ's own setting as it was. */
    @Test
    void blink_hidesAndShows_andEndsAsBefore() {
        Screen.click(frame, "Blink");
        assertTrue(image.getHideOverlay());
        Screen.await(() -> !image.getHideOverlay());
        Screen.await(image::getHideOverlay);
        Screen.click(frame, "Blink");
        assertFalse(image.getHideOverlay());
        Screen.click(frame, "Blink");
        Screen.onEventThread(() -> {
            frame.dispose();
            return null;
        });
        Screen.settle();
        assertFalse(image.getHideOverlay());
    }
}
