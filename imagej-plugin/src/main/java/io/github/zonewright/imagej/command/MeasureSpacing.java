package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.imagej.session.LengthUnit;
import io.github.zonewright.imagej.session.Measurement;
import io.github.zonewright.imagej.session.Measuring;
import io.github.zonewright.imagej.session.Ruler;
import io.github.zonewright.imagej.session.RulerPoint;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.imagej.session.SpacingCandidates;
import io.github.zonewright.imagej.session.SpotPick;
import io.github.zonewright.spots.MeasuredPattern;
import java.awt.GraphicsEnvironment;
import java.io.IOException;
import java.util.List;
import java.util.Optional;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Reads the spacing of a spot from the centre, or of a pair of spots g and −g, with no crystal in mind. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Measure Spacing...")
public final class MeasureSpacing extends PatternCommand {
    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(label = "Spot x (px)", description = "0, 0 for the table of the readings so far", persist = false)
    private double x1;

    @Parameter(label = "Spot y (px)", persist = false)
    private double y1;

    @Parameter(
            label = "Opposite spot x (px)",
            description = "For a pair of spots g and -g; empty to read from the centre",
            required = false,
            persist = false)
    private String x2 = "";

    @Parameter(
            label = "Opposite spot y (px)",
            description = "For a pair of spots g and -g; empty to read from the centre",
            required = false,
            persist = false)
    private String y2 = "";

    @Parameter(label = "Order", description = "Which spot of its row it is", min = "1", max = "99", persist = false)
    private int order = 1;

    @Parameter(
            label = "Camera constant (px·Å)",
            description = "Empty: as said for this image in the workbench, or as its calibration says",
            required = false,
            persist = false)
    private String constant = "";

    @Parameter(
            label = "Lengths in",
            choices = {LengthUnit.ANGSTROM_LABEL, LengthUnit.NANOMETRE_LABEL})
    private String lengths = LengthUnit.ANGSTROM_LABEL;

    @Parameter(
            label = "Crystals at hand",
            description = "Name of a crystal or of a list of candidates, whose {hkl} are looked up; may be empty",
            required = false,
            persist = false)
    private String crystals = "";

    @Parameter(label = "Spacing within (%)", min = "0.01", max = "20")
    private double within = 2;

    @Parameter(label = "Show table of spacings")
    private boolean table;

    @Parameter(label = "Clear", description = "Takes all readings away, and reads nothing", persist = false)
    private boolean clear;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public MeasureSpacing() {}

    @Override
    protected void perform() throws IOException {
        ImagePlus pattern = image != null ? image : WindowManager.getCurrentImage();
        if (pattern == null) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        if (clear) {
            PatternOverlay.saveForUndo(pattern);
            Sitting now = Sitting.of(pattern);
            now.withMeasurement(now.measurement().withoutRuler()).show(pattern);
            answer = "The readings are cleared.";
            return;
        }
        Optional<PixelPoint> opposite = opposite();
        List<Crystal> atHand = crystals == null || crystals.isBlank() ? List.of() : CrystalChoice.group(crystals, null);
        LengthUnit.ofLabel(lengths).remember();
        Sitting sitting = Measuring.asNeeded(pattern, Sitting.of(pattern));
        MeasuredPattern measured = sitting.measured().orElseThrow();
        Ruler ruler = Ruler.of(pattern, sitting).withConstant(Typed.positive("Camera constant (px·Å)", constant));
        Measurement laid = sitting.measurement();
        boolean listed = table && x1 == 0 && y1 == 0 && !laid.ruler().isEmpty();
        if (!listed) {
            RulerPoint point =
                    SpotPick.ruler(measured, new PixelPoint(x1, y1), opposite, order, SpotPick.reach(measured));
            ruler.read(point);
            laid = laid.withRuler(point);
            PatternOverlay.saveForUndo(pattern);
            sitting.withMeasurement(laid).show(pattern);
        }
        SpacingCandidates candidates = new SpacingCandidates();
        List<Ruler.Reading> readings = ruler.readings(laid.ruler());
        List<String> forms = readings.stream()
                .map(r -> RulerAnswer.forms(r, ruler, candidates, atHand, within))
                .toList();
        int last = readings.size() - 1;
        answer = RulerAnswer.line(readings.get(last), ruler, forms.get(last)) + ImagePixels.note(pattern);
        IJ.showStatus(answer);
        IJ.log(answer);
        if (table && !GraphicsEnvironment.isHeadless()) {
            RulerAnswer.table(readings, ruler, forms).show("Spacings of " + pattern.getTitle());
        }
    }

    private Optional<PixelPoint> opposite() {
        boolean none = (x2 == null || x2.isBlank()) && (y2 == null || y2.isBlank());
        return none
                ? Optional.empty()
                : Optional.of(new PixelPoint(coordinate("Opposite spot x", x2), coordinate("Opposite spot y", y2)));
    }

    private static double coordinate(String label, String text) {
        try {
            return Double.parseDouble(text == null ? "" : text.strip());
        } catch (NumberFormatException e) {
            throw new IllegalArgumentException(label + ": \"" + text + "\", expected a number of px", e);
        }
    }
}
