package io.github.zonewright.imagej.overlay;

import ij.ImagePlus;
import ij.gui.PolygonRoi;
import ij.gui.Roi;
import io.github.zonewright.image.Ellipse;
import io.github.zonewright.image.PixelPoint;
import java.util.ArrayList;
import java.util.List;

/**
 * Computed rings of a powder over an image: ordinary named polygons, marked as ours. They stay when a spot pattern is laid
 * over the image, until other rings take their place or our marks are removed.
 */
public final class RingMarks {
    private static final int CORNERS = 180;

    private RingMarks() {}

    /**
     * A ring to draw.
     *
     * @param name name of the ROI
     * @param radius radius in pixels before the distortion
     */
    public record Ring(String name, double radius) {}

    /**
     * Draws rings in place of those on this slice before.
     *
     * @param image the image
     * @param shape centre and distortion of all of them
     * @param rings the rings
     */
    public static void show(ImagePlus image, Ellipse shape, List<Ring> rings) {
        List<Roi> marks = new ArrayList<>();
        for (Ring ring : rings) {
            Roi line = polygon(shape, ring.radius());
            Roi halo = (Roi) line.clone();
            Marks.stroke(halo, MarkStyle.RING, ring.name() + " halo", MarkStyle.HALO, MarkStyle.HALO_LINE);
            Marks.stroke(line, MarkStyle.RING, ring.name(), MarkStyle.RING.colour(), MarkStyle.LINE);
            marks.add(halo);
            marks.add(line);
        }
        PatternOverlay.showRings(image, marks);
    }

    /**
     * Takes the rings off the current slice.
     *
     * @param image the image
     */
    public static void clear(ImagePlus image) {
        PatternOverlay.showRings(image, List.of());
    }

    private static Roi polygon(Ellipse shape, double radius) {
        float[] x = new float[CORNERS];
        float[] y = new float[CORNERS];
        for (int i = 0; i < CORNERS; i++) {
            PixelPoint corner = shape.pointAt(radius, 2 * Math.PI * i / CORNERS);
            x[i] = (float) corner.x();
            y[i] = (float) corner.y();
        }
        return new PolygonRoi(x, y, Roi.POLYGON);
    }
}
