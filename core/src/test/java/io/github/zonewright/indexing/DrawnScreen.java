package io.github.zonewright.indexing;

import io.github.zonewright.SyntheticPattern;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.PixelPoint;
import java.util.List;
import java.util.Random;

/** The detector of a {@link DrawnScene}: glow, rings and direct beam, a beam stop, and what the electronics do to counts. */
record DrawnScreen(
        DrawnScene.Look look,
        PixelPoint centre,
        double background,
        double glow,
        double glowRadius,
        double ring,
        double direct,
        double stopAzimuth,
        double stopWidth,
        double gain,
        boolean bytes,
        int hot,
        int dead,
        boolean blooms) {

    static DrawnScreen random(Random random, double flaws, DrawnScene.Look look, PixelPoint centre) {
        int side = Math.min(look.width(), look.height());
        boolean stop = random.nextDouble() < Math.max(0.1, 0.7 * flaws);
        boolean bytes = random.nextBoolean();
        double background = 0.5 + 6 * random.nextDouble();
        double direct = look.peak() * 10 * Math.exp(3 * random.nextDouble());
        double brightest = Math.min(look.peak(), 4000);
        return new DrawnScreen(
                look,
                centre,
                background,
                look.peak() * (0.1 + 0.4 * random.nextDouble()),
                side * (0.03 + 0.06 * random.nextDouble()),
                random.nextDouble() < flaws ? background * (0.5 + random.nextDouble()) : 0,
                direct,
                2 * Math.PI * random.nextDouble(),
                stop ? side * (0.02 + 0.02 * random.nextDouble()) : 0,
                bytes
                        ? 255 / (brightest * (0.6 + 0.8 * random.nextDouble()) + 3 * background)
                        : 1 + 4 * random.nextDouble(),
                bytes,
                random.nextDouble() < flaws ? 2 + random.nextInt(12) : 0,
                random.nextDouble() < 0.4 * flaws ? 1 + random.nextInt(2) : 0,
                random.nextInt(6) == 0);
    }

    String tags() {
        return (stopWidth > 0 ? " stop" : "") + (hot > 0 ? " hot" : "") + (dead > 0 ? " dead" : "")
                + (ring > 0 ? " ring" : "") + (bytes ? " 8bit" : "") + (blooms && stopWidth == 0 ? " bloom" : "") + " "
                + look.width() + String.format(java.util.Locale.ROOT, " σ%.1f peak %.0f", look.sigma(), look.peak());
    }

    boolean isInside(double x, double y) {
        return x > 1 && y > 1 && x < look.width() - 1 && y < look.height() - 1;
    }

    private double under(double x, double y) {
        double r = Math.hypot(x - centre.x(), y - centre.y());
        double side = Math.min(look.width(), look.height());
        double ringAt = (r - 0.22 * side) / (0.035 * side);
        return background
                + glow / Math.pow(1 + r * r / (glowRadius * glowRadius), 1.5)
                + ring * Math.exp(-0.5 * ringAt * ringAt);
    }

    private boolean isStopped(double x, double y, double margin) {
        double c = Math.cos(stopAzimuth);
        double s = Math.sin(stopAzimuth);
        double along = (x - centre.x()) * c + (y - centre.y()) * s;
        double across = (y - centre.y()) * c - (x - centre.x()) * s;
        return stopWidth > 0 && along > -stopWidth - margin && Math.abs(across) < stopWidth + margin;
    }

    SyntheticPattern electrons(List<DrawnScene.Spot> spots) {
        SyntheticPattern drawn = new SyntheticPattern(look.width(), look.height(), 0).add(this::under);
        spot(drawn, centre.x(), centre.y(), direct);
        spots.forEach(s -> spot(drawn, s.x(), s.y(), s.peak()));
        if (blooms && stopWidth == 0) {
            double reach = 0.3 * look.height();
            drawn.add((x, y) -> Math.abs(x - centre.x()) < 3 && Math.abs(y - centre.y()) < reach ? direct : 0);
        }
        return drawn.times((x, y) -> isStopped(x, y, 0) ? 0.02 : 1);
    }

    private void spot(SyntheticPattern drawn, double x, double y, double peak) {
        if (look.radius() > 0) {
            drawn.disc(x, y, look.radius(), peak);
        } else {
            drawn.spot(x, y, look.sigma(), peak);
        }
    }

    /** Whether a spot stands out: six times its noise, a share of the background, off stop and direct beam. */
    boolean shows(DrawnScene.Spot s) {
        double b = under(s.x(), s.y());
        double wide = look.radius() > 0 ? look.radius() : look.sigma();
        double read = bytes ? 0.4 / gain : 0.5;
        double snr = s.peak() * wide * Math.sqrt(Math.PI) / Math.sqrt(b + s.peak() / 2 + read * read);
        return snr >= 6
                && s.peak() > 0.04 * b
                && Math.hypot(s.x() - centre.x(), s.y() - centre.y()) > 4 * wide + 2
                && !isStopped(s.x(), s.y(), wide);
    }

    GrayImage image(SyntheticPattern drawn, long seed) {
        float[] values = drawn.counted(seed, gain, bytes ? 0.4 : 1);
        Random random = new Random(seed);
        for (int i = 0; i < hot; i++) {
            values[random.nextInt(values.length)] = (float) (gain * look.peak() * (1 + random.nextDouble()));
        }
        for (int i = 0; i < dead; i++) {
            int row = random.nextInt(look.height());
            java.util.Arrays.fill(values, row * look.width(), (row + 1) * look.width(), 0);
        }
        if (bytes) {
            byte[] result = new byte[values.length];
            for (int i = 0; i < result.length; i++) {
                result[i] = (byte) Math.round(Math.max(0, Math.min(255, 3 + values[i])));
            }
            return GrayImage.ofUnsignedBytes(look.width(), look.height(), result);
        }
        short[] result = new short[values.length];
        for (int i = 0; i < result.length; i++) {
            result[i] = (short) Math.round(Math.max(0, Math.min(65535, 100 + values[i])));
        }
        return GrayImage.ofUnsignedShorts(look.width(), look.height(), result);
    }
}
