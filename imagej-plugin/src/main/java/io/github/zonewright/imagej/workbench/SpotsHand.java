package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.image.PixelPoint;
import java.awt.event.MouseEvent;

/** Adds, moves and removes measured spots, and sets the centre. */
final class SpotsHand implements Hand {
    @Override
    public void press(ImagePlus image, PixelPoint at, MouseEvent event) {}

    @Override
    public void drag(ImagePlus image, PixelPoint at, MouseEvent event) {}

    @Override
    public void release(ImagePlus image, PixelPoint at, MouseEvent event) {}

    @Override
    public Integer cursor(ImagePlus image, PixelPoint at) {
        return null;
    }
}
