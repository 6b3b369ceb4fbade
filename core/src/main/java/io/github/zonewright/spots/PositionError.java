package io.github.zonewright.spots;

import io.github.zonewright.image.LevelMap;
import io.github.zonewright.image.PointFilter;
import java.util.Arrays;

/**
 * How well the position of a peak is known: the scatter of the response's slope over its curvature. For a Gaussian spot
 * in even noise this is √2 σ / (signal to noise), the Cramér–Rao bound. The spot's own counting noise is added, with a
 * gain read off the rise of the noise with the background, and a floor for the finite pixels.
 */
final class PositionError {

    /** Error that no intensity takes away, as a part of the width and in pixels. */
    private static final double FLOOR_OF_WIDTH = 0.003;

    private static final double FLOOR = 0.004;
    /**
     * Scatter of the response's slope over √½ of its own per spot width: the wide part of the filter takes more from the
     * response than from its slope (calculated).
     */
    private static final double SLOPE = 1.246;
    /** More of the same for a spot with a flat top. */
    private static final double SATURATED = 0.005;

    /** Response at the centre of a Gaussian spot over its height. */
    static final double RESPONSE_OF_HEIGHT = PointFilter.ofSigma(1).responsePerSum() * 2 * Math.PI;

    /** Σk³/(Σk²)^{3/2} of a Gaussian kernel, times σ: 2/(3√π). */
    private static final double SKEWNESS = 2 / (3 * Math.sqrt(Math.PI));

    private final double sigma;
    private final double noiseGain;
    private final double gain;

    PositionError(LevelMap level, LevelMap noise, double sigma) {
        this.sigma = sigma;
        this.noiseGain = PointFilter.ofSigma(sigma).noiseGain();
        this.gain = gain(level, noise);
    }

    /** Grey values per counted electron, from the variance of a pixel against the background level; 0 if not to be told. */
    private double gain(LevelMap level, LevelMap noise) {
        int count = level.columns() * level.rows();
        double[][] cells = new double[count][];
        for (int i = 0; i < count; i++) {
            double x = (i % level.columns() + 0.5) * level.cell();
            double y = (i / level.columns() + 0.5) * level.cell();
            double scatter = noise.at(x, y) / noiseGain;
            cells[i] = new double[] {level.level(i % level.columns(), i / level.columns()), scatter * scatter};
        }
        Arrays.sort(cells, (a, b) -> Double.compare(a[0], b[0]));
        int fifth = Math.max(1, count / 5);
        double low = median(cells, 0, fifth, 0);
        double high = median(cells, count - fifth, count, 0);
        double quiet = median(cells, 0, fifth, 1);
        double loud = median(cells, count - fifth, count, 1);
        return high > low && loud > quiet ? (loud - quiet) / (high - low) : 0;
    }

    private static double median(double[][] cells, int from, int to, int item) {
        double[] values =
                Arrays.stream(cells, from, to).mapToDouble(c -> c[item]).toArray();
        Arrays.sort(values);
        return values[values.length / 2];
    }

    /** Skewness that counting gives the response where its scatter is the given one; for Poisson counts. */
    double skewness(double responseNoise) {
        return SKEWNESS / sigma * gain * noiseGain / responseNoise;
    }

    /** Variance of a pixel where the response scatters as given, with the counting noise of what is above the background. */
    double pixelVariance(double responseNoise, double above) {
        double pixel = responseNoise / noiseGain;
        return pixel * pixel + gain * Math.max(0, above);
    }

    /** Error in pixels that no intensity takes away. */
    double floor() {
        return PeakSearch.root(FLOOR, FLOOR_OF_WIDTH * sigma);
    }

    /** Standard deviation of each coordinate in pixels. */
    double of(PeakSearch.Peak peak, boolean saturated, int width, int height) {
        double variance = pixelVariance(peak.noise(), 4.0 / 9 * peak.height() / RESPONSE_OF_HEIGHT);
        double scatter = Math.sqrt(variance) * noiseGain;
        double slope = scatter / (Math.sqrt(2) * sigma);
        double error = Math.min(SLOPE * slope / peak.curvature(), 2 * sigma);
        double floor = floor();
        if (saturated) {
            floor += SATURATED * sigma;
        }
        floor += Math.max(FrameEdge.error(peak.x(), width, sigma), FrameEdge.error(peak.y(), height, sigma));
        return PeakSearch.root(error, floor);
    }
}
