package io.github.zonewright;

import io.github.zonewright.image.GrayImage;
import java.awt.image.DataBuffer;
import java.awt.image.Raster;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import javax.imageio.ImageIO;

/** Images for tests: TIFF files read with the JDK's own reader. */
public final class TestImages {

    private TestImages() {}

    /** A file of the project's test data, whether the tests run in the module or above it. */
    public static Path testData(String name) {
        Path above = Path.of("..", "testdata", name);
        return Files.exists(above) ? above : Path.of("testdata", name);
    }

    /** Reads a grey TIFF file of 8, 16 or 32 bit. */
    public static GrayImage read(Path file) {
        try {
            Raster raster = ImageIO.read(file.toFile()).getRaster();
            int width = raster.getWidth();
            int height = raster.getHeight();
            float[] values = raster.getSamples(0, 0, width, height, 0, new float[width * height]);
            return switch (raster.getDataBuffer().getDataType()) {
                case DataBuffer.TYPE_BYTE -> GrayImage.ofUnsignedBytes(width, height, bytes(values));
                case DataBuffer.TYPE_USHORT -> GrayImage.ofUnsignedShorts(width, height, shorts(values));
                default -> GrayImage.ofFloats(width, height, values);
            };
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    private static byte[] bytes(float[] values) {
        byte[] result = new byte[values.length];
        for (int i = 0; i < result.length; i++) {
            result[i] = (byte) (int) values[i];
        }
        return result;
    }

    private static short[] shorts(float[] values) {
        short[] result = new short[values.length];
        for (int i = 0; i < result.length; i++) {
            result[i] = (short) (int) values[i];
        }
        return result;
    }
}
