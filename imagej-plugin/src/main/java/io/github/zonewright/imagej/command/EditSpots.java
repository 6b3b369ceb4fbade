package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Choice;
import io.github.zonewright.imagej.session.Measuring;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.spots.SpotEdit;
import io.github.zonewright.spots.SpotEdit.Way;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Adds, moves or removes a measured spot, or sets the centre. Spots that were not measured yet are measured first. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Edit Spots...")
public final class EditSpots extends PatternCommand {
    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(
            label = "Edit",
            choices = {Way.ADD_LABEL, Way.MOVE_LABEL, Way.REMOVE_LABEL, Way.CENTRE_LABEL, Way.FIND_CENTRE_LABEL})
    private String edit = Way.ADD_LABEL;

    @Parameter(label = "Spot x (px)", description = "The spot or the centre", persist = false)
    private double x;

    @Parameter(label = "Spot y (px)", description = "The spot or the centre", persist = false)
    private double y;

    @Parameter(label = "Move to x (px)", description = "For a spot that is moved", persist = false)
    private double tox;

    @Parameter(label = "Move to y (px)", description = "For a spot that is moved", persist = false)
    private double toy;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public EditSpots() {}

    @Override
    protected void perform() {
        ImagePlus pattern = image != null ? image : WindowManager.getCurrentImage();
        if (pattern == null) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        List<String> labels = Arrays.stream(Way.values()).map(Way::label).toList();
        Way way = Way.values()[labels.indexOf(Choice.pick("Edit", edit, labels))];
        SpotEdit change = new SpotEdit(
                way, new PixelPoint(x, y), way == Way.MOVE ? Optional.of(new PixelPoint(tox, toy)) : Optional.empty());
        Sitting before = Measuring.asNeeded(pattern, Sitting.of(pattern));
        Sitting after = before.withEdited(change);
        PatternOverlay.saveForUndo(pattern);
        after.show(pattern);
        answer = MeasurementAnswer.centre(after.measured().orElseThrow()) + ImagePixels.note(pattern);
        IJ.showStatus(answer);
    }
}
