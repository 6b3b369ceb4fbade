package io.github.zonewright.document;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.ResidualPlot;
import io.github.zonewright.indexing.Solution;
import java.util.stream.DoubleStream;
import java.util.stream.Stream;

/** Draws the residuals of a fit as arrows, as they lie on the image. Lengths in millimetres. */
final class ResidualFigure {
    private static final double SIDE = 40;
    private static final double MARGIN = 1.2;
    private static final double HEAD = 1.3;
    private static final double DOT = 0.3;

    /** A shorter arrow would be all head. */
    private static final double SHORTEST = 0.5;

    private final ResidualPlot plot;
    private final PixelPoint centre;
    private final double scale;
    private final PixelPoint corner;

    private ResidualFigure(ResidualPlot plot, PixelPoint centre) {
        this.plot = plot;
        this.centre = centre;
        PixelPoint[] all = Stream.concat(
                        Stream.of(centre), plot.arrows().stream().flatMap(a -> Stream.of(a.from(), a.to())))
                .toArray(PixelPoint[]::new);
        double left = Stream.of(all).mapToDouble(PixelPoint::x).min().orElseThrow();
        double top = Stream.of(all).mapToDouble(PixelPoint::y).min().orElseThrow();
        double wide = Stream.of(all).mapToDouble(PixelPoint::x).max().orElseThrow() - left;
        double tall = Stream.of(all).mapToDouble(PixelPoint::y).max().orElseThrow() - top;
        double longer = DoubleStream.of(wide, tall, 1).max().orElseThrow();
        this.scale = (SIDE - 2 * MARGIN) / longer;
        this.corner = new PixelPoint(left - (longer - wide) / 2, top - (longer - tall) / 2);
    }

    /** Writes the figure; nothing for a solution that explains no spot. */
    static void write(Solution solution, Markup out) {
        ResidualPlot.of(solution.matches())
                .ifPresent(
                        p -> new ResidualFigure(p, solution.placement().camera().centre()).write(out));
    }

    private void write(Markup out) {
        String factor = Figures.significant(plot.factor(), 3);
        double foot = SIDE + 3;
        out.open("figure", "class", "residuals");
        out.open(
                "svg",
                "xmlns",
                "http://www.w3.org/2000/svg",
                "width",
                SIDE + "mm",
                "height",
                foot + "mm",
                "viewBox",
                "0 0 " + SIDE + " " + foot,
                "role",
                "img",
                "aria-label",
                "Residuals of " + plot.arrows().size() + " spots as arrows, " + factor + " times as long");
        PixelPoint middle = place(centre);
        path(out, "line", "M" + at(middle.x() - 1, middle.y()) + "h2m-1 -1v2");
        for (ResidualPlot.Arrow arrow : plot.arrows()) {
            PixelPoint from = place(arrow.from());
            out.empty("circle", "cx", number(from.x()), "cy", number(from.y()), "r", number(DOT));
            arrow(out, from, place(arrow.to()));
        }
        double end = MARGIN + plot.barLength() * scale;
        arrow(out, new PixelPoint(MARGIN, foot - 1), new PixelPoint(end, foot - 1));
        out.close();
        out.element(
                "figcaption",
                "Residual × " + factor + ", from computed to measured; the arrow at the foot is "
                        + Figures.significant(plot.bar(), 3) + " px.");
        out.close().line();
    }

    private static void arrow(Markup out, PixelPoint from, PixelPoint to) {
        double length = from.distanceTo(to);
        if (length < SHORTEST) {
            return;
        }
        double azimuth = Math.atan2(to.y() - from.y(), to.x() - from.x());
        double head = Math.min(HEAD, length / 2);
        path(
                out,
                "line",
                "M" + at(from.x(), from.y()) + "L" + at(to.x(), to.y()) + barb(to, azimuth + 2.7, head)
                        + barb(to, azimuth - 2.7, head));
    }

    private static String barb(PixelPoint tip, double azimuth, double length) {
        return "M" + at(tip.x(), tip.y()) + "L"
                + at(tip.x() + length * Math.cos(azimuth), tip.y() + length * Math.sin(azimuth));
    }

    private static void path(Markup out, String kind, String data) {
        out.empty("path", "class", kind, "d", data);
    }

    private PixelPoint place(PixelPoint p) {
        return new PixelPoint(MARGIN + scale * (p.x() - corner.x()), MARGIN + scale * (p.y() - corner.y()));
    }

    private static String at(double x, double y) {
        return number(x) + " " + number(y);
    }

    private static String number(double value) {
        return Figures.significant(Math.rint(value * 1000) / 1000, 8).replace('\u2212', '-');
    }
}
