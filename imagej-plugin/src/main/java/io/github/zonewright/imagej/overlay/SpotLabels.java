package io.github.zonewright.imagej.overlay;

import ij.gui.Roi;
import ij.gui.ShapeRoi;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.pattern.PlacedSpot;
import java.awt.Shape;
import java.awt.geom.AffineTransform;
import java.awt.geom.Rectangle2D;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;

/**
 * Indices beneath the spots: the strongest first, and none where it would cover another. Each is a shape of the drawn
 * letters, filled light on a dark plate, so that it can be read on any ground.
 */
final class SpotLabels {
    private static final int MOST = 120;

    private final List<Roi> plates = new ArrayList<>();
    private final List<Roi> letters = new ArrayList<>();

    private SpotLabels() {}

    /** The labels of a view, all plates before all letters. */
    static List<Roi> of(PatternView view, MarkSize size, int width, int height) {
        SpotLabels labels = new SpotLabels();
        labels.place(view, size, new Rectangle2D.Double(0, 0, width, height));
        List<Roi> all = new ArrayList<>(labels.plates);
        all.addAll(labels.letters);
        return all;
    }

    private void place(PatternView view, MarkSize size, Rectangle2D frame) {
        Map<Hkl, Shape> drawn = new HashMap<>();
        List<Rectangle2D> taken = new ArrayList<>();
        for (PlacedSpot spot : view.computed()) {
            Shape text = drawn.computeIfAbsent(spot.spot().hkl(), hkl -> IndexShape.of(hkl, size.letters()));
            Rectangle2D box = text.getBounds2D();
            double top = spot.position().y() + 0.75 * size.of(spot);
            AffineTransform move =
                    AffineTransform.getTranslateInstance(spot.position().x() - box.getCenterX(), top - box.getMinY());
            Shape placed = move.createTransformedShape(text);
            Rectangle2D room = placed.getBounds2D();
            if (frame.contains(room) && taken.stream().noneMatch(room::intersects)) {
                taken.add(room);
                add(placed, room, "indices " + spot.spot().hkl());
            }
            if (letters.size() == MOST) {
                return;
            }
        }
    }

    private void add(Shape text, Rectangle2D room, String name) {
        double margin = 0.08 * room.getHeight();
        Roi plate = new Roi(
                room.getX() - 2 * margin,
                room.getY() - margin,
                room.getWidth() + 4 * margin,
                room.getHeight() + 2 * margin);
        plate.setFillColor(MarkStyle.PLATE);
        Roi letter = new ShapeRoi(text);
        letter.setFillColor(MarkStyle.LABEL.colour());
        plate.setName(name + " ground");
        letter.setName(name);
        plate.setProperty(PatternOverlay.PROPERTY, MarkStyle.LABEL.key());
        letter.setProperty(PatternOverlay.PROPERTY, MarkStyle.LABEL.key());
        plates.add(plate);
        letters.add(letter);
    }
}
