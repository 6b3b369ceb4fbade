package io.github.zonewright.imagej.overlay;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SolutionErrors;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.awt.Color;
import java.awt.image.BufferedImage;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import javax.swing.JLabel;
import org.junit.jupiter.api.Test;

class SolutionPictureTest {
    private static final int SIDE = 120;

    private static MeasuredSpot spot(PixelPoint at) {
        return new MeasuredSpot(at, 0.1, 100, 20, false);
    }

    /** Copper along [110] with its strongest spots found, and one measured spot more at the edge right of the centre. */
    private static Solution solution(Placement laid, double reach) {
        PixelPoint centre = laid.camera().centre();
        List<PlacedSpot> computed = new ViewMaker(TestPatterns.SIDE, TestPatterns.SIDE)
                .ofPlacement(laid, Optional.empty(), 500, false)
                .computed();
        List<SpotMatch> matches = computed.stream()
                .filter(s -> s.position().distanceTo(centre) < 0.8 * reach)
                .map(s -> new SpotMatch(spot(s.position()), s.spot().hkl(), s.position()))
                .toList();
        return new Solution(
                laid,
                matches,
                List.of(spot(centre.plus(new Vector2(reach, 0)))),
                0,
                100,
                new SolutionErrors(0, 0, 0, 0, 0, 0),
                Optional.empty());
    }

    /** The picture spans 1.08 of the farthest measured spot's distance to each side of the centre. */
    @Test
    void of_showsComputedMeasuredAndUnexplained() {
        Placement laid = TestPatterns.copper110();
        PixelPoint centre = laid.camera().centre();
        double reach = 0.45 * TestPatterns.SIDE;
        Solution solution = solution(laid, reach);
        BufferedImage picture = SolutionPicture.of(solution, 500, SIDE);
        assertEquals(SIDE, picture.getWidth());
        double scale = SIDE / 2.0 / (1.08 * reach);
        assertEquals(new Color(0x101010), new Color(picture.getRGB(1, 1)));
        assertTrue(solution.matches().size() >= 4, "spots to look at");
        for (SpotMatch match : solution.matches()) {
            Vector2 from = match.computed().minus(centre).times(scale);
            Color there = new Color(picture.getRGB((int) (SIDE / 2.0 + from.x()), (int) (SIDE / 2.0 + from.y())));
            assertTrue(there.getRed() > 150, match + ": " + there);
        }
        Color centreColour = new Color(picture.getRGB(SIDE / 2, SIDE / 2));
        assertTrue(centreColour.getRed() > centreColour.getBlue() + 80, "a yellow cross, " + centreColour);
        boolean amber = false;
        for (int x = (int) (SIDE / 2.0 + 0.8 * scale * reach); x < SIDE; x++) {
            Color there = new Color(picture.getRGB(x, SIDE / 2));
            amber |= there.getRed() > there.getBlue() + 80;
        }
        assertTrue(amber, "a diamond about the spot that nothing explains");
    }

    /** Where spots lie is seen without colour: the strongest computed disc is brighter than a measured spot's rim. */
    @Test
    void of_isReadableInGrey() {
        Placement laid = TestPatterns.copper110();
        double reach = 0.45 * TestPatterns.SIDE;
        Solution solution = solution(laid, reach);
        BufferedImage picture = SolutionPicture.of(solution, 500, SIDE);
        double scale = SIDE / 2.0 / (1.08 * reach);
        SpotMatch near = solution.matches().stream()
                .min(Comparator.comparingDouble(
                        m -> m.computed().distanceTo(laid.camera().centre())))
                .orElseThrow();
        Vector2 from = near.computed().minus(laid.camera().centre()).times(scale);
        int y = (int) (SIDE / 2.0 + from.y());
        int middle = new Color(picture.getRGB((int) (SIDE / 2.0 + from.x()), y)).getGreen();
        boolean rim = false;
        for (int dx = 1; dx < 9; dx++) {
            int there = new Color(picture.getRGB((int) (SIDE / 2.0 + from.x()) - dx, y)).getGreen();
            rim |= there > 60 && there < middle - 80;
        }
        assertTrue(rim, "a faint rim about " + middle);
    }

    @Test
    void zoneIcon_isWiderForMoreDigits() {
        ZoneIcon three = new ZoneIcon(new Uvw(1, 1, 0), 13);
        assertTrue(new ZoneIcon(new Uvw(10, 1, 3), 13).getIconWidth() > three.getIconWidth());
        assertTrue(new ZoneIcon(new Uvw(-1, 1, 0), 13).getIconHeight() >= three.getIconHeight());
        BufferedImage drawn = new BufferedImage(80, 40, BufferedImage.TYPE_INT_RGB);
        JLabel on = new JLabel();
        on.setForeground(Color.WHITE);
        three.paintIcon(on, drawn.createGraphics(), 2, 2);
        int lit = 0;
        for (int x = 0; x < 80; x++) {
            for (int y = 0; y < 40; y++) {
                lit += (drawn.getRGB(x, y) & 0xFF) > 128 ? 1 : 0;
            }
        }
        assertTrue(lit > 30, lit + " px");
    }
}
