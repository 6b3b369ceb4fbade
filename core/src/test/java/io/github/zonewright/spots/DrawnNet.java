package io.github.zonewright.spots;

import io.github.zonewright.SyntheticPattern;
import io.github.zonewright.image.PixelPoint;
import java.util.ArrayList;
import java.util.List;

/** A drawn pattern of one net about a centre, on a glow about it, and where its spots are. */
record DrawnNet(int width, int height, PixelPoint centre, List<PixelPoint> nodes) {

    /** Nodes well inside the frame, the centre left out. */
    static DrawnNet of(int width, int height, PixelPoint centre, double spacing, double angle) {
        List<PixelPoint> nodes = new ArrayList<>();
        for (int i = -14; i <= 14; i++) {
            for (int j = -14; j <= 14; j++) {
                double u = spacing * (i + 0.3 * j);
                double v = spacing * 0.9 * j;
                double x = centre.x() + u * Math.cos(angle) - v * Math.sin(angle);
                double y = centre.y() + u * Math.sin(angle) + v * Math.cos(angle);
                if ((i != 0 || j != 0) && x > 6 && y > 6 && x < width - 6 && y < height - 6) {
                    nodes.add(new PixelPoint(x, y));
                }
            }
        }
        return new DrawnNet(width, height, centre, nodes);
    }

    SyntheticPattern glow(double background, double height) {
        return new SyntheticPattern(width, height(), background)
                .add((x, y) -> height / (1 + Math.pow(Math.hypot(x - centre.x(), y - centre.y()) / 25, 2)));
    }

    SyntheticPattern drawn(double sigma, double peak) {
        SyntheticPattern pattern = glow(20, 400);
        nodes.forEach(node -> pattern.spot(node.x(), node.y(), sigma, peak));
        return pattern;
    }

    SyntheticPattern withBeam(double sigma, double peak) {
        return drawn(sigma, peak).spot(centre.x(), centre.y(), sigma, 20 * peak);
    }
}
