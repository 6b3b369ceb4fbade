package io.github.zonewright.document;

import static io.github.zonewright.document.Pages.all;
import static io.github.zonewright.document.Pages.parse;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SolutionErrors;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.OffsetDateTime;
import java.util.ArrayList;
import java.util.Base64;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.w3c.dom.Document;
import org.w3c.dom.Element;

class FitReportTest {
    /** The smallest PNG there is: one transparent pixel. */
    private static final byte[] PNG = Base64.getDecoder()
            .decode("iVBORw0KGgoAAAANSUhEUgAAAAEAAAABCAQAAAC1HAwCAAAAC0lEQVR42mNkYAAAAAYAAjCB0C8AAAAASUVORK5CYII=");

    private static final String NASTY = "<script>alert('x')</script><b onload=\"y\">&amp;]]>\u0001\uD800é";

    /** A cubic crystal of 4 Å, on zone, with spots at round places: 200 lies 250 px from the centre at K = 500 px·Å. */
    private static Solution round(Crystal crystal) {
        Camera camera = Camera.of(new PixelPoint(512, 512), 500, false);
        ZoneSetting setting = ZoneSetting.onZone(new Uvw(0, 1, 1), new Hkl(2, 0, 0), 0);
        Placement placement = new Placement(crystal, Beam.ofKilovolts(200), setting, camera);
        List<SpotMatch> matches = new ArrayList<>();
        matches.add(match(new Hkl(2, 0, 0), 762, 512));
        matches.add(match(new Hkl(0, 1, -1), 512, 512 - 176.78));
        matches.add(match(new Hkl(-2, 0, 0), 262, 512));
        SolutionErrors errors = new SolutionErrors(
                Math.toRadians(0.00035), Math.toRadians(0.21), Math.toRadians(0.2), 0.012, 0.014, 0.35);
        return new Solution(placement, matches, List.of(), 0.5, 123.45, errors, Optional.empty());
    }

    private static SpotMatch match(Hkl hkl, double x, double y) {
        return new SpotMatch(
                new MeasuredSpot(new PixelPoint(x, y), 0.1, 1000, 20, false), hkl, new PixelPoint(x + 0.5, y));
    }

    private static Crystal cubic(String name, String... notices) {
        Crystal plain = Crystal.of(name, Lattice.cubic(4), "P m -3 m", AtomSite.of("Po", 0, 0, 0));
        return new Crystal(name, plain.lattice(), plain.spaceGroup(), plain.sites(), List.of(notices));
    }

    private static FitReport full(String name) {
        Solution solution = round(cubic(name, name, "twice"));
        FitDocument fit = FitDocument.of(solution)
                .withImage(ImageReference.of(name.replaceAll("[/\\p{Cntrl}]", "_"), 1024, 1024)
                        .withSha256("0123456789abcdef".repeat(4)))
                .createdAt(OffsetDateTime.parse("2026-03-01T14:05:00+01:00"))
                .createdBy(name);
        return FitReport.of(fit)
                .withPicture(PNG)
                .withSolutions(List.of(solution))
                .withMissing(List.of(new Hkl(-4, 0, 0)))
                .withCalibration(name);
    }

    private static String definition(Document page, String term) {
        return all(page, "dt").stream()
                .filter(dt -> dt.getTextContent().equals(term))
                .map(dt -> dt.getNextSibling().getTextContent())
                .findFirst()
                .orElseThrow();
    }

    @Test
    void html_isXmlOfTheNamespaceOfHtml() throws Exception {
        Document page = parse(full("polonium").toHtml());
        assertEquals("http://www.w3.org/1999/xhtml", page.getDocumentElement().getNamespaceURI());
        assertEquals("html", page.getDoctype().getName());
        assertEquals("en", page.getDocumentElement().getAttribute("lang"));
    }

    @Test
    void html_nastyNames_stayText() throws Exception {
        Document page = parse(full(NASTY).toHtml());
        assertEquals(List.of(), all(page, "script"));
        assertEquals(List.of(), all(page, "b"));
        assertTrue(definition(page, "Made").contains("<script>alert('x')</script>"));
        assertTrue(definition(page, "Calibration").contains("&amp;]]>\uFFFD\uFFFDé"));
        for (Element element : all(page, "*")) {
            for (int i = 0; i < element.getAttributes().getLength(); i++) {
                assertFalse(element.getAttributes().item(i).getNodeName().startsWith("on"), element.getTagName());
            }
        }
    }

