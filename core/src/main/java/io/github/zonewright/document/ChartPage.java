package io.github.zonewright.document;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.MillerBravais;
import io.github.zonewright.lattice.ReciprocalLattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.pattern.PredictedSpot;
import io.github.zonewright.pattern.ZonePattern;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;

/** Draws a zone chart: a heading, and a figure for each zone. Lengths in millimetres; on the paper y points down. */
final class ChartPage {
    private static final double WIDTH = 186;
    private static final double GAP = 3;
    private static final int MOST_COLUMNS = 3;

    /** A spot this much farther out than the second basis spot must still fit, so that a net can be seen. */
    private static final double SEEN = 1.05;

    private static final double LARGEST_SPOT = 1.35;
    private static final double SMALLEST_PART = 0.22;
    private static final double DECADES = 4;
    private static final double LETTERS = 2.4;

    private static final String STYLE = """
            header { margin-bottom: 2mm; }
            .sheet { display: grid; gap: 2mm 3mm; justify-content: start; }
            figure { margin: 0; break-inside: avoid; }
            figcaption { font-size: 7.5pt; line-height: 1.3; white-space: nowrap; }
            figcaption b { font-size: 11pt; }
            svg { display: block; }
            .frame { fill: none; stroke: #888; stroke-width: .15; }
            .spot { fill: #000; }
            .basis { fill: none; stroke: #000; stroke-width: .2; }
            .doubled { fill: #fff; stroke: #000; stroke-width: .25; }
            .line { fill: none; stroke: #000; stroke-width: .3; }
            svg text { font-size: 2.4px; fill: #000; paint-order: stroke; stroke: #fff; stroke-width: .4px; }
            """;

    private final ZoneChart chart;
    private final ReciprocalLattice reciprocal;
    private Markup out;

    ChartPage(ZoneChart chart) {
        this.chart = chart;
        this.reciprocal = chart.crystal().lattice().reciprocal();
    }

    String html() {
        String title = "Zones of " + chart.crystal().name();
        int columns = columns();
        double side = side(columns);
        String grid = ".sheet { grid-template-columns: repeat(" + columns + ", " + number(side) + "mm); }\n";
        return Sheet.of(title, STYLE + grid, markup -> {
            out = markup;
            header(title);
            out.open("main", "class", "sheet").line();
            for (Uvw zone : chart.zones()) {
                pattern(zone, side / 2).ifPresentOrElse(p -> figure(p, side), () -> absent(zone));
            }
            out.close().line();
        });
    }

    private void header(String title) {
        out.open("header").element("h1", title);
        out.element(
                "p",
                chart.crystal().formula() + "; "
                        + Figures.significant(chart.beam().kilovolts(), 6)
                        + " kV; camera constant on paper " + Figures.significant(chart.scale(), 5)
                        + " mm·Å when printed at 100 %: a spot of spacing d lies "
                        + Figures.significant(chart.scale(), 5)
                        + " mm / d (Å) from the centre.");
        out.element(
                "p",
                "● spot, the larger the stronger; ⊙ basis spot, with its indices; □ forbidden spot that double diffraction "
                        + "may light; + direct beam. Zero layers, exactly on zone; the first basis spot points to the right. "
                        + "The zone axis points towards the electron source; its opposite shows the mirror image.",
                "class",
                "quiet");
        out.close().line();
    }

    /** As many columns as let three quarters of the zones show their second basis spot and something beyond. */
    private int columns() {
        double[] needed = chart.zones().stream()
                .map(z -> pattern(z, WIDTH / 2))
                .flatMap(Optional::stream)
                .mapToDouble(p ->
                        SEEN * chart.scale() * reciprocal.vector(p.second()).norm())
                .sorted()
                .toArray();
        double radius = needed.length == 0 ? 0 : needed[(3 * needed.length - 1) / 4];
        int columns = MOST_COLUMNS;
        while (columns > 1 && side(columns) / 2 < radius) {
            columns--;
        }
        return columns;
    }

    private static double side(int columns) {
        return (WIDTH - (columns - 1) * GAP) / columns;
    }

    private Optional<ZonePattern> pattern(Uvw zone, double radius) {
        double wavelength = chart.beam().wavelength();
        double largestG = paper().toReciprocal(new PixelPoint(radius - LARGEST_SPOT, 0), wavelength)
                .norm();
        return ZonePattern.of(chart.crystal(), chart.beam(), zone, largestG);
    }

    /** The paper as a camera, in mm about its middle. */
    private Camera paper() {
        return Camera.of(new PixelPoint(0, 0), chart.scale(), false);
    }

    private void absent(Uvw zone) {
        out.open("figure").open("figcaption").open("b");
        symbol(zone);
        out.close()
                .text(" no two rows of reflections within this frame")
                .close()
                .close()
                .line();
    }

