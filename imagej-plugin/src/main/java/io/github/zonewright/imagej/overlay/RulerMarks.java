package io.github.zonewright.imagej.overlay;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import java.util.List;

/** Marks of measured distances: a line, a short tick across it at each order, and what was read. */
final class RulerMarks {
    private static final double TICK_ON_SCREEN = 5;

    /** How far beyond the spot its reading stands. */
    private static final double AWAY_ON_SCREEN = 24;

    private RulerMarks() {}

    static void draw(MarkSheet sheet, List<RulerLine> lines, int side, double zoom) {
        double letters = MarkSize.letters(side, zoom);
        double tick = TICK_ON_SCREEN / zoom;
        for (RulerLine line : lines) {
            Vector2 way = line.to().minus(line.from());
            if (way.norm() == 0) {
                continue;
            }
            Vector2 across = new Vector2(-way.y(), way.x()).times(tick / way.norm());
            sheet.add(MarkShapes.line(line.from(), line.to()), MarkStyle.RULER, "ruler");
            for (int n = 1; n <= line.orders(); n++) {
                PixelPoint at = MarkShapes.between(line.from(), line.to(), (double) n / line.orders());
                sheet.add(MarkShapes.line(at.plus(across), at.plus(across.times(-1))), MarkStyle.RULER, "ruler tick");
            }
            PixelPoint beyond = line.to().plus(way.times((AWAY_ON_SCREEN / zoom + 1.5 * letters) / way.norm()));
            sheet.letters(line.text(), beyond.x(), beyond.y(), letters, "ruler reading");
        }
    }
}
