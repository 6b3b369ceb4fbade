package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.bridge.HandTable;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.ClickedSpots;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.Measuring;
import io.github.zonewright.imagej.session.ScaleKind;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.HandAnswer;
import java.awt.GraphicsEnvironment;
import java.io.IOException;
import java.util.List;
import java.util.OptionalDouble;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Lists the zones that two or more clicked spots may belong to, and lays one of them over the image. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Index by Hand...")
public final class IndexByHand extends PatternCommand {
    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(
            label = "Spots x, y (px)",
            description = "Two or more, as 130.5 88; 171 120. Empty: where the ruler was laid",
            required = false,
            persist = false)
    private String spots = "";

    @Parameter(
            label = "Their h k l",
            description = "As far as they are known, as 1 1 1; 2 0 0",
            required = false,
            persist = false)
    private String hkl = "";

    @Parameter(
            label = "Crystal",
            description = "Name or formula of a crystal of the shelf or of your own, or a list of candidates",
            style = CrystalChoice.GROUP_STYLE)
    private String crystal = "Aluminium";

    @Parameter(
            label = "Camera constant (px·Å)",
            description = "Empty: as said for this image in the workbench, or as its calibration says",
            required = false,
            persist = false)
    private String constant = "";

    @Parameter(
            label = "Lay answer",
            description = "Place in the list of the answer that is laid over the image; 0 for none",
            min = "0",
            max = "50",
            persist = false)
    private int lay = 1;

    @Parameter(label = "Show table of zones")
    private boolean table = true;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public IndexByHand() {}

    @Override
    protected void perform() throws IOException {
        ImagePlus pattern = pattern(image);
        List<Crystal> crystals = CrystalChoice.group(crystal, null);
        Sitting sitting = Measuring.asNeeded(pattern, Sitting.of(pattern));
        Instrument said =
                Instrument.of(pattern).orElseGet(() -> Instrument.last().withKind(ScaleKind.IMAGE));
        OptionalDouble typed = Typed.positive("Camera constant (px·Å)", constant);
        if (typed.isPresent()) {
            said = said.withConstant(typed.getAsDouble());
        }
        List<PixelPoint> places = spots == null || spots.isBlank()
                ? ClickedSpots.ofRuler(sitting)
                : ClickedSpots.places(spots, sitting.measured().orElseThrow());
        List<HandAnswer> found = ClickedSpots.index(pattern, sitting, said, crystals, ClickedSpots.of(places, hkl));
        if (found.isEmpty()) {
            throw new IllegalArgumentException("no zone of " + crystal
                    + " has such spots: check the camera constant, the centre, and whether each click met its spot");
        }
        if (lay > found.size()) {
            throw new IllegalArgumentException("answer to lay: " + lay + ", expected 0 to " + found.size());
        }
        answer = (found.size() == 1 ? "1 zone fits: " : found.size() + " zones fit, best ")
                + found.get(0).sentence()
                + ImagePixels.note(pattern);
        IJ.showStatus(answer);
        if (lay > 0) {
            PatternOverlay.saveForUndo(pattern);
            HandAnswer chosen = found.get(lay - 1);
            sitting.withPlacement(chosen.placement()).show(pattern);
            said.keepWith(pattern, chosen.placement().crystal());
        }
        if (table && !GraphicsEnvironment.isHeadless()) {
            HandTable.of(found).show("Zones by hand of " + pattern.getTitle());
        }
    }
}
