package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import java.awt.GraphicsEnvironment;
import java.io.IOException;
import org.scijava.ItemIO;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Opens the example pattern that comes with the jar; the workbench then shows what is known of it. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Open Example Pattern")
public final class OpenExample extends PatternCommand {
    @Parameter(type = ItemIO.OUTPUT)
    private ImagePlus example;

    /** For SciJava and the launcher. */
    public OpenExample() {}

    @Override
    protected void perform() throws IOException {
        ExamplePattern loaded = ExamplePattern.load();
        loaded.keep();
        example = loaded.image();
        if (!GraphicsEnvironment.isHeadless()) {
            example.show();
        }
    }
}
