package io.github.zonewright.imagej.overlay;

import ij.ImagePlus;
import ij.gui.Overlay;
import ij.gui.Roi;
import io.github.zonewright.image.PixelPoint;
import java.util.List;

/** Forbidden spots that double diffraction may light, as squares that stay while the pattern's other marks are drawn anew. */
public final class DoubledMarks {
    private DoubledMarks() {}

    /**
     * Adds them to an image.
     *
     * @param image the image
     * @param slice the slice as {@link PatternOverlay#slice} counts
     * @param places where they are, in px
     */
    public static void add(ImagePlus image, int slice, List<PixelPoint> places) {
        Overlay overlay = image.getOverlay() == null ? new Overlay() : image.getOverlay();
        double side = Math.max(image.getWidth(), image.getHeight()) / 55.0;
        for (PixelPoint p : places) {
            Roi halo = new Roi(p.x() - side / 2, p.y() - side / 2, side, side);
            Roi line = (Roi) halo.clone();
            MarkStyle style = MarkStyle.DOUBLED;
            Marks.stroke(halo, style, "double diffraction halo", MarkStyle.HALO, MarkStyle.HALO_LINE);
            Marks.stroke(line, style, "double diffraction", style.colour(), MarkStyle.LINE);
            for (Roi roi : List.of(halo, line)) {
                roi.setPosition(slice);
                overlay.add(roi);
            }
        }
        image.setOverlay(overlay);
    }
}
