package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.command.PatternCommand;
import java.awt.EventQueue;
import java.awt.GraphicsEnvironment;
import org.scijava.command.Command;
import org.scijava.plugin.Plugin;

/** Opens the workbench beside the current image, and puts the hand tool into ImageJ's toolbar. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Open Workbench")
public final class OpenWorkbench extends PatternCommand {
    /** For SciJava and the launcher. */
    public OpenWorkbench() {}

    @Override
    protected void perform() {
        if (GraphicsEnvironment.isHeadless()) {
            throw new IllegalArgumentException(
                    "the workbench needs a display; without one use the commands Find Zone Axis and Lay Computed Pattern");
        }
        EventQueue.invokeLater(() -> {
            HandTool.pickUp();
            Workbench.open();
        });
    }
}