    @Test
    void html_fetchesNothing() throws Exception {
        String html = full("polonium").toHtml();
        for (Element element : all(parse(html), "*")) {
            assertEquals("", element.getAttribute("href"));
            assertTrue(element.getAttribute("src").isEmpty()
                    || element.getAttribute("src").startsWith("data:image/png"));
        }
        assertFalse(html.contains("url(") || html.contains("@import"), html);
    }

    /** What readers of the page by ear need, after the W3C's WCAG 2.1: a language, a title, alt texts, headed tables. */
    @Test
    void html_canBeReadAloud() throws Exception {
        Document page = parse(full("polonium").toHtml());
        assertEquals("Zone axis [0 1 1] of polonium", all(page, "title").get(0).getTextContent());
        assertEquals(1, all(page, "h1").size());
        assertEquals(1, all(page, "main").size());
        all(page, "img").forEach(img -> assertTrue(img.getAttribute("alt").contains("polonium")));
        assertFalse(all(page, "th").isEmpty());
        all(page, "th").forEach(th -> assertFalse(th.getAttribute("scope").isEmpty()));
    }

    /** The uncertainty to two digits and the value to the same place: GUM (JCGM 100), 7.2.2, m = 100.021 47(35) g. */
    @Test
    void uncertain_isRoundedAsTheGumHasIt() {
        assertEquals("100.02147 ± 0.00035 g", Figures.uncertain(100.0214683, 0.000352, " g"));
        assertEquals("1234 ± 120 px", Figures.uncertain(1234.4, 123.4, " px"));
        assertEquals("−0.30 ± 0.21°", Figures.uncertain(-0.3, 0.21, "°"));
        assertEquals("0.0 ± 1.0", Figures.uncertain(-0.001, 0.996, ""));
        assertEquals("5.00 (uncertainty not known)", Figures.uncertain(5, Double.NaN, ""));
    }

    /** 200 kV: 0.02508 Å (Williams, table of wavelengths, from memory). */
    @Test
    void html_saysInstrumentAndSolution() throws Exception {
        Document page = parse(full("polonium").toHtml());
        assertEquals("200 kV", definition(page, "Voltage"));
        assertEquals("0.02508 Å", definition(page, "Wavelength"));
        assertEquals("500.00 ± 0.35 px·Å", definition(page, "Camera constant"));
        assertEquals("none", definition(page, "Ellipse"));
        assertEquals("no, as told", definition(page, "Image is mirrored"));
        assertEquals("0.00000 ± 0.00035°, azimuth of 200", definition(page, "Rotation"));
        assertEquals("512.000 ± 0.012, 512.000 ± 0.014 px", definition(page, "Centre x, y"));
        assertEquals("3 of 3 measured spots", definition(page, "Explained"));
        assertEquals("1: −400 ", definition(page, "Missing"));
        assertEquals("P m -3 m, No. 221", definition(page, "Space group"));
        assertEquals("0123456789abcdef".repeat(4), definition(page, "SHA-256 of the pixels"));
    }

    /** R·d = λL (Hirsch, Williams): 4/2 Å at 250 px, 4/√2 Å at 176.78 px. */
    @Test
    void html_spotsHaveTheirSpacings() throws Exception {
        List<String> cells = new ArrayList<>();
        all(parse(full("polonium").toHtml()), "tbody").forEach(body -> {
            for (Element row : all(body, "tr")) {
                for (int i = 0; i < row.getChildNodes().getLength(); i++) {
                    cells.add(row.getChildNodes().item(i).getTextContent().strip());
                }
            }
        });
        cells.removeIf(String::isEmpty);
        assertEquals(
                List.of(
                        "01−1", "2.828", "2.828", "0.50", "200", "2.000", "2.000", "0.50", "−200", "2.000", "2.000",
                        "0.50"),
                cells);
    }

