package io.github.zonewright.imagej.overlay;

import ij.gui.Line;
import ij.gui.OvalRoi;
import ij.gui.Roi;
import ij.gui.ShapeRoi;
import ij.process.FloatPolygon;
import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Graphics2D;
import java.awt.Rectangle;
import java.awt.Shape;
import java.awt.geom.AffineTransform;
import java.awt.geom.Ellipse2D;
import java.awt.geom.Line2D;
import java.awt.geom.Path2D;
import java.awt.geom.Rectangle2D;

/**
 * A mark as it looks on the screen, without the ROI.
 *
 * @param outline in screen px
 * @param colour of the line, or of the filled area
 * @param width of the line in screen px; 0 for a filled area
 */
record MarkInk(Shape outline, Color colour, double width) {
    private static final int MARGIN = 2;
    private static final double HALF = 0.5;

    /** Of one of our ROIs, on a canvas that shows an image from this corner on at this zoom. */
    static MarkInk of(Roi roi, double left, double top, double zoom) {
        AffineTransform screen = AffineTransform.getScaleInstance(zoom, zoom);
        screen.translate(-left, -top);
        Shape outline = screen.createTransformedShape(outline(roi));
        Color fill = roi.getFillColor();
        return fill != null
                ? new MarkInk(outline, fill, 0)
                : new MarkInk(outline, roi.getStrokeColor(), roi.getStrokeWidth());
    }

    /** In px of the image, from the corner of the first pixel; ImageJ counts lines from its middle. */
    private static Shape outline(Roi roi) {
        Rectangle2D.Double box = roi.getFloatBounds();
        if (roi instanceof OvalRoi) {
            return new Ellipse2D.Double(box.x, box.y, box.width, box.height);
        }
        if (roi instanceof ShapeRoi shape) {
            return AffineTransform.getTranslateInstance(box.x, box.y).createTransformedShape(shape.getShape());
        }
        if (roi instanceof Line line) {
            return new Line2D.Double(line.x1d + HALF, line.y1d + HALF, line.x2d + HALF, line.y2d + HALF);
        }
        if (roi.getType() == Roi.RECTANGLE) {
            return box;
        }
        boolean open = roi.getType() == Roi.POLYLINE;
        double offset = open ? HALF : 0;
        FloatPolygon corners = roi.getFloatPolygon();
        Path2D path = new Path2D.Double();
        path.moveTo(corners.xpoints[0] + offset, corners.ypoints[0] + offset);
        for (int i = 1; i < corners.npoints; i++) {
            path.lineTo(corners.xpoints[i] + offset, corners.ypoints[i] + offset);
        }
        if (!open) {
            path.closePath();
        }
        return path;
    }

    /** The pixels that it touches. */
    Rectangle box() {
        Rectangle box = outline.getBounds();
        int margin = MARGIN + (int) Math.ceil(width / 2);
        box.grow(margin, margin);
        return box;
    }

    double middleX() {
        return outline.getBounds2D().getCenterX();
    }

    double middleY() {
        return outline.getBounds2D().getCenterY();
    }

    /** The same elsewhere. */
    MarkInk moved(double x, double y) {
        return new MarkInk(AffineTransform.getTranslateInstance(x, y).createTransformedShape(outline), colour, width);
    }

    void draw(Graphics2D g) {
        g.setColor(colour);
        if (width == 0) {
            g.fill(outline);
        } else {
            g.setStroke(new BasicStroke((float) width));
            g.draw(outline);
        }
    }
}
