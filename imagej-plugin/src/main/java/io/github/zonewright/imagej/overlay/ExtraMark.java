package io.github.zonewright.imagej.overlay;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.pattern.PlacedSpot;

/**
 * A mark of something beside the pattern that is laid over the image.
 *
 * @param place where it is, in px
 * @param style what it marks
 * @param part its size, as a part of that of the largest ring
 * @param number which further crystal it belongs to, from 0, or which answer expects the spot, 1 or 2
 * @param name name of its ROI
 */
public record ExtraMark(PixelPoint place, MarkStyle style, double part, int number, String name) {
    private static final double SMALLEST = 0.55;
    private static final double DECADES = 3;

    /**
     * A spot that tells two answers apart.
     *
     * @param place where it is
     * @param answer which of them expects it, 1 or 2
     * @return the mark
     */
    public static ExtraMark telling(PixelPoint place, int answer) {
        return new ExtraMark(place, MarkStyle.TELLING, 1.6, answer, "spot to look for, of answer " + answer);
    }

    /** A computed spot of a further crystal. */
    static ExtraMark further(PlacedSpot spot, double strongest, int number) {
        double part = 1 + Math.log10(spot.spot().intensity() / strongest) / DECADES;
        return new ExtraMark(
                spot.position(),
                MarkStyle.FURTHER,
                SMALLEST + (1 - SMALLEST) * Math.max(0, Math.min(1, part)),
                number,
                "further crystal " + (number + 1) + ": "
                        + IndexLabel.of(spot.spot().hkl()));
    }

    ExtraMark scaled(double factor) {
        return new ExtraMark(new PixelPoint(factor * place.x(), factor * place.y()), style, part, number, name);
    }

    void draw(MarkSheet sheet, MarkSize size) {
        double diameter = 1.15 * part * size.largest();
        if (style == MarkStyle.FURTHER) {
            MarkShapes.corners(place, diameter, number).forEach(corner -> sheet.add(corner, style, name));
        } else {
            sheet.add(MarkShapes.hexagon(place, diameter), style, name);
            sheet.letters(
                    Integer.toString(number),
                    place.x(),
                    place.y() + 0.6 * diameter + size.letters(),
                    size.letters(),
                    name + ", number");
        }
    }
}
