package io.github.zonewright.imagej.overlay;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.pattern.PlacedSpot;
import java.awt.Shape;
import java.awt.geom.AffineTransform;
import java.awt.geom.Rectangle2D;
import java.util.ArrayList;
import java.util.List;

/**
 * Indices beneath the spots: the strongest first, and none where it would cover another. Each is a shape of the drawn
 * letters, filled light on a dark plate, so that it can be read on any ground.
 */
final class SpotLabels {
    private static final int MOST = 120;

    private SpotLabels() {}

    /** Adds the labels of a view. */
    static void place(MarkSheet sheet, PatternView view, MarkSize size, int width, int height) {
        Rectangle2D frame = new Rectangle2D.Double(0, 0, width, height);
        List<Rectangle2D> taken = new ArrayList<>();
        Crystal crystal = view.placement().orElseThrow().crystal();
        for (PlacedSpot spot : view.computed()) {
            Shape text = IndexShape.of(IndexLabel.shown(spot.spot().hkl(), crystal), size.letters());
            Rectangle2D box = text.getBounds2D();
            double top = spot.position().y() + 0.75 * size.of(spot);
            AffineTransform move =
                    AffineTransform.getTranslateInstance(spot.position().x() - box.getCenterX(), top - box.getMinY());
            Shape placed = move.createTransformedShape(text);
            Rectangle2D room = placed.getBounds2D();
            if (frame.contains(room) && taken.stream().noneMatch(room::intersects)) {
                taken.add(room);
                sheet.letters(placed, "indices " + spot.spot().hkl());
            }
            if (taken.size() == MOST) {
                return;
            }
        }
    }
}
