package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.measure.ResultsTable;
import ij.process.ByteProcessor;
import ij.process.ColorProcessor;
import ij.process.FloatProcessor;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.bridge.NetTable;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.spots.MeasuredSpot;
import io.github.zonewright.spots.SpotNet;
import io.github.zonewright.spots.SpotNetFinder;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.junit.jupiter.api.Test;

/** The net as a macro measures it, with no display. */
class MeasureNetTest {
    private static final String NET = "command.MeasureNet";

    /**
     * Copper along [110]: the shortest vectors of the net are 1 −1 1 and 1 −1 −1 (d = a/√3), at acos(1/3) = 70.53°, since the
     * square of their difference 0 0 2 is 4 of 3 + 3 − 2·3·cos.
     */
    @Test
    void copper110_netOfTwoElevens() {
        ImagePlus image = TestPatterns.imageOfUser();
        Fingerprint before = Fingerprint.of(image);
        String answer = answer(image);
        double length = TestPatterns.CONSTANT * Math.sqrt(3) / 3.615;
        assertEquals(length, number(answer, "a ([\\d.]+) ± "), 0.01 * length);
        assertEquals(1, number(answer, "b/a ([\\d.]+) ± "), 0.01);
        assertEquals(70.53, number(answer, "angle ([\\d.]+) ± "), 0.5);
        before.assertSame(image);
        assertEquals(0, PatternOverlay.count(image));
    }

    @Test
    void spotsOnOneLine_areARow() {
        String answer = answer(image(new double[][] {{28, 100}, {64, 100}, {100, 100}, {136, 100}, {172, 100}}));
        assertEquals(36, number(answer, "Row: spacing ([\\d.]+) ± "), 0.1);
        assertTrue(answer.contains("Nothing is known across a row."), answer);
    }

    @Test
    void table_hasEverySpot() {
        List<MeasuredSpot> spots = new ArrayList<>(List.of(spot(33, 17)));
        for (int i = 0; i < 20; i++) {
            spots.add(spot(20 * (i % 5), 25 * (i / 5)));
        }
        SpotNet net = SpotNetFinder.find(spots);
        ResultsTable table = NetTable.of(net, spots);
        assertEquals(21, table.size());
        assertEquals("no", table.getStringValue("off net", 0));
        assertEquals(0, table.getValue("residual (px)", 0), 1e-6);
        assertEquals("yes", table.getStringValue("off net", 20));
        assertEquals(33, table.getValue("x (px)", 20));
        assertTrue(Double.isNaN(table.getValue("n1", 20)));
        assertEquals(21, table.getValue("spot", 20));
    }

    @Test
    void table_withoutNet_listsTheSpots() {
        List<MeasuredSpot> spots = List.of(spot(5, 6));
        ResultsTable table = NetTable.of(new SpotNet.NoNet("too few"), spots);
        assertEquals(1, table.size());
        assertEquals("yes", table.getStringValue("off net", 0));
    }

    @Test
    void noSpots_isRefused() {
        for (ImagePlus image : List.of(
                new ImagePlus("blank", new ByteProcessor(64, 64)),
                new ImagePlus("blank colour", new ColorProcessor(64, 64)),
                new ImagePlus("1 x 1", new ByteProcessor(1, 1)))) {
            Fingerprint before = Fingerprint.of(image);
            Optional<String> said = Launching.macro(image, NET, "table=false");
            assertTrue(said.orElse("").startsWith("Spots: "), image.getTitle() + said);
            before.assertSame(image);
        }
        assertTrue(Launching.macro(null, NET, "table=false").orElse("").contains("o image is open"));
    }

    private static MeasuredSpot spot(double x, double y) {
        return new MeasuredSpot(new PixelPoint(x, y), 0.05, 100, 20, false);
    }

    private static ImagePlus image(double[][] spots) {
        Random noise = new Random(5);
        FloatProcessor pixels = new FloatProcessor(200, 200);
        for (int y = 0; y < 200; y++) {
            for (int x = 0; x < 200; x++) {
                double value = 100 + 5 * noise.nextGaussian();
                for (double[] s : spots) {
                    double r = Math.hypot(x + 0.5 - s[0], y + 0.5 - s[1]) / 1.8;
                    value += (s[0] == 100 ? 9000 : 2000) * Math.exp(-r * r / 2);
                }
                pixels.setf(x, y, (float) value);
            }
        }
        return new ImagePlus("row", pixels);
    }

    private static String answer(ImagePlus image) {
        MeasureNet command = new MeasureNet();
        List<CommandParameter> parameters = CommandParameter.of(command);
        parameters.forEach(p -> p.fillImage(image));
        command.run();
        assertFalse(command.isCanceled(), command.getCancelReason());
        return parameters.stream()
                .filter(p -> p.name().equals("answer"))
                .findFirst()
                .orElseThrow()
                .text();
    }

    private static double number(String answer, String pattern) {
        Matcher matcher = Pattern.compile(pattern).matcher(answer);
        assertTrue(matcher.find(), answer);
        return Double.parseDouble(matcher.group(1));
    }
}