    private void figure(ZonePattern p, double side) {
        out.open("figure").open("figcaption").open("b");
        symbol(p.zone());
        out.close().empty("br");
        basis(p.first());
        out.text("; ");
        basis(p.second());
        double angle = Math.toDegrees(reciprocal.angle(p.first(), p.second()));
        out.text("; " + Figures.plain(angle, 1) + "°").close().line();
        drawing(p, side);
        out.close().line();
    }

    private void basis(Hkl hkl) {
        out.indices(hkl.h(), hkl.k(), hkl.l()).text(" " + Figures.plain(reciprocal.spacing(hkl), 3) + " Å");
    }

    private void symbol(Uvw zone) {
        out.text("[").indices(zone.u(), zone.v(), zone.w()).text("]");
        if (chart.crystal().lattice().hasHexagonalAxes()) {
            out.text(" = [").indices(MillerBravais.of(zone)).text("]");
        }
    }

    private void drawing(ZonePattern p, double side) {
        double r = side / 2;
        String size = number(side) + "mm";
        String box = Stream.of(-r, -r, side, side)
                .map(ChartPage::number)
                .reduce((a, b) -> a + " " + b)
                .orElseThrow();
        out.open(
                "svg",
                "xmlns",
                "http://www.w3.org/2000/svg",
                "width",
                size,
                "height",
                size,
                "viewBox",
                box,
                "role",
                "img",
                "aria-label",
                "Computed pattern along [" + p.zone() + "]: " + p.spots().size() + " spots, "
                        + p.doubled().size() + " by double diffraction");
        out.empty("circle", "class", "frame", "r", number(r - 0.1)).line();
        p.doubled().forEach(g -> square(place(g)));
        double strongest = p.spots().isEmpty() ? 1 : p.spots().get(0).intensity();
        for (PredictedSpot spot : p.spots()) {
            circle("spot", place(spot.g()), LARGEST_SPOT * part(spot.intensity() / strongest));
        }
        out.line().empty("path", "class", "line", "d", "M-1.6 0H1.6M0 -1.6V1.6");
        p.spots().stream().filter(s -> s.hkl().equals(p.first())).forEach(this::label);
        p.spots().stream().filter(s -> s.hkl().equals(p.second())).forEach(this::label);
        bar(r);
        out.close();
    }

    /** Radius as a part of the largest: the area grows with the logarithm of the intensity over four decades. */
    private static double part(double intensity) {
        double level = Math.min(1, Math.max(0, 1 + Math.log10(intensity) / DECADES));
        return Math.sqrt(SMALLEST_PART * SMALLEST_PART + (1 - SMALLEST_PART * SMALLEST_PART) * level);
    }

    private PixelPoint place(Vector2 g) {
        return paper().toPixel(g, chart.beam().wavelength());
    }

    private void circle(String kind, PixelPoint at, double radius) {
        out.empty("circle", "class", kind, "cx", number(at.x()), "cy", number(at.y()), "r", number(radius));
    }

    private void square(PixelPoint at) {
        double half = 0.6;
        out.empty(
                "rect",
                "class",
                "doubled",
                "x",
                number(at.x() - half),
                "y",
                number(at.y() - half),
                "width",
                number(2 * half),
                "height",
                number(2 * half));
    }

    private void label(PredictedSpot spot) {
        PixelPoint at = place(spot.g());
        circle("basis", at, LARGEST_SPOT + 0.55);
        out.open(
                "text",
                "x",
                number(at.x()),
                "y",
                number(at.y() + LARGEST_SPOT + LETTERS + 0.9),
                "text-anchor",
                "middle");
        Hkl hkl = spot.hkl();
        boolean wide = Math.max(Math.abs(hkl.h()), Math.max(Math.abs(hkl.k()), Math.abs(hkl.l()))) > 9;
        List<Integer> indices = List.of(hkl.h(), hkl.k(), hkl.l());
        for (int i = 0; i < indices.size(); i++) {
            out.text(wide && i > 0 ? "\u2009" : "");
            String digits = Integer.toString(Math.abs(indices.get(i)));
            if (indices.get(i) < 0) {
                out.element("tspan", digits, "text-decoration", "overline");
            } else {
                out.text(digits);
            }
        }
        out.close();
    }

    /** A scale bar in the lower left corner, of 1, 2 or 5 times a power of ten 1/Å, a fifth to a half of the radius. */
    private void bar(double r) {
        double wanted = 0.5 * r / chart.scale();
        double power = Math.pow(10, Math.floor(Math.log10(wanted)));
        double length = wanted >= 5 * power ? 5 * power : wanted >= 2 * power ? 2 * power : power;
        double end = -r + 1 + length * chart.scale();
        out.empty(
                "path",
                "class",
                "line",
                "d",
                "M" + number(-r + 1) + " " + number(r - 2.2) + "v1.2H" + number(end) + "v-1.2");
        out.element("text", Figures.significant(length, 1) + " 1/Å", "x", number(-r + 1), "y", number(r - 2.6));
    }

    private static String number(double value) {
        return Figures.significant(Math.rint(value * 1000) / 1000, 8).replace('\u2212', '-');
    }
}
