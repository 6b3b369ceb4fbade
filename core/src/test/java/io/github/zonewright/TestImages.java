package io.github.zonewright;

import io.github.zonewright.image.GrayImage;
import java.awt.image.DataBuffer;
import java.awt.image.Raster;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import javax.imageio.ImageIO;
import javax.imageio.ImageReader;
import javax.imageio.stream.ImageInputStream;

/** Images for tests: TIFF files read with the JDK's own reader, and simple patterns drawn from a formula. */
public final class TestImages {

    private TestImages() {}

    /** Reads a grey TIFF file of 8, 16 or 32 bit. */
    public static GrayImage read(Path file) {
        ImageReader reader = ImageIO.getImageReadersByFormatName("tiff").next();
        try (ImageInputStream stream = ImageIO.createImageInputStream(Files.newInputStream(file))) {
            reader.setInput(stream);
            Raster raster = reader.readRaster(0, null);
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
        } catch (UnsupportedOperationException e) {
            return readByImage(file);
        } finally {
            reader.dispose();
        }
    }

    private static GrayImage readByImage(Path file) {
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
