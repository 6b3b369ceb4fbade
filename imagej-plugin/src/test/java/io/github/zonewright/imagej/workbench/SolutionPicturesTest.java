package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.overlay.ShownMarks;
import io.github.zonewright.imagej.overlay.ViewMaker;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SolutionErrors;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.awt.event.KeyEvent;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import javax.swing.JFrame;
import javax.swing.JLabel;
import javax.swing.JTable;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

/** Solutions to look at in the workbench, and their residuals on the image. */
@Tag("window")
class SolutionPicturesTest {
    private ImagePlus image;
    private JFrame frame;
    private List<Solution> solutions;

    @BeforeEach
    void open() {
        Screen.start();
        image = Screen.show(TestPatterns.imageOfUser());
        frame = Screen.workbench();
        Screen.select(image);
        solutions = List.of(solution(0, 90), solution(0.4, 30));
        Sitting.EMPTY.withSolutions(solutions).show(image);
        Screen.settle();
    }

    @AfterEach
    void close() {
        ShownMarks.choose(Set.of(), image);
        Screen.clear();
    }

    private static Solution solution(double rotation, double score) {
        Placement first = TestPatterns.copper110();
        ZoneSetting setting = first.setting();
        Placement laid = first.withSetting(ZoneSetting.onZone(setting.zone(), setting.reference(), rotation));
        List<SpotMatch> matches = new ViewMaker(TestPatterns.SIDE, TestPatterns.SIDE)
                .ofPlacement(laid, Optional.empty(), 500, false).computed().stream()
                        .limit(12)
                        .map(s -> new SpotMatch(
                                new MeasuredSpot(s.position(), 0.1, 100, 20, false),
                                s.spot().hkl(),
                                s.position()))
                        .toList();
        return new Solution(
                laid, matches, List.of(), 0.1, score, new SolutionErrors(0, 0, 0, 0, 0, 0), Optional.empty());
    }

    private JTable table() {
        return Screen.find(frame, "solutions", JTable.class);
    }

    private JLabel cell(int row, int column) {
        return Screen.onEventThread(
                () -> (JLabel) table().prepareRenderer(table().getCellRenderer(row, column), row, column));
    }

    @Test
    void eachHasAPicture_andItsNumbers() {
        Screen.await(() -> cell(0, 0).getIcon() != SolutionsTable.WAITING);
        Screen.await(() -> cell(1, 0).getIcon() != SolutionsTable.WAITING);
        assertEquals(SolutionPictures.SIDE, cell(1, 0).getIcon().getIconWidth());
        assertEquals(
                "computed pattern of [1 1 0]", cell(0, 0).getAccessibleContext().getAccessibleName());
        assertTrue(table().getValueAt(0, 1).toString().startsWith("[1 1 0]"));
        assertTrue(table().getValueAt(0, 1).toString().endsWith("settled"));
        assertTrue(table().getValueAt(1, 1).toString().endsWith("behind"));
        assertEquals("12 of 12\n0 unexplained", table().getValueAt(0, 2));
        assertEquals("0.10 px", table().getValueAt(0, 3));
        assertEquals("90.0", table().getValueAt(0, 4));
    }

    /** The arrow keys choose, and what is chosen lies on the image. */
    @Test
    void arrowKeys_layTheNextOverTheImage() {
        Fingerprint user = Fingerprint.of(image);
        assertEquals(solutions.get(0), Sitting.of(image).chosen().orElseThrow());
        Screen.press(table(), KeyEvent.VK_DOWN);
        assertEquals(solutions.get(1), Sitting.of(image).chosen().orElseThrow());
        assertEquals(solutions.get(1).placement(), Sitting.of(image).placement().orElseThrow());
        Screen.press(table(), KeyEvent.VK_UP);
        assertEquals(solutions.get(0), Sitting.of(image).chosen().orElseThrow());
        user.assertSame(image);
    }

    @Test
    void residuals_areSwitchedLikeOtherMarks() {
        Fingerprint user = Fingerprint.of(image);
        Screen.click(frame, "Residuals");
        assertTrue(isDrawn("residual"));
        assertTrue(isDrawn("bar of the residuals"));
        Screen.click(frame, "Residuals");
        assertFalse(isDrawn("residual"));
        user.assertSame(image);
    }

    private boolean isDrawn(String name) {
        return Arrays.stream(image.getOverlay().toArray()).anyMatch(roi -> name.equals(roi.getName()));
    }
}
