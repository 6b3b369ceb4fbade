package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.command.PatternCommand;
import java.awt.EventQueue;
import java.awt.GraphicsEnvironment;
import org.scijava.command.Command;
import org.scijava.plugin.Plugin;

/** Puts the hand tool into ImageJ's toolbar and selects it. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Pattern Hand Tool")
public final class PickUpHandTool extends PatternCommand {
    /** For SciJava and the launcher. */
    public PickUpHandTool() {}

    @Override
    protected void perform() {
        if (GraphicsEnvironment.isHeadless()) {
            throw new IllegalArgumentException("the hand tool needs a display");
        }
        EventQueue.invokeLater(HandTool::pickUp);
    }
}
