package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.command.PatternCommand;
import java.awt.EventQueue;
import java.awt.GraphicsEnvironment;
import org.scijava.command.Command;
import org.scijava.plugin.Plugin;

/** Opens the help, which comes with the jar and needs no network. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Zonewright Help")
public final class OpenHelp extends PatternCommand {
    /** For SciJava and the launcher. */
    public OpenHelp() {}

    @Override
    protected void perform() {
        if (GraphicsEnvironment.isHeadless()) {
            throw new IllegalArgumentException(
                    "the help needs a display; without one, each command's parameters say what they mean");
        }
        EventQueue.invokeLater(() -> HelpWindow.open(HelpWindow.START));
    }
}
