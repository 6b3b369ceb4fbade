package io.github.zonewright.calibration;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import java.util.Arrays;
import java.util.Random;
import org.junit.jupiter.api.Test;

class RingFinderTest {
    private static MeasuredRings find(PowderImage powder, long seed) {
        return RingFinder.withDefaults().find(powder.draw(seed));
    }

    private static void assertRings(PowderImage powder, MeasuredRings found, double tolerance) {
        assertRings(powder, found, tolerance, 0, 1, 2, 3, 4, 5);
    }

    private static void assertRings(PowderImage powder, MeasuredRings found, double tolerance, int... lines) {
        for (int k : lines) {
            double expected = powder.radius(powder.a / Math.sqrt(powder.lines[k][0]));
            double nearest = found.rings().stream()
                    .mapToDouble(r -> Math.abs(r.radius().value() - expected))
                    .min()
                    .orElseThrow();
            assertEquals(0, nearest, tolerance, "ring " + k + " at " + expected + " px");
        }
        RingShape shape = found.shape().orElseThrow();
        assertEquals(powder.x, shape.ellipse().centre().x(), tolerance);
        assertEquals(powder.y, shape.ellipse().centre().y(), tolerance);
        assertEquals(powder.ratio, shape.ellipse().ratio(), 0.003);
    }

    @Test
    void find_ringsBehindStop_haveRadiiAndShape() {
        PowderImage powder = new PowderImage();
        MeasuredRings found = find(powder, 1);
        assertRings(powder, found, 0.25);
        assertEquals(powder.sigma, found.ringSigma(), 0.5);
        assertTrue(found.rings().get(0).arcs() < 1);
        assertTrue(found.rings().get(0).arcs() > 0.8);
    }

    @Test
    void find_texturedRings_haveRadiiAndShape() {
        PowderImage powder = new PowderImage();
        powder.texture = 0.9;
        assertRings(powder, find(powder, 2), 0.25);
    }

    @Test
    void find_ringsOfSingleGrains_haveRadiiAndShape() {
        PowderImage powder = new PowderImage();
        powder.spotty = true;
        MeasuredRings found = find(powder, 3);
        // The faint 222 beside 311 is lost among the grains.
        assertRings(powder, found, 0.4, 0, 1, 2, 3, 5);
    }

    @Test
    void find_circlesWithoutStop_haveRatioNearOne() {
        PowderImage powder = new PowderImage();
        powder.stop = false;
        powder.ratio = 1;
        MeasuredRings found = find(powder, 4);
        assertRings(powder, found, 0.25);
        assertEquals(1, found.shape().orElseThrow().ellipse().ratio(), 5e-4);
    }

    @Test
    void find_centreFarFromTheMiddle_isFound() {
        PowderImage powder = new PowderImage();
        powder.x = 90;
        powder.y = 400;
        powder.azimuth = Math.toRadians(-60);
        assertRings(powder, find(powder, 5), 0.3);
    }

    @Test
    void find_centreGiven_isTheSame() {
        PowderImage powder = new PowderImage();
        GrayImage image = powder.draw(6);
        assertRings(
                powder,
                RingFinder.withDefaults()
                        .withCentreNear(new PixelPoint(247, 266))
                        .find(image),
                0.25);
    }

    @Test
    void find_maskedHalf_usesTheRest() {
        PowderImage powder = new PowderImage();
        Mask left = Mask.of(powder.size, powder.size, i -> i % powder.size < 200);
        MeasuredRings found = RingFinder.withDefaults().withMask(left).find(powder.draw(7));
        assertRings(powder, found, 0.3);
        assertTrue(found.rings().get(2).arcs() < 0.75);
    }

    @Test
    void find_imageThatIsBinned_givesPixelsAsGiven() {
        PowderImage powder = new PowderImage();
        powder.size = 2200;
        powder.x = 1090;
        powder.y = 1120;
        powder.constant = 950;
        powder.sigma = 8;
        assertRings(powder, find(powder, 8), 0.5);
    }

    @Test
    void find_noiseOrNothing_hasNoRings() {
        Random random = new Random(9);
        float[] noise = new float[256 * 256];
        for (int i = 0; i < noise.length; i++) {
            noise[i] = (float) (100 + 10 * random.nextGaussian());
        }
        assertTrue(RingFinder.withDefaults()
                .find(GrayImage.ofFloats(256, 256, noise))
                .rings()
                .isEmpty());
        Arrays.fill(noise, 7);
        assertTrue(RingFinder.withDefaults()
                .find(GrayImage.ofFloats(256, 256, noise))
                .rings()
                .isEmpty());
        Arrays.fill(noise, Float.NaN);
        assertTrue(RingFinder.withDefaults()
                .find(GrayImage.ofFloats(256, 256, noise))
                .rings()
                .isEmpty());
    }

    @Test
    void find_maskOfAnotherFrame_isRefused() {
        RingFinder finder = RingFinder.withDefaults().withMask(Mask.none(10, 10));
        GrayImage image = GrayImage.ofFloats(64, 64, new float[64 * 64]);
        assertThrows(IllegalArgumentException.class, () -> finder.find(image));
    }
}
