package io.github.zonewright.imagej.overlay;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.process.ByteProcessor;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import java.awt.image.BufferedImage;
import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.util.Optional;
import javax.imageio.ImageIO;
import org.junit.jupiter.api.Test;

class PatternPictureTest {
    private static BufferedImage picture(ImagePlus image, PatternView view) throws IOException {
        return ImageIO.read(new ByteArrayInputStream(PatternPicture.png(image, view)));
    }

    private static PatternView view() {
        return new ViewMaker(TestPatterns.SIDE, TestPatterns.SIDE)
                .ofPlacement(TestPatterns.copper110(), Optional.empty(), 500, true);
    }

    @Test
    void png_changesNothing() throws IOException {
        ImagePlus image = TestPatterns.imageOfUser();
        Fingerprint before = Fingerprint.of(image);
        picture(image, view());
        before.assertSame(image);
        assertEquals(0, PatternOverlay.count(image));
    }

    /** The marks lie where the pattern lies: the centre mark of yellow on the stretched place of the centre. */
    @Test
    void png_marksLieOnTheStretchedImage() throws IOException {
        BufferedImage picture = picture(new ImagePlus("black", new ByteProcessor(256, 256)), view());
        assertEquals(700, picture.getWidth());
        PixelPoint centre = TestPatterns.copper110().camera().centre();
        double scale = 700 / 256.0;
        double x = 0;
        double y = 0;
        int yellow = 0;
        for (int row = (int) (scale * centre.y()) - 25; row < scale * centre.y() + 25; row++) {
            for (int column = (int) (scale * centre.x()) - 25; column < scale * centre.x() + 25; column++) {
                if ((picture.getRGB(column, row) & 0xFFFFFF) == 0xF0E442) {
                    x += column + 0.5;
                    y += row + 0.5;
                    yellow++;
                }
            }
        }
        assertTrue(yellow > 20, "yellow px: " + yellow);
        assertEquals(scale * centre.x(), x / yellow, 3);
        assertEquals(scale * centre.y(), y / yellow, 3);
    }

    @Test
    void png_largeImage_isMadeSmaller() throws IOException {
        BufferedImage picture = picture(
                new ImagePlus("large", new ByteProcessor(2400, 1200)),
                PatternView.ofMeasured(java.util.Optional.empty()));
        assertEquals(1200, picture.getWidth());
        assertEquals(600, picture.getHeight());
    }

    @Test
    void png_isTheImageAsDisplayed() throws IOException {
        ImagePlus image = new ImagePlus("grey", new ij.process.ShortProcessor(800, 800));
        image.getProcessor().setColor(500);
        image.getProcessor().fill();
        image.setDisplayRange(0, 1000);
        int shown = picture(image, PatternView.ofMeasured(java.util.Optional.empty()))
                        .getRGB(400, 400)
                & 0xFF;
        assertEquals(127.5, shown, 1);
    }
}
