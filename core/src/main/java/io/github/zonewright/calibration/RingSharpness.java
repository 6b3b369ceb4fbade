package io.github.zonewright.calibration;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.Ellipse;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.PointFilter;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;

/**
 * Finds the shape about which the image, filtered for ridges, falls into the sharpest rings: the largest sum over the radius
 * of the squared mean times the number of pixels. Strong values are cut off, so that neither a beam nor the edge of a stop
 * outweighs the rings.
 */
final class RingSharpness {

    private static final int COARSE = 96;
    private static final int MIDDLE = 192;
    private static final int FINE = 384;
    private static final double SIGMA = 1.2;
    private static final double CUT = 4;
    private static final int FEWEST = 12;
    private static final int STARTS = 5;

    private final float[] ridges;
    private final int width;
    private final int height;
    private final int binning;

    private RingSharpness(GrayImage image, Mask excluded, int side) {
        this.binning = Math.max(1, (Math.max(image.width(), image.height()) + side - 1) / side);
        GrayImage small = image.binned(Math.min(binning, Math.min(image.width(), image.height())));
        this.width = small.width();
        this.height = small.height();
        float[] filtered = PointFilter.ofSigma(SIGMA).apply(levelled(small)).values();
        boolean[] out = new boolean[filtered.length];
        for (int i = 0; i < out.length; i++) {
            int x = (i % width * binning) + binning / 2;
            int y = (i / width * binning) + binning / 2;
            boolean margin = i % width < 3 || i / width < 3 || i % width >= width - 3 || i / width >= height - 3;
            out[i] = margin || excluded.contains(x, y) || Float.isNaN(filtered[i]);
        }
        float[] sizes = new float[filtered.length];
        int count = 0;
        for (int i = 0; i < out.length; i++) {
            if (!out[i]) {
                sizes[count++] = Math.abs(filtered[i]);
            }
        }
        Arrays.sort(sizes, 0, count);
        float limit = count == 0 ? 1 : (float) (CUT * sizes[count / 2] / 0.6745);
        for (int i = 0; i < out.length; i++) {
            filtered[i] = out[i] ? Float.NaN : Math.max(-limit, Math.min(limit, filtered[i]));
        }
        this.ridges = filtered;
    }

    /** Takes the mean away, since the filter counts what is beyond the frame as zero. */
    private static GrayImage levelled(GrayImage image) {
        float[] values = image.values();
        double sum = 0;
        int count = 0;
        for (float value : values) {
            if (value == value) {
                sum += value;
                count++;
            }
        }
        for (int i = 0; i < values.length; i++) {
            values[i] = values[i] == values[i] ? (float) (values[i] - sum / Math.max(1, count)) : 0;
        }
        return GrayImage.ofFloats(image.width(), image.height(), values);
    }

    /** The shape of an image's rings, good to a pixel or so. */
    static Ellipse search(GrayImage image, Mask excluded) {
        RingSharpness coarse = new RingSharpness(image, excluded, COARSE);
        RingSharpness middle = new RingSharpness(image, excluded, MIDDLE);
        Ellipse best = coarse.centres().stream()
                .map(start -> middle.climb(start, 2 * coarse.binning, 0.01))
                .max(Comparator.comparingDouble(middle::of))
                .orElseThrow();
        return new RingSharpness(image, excluded, FINE).climb(best, middle.binning, 0.004);
    }

    /** The shape near a known centre. */
    static Ellipse searchNear(GrayImage image, Mask excluded, PixelPoint centre) {
        RingSharpness middle = new RingSharpness(image, excluded, MIDDLE);
        Ellipse start = middle.climb(Ellipse.circle(centre), middle.binning, 0.01);
        return new RingSharpness(image, excluded, FINE).climb(start, middle.binning, 0.004);
    }

    private List<Ellipse> centres() {
        record Trial(Ellipse shape, double merit) {}
        List<Trial> trials = new ArrayList<>();
        for (double y = -0.2 * height; y < 1.2 * height; y += 2) {
            for (double x = -0.2 * width; x < 1.2 * width; x += 2) {
                Ellipse shape = Ellipse.circle(new PixelPoint(x * binning, y * binning));
                trials.add(new Trial(shape, of(shape)));
            }
        }
        trials.sort(Comparator.comparingDouble(Trial::merit).reversed());
        List<Ellipse> starts = new ArrayList<>();
        for (Trial trial : trials) {
            PixelPoint centre = trial.shape.centre();
            if (starts.stream().allMatch(s -> s.centre().distanceTo(centre) > 6.0 * binning)) {
                starts.add(trial.shape);
                if (starts.size() == STARTS) {
                    break;
                }
            }
        }
        return starts;
    }

    /** Steps along each of centre x, y and the two strains while that sharpens the rings, with ever smaller steps. */
    private Ellipse climb(Ellipse start, double shift, double strain) {
        double[] at = {start.centre().x(), start.centre().y(), start.along(), start.diagonal()};
        double[] step = {shift, shift, strain, strain};
        double best = of(start);
        for (int round = 0; round < 40 && step[0] > 0.1 * binning; round++) {
            boolean moved = false;
            for (int k = 0; k < 4; k++) {
                for (int sign = -1; sign <= 1; sign += 2) {
                    double[] trial = at.clone();
                    trial[k] += sign * step[k];
                    double merit = Math.hypot(trial[2], trial[3]) > 0.1 ? 0 : of(shape(trial));
                    if (merit > best) {
                        best = merit;
                        at = trial;
                        moved = true;
                        break;
                    }
                }
            }
            if (!moved) {
                for (int k = 0; k < 4; k++) {
                    step[k] /= 2;
                }
            }
        }
        return shape(at);
    }

    private static Ellipse shape(double[] p) {
        return Ellipse.ofStrain(new PixelPoint(p[0], p[1]), p[2], p[3]);
    }

    private double of(Ellipse shape) {
        double[] sums = new double[2 * (width + height)];
        int[] counts = new int[sums.length];
        Vector2 origin = shape.undistorted(0.5 * binning, 0.5 * binning);
        Vector2 right = shape.undistorted(1.5 * binning, 0.5 * binning).minus(origin);
        Vector2 down = shape.undistorted(0.5 * binning, 1.5 * binning).minus(origin);
        for (int row = 0; row < height; row++) {
            double x = origin.x() + row * down.x();
            double y = origin.y() + row * down.y();
            for (int column = 0; column < width; column++) {
                float value = ridges[row * width + column];
                if (value == value) {
                    int bin = (int) (Math.sqrt(x * x + y * y) / binning);
                    if (bin < sums.length) {
                        sums[bin] += value;
                        counts[bin]++;
                    }
                }
                x += right.x();
                y += right.y();
            }
        }
        double merit = 0;
        for (int i = 0; i < sums.length; i++) {
            if (counts[i] >= FEWEST) {
                merit += sums[i] * sums[i] / counts[i];
            }
        }
        return merit;
    }
}
