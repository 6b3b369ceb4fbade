package io.github.zonewright.imagej.demo;

import ij.IJ;
import java.awt.EventQueue;
import java.awt.Rectangle;
import java.awt.Robot;
import java.awt.Window;
import java.io.File;
import javax.imageio.ImageIO;

/** Makes the README's picture of the workbench, on the display at hand. */
public final class Screenshots {
    private static final int DRAWN_AFTER = 2500;

    private Screenshots() {}

    /**
     * Opens what the demo opens, and writes the picture.
     *
     * @param arguments the folder to write to
     * @throws Exception if there is no display, or the folder can't be written to
     */
    public static void main(String[] arguments) throws Exception {
        File picture = new File(arguments[0], "workbench.png");
        DemoSession.main(new String[0]);
        EventQueue.invokeAndWait(() -> {});
        IJ.wait(DRAWN_AFTER);
        Rectangle all = new Rectangle();
        for (Window window : Window.getWindows()) {
            if (window.isShowing()) {
                all = all.isEmpty() ? window.getBounds() : all.union(window.getBounds());
            }
        }
        ImageIO.write(new Robot().createScreenCapture(all), "png", picture);
        System.out.println("Written: " + picture);
        System.exit(0);
    }
}
