package io.github.zonewright.imagej.bridge;

import ij.gui.Roi;
import ij.plugin.filter.ThresholdToSelection;
import ij.process.ByteProcessor;
import ij.process.ImageProcessor;
import io.github.zonewright.image.Mask;
import java.awt.Rectangle;
import java.util.Optional;

/** Between the library's sets of pixels and ImageJ's selections. */
public final class MaskSelection {
    private static final int MEMBER = 255;

    private MaskSelection() {}

    /**
     * A selection that holds just the members of a mask.
     *
     * @param mask the mask
     * @return the selection, or empty where the mask has no members
     */
    public static Optional<Roi> of(Mask mask) {
        if (mask.count() == 0) {
            return Optional.empty();
        }
        ByteProcessor pixels = new ByteProcessor(mask.width(), mask.height());
        for (int y = 0; y < mask.height(); y++) {
            for (int x = 0; x < mask.width(); x++) {
                if (mask.contains(x, y)) {
                    pixels.set(x, y, MEMBER);
                }
            }
        }
        pixels.setThreshold(MEMBER, MEMBER, ImageProcessor.NO_LUT_UPDATE);
        return Optional.ofNullable(new ThresholdToSelection().convert(pixels));
    }

    /**
     * The pixels that a selection holds.
     *
     * @param selection the selection, which is only read; may be null
     * @param width columns of the image
     * @param height rows of the image
     * @return the mask
     * @throws IllegalArgumentException if there is no selection, or one that encloses no pixels
     */
    public static Mask of(Roi selection, int width, int height) {
        if (selection == null || !selection.isArea()) {
            throw new IllegalArgumentException("selection: "
                    + (selection == null
                            ? "none"
                            : "a " + selection.getTypeAsString().toLowerCase(java.util.Locale.ROOT))
                    + ", expected one that encloses the hidden area, such as a polygon");
        }
        Rectangle box = selection.getBounds();
        ImageProcessor inside = selection.getMask();
        return Mask.of(width, height, index -> {
            int x = index % width - box.x;
            int y = index / width - box.y;
            return x >= 0 && y >= 0 && x < box.width && y < box.height && (inside == null || inside.get(x, y) != 0);
        });
    }
}
