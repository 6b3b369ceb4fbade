package io.github.zonewright.imagej.overlay;

import ij.gui.Roi;
import io.github.zonewright.image.PixelPoint;
import java.awt.Color;
import java.awt.Rectangle;
import java.awt.Shape;
import java.awt.geom.PathIterator;
import java.awt.geom.Rectangle2D;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;

/** Marks as sprites for one zoom. Their sizes count in half screen px, so that few are ever drawn. */
final class MarkSprites {
    private static final PixelPoint ORIGIN = new PixelPoint(0, 0);
    private static final int LARGEST = 96;
    private static final int CORNERS = 6;
    private static final double LATE = 0.5;

    private record Key(Color colour, double width, int phase, List<Integer> corners) {}

    private final double zoom;
    private final int width;
    private final Map<Long, Sprite> spots = new HashMap<>();
    private final Map<Key, Sprite> others = new HashMap<>();

    /** For pictures of this width. */
    MarkSprites(double zoom, int width) {
        this.zoom = zoom;
        this.width = width;
    }

    /** Twice a place on the screen, to the nearest whole number: the place where a sprite is put. */
    static int halves(double place) {
        return (int) Math.round(2 * place);
    }

    /** Of a place in halves, whether it is between two px, for x and y. */
    private static int phase(int x, int y) {
        return 2 * (x & 1) + (y & 1);
    }

    /** The mark of a computed spot: its diameter in px of the image, and the place where it is put. */
    Sprite spot(double diameter, boolean upper, int x, int y) {
        int size = Math.max(1, halves(zoom * diameter));
        long key = 8L * size + (upper ? 4 : 0) + phase(x, y);
        Sprite known = spots.get(key);
        if (known == null) {
            MarkSheet sheet = new MarkSheet();
            double side = size / 2.0;
            if (upper) {
                sheet.add(MarkShapes.star(ORIGIN, side), MarkStyle.UPPER, "");
            } else {
                sheet.add(MarkShapes.ring(ORIGIN, side), MarkStyle.COMPUTED, "");
            }
            known = of(inks(sheet.all(), 1), phase(x, y));
            spots.put(key, known);
        }
        return known;
    }

    /** Letters about the place of their spot, in px of the image. */
    Sprite letters(Shape letters) {
        MarkSheet sheet = new MarkSheet();
        sheet.letters(letters, "");
        return of(inks(sheet.all(), zoom), 0);
    }

    /** Any mark about its middle; null for one that is too large to be worth it. */
    Sprite of(MarkInk ink, int x, int y) {
        Rectangle2D box = ink.outline().getBounds2D();
        if (box.getWidth() > LARGEST || box.getHeight() > LARGEST) {
            return null;
        }
        MarkInk middle = ink.moved(-box.getCenterX(), -box.getCenterY());
        Key key = new Key(ink.colour(), ink.width(), phase(x, y), corners(middle.outline()));
        return others.computeIfAbsent(key, k -> of(List.of(middle), k.phase()));
    }

    private static List<Integer> corners(Shape outline) {
        List<Integer> corners = new ArrayList<>();
        double[] at = new double[CORNERS];
        for (PathIterator way = outline.getPathIterator(null); !way.isDone(); way.next()) {
            corners.add(way.currentSegment(at));
            corners.add(halves(at[0]));
            corners.add(halves(at[1]));
        }
        return corners;
    }

    private static List<MarkInk> inks(List<Roi> rois, double zoom) {
        return rois.stream().map(roi -> MarkInk.of(roi, 0, 0, zoom)).toList();
    }

    private Sprite of(List<MarkInk> inks, int phase) {
        List<MarkInk> moved = inks.stream()
                .map(ink -> ink.moved((phase & 2) == 0 ? 0 : LATE, (phase & 1) == 0 ? 0 : LATE))
                .toList();
        Rectangle box =
                moved.stream().map(MarkInk::box).reduce(Rectangle::union).orElseThrow();
        return Sprite.of(box, width, g -> moved.forEach(ink -> ink.draw(g)));
    }
}