    /**
     * The computed places lie 0.5 px right of the measured ones and 306 px apart. Arrows may be as long: 306/0.5 rounds down
     * to 500 times, and 306/500 to a bar of 0.5 px.
     */
    @Test
    void html_drawsResiduals() throws Exception {
        Document page = parse(full("polonium").toHtml());
        Element drawing = all(page, "svg").get(0);
        assertEquals("Residuals of 3 spots as arrows, 500 times as long", drawing.getAttribute("aria-label"));
        assertTrue(drawing.getParentNode().getTextContent().contains("Residual × 500"));
        assertTrue(drawing.getParentNode().getTextContent().contains("is 0.5 px"));
        assertEquals(3, all(page, "circle").size());
        assertEquals(5, all(page, "path").size(), "three arrows, the centre and the arrow of the scale");
    }

    @Test
    void html_negativeIndices_haveABar() {
        String html = new Markup().indices(1, -12, 0).toString();
        assertTrue(html.contains("<span class=\"bar\">12</span>"), html);
        assertEquals("1\u2009−12\u20090", html.replaceAll("<[^>]*>", ""));
    }

    @Test
    void html_halfTurnAndOthers_areAlternatives() throws Exception {
        Random random = new Random(8);
        Solution best = FitSamples.ordinary();
        Solution other = FitSamples.solution(FitSamples.placement(FitSamples.NICKEL, random), 4, 1, random);
        Solution mated = new Solution(
                best.placement(),
                best.matches(),
                best.unexplained(),
                best.rmsResidual(),
                best.score(),
                best.errors(),
                Optional.of(best.placement().turnedBy(Math.PI).orientation()));
        String html = FitReport.of(FitDocument.of(mated))
                .withSolutions(List.of(mated, other))
                .toHtml();
        String text = parse(html).getDocumentElement().getTextContent();
        assertTrue(text.contains("Half a turn about the zone axis"), text);
        assertTrue(text.contains("4 explained"), text);
        assertTrue(text.contains("Open: only 3 spots are explained"), text);
    }

    /** The {1 1 1} twin is 60° about [1 1 1], Σ3 (textbook). */
    @Test
    void html_findings_areTold() throws Exception {
        Solution s = FitSamples.ordinary();
        FitDocument plainly = FitDocument.of(new Solution(
                s.placement(), s.matches(), s.unexplained(), s.rmsResidual(), s.score(), s.errors(), Optional.empty()));
        FitDocument document = plainly.withFindings(FitSamples.findings());
        String text =
                parse(FitReport.of(document).toHtml()).getDocumentElement().getTextContent();
        assertTrue(text.contains("Further crystals") && text.contains("[−110] of nickel"), text);
        assertTrue(text.contains("4 explained, 2 of them shared; turned by 60.00° about [1 1 1]"), text);
        assertTrue(text.contains("twin on (1 1 1), 0.00° off; Σ3"), text);
        assertTrue(text.contains("What tells apart") && text.contains("Tilt by 12.3°"), text);
        String plain =
                parse(FitReport.of(plainly).toHtml()).getDocumentElement().getTextContent();
        assertFalse(plain.contains("Further crystals") || plain.contains("tells apart"), plain);
    }

    @Test
    void html_laidByHand_claimsNoFit() throws Exception {
        String html = FitReport.of(FitDocument.of(FitSamples.placement(FitSamples.NICKEL, new Random(3))))
                .toHtml();
        String text = parse(html).getDocumentElement().getTextContent();
        assertTrue(text.contains("no fit stands behind"), text);
        assertFalse(text.contains("Residual"), text);
    }

    @Test
    void withPicture_noPng_isRefused() {
        FitReport report = FitReport.of(FitDocument.of(FitSamples.ordinary()));
        String said = assertThrows(IllegalArgumentException.class, () -> report.withPicture(new byte[] {1, 2}))
                .getMessage();
        assertTrue(said.contains("2 bytes") && said.contains("PNG"), said);
    }

    @Test
    void write_isUtf8(@TempDir Path folder) throws IOException {
        Path file = folder.resolve("report.html");
        full("Pölönium").write(file);
        assertEquals(full("Pölönium").toHtml(), Files.readString(file, StandardCharsets.UTF_8));
    }
}
