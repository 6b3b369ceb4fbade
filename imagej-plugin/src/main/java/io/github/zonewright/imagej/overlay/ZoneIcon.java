package io.github.zonewright.imagej.overlay;

import io.github.zonewright.lattice.Uvw;
import java.awt.Component;
import java.awt.Graphics;
import java.awt.Graphics2D;
import java.awt.RenderingHints;
import java.awt.Shape;
import java.awt.geom.AffineTransform;
import java.awt.geom.Path2D;
import java.awt.geom.Rectangle2D;
import javax.swing.Icon;

/** A zone axis [uvw] as drawn letters, negative indices with a bar above, in the colour of what it stands on. */
public final class ZoneIcon implements Icon {
    private final Shape letters;

    /**
     * Draws the letters.
     *
     * @param zone the zone axis
     * @param digits height of the digits in px
     */
    public ZoneIcon(Uvw zone, double digits) {
        Path2D all = new Path2D.Double();
        append(all, IndexShape.of("[", digits), 0);
        append(all, IndexShape.of(new int[] {zone.u(), zone.v(), zone.w()}, digits), 0.2 * digits);
        append(all, IndexShape.of("]", digits), 0.2 * digits);
        Rectangle2D box = all.getBounds2D();
        letters = AffineTransform.getTranslateInstance(-box.getX(), -box.getY()).createTransformedShape(all);
    }

    private static void append(Path2D all, Shape next, double gap) {
        Rectangle2D box = all.getBounds2D();
        double x = box.isEmpty() ? 0 : box.getMaxX() + gap - next.getBounds2D().getX();
        all.append(next.getPathIterator(AffineTransform.getTranslateInstance(x, 0)), false);
    }

    @Override
    public void paintIcon(Component on, Graphics graphics, int x, int y) {
        Graphics2D g = (Graphics2D) graphics.create();
        g.setRenderingHint(RenderingHints.KEY_ANTIALIASING, RenderingHints.VALUE_ANTIALIAS_ON);
        g.setColor(on.getForeground());
        g.translate(x, y);
        g.fill(letters);
        g.dispose();
    }

    @Override
    public int getIconWidth() {
        return (int) Math.ceil(letters.getBounds2D().getMaxX());
    }

    @Override
    public int getIconHeight() {
        return (int) Math.ceil(letters.getBounds2D().getMaxY());
    }
}
