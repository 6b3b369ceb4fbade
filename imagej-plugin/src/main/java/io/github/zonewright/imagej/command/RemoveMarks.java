package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.imagej.session.SliceMarks;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Takes the pattern's marks off the current image and forgets the pattern; the user's own elements stay. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Remove Pattern Marks")
public final class RemoveMarks extends PatternCommand {
    @Parameter(required = false, persist = false)
    private ImagePlus image;

    /** For SciJava and the launcher. */
    public RemoveMarks() {}

    @Override
    protected void perform() {
        ImagePlus marked = image != null ? image : WindowManager.getCurrentImage();
        if (marked == null) {
            throw new IllegalArgumentException("no image is open, so there are no marks to remove");
        }
        PatternOverlay.saveForUndo(marked);
        Sitting.EMPTY.show(marked);
        PatternOverlay.clear(marked);
        SliceMarks.forget(marked);
    }
}
