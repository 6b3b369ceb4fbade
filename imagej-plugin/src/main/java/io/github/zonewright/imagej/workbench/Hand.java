package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.image.PixelPoint;
import java.awt.event.MouseEvent;

/** One way of taking hold of what is drawn on an image; places are in image px. */
interface Hand {
    /** The button went down. */
    void press(ImagePlus image, PixelPoint at, MouseEvent event);

    /** The mouse moved while the button is down. */
    void drag(ImagePlus image, PixelPoint at, MouseEvent event);

    /** The button went up. */
    void release(ImagePlus image, PixelPoint at, MouseEvent event);

    /** The cursor that says what a press here would take hold of; null to leave it to ImageJ. */
    Integer cursor(ImagePlus image, PixelPoint at, MouseEvent event);

    /** The mouse left the image. */
    default void leave() {}
}
