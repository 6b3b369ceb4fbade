package io.github.zonewright.imagej.demo;

import ij.IJ;
import ij.ImageJ;
import io.github.zonewright.imagej.command.CommandRunner;

/** ImageJ with the example and the workbench, as the demo leaves it on the screen. */
final class DemoSession {
    private DemoSession() {}

    /**
     * Starts ImageJ.
     *
     * @param arguments none
     */
    public static void main(String[] arguments) {
        ImageJ imagej = new ImageJ();
        imagej.exitWhenQuitting(true);
        CommandRunner.run("command.OpenExample");
        CommandRunner.run("workbench.OpenWorkbench");
        IJ.showStatus("Zonewright: the example is open.");
    }
}
