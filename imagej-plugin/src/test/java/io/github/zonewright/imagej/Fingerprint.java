package io.github.zonewright.imagej;

import static org.junit.jupiter.api.Assertions.assertEquals;

import ij.ImagePlus;
import ij.gui.Overlay;
import ij.gui.Roi;
import ij.io.RoiEncoder;
import ij.measure.Calibration;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import java.nio.ByteBuffer;
import java.nio.charset.StandardCharsets;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;

/**
 * SHA-256 over all that belongs to the user of an image: the pixels of every slice, the selection, the calibration, the
 * overlay elements that are not ours, in their order, and how the grey values are displayed.
 *
 * @param pixels hash of the pixels
 * @param selection hash of the selection
 * @param calibration hash of the local calibration
 * @param foreign hash of the foreign overlay elements
 * @param display hash of the look-up table and the display range
 */
public record Fingerprint(String pixels, String selection, String calibration, String foreign, String display) {
    /** Takes it. */
    public static Fingerprint of(ImagePlus image) {
        MessageDigest pixels = sha256();
        for (int slice = 1; slice <= image.getStackSize(); slice++) {
            Object values = image.getStackSize() == 1
                    ? image.getProcessor().getPixels()
                    : image.getStack().getPixels(slice);
            pixels.update(bytes(values));
        }
        MessageDigest selection = sha256();
        Roi roi = image.getRoi();
        selection.update(roi == null ? new byte[0] : RoiEncoder.saveAsByteArray(roi));
        Calibration c = image.getLocalCalibration();
        String calibration = c.pixelWidth + " " + c.pixelHeight + " " + c.getXUnit() + " " + c.getYUnit() + " "
                + c.xOrigin + " " + c.yOrigin + " " + c.getInvertY() + " " + c.getFunction();
        MessageDigest foreign = sha256();
        Overlay overlay = image.getOverlay();
        for (int i = 0; overlay != null && i < overlay.size(); i++) {
            if (!PatternOverlay.isOurs(overlay.get(i))) {
                foreign.update(RoiEncoder.saveAsByteArray(overlay.get(i)));
            }
        }
        MessageDigest calibrated = sha256();
        calibrated.update(calibration.getBytes(StandardCharsets.UTF_8));
        return new Fingerprint(hex(pixels), hex(selection), hex(calibrated), hex(foreign), display(image));
    }

    private static String display(ImagePlus image) {
        MessageDigest display = sha256();
        display.update((image.getDisplayRangeMin() + " " + image.getDisplayRangeMax() + " " + image.isInvertedLut())
                .getBytes(StandardCharsets.UTF_8));
        if (image.getType() != ImagePlus.COLOR_RGB) {
            display.update(image.getProcessor().getLut().getBytes());
        }
        return hex(display);
    }

    /** Checks that an image is as it was. */
    public void assertSame(ImagePlus image) {
        assertEquals(this, of(image));
    }

    /** Checks that an image is as it was, but for how its grey values are displayed. */
    public void assertSameButDisplay(ImagePlus image) {
        Fingerprint now = of(image);
        assertEquals(this, new Fingerprint(now.pixels, now.selection, now.calibration, now.foreign, display));
    }

    private static byte[] bytes(Object values) {
        if (values instanceof byte[] b) {
            return b;
        }
        if (values instanceof short[] s) {
            ByteBuffer buffer = ByteBuffer.allocate(2 * s.length);
            buffer.asShortBuffer().put(s);
            return buffer.array();
        }
        if (values instanceof float[] f) {
            ByteBuffer buffer = ByteBuffer.allocate(4 * f.length);
            buffer.asFloatBuffer().put(f);
            return buffer.array();
        }
        int[] rgb = (int[]) values;
        ByteBuffer buffer = ByteBuffer.allocate(4 * rgb.length);
        buffer.asIntBuffer().put(rgb);
        return buffer.array();
    }

    private static MessageDigest sha256() {
        try {
            return MessageDigest.getInstance("SHA-256");
        } catch (NoSuchAlgorithmException e) {
            throw new IllegalStateException(e);
        }
    }

    private static String hex(MessageDigest digest) {
        return HexFormat.of().formatHex(digest.digest());
    }
}
