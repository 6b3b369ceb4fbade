package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.gui.Roi;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.pattern.Placement;
import java.awt.geom.Rectangle2D;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The zone chart as a macro draws it, with no display. */
class DrawZoneChartTest {
    private static DrawZoneChart run(String options) {
        DrawZoneChart command = new DrawZoneChart();
        CommandParameter.of(command).stream().filter(CommandParameter::isAsked).forEach(p -> p.readMacro(options));
        command.run();
        return command;
    }

    private static ImagePlus chart(DrawZoneChart command) throws ReflectiveOperationException {
        var field = DrawZoneChart.class.getDeclaredField("chart");
        field.setAccessible(true);
        return (ImagePlus) field.get(command);
    }

    @Test
    void stack_hasASliceForEachZone() throws Exception {
        DrawZoneChart command = run("crystal=copper kilovolts=200 zones=4 scale=60 patternside=128");
        assertTrue(!command.isCanceled(), command.getCancelReason());
        ImagePlus stack = chart(command);
        assertEquals(4, stack.getStackSize());
        assertEquals("[1 1 0]", stack.getStack().getSliceLabel(1));
        assertEquals(10 / 60.0, stack.getLocalCalibration().pixelWidth, 1e-12);
        assertEquals("1/nm", stack.getLocalCalibration().getUnit());
        for (int slice = 1; slice <= 4; slice++) {
            stack.setSlice(slice);
            Placement laid = Sitting.of(stack).placement().orElseThrow();
            assertEquals(
                    stack.getStack().getSliceLabel(slice), "[" + laid.setting().zone() + "]");
            assertEquals(60, laid.camera().constant());
            assertTrue(PatternOverlay.isLabelled(stack));
        }
    }

    /** Silicon along [110]: a square for 002, 2K/a from the middle (Williams, from memory); it outlives a new drawing. */
    @Test
    void stack_doubleDiffraction_isASquare() throws Exception {
        ImagePlus stack = chart(run("crystal=silicon kilovolts=200 zones=1 scale=100 patternside=256"));
        double wanted =
                2 * 100 / CrystalShelf.find("silicon").orElseThrow().lattice().a();
        Sitting.of(stack).withLabels(false).show(stack);
        boolean there = false;
        for (Roi roi : stack.getOverlay()) {
            Rectangle2D box = roi.getFloatBounds();
            double distance = Math.hypot(box.getCenterX() - 128, box.getCenterY() - 128);
            there |= "doubled".equals(roi.getProperty(PatternOverlay.PROPERTY)) && Math.abs(distance - wanted) < 0.05;
        }
        assertTrue(there);
        PatternOverlay.clear(stack);
        assertEquals(0, PatternOverlay.count(stack));
    }

    @Test
    void macro_writesTheSheetAndLeavesTheImage(@TempDir Path folder) throws Exception {
        ImagePlus image = TestPatterns.imageOfUser();
        Fingerprint before = Fingerprint.of(image);
        Path sheet = folder.resolve("zones.html");
        String options =
                "crystal=copper kilovolts=200 zones=3 scalekind=[image calibration] patternside=64 paper=0 sheet=["
                        + sheet + "]";
        assertEquals(Optional.empty(), Launching.macro(image, "command.DrawZoneChart", options));
        before.assertSame(image);
        // 120 px·Å at 96 px to the inch.
        assertTrue(Files.readString(sheet).contains("camera constant on paper 31.75 mm·Å"));
    }

    @Test
    void scaleOfThePatternOnTheImage_isTaken() throws Exception {
        String options = "crystal=copper zones=1 patternside=64 scalekind=[pattern on the image]";
        ImagePlus image = TestPatterns.image();
        Optional<String> none = Launching.macro(image, "command.DrawZoneChart", options);
        assertTrue(none.orElse("").contains("no pattern lies on " + image.getTitle()), none.toString());
        Sitting.EMPTY.withPlacement(TestPatterns.copper110()).show(image);
        DrawZoneChart command = new DrawZoneChart();
        CommandParameter.of(command).forEach(p -> p.fillImage(image));
        CommandParameter.of(command).stream().filter(CommandParameter::isAsked).forEach(p -> p.readMacro(options));
        command.run();
        assertEquals(10 / TestPatterns.CONSTANT, chart(command).getLocalCalibration().pixelWidth, 1e-12);
    }

    @Test
    void wrongValues_areNamed(@TempDir Path folder) {
        Optional<String> zones = Launching.macro(null, "command.DrawZoneChart", "crystal=copper zones=0");
        assertTrue(zones.orElse("").contains("Number of zones: \"0\""), zones.toString());
        String nowhere =
                "crystal=copper zones=1 sheet=[" + folder.resolve("no folder").resolve("a.html") + "]";
        Optional<String> file = Launching.macro(null, "command.DrawZoneChart", nowhere);
        assertTrue(file.orElse("").contains("a.html"), file.toString());
    }
}
