package io.github.zonewright.document;

import static io.github.zonewright.document.Pages.all;
import static io.github.zonewright.document.Pages.parse;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.w3c.dom.Document;
import org.w3c.dom.Element;

class ZoneChartTest {
    private static final Beam BEAM = Beam.ofKilovolts(200);
    private static final Crystal COPPER = CrystalShelf.find("copper").orElseThrow();
    private static final Crystal SILICON = CrystalShelf.find("silicon").orElseThrow();

    private static List<Element> classed(Element in, String tag, String kind) {
        return all(in, tag).stream()
                .filter(e -> e.getAttribute("class").equals(kind))
                .toList();
    }

    private static Element drawing(ZoneChart chart) throws Exception {
        return all(parse(chart.toHtml()), "svg").get(0);
    }

    @Test
    void html_hasADrawingForEachZone() throws Exception {
        Document page = parse(ZoneChart.of(COPPER, BEAM, 9, 20).toHtml());
        assertEquals(9, all(page, "svg").size());
        all(page, "svg").forEach(svg -> {
            assertEquals("img", svg.getAttribute("role"));
            assertTrue(svg.getAttribute("aria-label").startsWith("Computed pattern along ["));
        });
        assertEquals("Zones of Copper", all(page, "h1").get(0).getTextContent());
    }

    /** True to scale: a drawing as many mm wide as it has units, and R·d = scale (Hirsch, Williams) for its basis spots. */
    @Test
    void html_isTrueToScale() throws Exception {
        Element svg = drawing(new ZoneChart(COPPER, BEAM, List.of(new Uvw(0, 0, 1)), 30));
        String[] box = svg.getAttribute("viewBox").split(" ");
        assertEquals(box[2] + "mm", svg.getAttribute("width"));
        assertEquals(box[3] + "mm", svg.getAttribute("height"));
        double d200 = COPPER.lattice().a() / 2;
        for (Element ring : classed(svg, "circle", "basis")) {
            double r = Math.hypot(
                    Double.parseDouble(ring.getAttribute("cx")), Double.parseDouble(ring.getAttribute("cy")));
            assertEquals(30 / d200, r, 0.005);
        }
        assertEquals(2, classed(svg, "circle", "basis").size());
    }

    /** Silicon along [110]: forbidden 002 stands as a square at scale/(a/2), along [001] there is none (Williams). */
    @Test
    void html_doubleDiffraction_isASquare() throws Exception {
        Element along110 = drawing(new ZoneChart(SILICON, BEAM, List.of(new Uvw(1, 1, 0)), 30));
        double wanted = 30 / (SILICON.lattice().a() / 2);
        assertTrue(classed(along110, "rect", "doubled").stream().anyMatch(square -> {
            double half = Double.parseDouble(square.getAttribute("width")) / 2;
            double x = Double.parseDouble(square.getAttribute("x")) + half;
            double y = Double.parseDouble(square.getAttribute("y")) + half;
            return Math.abs(Math.hypot(x, y) - wanted) < 0.005;
        }));
        Element along001 = drawing(new ZoneChart(SILICON, BEAM, List.of(new Uvw(0, 0, 1)), 30));
        assertEquals(List.of(), classed(along001, "rect", "doubled"));
    }

    @Test
    void html_strongerSpots_areLarger() throws Exception {
        Element svg = drawing(new ZoneChart(COPPER, BEAM, List.of(new Uvw(0, 0, 1)), 30));
        List<Double> radii = classed(svg, "circle", "spot").stream()
                .map(c -> Double.parseDouble(c.getAttribute("r")))
                .toList();
        for (int i = 1; i < radii.size(); i++) {
            assertTrue(radii.get(i) <= radii.get(i - 1));
        }
        assertTrue(radii.get(0) > radii.get(radii.size() - 1));
    }

    @Test
    void html_nastyName_staysText() throws Exception {
        String name = "<script>alert(1)</script>&\u0002";
        Document page = parse(ZoneChart.of(COPPER.withName(name), BEAM, 2, 20).toHtml());
        assertEquals(List.of(), all(page, "script"));
        assertEquals(
                "Zones of <script>alert(1)</script>&\uFFFD",
                all(page, "title").get(0).getTextContent());
    }

    @Test
    void html_hexagonal_hasFourIndicesToo() {
        Crystal magnesium = CrystalShelf.find("magnesium").orElseThrow();
        String text = new ZoneChart(magnesium, BEAM, List.of(new Uvw(1, 0, 0)), 20)
                .toHtml()
                .replaceAll("<[^>]*>", "");
        assertTrue(text.contains("[100] = [2−1−10]"), text);
    }

    @Test
    void html_scaleTooLargeForASpot_saysSo() {
        String html = new ZoneChart(COPPER, BEAM, List.of(new Uvw(0, 0, 1)), 400).toHtml();
        assertFalse(html.contains("<svg"));
        assertTrue(html.contains("no two rows"), html);
    }

    @Test
    void of_wrongValues_areNamed() {
        String scale = assertThrows(IllegalArgumentException.class, () -> ZoneChart.of(COPPER, BEAM, 9, 0.5))
                .getMessage();
        assertTrue(scale.contains("scale on paper: 0.5 mm·Å"), scale);
        String zones = assertThrows(IllegalArgumentException.class, () -> new ZoneChart(COPPER, BEAM, List.of(), 20))
                .getMessage();
        assertTrue(zones.contains("zones of the chart"), zones);
    }

    /** An inch is 25.4 mm and 96 px of a page (CSS Values and Units, level 3). */
    @Test
    void scaleOnScreen_ninetySixPixelsAreAnInch() {
        assertEquals(25.4, ZoneChart.scaleOnScreen(96), 1e-12);
    }

    @Test
    void write_isUtf8(@TempDir Path folder) throws Exception {
        Path file = folder.resolve("chart.html");
        ZoneChart chart = ZoneChart.of(COPPER, BEAM, 2, 20);
        chart.write(file);
        assertEquals(chart.toHtml(), Files.readString(file, StandardCharsets.UTF_8));
    }
}
