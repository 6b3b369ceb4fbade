package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.image.Mask;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Choice;
import io.github.zonewright.imagej.session.HiddenArea;
import io.github.zonewright.imagej.session.HiddenArea.Way;
import io.github.zonewright.imagej.session.Measurement;
import io.github.zonewright.imagej.session.Search;
import io.github.zonewright.imagej.session.Sitting;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Changes the area behind the beam stop by the present selection, and measures what was measured again. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Hidden Area...")
public final class HideArea extends PatternCommand {
    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(
            label = "Hidden area",
            choices = {
                Way.SELECTION_LABEL,
                Way.ADD_LABEL,
                Way.TAKE_AWAY_LABEL,
                Way.AUTOMATIC_LABEL,
                Way.TO_SELECTION_LABEL
            })
    private String area = Way.SELECTION_LABEL;

    @Parameter(type = ItemIO.OUTPUT, label = "Answer")
    private String answer;

    /** For SciJava and the launcher. */
    public HideArea() {}

    @Override
    protected void perform() {
        ImagePlus pattern = image != null ? image : WindowManager.getCurrentImage();
        if (pattern == null) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        List<String> labels = Arrays.stream(Way.values()).map(Way::label).toList();
        Way way = Way.values()[labels.indexOf(Choice.pick("Hidden area", area, labels))];
        Sitting before = Sitting.of(pattern);
        if (way == Way.TO_SELECTION) {
            HiddenArea.select(pattern);
        } else {
            Optional<Mask> hidden = HiddenArea.area(pattern, way);
            Measurement.How how =
                    Search.judged(pattern, before.measurement().how()).withHidden(hidden);
            Sitting changed = before.withMeasurement(before.measurement().withHow(how))
                    .withMeasured(Search.measure(pattern, how));
            PatternOverlay.saveForUndo(pattern);
            changed.withMeasurement(changed.measurement().withShown(true)).show(pattern);
        }
        int pixels = Sitting.of(pattern).measured().map(m -> m.hidden().count()).orElse(0);
        answer = "Hidden: " + pixels + " px." + ImagePixels.note(pattern);
        IJ.showStatus(answer);
    }
}
