package io.github.zonewright.imagej.overlay;

import ij.gui.Line;
import ij.gui.OvalRoi;
import ij.gui.PolygonRoi;
import ij.gui.Roi;
import io.github.zonewright.image.PixelPoint;
import java.util.List;
import java.util.stream.Stream;

/**
 * The shapes of the marks. Area ROIs count as the library does, from pixel corners; ImageJ's lines count from pixel centres,
 * so they are moved by half a pixel.
 */
final class MarkShapes {
    private MarkShapes() {}

    static Roi ring(PixelPoint p, double diameter) {
        return new OvalRoi(p.x() - diameter / 2, p.y() - diameter / 2, diameter, diameter);
    }

    static Roi square(PixelPoint p, double side) {
        double r = side / 2;
        return polygon(p, new double[] {-r, r, r, -r}, new double[] {-r, -r, r, r});
    }

    static Roi diamond(PixelPoint p, double diameter) {
        double r = diameter * 0.62;
        return polygon(p, new double[] {0, r, 0, -r}, new double[] {-r, 0, r, 0});
    }

    static Roi triangle(PixelPoint p, double diameter) {
        double r = diameter * 0.72;
        return polygon(p, new double[] {0, 0.87 * r, -0.87 * r}, new double[] {-r, 0.5 * r, 0.5 * r});
    }

    static Roi star(PixelPoint p, double diameter) {
        double r = diameter * 0.75;
        double h = diameter * 0.22;
        return polygon(p, new double[] {0, h, r, h, 0, -h, -r, -h}, new double[] {-r, -h, 0, h, r, h, 0, -h});
    }

    static Roi closed(List<PixelPoint> corners) {
        double[] x = corners.stream().mapToDouble(PixelPoint::x).toArray();
        double[] y = corners.stream().mapToDouble(PixelPoint::y).toArray();
        return polygon(new PixelPoint(0, 0), x, y);
    }

    static Roi cross(PixelPoint p, double diameter) {
        double r = diameter / 2;
        double h = diameter / 8;
        double[] x = {-h, h, h, r, r, h, h, -h, -h, -r, -r, -h};
        double[] y = {-r, -r, -h, -h, h, h, r, r, h, h, -h, -h};
        return polygon(p, x, y);
    }

    static Roi hexagon(PixelPoint p, double diameter) {
        double r = diameter * 0.55;
        double h = 0.5 * r;
        double w = 0.87 * r;
        return polygon(p, new double[] {0, w, w, 0, -w, -w}, new double[] {-r, -h, h, r, h, -h});
    }

    /** Two opposite corners of a square, open towards each other; with odd numbers the other two. */
    static List<Roi> corners(PixelPoint p, double side, int number) {
        double x = (number % 2 == 0 ? 1 : -1) * side / 2;
        double y = side / 2;
        double arm = 0.55;
        return Stream.of(1, -1)
                .<Roi>map(s -> new PolygonRoi(
                        new float[] {at(p.x(), -s * x), at(p.x(), -s * x), at(p.x(), -s * x * (1 - 2 * arm))},
                        new float[] {at(p.y(), -s * y * (1 - 2 * arm)), at(p.y(), -s * y), at(p.y(), -s * y)},
                        Roi.POLYLINE))
                .toList();
    }

    private static float at(double middle, double offset) {
        return (float) (middle + offset - 0.5);
    }

    static Roi line(PixelPoint a, PixelPoint b) {
        return new Line(a.x() - 0.5, a.y() - 0.5, b.x() - 0.5, b.y() - 0.5);
    }

    /** A line with an open head of this length at b. */
    static Roi arrow(PixelPoint a, PixelPoint b, double head) {
        double azimuth = Math.atan2(b.y() - a.y(), b.x() - a.x());
        PixelPoint left = barb(b, azimuth + 2.7, head);
        PixelPoint right = barb(b, azimuth - 2.7, head);
        float[] x = new float[5];
        float[] y = new float[5];
        PixelPoint[] way = {a, b, left, b, right};
        for (int i = 0; i < way.length; i++) {
            x[i] = (float) (way[i].x() - 0.5);
            y[i] = (float) (way[i].y() - 0.5);
        }
        return new PolygonRoi(x, y, Roi.POLYLINE);
    }

    static PixelPoint between(PixelPoint a, PixelPoint b, double part) {
        return new PixelPoint(a.x() + part * (b.x() - a.x()), a.y() + part * (b.y() - a.y()));
    }

    private static PixelPoint barb(PixelPoint tip, double azimuth, double length) {
        return new PixelPoint(tip.x() + length * Math.cos(azimuth), tip.y() + length * Math.sin(azimuth));
    }

    private static Roi polygon(PixelPoint p, double[] x, double[] y) {
        float[] px = new float[x.length];
        float[] py = new float[x.length];
        for (int i = 0; i < x.length; i++) {
            px[i] = (float) (p.x() + x[i]);
            py[i] = (float) (p.y() + y[i]);
        }
        return new PolygonRoi(px, py, Roi.POLYGON);
    }
}
