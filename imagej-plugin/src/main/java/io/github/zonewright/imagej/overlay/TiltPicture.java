package io.github.zonewright.imagej.overlay;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.Discrimination;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.PredictedSpot;
import io.github.zonewright.pattern.SpotPattern;
import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Graphics2D;
import java.awt.RenderingHints;
import java.awt.Shape;
import java.awt.geom.AffineTransform;
import java.awt.geom.Ellipse2D;
import java.awt.geom.Line2D;
import java.awt.geom.Rectangle2D;
import java.awt.image.BufferedImage;
import java.util.List;

/** The two patterns that two answers expect after a tilt, side by side, as they would stand on the image. */
public final class TiltPicture {
    /** Side of each pattern in px. */
    private static final int SIDE = 260;

    private static final int GAP = 8;
    private static final int FOOT = 40;

    /** Room beyond the outermost spot, as a part of its |g|. */
    private static final double MARGIN = 1.25;

    private static final double LARGEST_SPOT = 15;
    private static final double FAINTEST = 0.002;
    private static final int NAMED = 14;
    private static final double LETTERS = 8;

    private TiltPicture() {}

    /**
     * Draws both.
     *
     * @param tilt the tilt
     * @param mirrored whether the image is mirrored
     * @return the picture, dark spots on bright ground
     */
    public static BufferedImage of(Discrimination.Tilt tilt, boolean mirrored) {
        BufferedImage picture = new BufferedImage(2 * SIDE + 3 * GAP, SIDE + FOOT, BufferedImage.TYPE_INT_RGB);
        Graphics2D g = picture.createGraphics();
        g.setRenderingHint(RenderingHints.KEY_ANTIALIASING, RenderingHints.VALUE_ANTIALIAS_ON);
        g.setColor(Color.WHITE);
        g.fillRect(0, 0, picture.getWidth(), picture.getHeight());
        double constant = SIDE / (2 * MARGIN * Math.max(farthest(tilt.first()), farthest(tilt.second())));
        Camera camera = Camera.of(new PixelPoint(SIDE / 2.0, SIDE / 2.0), constant, mirrored);
        draw(g, GAP, tilt.first(), tilt.firstZone(), "if the first is right", camera);
        draw(g, 2 * GAP + SIDE, tilt.second(), tilt.secondZone(), "if the second is right", camera);
        g.dispose();
        return picture;
    }

    private static double strongest(SpotPattern pattern) {
        return pattern.spots().stream()
                .mapToDouble(PredictedSpot::intensity)
                .max()
                .orElse(1);
    }

    private static double farthest(SpotPattern pattern) {
        double faintest = FAINTEST * strongest(pattern);
        return pattern.spots().stream()
                .filter(s -> s.intensity() > faintest)
                .mapToDouble(s -> s.g().norm())
                .max()
                .orElse(1);
    }

    private static void draw(Graphics2D all, int left, SpotPattern pattern, Uvw zone, String when, Camera camera) {
        Graphics2D g = (Graphics2D) all.create(left, GAP, SIDE, SIDE + FOOT - GAP);
        PixelPoint centre = camera.centre();
        List<PlacedSpot> spots = pattern.on(camera);
        double strongest = strongest(pattern);
        g.setColor(new Color(0xC4C4C4));
        g.drawRect(0, 0, SIDE - 1, SIDE - 1);
        Shape frame = g.getClip();
        g.clipRect(1, 1, SIDE - 2, SIDE - 2);
        g.setColor(Color.BLACK);
        g.setStroke(new BasicStroke(1.4f));
        g.draw(new Line2D.Double(centre.x() - 5, centre.y(), centre.x() + 5, centre.y()));
        g.draw(new Line2D.Double(centre.x(), centre.y() - 5, centre.x(), centre.y() + 5));
        int named = 0;
        for (PlacedSpot spot : spots) {
            double part = spot.spot().intensity() / strongest;
            if (part < FAINTEST) {
                continue;
            }
            double diameter = Math.max(2, LARGEST_SPOT * Math.pow(part, 0.3));
            PixelPoint p = spot.position();
            g.fill(new Ellipse2D.Double(p.x() - diameter / 2, p.y() - diameter / 2, diameter, diameter));
            if (named++ < NAMED) {
                text(
                        g,
                        IndexShape.of(IndexLabel.shown(spot.spot().hkl(), pattern.crystal()), LETTERS),
                        p.x(),
                        p.y() + diameter / 2 + 3);
            }
        }
        g.setClip(frame);
        text(
                g,
                IndexShape.of(pattern.crystal().name() + " [" + zone + "], " + when, LETTERS + 1),
                SIDE / 2.0,
                SIDE + 8);
        g.dispose();
    }

    /** Letters whose top is in the middle of a place. */
    private static void text(Graphics2D g, Shape letters, double x, double top) {
        Rectangle2D box = letters.getBounds2D();
        g.fill(AffineTransform.getTranslateInstance(x - box.getCenterX(), top - box.getMinY())
                .createTransformedShape(letters));
    }
}
