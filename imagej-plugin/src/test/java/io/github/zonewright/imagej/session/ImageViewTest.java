package io.github.zonewright.imagej.session;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.io.FileSaver;
import ij.process.ImageProcessor;
import ij.process.LUT;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import java.awt.Color;
import java.awt.image.BufferedImage;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class ImageViewTest {
    private static ImagePlus image(int bits) {
        ImageProcessor pixels = TestPatterns.pixels(TestPatterns.copper110());
        pixels.setMinAndMax(180, 4321);
        ImageProcessor typed = bits == 8 ? pixels.convertToByte(true) : bits == 32 ? pixels.convertToFloat() : pixels;
        ImagePlus image = new ImagePlus("pattern", typed);
        image.setDisplayRange(bits == 8 ? 7 : 150, bits == 8 ? 200 : 5000);
        return image;
    }

    private static byte[] saved(ImagePlus image) {
        return new FileSaver(image).serialize();
    }

    private static int shown(ImagePlus image, int x, int y) {
        return new Color(image.getProcessor().convertToRGB().getPixel(x, y)).getGreen();
    }

    /** The file of the image after a view is the file of before, byte by byte; and no pixel is touched while it lasts. */
    @ParameterizedTest
    @ValueSource(ints = {8, 16, 32})
    void asItIs_isExactlyAsBefore(int bits) {
        ImagePlus image = image(bits);
        byte[] before = saved(image);
        Fingerprint user = Fingerprint.of(image);
        BufferedImage seen = image.getBufferedImage();
        for (ImageView view : ImageView.values()) {
            view.show(image);
            assertEquals(view, ImageView.of(image));
            user.assertSameButDisplay(image);
        }
        ImageView.AS_IT_IS.show(image);
        user.assertSame(image);
        assertArrayEquals(before, saved(image));
        assertFalse(image.changes);
        assertEquals(seen.getRGB(130, 125), image.getBufferedImage().getRGB(130, 125));
        assertEquals(seen.getRGB(5, 5), image.getBufferedImage().getRGB(5, 5));
    }

    /** A logarithm lifts weak spots: a grey value a tenth of the way up is shown above half. */
    @ParameterizedTest
    @ValueSource(ints = {16, 32})
    void logarithmic_liftsWhatIsWeak(int bits) {
        ImagePlus image = image(bits);
        ImageView.LOGARITHMIC.show(image);
        double min = image.getProcessor().getMin();
        double max = image.getProcessor().getMax();
        ImageProcessor ramp = image.getProcessor().duplicate();
        ramp.setMinAndMax(min, max);
        ramp.setf(0, (float) (min + 0.1 * (max - min)));
        int lifted = new Color(ramp.convertToRGB().getPixel(0, 0)).getGreen();
        assertTrue(lifted > 110, "" + lifted);
        ImageView.LOGARITHMIC_INVERTED.show(image);
        ramp.setColorModel(image.getProcessor().getColorModel());
        ramp.setMinAndMax(min, max);
        assertEquals(255 - lifted, new Color(ramp.convertToRGB().getPixel(0, 0)).getGreen());
    }

    @Test
    void inverted_isTheOtherWayRound() {
        ImagePlus image = image(16);
        int dark = shown(image, 5, 5);
        int bright = shown(image, 130, 125);
        ImageView.INVERTED.show(image);
        assertEquals(255 - dark, shown(image, 5, 5));
        assertEquals(255 - bright, shown(image, 130, 125));
    }

    /** Who chooses another table while the view lasts keeps it. */
    @Test
    void otherTableMeanwhile_stays() {
        ImagePlus image = image(16);
        ImageView.LOGARITHMIC.show(image);
        image.setLut(LUT.createLutFromColor(Color.RED));
        assertEquals(ImageView.AS_IT_IS, ImageView.of(image));
        byte[] chosen = saved(image);
        ImageView.AS_IT_IS.show(image);
        assertArrayEquals(chosen, saved(image));
    }

    @Test
    void colour_isRefused() {
        ImagePlus image = new ImagePlus("c", image(16).getProcessor().convertToRGB());
        String message = assertThrows(IllegalArgumentException.class, () -> ImageView.LOGARITHMIC.show(image))
                .getMessage();
        assertTrue(message.contains("in colour") && message.contains("expected"), message);
    }

    @Test
    void threshold_isRefused_andStays() {
        ImagePlus image = image(16);
        image.getProcessor().setThreshold(300, 900, ImageProcessor.RED_LUT);
        assertThrows(IllegalArgumentException.class, () -> ImageView.INVERTED.show(image));
        assertEquals(300, image.getProcessor().getMinThreshold());
    }
}
